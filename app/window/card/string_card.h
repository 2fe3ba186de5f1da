#pragma once
// The card of a string: its record, and its state at the end of each year.

#include <QLabel>
#include <QScrollArea>
#include <QTableWidget>

#include "app/window/desk.h"

namespace unstring {

class StringCard : public QWidget {
    Q_OBJECT
public:
    explicit StringCard(Desk& desk, QWidget* parent = nullptr);

private:
    void refresh();
    void fill_states(StringIx string);
    [[nodiscard]] QString record_text(StringIx string) const;
    [[nodiscard]] QString unit_moves(StringIx string) const;

    Desk& desk_;
    QLabel *name_, *record_, *sentence_, *moves_;
    QTableWidget* states_;
};

} // namespace unstring
