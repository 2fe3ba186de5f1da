#include <algorithm>
#include <cmath>
#include <functional>

#include "app/window/ledger/ledger_view.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

using CellOf = std::function<LedgerCell(const PhaseYear&)>;

LedgerCell limited(double value, const std::optional<double>& limit, const QString& unit,
                   const std::function<QString(double)>& text) {
    LedgerCell cell;
    cell.number = text(value);
    if (!limit) return cell;
    cell.of = QObject::tr(" of %1").arg(text(*limit));
    cell.used_frac = *limit > 0 ? value / *limit : value > 0 ? 2.0 : 0.0;
    cell.is_over = value > *limit + 0.5e-2;
    cell.tip = QObject::tr("%1%2 of %3%2").arg(text(value), unit, text(*limit));
    if (cell.is_over) {
        cell.number = QObject::tr("%1%2 over").arg(text(value - *limit), unit);
        cell.of.clear();
    }
    return cell;
}

LedgerRow row_of(const QString& label, const PhaseResult* phase, const YearColumns& columns,
                 const CellOf& cell_of) {
    LedgerRow row{label, std::vector<LedgerCell>(std::size_t(columns.count))};
    if (phase == nullptr) return row;
    for (const PhaseYear& year : phase->years) {
        const int place = year.year - columns.first_year;
        if (place >= 0 && place < columns.count) row.cells[std::size_t(place)] = cell_of(year);
    }
    return row;
}

LedgerCell spares_cell(const PhaseYear& year) {
    int count = 0;
    double worst = 1;
    QString tip;
    for (const SpareCover& spare : year.spares) {
        count += spare.count;
        worst = std::min(worst, spare.cover_frac);
        tip += QObject::tr("%1 x %2 kW, %3 A, primary %4 V: covers %5\n")
                   .arg(spare.count)
                   .arg(number_text(spare.rated_kw, 1), number_text(spare.output_a, 1),
                        number_text(spare.primary_v), percent_text(spare.cover_frac));
    }
    LedgerCell cell;
    cell.number = number_text(count);
    if (!year.spares.empty()) cell.of = QObject::tr(", cover %1").arg(percent_text(worst));
    cell.tip = tip.trimmed();
    return cell;
}

} // namespace

std::vector<LedgerRow> ledger_rows(const ProjectView&, const PhaseResult* phase, const YearColumns& columns) {
    const auto thousands = [](double dollars) { return thousands_text(dollars); };
    const auto hours = [](double h) { return number_text(h); };
    const QString h = QObject::tr(" h"), k = QObject::tr(" k$");
    std::vector<LedgerRow> rows;
    const auto add = [&](const QString& label, const CellOf& cell_of) {
        rows.push_back(row_of(label, phase, columns, cell_of));
    };
    add(QObject::tr("money, k$"),
        [&](const PhaseYear& y) { return limited(to_dollars(y.money), y.money_limit, k, thousands); });
    add(QObject::tr("running cost, k$"), [&](const PhaseYear& y) {
        return LedgerCell{
            thousands_text(to_dollars(y.operating)), {}, -1, false, money_text(to_dollars(y.operating))};
    });
    add(QObject::tr("line crew, h"),
        [&](const PhaseYear& y) { return limited(y.hours.line, y.line_limit_h, h, hours); });
    add(QObject::tr("civil, h"),
        [&](const PhaseYear& y) { return limited(y.hours.civil, y.civil_limit_h, h, hours); });
    add(QObject::tr("lighting, h"),
        [&](const PhaseYear& y) { return limited(y.hours.lighting, y.lighting_limit_h, h, hours); });
    add(QObject::tr("electric, h"),
        [&](const PhaseYear& y) { return limited(y.hours.electric, y.electric_limit_h, h, hours); });
    add(QObject::tr("poles done"), [](const PhaseYear& y) {
        return LedgerCell{
            QString(), {}, -1, false, QObject::tr("%1 rewired, %2 solar").arg(y.rewire).arg(y.solar)};
    });
    add(QObject::tr("lamps left on strings"), [](const PhaseYear& y) {
        return LedgerCell{number_text(y.series_lamps_left), {}, -1, false, {}};
    });
    add(QObject::tr("spare transformers"), spares_cell);
    return rows;
}

std::vector<ReadingRow> reading_rows(const ProjectView& view, const PhaseResult& was, const PhaseResult& now,
                                     StringIx string) {
    std::vector<ReadingRow> rows;
    const auto add = [&](const QString& what, double before, double after, const std::optional<double>& limit,
                         const QString& unit, const std::function<QString(double)>& text) {
        if (std::abs(before - after) < 0.5) return;
        const bool is_over = limit && after > *limit + 0.5e-2;
        const QString of =
            limit ? QObject::tr("%1 of %2%3").arg(text(after), text(*limit), unit) : text(after) + unit;
        const QString more = after > before ? QObject::tr("%1%2 more") : QObject::tr("%1%2 less");
        rows.push_back({what, text(before) + unit, of,
                        is_over ? QObject::tr("%1%2 over").arg(text(after - *limit), unit)
                                : more.arg(text(std::abs(after - before)), unit),
                        is_over});
    };
    const auto thousands = [](double dollars) { return thousands_text(dollars); };
    const auto hours = [](double h) { return number_text(h); };
    for (const PhaseYear& year : now.years) {
        const auto old = std::find_if(was.years.begin(), was.years.end(),
                                      [&year](const PhaseYear& y) { return y.year == year.year; });
        if (old == was.years.end()) continue;
        const auto name = [&year](const QString& what) {
            return QStringLiteral("%1 %2").arg(year.year).arg(what);
        };
        add(name(QObject::tr("money")), to_dollars(old->money), to_dollars(year.money), year.money_limit,
            QObject::tr(" k$"), thousands);
        add(name(QObject::tr("line crew")), old->hours.line, year.hours.line, year.line_limit_h,
            QObject::tr(" h"), hours);
        add(name(QObject::tr("civil")), old->hours.civil, year.hours.civil, year.civil_limit_h,
            QObject::tr(" h"), hours);
        add(name(QObject::tr("lighting")), old->hours.lighting, year.hours.lighting, year.lighting_limit_h,
            QObject::tr(" h"), hours);
        add(name(QObject::tr("electric")), old->hours.electric, year.hours.electric, year.electric_limit_h,
            QObject::tr(" h"), hours);
    }
    const auto state_text = [](const StringYear& s) {
        return s.lamps == 0 ? QObject::tr("no lamps left")
                            : QObject::tr("%1, %2 kVA, %3")
                                  .arg(count_text(s.lamps, QObject::tr("lamp"), QObject::tr("lamps")),
                                       number_text(s.load_kva, 1), percent_text(s.loading_frac));
    };
    for (const StringYear& state : now.string_years) {
        if (state.string != string) continue;
        const StringYear* old = string_year(&was, string, state.year);
        if (old == nullptr || old->lamps == state.lamps) continue;
        rows.push_back(
            {QStringLiteral("%1 %2").arg(state.year).arg(to_q(view.city.strings[string.place()].id)),
             state_text(*old), state_text(state), verdict_word(state.verdict),
             state.lamps > 0 && is_trouble(state.verdict)});
    }
    if (std::abs(now.cost - was.cost) >= 0.5)
        rows.push_back({QObject::tr("plan, present value"), money_text(was.cost), money_text(now.cost),
                        now.cost > was.cost ? QObject::tr("%1 dearer").arg(money_text(now.cost - was.cost))
                                            : QObject::tr("%1 cheaper").arg(money_text(was.cost - now.cost)),
                        false});
    std::stable_partition(rows.begin(), rows.end(), [](const ReadingRow& row) { return row.is_trouble; });
    return rows;
}

} // namespace unstring
