#pragma once
// The six steps as words along one line, and the undo word and the plan's name at its right.

#include <QLabel>
#include <QPushButton>
#include <QWidget>

#include <array>

#include "app/window/stepline/step_knot.h"

namespace unstring {

class StepLine : public QWidget {
    Q_OBJECT
public:
    explicit StepLine(Desk& desk, QWidget* parent = nullptr);
    /// The first step that is not up to date, hand_out when all are.
    [[nodiscard]] Step next_step() const;

Q_SIGNALS:
    void step_clicked(unstring::Step step);
    void run_wanted(unstring::Step step);
    void findings_wanted();
    void night_wanted();

private:
    void refresh();
    void show_menu(Step step, QPoint at);

    Desk& desk_;
    std::array<StepKnot*, 6> knots_{};
    QPushButton* run_ = nullptr;
    QPushButton* cancel_ = nullptr;
    QPushButton* undo_ = nullptr;
    QPushButton* redo_ = nullptr;
    QPushButton* night_ = nullptr;
    QLabel* plan_ = nullptr;
};

} // namespace unstring
