#pragma once
// Asks where the work orders go, of which year and crew, on which paper.

#include <QComboBox>
#include <QDialog>
#include <QLineEdit>

#include "app/steps/open_project.h"

namespace unstring {

class HandOutDialog : public QDialog {
    Q_OBJECT
public:
    HandOutDialog(const ProjectView& view, QWidget* parent = nullptr);
    [[nodiscard]] HandOutOptions options() const;

private:
    QLineEdit* folder_;
    QComboBox *year_, *crew_, *paper_;
};

} // namespace unstring
