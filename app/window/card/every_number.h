#pragma once
// Every number behind one pole's decision: the cash lines of each option, from which its cost can be rebuilt
// by hand.

#include <QDialog>

#include "app/window/desk.h"

namespace unstring {

class EveryNumber : public QDialog {
    Q_OBJECT
public:
    EveryNumber(const Desk& desk, PoleIx pole, QWidget* parent = nullptr);
};

} // namespace unstring
