// Prices and budgets.

#include <algorithm>

#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"
#include "resources/resources.h"

namespace unstring {
namespace {

constexpr double kMostMoney = 1e12;

const PriceItem* find_item(const std::string& name) {
    const auto items = price_items();
    const auto at =
        std::find_if(items.begin(), items.end(), [&](const PriceItem& item) { return item.item == name; });
    return at == items.end() ? nullptr : &*at;
}

bool is_length(std::string_view unit) { return unit == "ft" || unit == "m"; }

struct PriceFields {
    explicit PriceFields(TableReader& in)
        : item(in, "item"), unit(in, "unit"), note(in, "note"), date(in, "date"),
          low(in, "low", 0, kMostMoney), base(in, "base", 0, kMostMoney), high(in, "high", 0, kMostMoney),
          from_year(in, "from_year", 1900, 2300), to_year(in, "to_year", 1900, 2300),
          change(in, "change_frac_year", -0.5, 1) {}
    TextField item, unit, note, date;
    NumberField low, base, high, from_year, to_year, change;
};

/// Nothing (with its finding) where the row is no price.
std::optional<PriceRow> read_price(TableReader& in, const PriceFields& fields) {
    PriceRow row;
    row.item = list_word(fields.item());
    std::replace(row.item.begin(), row.item.end(), '-', '_');
    const PriceItem* item = find_item(row.item);
    if (item == nullptr) {
        in.add_finding("value-unknown", "item \"" + fields.item().substr(0, 40) + "\"",
                       "an item of the price list",
                       "see the list with gather --help-prices; the row is left out");
        return std::nullopt;
    }
    row.unit = fields.unit.unless_blank();
    if (row.unit.empty()) row.unit = item->unit;
    if (row.unit != item->unit && !(is_length(row.unit) && is_length(item->unit))) {
        in.add_finding("value-unknown", "unit \"" + row.unit.substr(0, 40) + "\"", std::string(item->unit),
                       "give the price in that unit; the row is left out");
        return std::nullopt;
    }
    const auto base = fields.base();
    if (!base) {
        if (is_blank_cell(in.cell("base")))
            in.add_finding("number-unreadable", "base blank", "a price",
                           "give the price; the row is left out");
        return std::nullopt;
    }
    row.base = *base;
    row.low = std::min(fields.low().value_or(*base), *base);
    row.high = std::max(fields.high().value_or(*base), *base);
    row.note = fields.note();
    row.date = read_date(fields.date());
    row.from_year = fields.from_year.whole();
    row.to_year = fields.to_year.whole();
    row.change_frac_year = fields.change().value_or(0);
    row.row = in.from().row;
    return row;
}

} // namespace

Expected<void> read_prices(const ReadyTable& from, Gathered& out) {
    for (const char* field : {"item", "base"})
        if (auto has = need_column(from, field); !has) return has;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const PriceFields fields(in);
    std::vector<PriceRow> rows;
    read_rows(in, "item", out, [&] {
        auto row = read_price(in, fields);
        if (row) rows.push_back(std::move(*row));
        return row.has_value();
    });
    out.prices = PriceBook(std::move(rows));
    return {};
}

Expected<void> read_budget(const ReadyTable& from, Gathered& out) {
    if (auto has_year = need_column(from, "year"); !has_year) return has_year;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const TextField fund(in, "fund"), wards(in, "wards"), kinds(in, "kinds"), spend_by(in, "spend_by");
    const NumberField year(in, "year", 1900, 2300), money(in, "money", 0, kMostMoney),
        match(in, "match_frac", 0, 1);
    const NumberField line_h(in, "line_h", 0, 1e7), civil_h(in, "civil_h", 0, 1e7),
        lighting_h(in, "lighting_h", 0, 1e7), electric_h(in, "electric_h", 0, 1e7);
    out.city.budget.clear();
    read_rows(in, "year", out, [&] {
        const auto calendar_year = year.whole();
        if (!calendar_year) return false;
        YearBudget row;
        row.year = *calendar_year;
        row.money = money();
        row.fund = fund.unless_blank();
        row.wards = wards.unless_blank();
        row.kinds = kinds.unless_blank();
        row.spend_by = read_date(spend_by());
        row.match_frac = match();
        row.line_h = line_h();
        row.civil_h = civil_h();
        row.lighting_h = lighting_h();
        row.electric_h = electric_h();
        row.from = in.from();
        out.city.budget.push_back(std::move(row));
        return true;
    });
    return {};
}

} // namespace unstring
