#pragma once
// One step of the step line: its knot, its word, its state; the thread to the next one.

#include <QAbstractButton>

#include "app/window/desk.h"

namespace unstring {

class StepKnot : public QAbstractButton {
    Q_OBJECT
public:
    StepKnot(Desk& desk, Step step, QWidget* parent = nullptr);
    [[nodiscard]] QSize sizeHint() const override;
    [[nodiscard]] Step step() const { return step_; }
    [[nodiscard]] StepStanding standing() const;
    [[nodiscard]] QString state_text() const;
    void refresh();

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    void paint_knot(QPainter& painter, QPointF at);
    void paint_thread(QPainter& painter, double from);

    Desk& desk_;
    Step step_;
};

} // namespace unstring
