#pragma once
// The card of a pole: what it is, the three options with cost and what stops each, a year of energy, the sky,
// the reason, marks and locks, and its history.

#include <QLabel>
#include <QPushButton>
#include <QScrollArea>
#include <QSpinBox>

#include <array>

#include "app/window/card/month_chart.h"
#include "app/window/card/option_columns.h"
#include "app/window/card/sky_plot.h"

namespace unstring {

class PoleCard : public QScrollArea {
    Q_OBJECT
public:
    explicit PoleCard(Desk& desk, QWidget* parent = nullptr);
    [[nodiscard]] PoleIx pole() const { return pole_; }

Q_SIGNALS:
    void every_number_wanted(unstring::PoleIx pole);
    void all_history_wanted();

private:
    QLabel* label(double size, Weight weight, const char* name);
    void build_keys(QWidget* parent);
    void refresh();
    void show_pole();
    void show_several();
    void show_none();
    void show_keys(const PolePlan& row);
    void show_solar(const PoleShade* shade);
    void show_history();
    [[nodiscard]] QString what_it_is(const Pole& pole) const;
    [[nodiscard]] QString numbers_html(const PoleDecision* decision, const PoleShade* shade) const;
    [[nodiscard]] QString orders_text(const PolePlan& row) const;

    Desk& desk_;
    PoleIx pole_;
    QLabel *name_, *place_, *what_, *value_note_, *why_, *why_head_, *refused_, *numbers_, *orders_,
        *history_, *findings_;
    OptionColumns* options_;
    MonthChart* months_;
    SkyPlot* sky_;
    QWidget* keys_;
    QPushButton *keep_, *rewire_, *solar_, *lock_, *clear_, *year_lock_, *every_number_, *all_history_,
        *earlier_, *later_;
    QSpinBox* year_;
};

} // namespace unstring
