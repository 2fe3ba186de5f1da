#pragma once
// Keep, rewire, solar side by side: what each costs, what makes up the cost, what stops it.

#include <QGridLayout>
#include <QLabel>
#include <QWidget>

#include <array>
#include <vector>

#include "app/window/desk.h"

namespace unstring {

/// One line of a cost's build-up: cash lines of one name together, at present value.
struct CostPart {
    QString what;
    double present_value = 0;
};
/// Largest first; everything after `at_most - 1` parts together as "other".
[[nodiscard]] std::vector<CostPart> cost_parts(const OptionCost& option, std::size_t at_most);

class OptionColumns : public QWidget {
    Q_OBJECT
public:
    explicit OptionColumns(Desk& desk, QWidget* parent = nullptr);
    /// null = decide has not run for this pole
    void set_decision(const PoleDecision* decision, Choice chosen);

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    struct Column {
        QLabel *name, *cost, *parts, *stopped;
    };
    std::array<Column, 3> columns_{};
    Desk& desk_;
    Choice chosen_ = Choice::undecided;
};

} // namespace unstring
