#pragma once
// The findings, by code: each one click from its place on the map, with its remedy.

#include <QComboBox>
#include <QLabel>
#include <QPushButton>
#include <QTreeWidget>
#include <QWidget>

#include "app/window/desk.h"

namespace unstring {

class FindingsList : public QWidget {
    Q_OBJECT
public:
    explicit FindingsList(Desk& desk, QWidget* parent = nullptr);

private:
    void refresh();
    void show_finding(QTreeWidgetItem* item);

    Desk& desk_;
    QLabel *count_, *detail_;
    QComboBox* filter_;
    QTreeWidget* list_;
    QPushButton* set_aside_;
    std::vector<Finding> findings_;
};

/// The findings of the steps as each last ran, and those of phase as the plan stands.
[[nodiscard]] std::vector<Finding> all_findings(const ProjectView& view, const PhaseResult* phase);

} // namespace unstring
