#pragma once
// The last word of the program: what was done, or what could not be and why. Trouble stays until it is
// dismissed.

#include <QLabel>
#include <QTimer>

#include "app/window/desk.h"

namespace unstring {

class Notice : public QLabel {
    Q_OBJECT
public:
    Notice(Desk& desk, QWidget* over);
    void show_words(const QString& words, bool is_trouble);

protected:
    void mousePressEvent(QMouseEvent* event) override;
    bool eventFilter(QObject* watched, QEvent* event) override;

private:
    void place();
    void take_look();
    Desk& desk_;
    QTimer timer_;
    bool is_trouble_ = false;
};

} // namespace unstring
