#pragma once
// Every edit of the project, newest first; or those of the chosen pole.

#include <QCheckBox>
#include <QListWidget>
#include <QWidget>

#include "app/window/desk.h"

namespace unstring {

class HistoryList : public QWidget {
    Q_OBJECT
public:
    explicit HistoryList(Desk& desk, QWidget* parent = nullptr);

protected:
    void showEvent(QShowEvent* event) override;

private:
    void refresh();

    Desk& desk_;
    QCheckBox* of_pole_;
    QListWidget* list_;
};

} // namespace unstring
