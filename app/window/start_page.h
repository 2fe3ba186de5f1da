#pragma once
// What stands in the window when no project is open.

#include <QPushButton>
#include <QWidget>

#include "app/window/look/look.h"

namespace unstring {

class StartPage : public QWidget {
    Q_OBJECT
public:
    explicit StartPage(QWidget* parent = nullptr);
    void set_look(const Look& look);

Q_SIGNALS:
    void open_wanted();
    void gather_wanted();

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    const Look* look_;
};

} // namespace unstring
