#include "app/window/card/pole_card.h"

#include <QHBoxLayout>
#include <QSignalBlocker>
#include <QVBoxLayout>

#include <algorithm>
#include <map>

#include "app/window/look/words.h"

namespace unstring {

PoleCard::PoleCard(Desk& desk, QWidget* parent) : QScrollArea(parent), desk_(desk) {
    setObjectName("pole_card");
    setWidgetResizable(true);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    auto* inside = new QWidget(this);
    auto* column = new QVBoxLayout(inside);
    column->setContentsMargins(20, 14, 20, 16);
    column->setSpacing(8);
    name_ = label(20, Weight::bold, "card_name");
    place_ = label(12.5, Weight::normal, "card_place");
    what_ = label(12.5, Weight::normal, "card_what");
    findings_ = label(12, Weight::bold, "card_findings");
    options_ = new OptionColumns(desk_, inside);
    value_note_ = label(11, Weight::normal, "card_value_note");
    refused_ = label(12, Weight::bold, "card_refused");
    why_head_ = label(12.5, Weight::bold, "card_why_head");
    why_ = label(12.5, Weight::normal, "card_why");
    every_number_ = new QPushButton(tr("Every number"), inside);
    every_number_->setObjectName("every_number");
    every_number_->setFlat(true);
    keys_ = new QWidget(inside);
    keys_->setObjectName("card_keys");
    build_keys(keys_);
    orders_ = label(12, Weight::normal, "card_orders");
    months_ = new MonthChart(desk_, inside);
    sky_ = new SkyPlot(desk_, inside);
    numbers_ = label(12, Weight::normal, "card_numbers");
    history_ = label(12, Weight::normal, "card_history");
    all_history_ = new QPushButton(tr("the whole history"), inside);
    all_history_->setObjectName("all_history");
    all_history_->setFlat(true);
    for (QWidget* part : std::initializer_list<QWidget*>{
             name_, place_, what_, findings_, options_, value_note_, refused_, why_head_, why_, every_number_,
             keys_, orders_, months_, sky_, numbers_, history_, all_history_})
        column->addWidget(part, 0,
                          part == every_number_ || part == all_history_ ? Qt::AlignLeft : Qt::Alignment());
    column->addStretch(1);
    setWidget(inside);
    connect(every_number_, &QPushButton::clicked, this, [this] { Q_EMIT every_number_wanted(pole_); });
    connect(all_history_, &QPushButton::clicked, this, [this] { Q_EMIT all_history_wanted(); });
    for (const auto signal :
         {&Desk::view_changed, &Desk::selection_changed, &Desk::look_changed, &Desk::step_changed})
        connect(&desk_, signal, this, &PoleCard::refresh);
    refresh();
}

QLabel* PoleCard::label(double size, Weight weight, const char* name) {
    auto* made = new QLabel(this);
    made->setFont(text_font(size, weight));
    made->setWordWrap(true);
    made->setObjectName(QLatin1String(name));
    made->setTextInteractionFlags(Qt::TextSelectableByMouse);
    return made;
}

void PoleCard::build_keys(QWidget* parent) {
    auto* rows = new QVBoxLayout(parent);
    rows->setContentsMargins(0, 2, 0, 2);
    rows->setSpacing(6);
    auto* marks = new QHBoxLayout;
    marks->setSpacing(6);
    const auto key = [&](const QString& text, const char* name, const QString& tip, bool is_checkable) {
        auto* button = new QPushButton(text, parent);
        button->setObjectName(QLatin1String(name));
        button->setProperty("key", true);
        button->setCheckable(is_checkable);
        button->setToolTip(tip);
        return button;
    };
    keep_ = key(tr("K keep"), "mark_keep", tr("Mark as a wish of the staff: keep (key K)"), true);
    rewire_ = key(tr("R rewire"), "mark_rewire", tr("Mark as a wish of the staff: rewire (key R)"), true);
    solar_ = key(tr("S solar"), "mark_solar", tr("Mark as a wish of the staff: solar (key S)"), true);
    lock_ = key(tr("L lock"), "lock_choice",
                tr("Lock the mark, or else the choice of the plan (key L): decide follows it"), true);
    clear_ = key(tr("U clear"), "clear_marks", tr("Clear mark and lock (key U)"), false);
    for (QPushButton* button : {keep_, rewire_, solar_}) marks->addWidget(button);
    marks->addStretch(1);
    rows->addLayout(marks);
    auto* orders = new QHBoxLayout;
    orders->setSpacing(6);
    year_lock_ =
        key(tr("lock year"), "lock_year", tr("A locked year stays where it is, in drags and in phase"), true);
    for (QPushButton* button : {lock_, clear_, year_lock_}) orders->addWidget(button);
    orders->addStretch(1);
    rows->addLayout(orders);
    auto* years = new QHBoxLayout;
    years->setSpacing(6);
    auto* word = new QLabel(tr("work year"), parent);
    word->setFont(text_font(12));
    year_ = new QSpinBox(parent);
    year_->setObjectName("work_year");
    year_->setKeyboardTracking(false);
    year_->setButtonSymbols(QAbstractSpinBox::NoButtons);
    year_->setAlignment(Qt::AlignCenter);
    earlier_ = key(tr("earlier"), "year_earlier", tr("A year earlier"), false);
    later_ = key(tr("later"), "year_later", tr("A year later"), false);
    year_->setToolTip(tr("The year of this pole's work. A change by hand is kept by phase."));
    years->addWidget(word);
    years->addWidget(earlier_);
    years->addWidget(year_);
    years->addWidget(later_);
    years->addStretch(1);
    rows->addLayout(years);
    connect(keep_, &QPushButton::clicked, this, [this] { desk_.mark(Choice::keep); });
    connect(rewire_, &QPushButton::clicked, this, [this] { desk_.mark(Choice::rewire); });
    connect(solar_, &QPushButton::clicked, this, [this] { desk_.mark(Choice::solar); });
    connect(lock_, &QPushButton::clicked, this, [this] { desk_.lock(); });
    connect(clear_, &QPushButton::clicked, this, [this] { desk_.clear_marks(); });
    connect(earlier_, &QPushButton::clicked, this, [this] { year_->setValue(year_->value() - 1); });
    connect(later_, &QPushButton::clicked, this, [this] { year_->setValue(year_->value() + 1); });
    connect(year_lock_, &QPushButton::clicked, this, [this] { desk_.toggle_year_lock(); });
    connect(year_, &QSpinBox::valueChanged, this, [this](int year) {
        if (year >= desk_.plan().settings.first_year) desk_.set_work_year(year);
    });
}

void PoleCard::refresh() {
    const std::size_t chosen = desk_.is_open() ? desk_.selection().size() : 0;
    pole_ = chosen == 1 ? desk_.selection().front() : PoleIx{};
    for (QWidget* part : std::initializer_list<QWidget*>{options_, value_note_, refused_, why_head_, why_,
                                                         every_number_, keys_, orders_, months_, sky_,
                                                         numbers_, history_, all_history_, findings_})
        part->setVisible(false);
    if (chosen == 0) return show_none();
    const bool may_edit = !desk_.view().is_read_only && !desk_.is_running();
    keys_->setEnabled(may_edit);
    if (chosen == 1)
        show_pole();
    else
        show_several();
}

void PoleCard::show_none() {
    name_->setText(tr("No pole chosen"));
    place_->setText(tr("Click a pole on the map or a bead on the rail. Shift and drag draws an outline round "
                       "several. The arrow keys walk along a string."));
    what_->setText({});
}

void PoleCard::show_several() {
    std::map<QString, int> kinds;
    int lamps = 0;
    for (const PoleIx pole : desk_.selection()) {
        if (!is_candidate(desk_.view().city, desk_.view().city.poles[pole.place()])) continue;
        ++lamps;
        ++kinds[choice_word(desk_.plan().poles[pole.place()].choice)];
    }
    name_->setText(count_text(long(desk_.selection().size()), tr("pole"), tr("poles")));
    place_->setText(tr("%1 on series strings in the plan. K, R, S, L, U and the work year act on all of "
                       "them, as one edit.")
                        .arg(count_text(lamps, tr("lamp"), tr("lamps"))));
    QStringList words;
    for (const auto& [kind, count] : kinds) words << QStringLiteral("%1 %2").arg(count).arg(kind);
    what_->setText(words.join(", "));
    keys_->setVisible(lamps > 0);
    for (QPushButton* button : {keep_, rewire_, solar_, lock_, year_lock_}) button->setChecked(false);
    for (QWidget* part : std::initializer_list<QWidget*>{year_, earlier_, later_}) part->setEnabled(true);
    const QSignalBlocker quiet(year_);
    year_->setRange(desk_.plan().settings.first_year - 1, desk_.plan().last_year());
    year_->setSpecialValueText(tr("as it is"));
    year_->setValue(year_->minimum());
}

QString PoleCard::what_it_is(const Pole& pole) const {
    QStringList parts;
    if (!pole.street.empty())
        parts << to_q(pole.street) + (pole.side.empty() ? QString() : tr(", %1 side").arg(to_q(pole.side)));
    if (!pole.ward.empty()) parts << tr("ward %1").arg(to_q(pole.ward));
    QString body = pole.pole_kind.empty() ? tr("pole kind not known") : to_q(pole.pole_kind);
    if (pole.mount_m) body += tr(" %1 m").arg(number_text(*pole.mount_m, 1));
    if (pole.arm_m) body += tr(", arm %1 m").arg(number_text(*pole.arm_m, 1));
    parts << body;
    parts << (pole.fixture.empty() ? tr("lamp not known") : to_q(pole.fixture)) +
                 (pole.lamp_w ? tr(" (%1 W)").arg(number_text(*pole.lamp_w)) : QString());
    if (pole.feed != Feed::unknown)
        parts << to_q(text_of(pole.feed)) + (pole.feed == Feed::underground
                                                 ? tr(", duct %1").arg(to_q(text_of(pole.duct)))
                                                 : QString());
    if (pole.need_lm) parts << tr("needs %1 lm").arg(number_text(*pole.need_lm));
    if (pole.critical) parts << tr("critical");
    if (!pole.attachments.empty()) parts << tr("carries %1").arg(to_q(pole.attachments));
    if (pole.owner != Owner::city) parts << tr("owner: %1").arg(to_q(text_of(pole.owner)));
    if (!pole.note.empty()) parts << to_q(pole.note);
    return parts.join(QStringLiteral(" \u00b7 "));
}

void PoleCard::show_pole() {
    const ProjectView& view = desk_.view();
    const Pole& pole = view.city.poles[pole_.place()];
    const PolePlan& row = view.plan.poles[pole_.place()];
    name_->setText(tr("Pole %1").arg(to_q(pole.id)));
    place_->setText(lamp_text(view, pole_) + (row.year != 0 ? tr(", work in %1").arg(row.year) : QString()));
    what_->setText(what_it_is(pole));
    QStringList own;
    for (const Finding& finding : view.findings)
        if (finding.record == pole.id && finding.severity != Severity::notice) own << finding_text(finding);
    findings_->setText(own.join('\n'));
    findings_->setStyleSheet(QStringLiteral("color:%1").arg(desk_.look().trouble.name()));
    findings_->setVisible(!own.isEmpty());
    show_history();
    if (!is_candidate(view.city, pole)) {
        why_->setText(pole.status != PoleStatus::standing
                          ? tr("Status %1: it is shown and counted, and nothing is decided for it.")
                                .arg(to_q(text_of(pole.status)))
                      : pole.set_aside
                          ? tr("Set aside because of its findings: it is in no plan until they are mended.")
                          : tr("Not on a series string: there is nothing to decide."));
        why_->setVisible(true);
        return;
    }
    const PoleDecision* decision = view.decide ? view.decide->find(pole_) : nullptr;
    const PoleShade* shade = view.shade ? view.shade->find(pole_) : nullptr;
    options_->set_decision(decision, row.choice);
    options_->setVisible(true);
    value_note_->setText(decision == nullptr
                             ? tr("No costs yet: run decide.")
                             : tr("Present value over %1 years at %2 %, work in %3, before phasing.")
                                   .arg(view.plan.settings.horizon_years)
                                   .arg(number_text(100 * view.plan.settings.rate, 1))
                                   .arg(view.plan.decide_year()));
    value_note_->setVisible(true);
    why_head_->setText(row.choice == Choice::undecided ? tr("Not decided")
                                                       : tr("Why %1").arg(choice_word(row.choice)));
    why_->setText(decision != nullptr ? to_q(decision->reason) : tr("Nothing is decided for this pole yet."));
    why_head_->setVisible(true), why_->setVisible(true);
    every_number_->setVisible(decision != nullptr);
    const auto refused =
        view.decide ? std::find_if(view.decide->marks_refused.begin(), view.decide->marks_refused.end(),
                                   [this](const auto& r) { return r.pole == pole_; })
                    : std::vector<DecideResult::Refused>::const_iterator{};
    const bool is_refused = view.decide && refused != view.decide->marks_refused.end();
    if (is_refused) refused_->setText(tr("Mark not followed: %1").arg(to_q(refused->reason)));
    refused_->setStyleSheet(QStringLiteral("color:%1").arg(desk_.look().trouble.name()));
    refused_->setVisible(is_refused);
    show_keys(row);
    show_solar(shade);
    numbers_->setText(numbers_html(decision, shade));
    numbers_->setVisible(!numbers_->text().isEmpty());
}

void PoleCard::show_keys(const PolePlan& row) {
    keep_->setChecked(row.mark == Choice::keep);
    rewire_->setChecked(row.mark == Choice::rewire);
    solar_->setChecked(row.mark == Choice::solar);
    lock_->setChecked(row.lock != Choice::undecided);
    year_lock_->setChecked(row.year_locked);
    const QSignalBlocker quiet(year_);
    year_->setRange(desk_.plan().settings.first_year - 1, desk_.plan().last_year());
    year_->setSpecialValueText(tr("none"));
    year_->setValue(row.year == 0 ? year_->minimum() : row.year);
    for (QWidget* part : std::initializer_list<QWidget*>{year_, earlier_, later_})
        part->setEnabled((row.choice == Choice::rewire || row.choice == Choice::solar) && !row.year_locked);
    keys_->setVisible(true);
    orders_->setText(orders_text(row));
    orders_->setVisible(!orders_->text().isEmpty());
}

QString PoleCard::orders_text(const PolePlan& row) const {
    QStringList words;
    if (row.mark != Choice::undecided)
        words << tr("marked %1%2")
                     .arg(choice_word(row.mark),
                          row.who.empty() ? QString() : tr(" by %1").arg(to_q(row.who)));
    if (row.lock != Choice::undecided) words << tr("locked to %1").arg(choice_word(row.lock));
    if (row.year_by == YearBy::hand) words << tr("year set by hand");
    if (row.year_locked) words << tr("year locked");
    if (!row.note.empty()) words << to_q(row.note);
    return words.join(", ");
}

void PoleCard::show_solar(const PoleShade* shade) {
    if (shade == nullptr) return;
    const HeadAnswer* best = shade->best >= 0 && std::size_t(shade->best) < shade->heads.size()
                                 ? &shade->heads[std::size_t(shade->best)]
                                 : nullptr;
    months_->set_answer(best);
    months_->setVisible(best != nullptr);
    sky_->set_pole(pole_);
    sky_->setVisible(!shade->canopy_deg.empty() || !shade->solid_deg.empty());
}

} // namespace unstring
