#pragma once
// Twelve months of a solar head: what the panel gives against what the lamp asks.

#include <QWidget>

#include <array>

#include "app/window/desk.h"

namespace unstring {

class MonthChart : public QWidget {
    Q_OBJECT
public:
    explicit MonthChart(Desk& desk, QWidget* parent = nullptr);
    void set_answer(const HeadAnswer* answer);
    [[nodiscard]] QSize sizeHint() const override { return {340, 164}; }

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    Desk& desk_;
    bool has_answer_ = false;
    QString head_;
    std::array<double, 12> supply_{}, demand_{};
};

} // namespace unstring
