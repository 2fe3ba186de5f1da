#include "app/window/card/string_card.h"

#include <QHeaderView>
#include <QVBoxLayout>

#include <algorithm>

#include "app/window/look/words.h"

namespace unstring {
namespace {

QString unit_text(const City& city, TransformerIx unit) {
    if (!unit.is_valid()) return QObject::tr("none");
    const Transformer& record = city.transformers[unit.place()];
    return QObject::tr("%1, %2 kW")
        .arg(to_q(record.id), number_text(record.rated_kw, record.rated_kw < 10 ? 1 : 0));
}

} // namespace

StringCard::StringCard(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("string_card");
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(20, 14, 12, 12);
    column->setSpacing(8);
    const auto label = [&](double size, Weight weight, const char* name) {
        auto* made = new QLabel(this);
        made->setFont(text_font(size, weight));
        made->setWordWrap(true);
        made->setObjectName(QLatin1String(name));
        made->setTextInteractionFlags(Qt::TextSelectableByMouse);
        column->addWidget(made);
        return made;
    };
    name_ = label(20, Weight::bold, "string_name");
    record_ = label(12.5, Weight::normal, "string_record");
    sentence_ = label(13, Weight::strong, "string_sentence");
    states_ = new QTableWidget(0, 7, this);
    states_->setObjectName("string_states");
    states_->setAccessibleName(tr("State of the string at the end of each year"));
    states_->setHorizontalHeaderLabels(
        {tr("year"), tr("lamps"), tr("kV"), tr("kVA"), tr("cable m"), tr("transformer"), tr("load")});
    states_->verticalHeader()->hide();
    states_->setShowGrid(false);
    states_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    states_->setSelectionBehavior(QAbstractItemView::SelectRows);
    states_->setSelectionMode(QAbstractItemView::SingleSelection);
    states_->setWordWrap(true);
    states_->setHorizontalScrollMode(QAbstractItemView::ScrollPerPixel);
    states_->horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
    states_->horizontalHeader()->setStretchLastSection(true);
    states_->setFont(text_font(12));
    states_->horizontalHeader()->setFont(text_font(11));
    column->addWidget(states_, 1);
    moves_ = label(12, Weight::normal, "string_moves");
    connect(states_, &QTableWidget::cellClicked, this,
            [this](int row, int) { desk_.set_year(states_->item(row, 0)->data(Qt::UserRole).toInt()); });
    for (const auto signal : {&Desk::view_changed, &Desk::selection_changed, &Desk::look_changed,
                              &Desk::preview_changed, &Desk::year_changed})
        connect(&desk_, signal, this, &StringCard::refresh);
    refresh();
}

void StringCard::refresh() {
    const StringIx string = desk_.is_open() ? desk_.chosen_string() : StringIx{};
    states_->setVisible(string.is_valid());
    if (!string.is_valid()) {
        name_->setText(tr("No string chosen"));
        record_->setText(tr("Click a row of the rail, or a lamp on a string."));
        sentence_->clear(), moves_->clear();
        return;
    }
    name_->setText(tr("String %1").arg(to_q(desk_.view().city.strings[string.place()].id)));
    record_->setText(record_text(string));
    const StringYear* state = string_year(desk_.phase(), string, desk_.year());
    sentence_->setText(state != nullptr ? string_sentence(desk_.view(), *state)
                                        : tr("No state yet: run vet, then phase."));
    fill_states(string);
    moves_->setText(unit_moves(string));
}

QString StringCard::record_text(StringIx string) const {
    const SeriesString& record = desk_.view().city.strings[string.place()];
    const StringLoop& loop = desk_.scene().loops[string.place()];
    QStringList parts;
    parts << count_text(long(loop.lamps.size()), tr("lamp"), tr("lamps"));
    parts << (record.current_a ? tr("%1 A").arg(number_text(*record.current_a, 1))
                               : tr("current not known, 6.6 A taken"));
    if (record.cable_awg) parts << tr("cable %1 AWG").arg(*record.cable_awg);
    if (record.cable_kv) parts << tr("%1 kV class").arg(number_text(*record.cable_kv, 1));
    parts << (loop.order_from == OrderFrom::given
                  ? tr("wiring order given")
                  : tr("wiring order %1, %2 sure")
                        .arg(to_q(text_of(loop.order_from)), percent_text(loop.order_confidence_frac)));
    const long confirmed = std::count_if(loop.cutbacks.begin(), loop.cutbacks.end(),
                                         [](const LoopCutBack& cut) { return cut.confirmed; });
    parts << tr("%1, %2 confirmed")
                 .arg(count_text(long(loop.cutbacks.size()), tr("cut-back"), tr("cut-backs")))
                 .arg(confirmed);
    if (!record.control_from.empty()) parts << tr("switched by %1").arg(to_q(record.control_from));
    if (record.asfound_v)
        parts << tr("measured %1 kV %2")
                     .arg(number_text(*record.asfound_v / 1000, 2), to_q(record.asfound_date));
    return parts.join(QStringLiteral(" \u00b7 "));
}

void StringCard::fill_states(StringIx string) {
    states_->setRowCount(0);
    if (desk_.phase() == nullptr) return;
    const Look& look = desk_.look();
    for (const StringYear& state : desk_.phase()->string_years) {
        if (state.string != string) continue;
        const int row = states_->rowCount();
        states_->insertRow(row);
        const bool is_bad = state.lamps > 0 && is_trouble(state.verdict);
        const bool is_today = state.year < desk_.plan().settings.first_year;
        const QStringList cells{
            is_today ? tr("today") : QString::number(state.year),
            QString::number(state.lamps),
            number_text(state.volts / 1000, 2),
            number_text(state.load_kva, 1),
            number_text(state.cable_m),
            state.lamps == 0 ? QStringLiteral("\u2013") : unit_text(desk_.view().city, state.transformer),
            state.lamps == 0
                ? verdict_word(Verdict::none)
                : tr("%1, %2").arg(percent_text(state.loading_frac), verdict_word(state.verdict))};
        for (int column = 0; column < cells.size(); ++column) {
            auto* item = new QTableWidgetItem(cells[column]);
            item->setTextAlignment((column >= 1 && column <= 4 ? Qt::AlignRight : Qt::AlignLeft) |
                                   Qt::AlignVCenter);
            item->setData(Qt::UserRole, state.year);
            item->setToolTip(string_sentence(desk_.view(), state));
            if (is_bad) item->setForeground(look.trouble), item->setFont(text_font(12, Weight::bold));
            if (state.year == desk_.year()) item->setBackground(look.band);
            states_->setItem(row, column, item);
        }
    }
    states_->resizeRowsToContents();
}

QString StringCard::unit_moves(StringIx string) const {
    if (desk_.phase() == nullptr) return {};
    const std::string& id = desk_.view().city.strings[string.place()].id;
    QStringList lines;
    for (const UnitMove& move : desk_.phase()->moves)
        if (move.from == id || move.to == id)
            lines << tr("%1: transformer %2 from %3 to %4")
                         .arg(move.year)
                         .arg(move.transformer.is_valid()
                                  ? to_q(desk_.view().city.transformers[move.transformer.place()].id)
                                  : tr("new"),
                              to_q(move.from), to_q(move.to));
    return lines.join('\n');
}

} // namespace unstring
