#include "model/catalog/prices.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>
#include <utility>

#include <fmt/format.h>

#include "model/quantities.h"

namespace unstring {
namespace {

int starts(const PriceRow& row) { return row.from_year.value_or(std::numeric_limits<int>::min()); }

/// The book's own unit to SI: a price per foot grows when it is told per metre, a pace in feet shrinks.
double in_metres(const PriceRow& row, double value) {
    if (row.unit == "ft") return value / kMetresPerFoot;
    if (row.unit == "ft per crew-day") return value * kMetresPerFoot;
    return value;
}

double value_in(const PriceRow& row, int year) {
    if (!row.from_year || row.change_frac_year == 0 || year < *row.from_year) return in_metres(row, row.base);
    return in_metres(row, row.base) * std::pow(1 + row.change_frac_year, year - *row.from_year);
}

} // namespace

bool price_unit_fits(const PriceItem& item, std::string_view unit) {
    if (unit == item.unit) return true;
    return (item.unit == "ft" && unit == "m") || (item.unit == "ft per crew-day" && unit == "m per crew-day");
}

std::string wire_item(int awg) {
    return awg > 0 ? fmt::format("wire_awg{}", awg) : fmt::format("wire_awg{}_0", 1 - awg);
}

PriceBook::PriceBook(std::vector<PriceRow> rows) : rows_(std::move(rows)) {
    for (std::size_t i = 0; i < rows_.size(); ++i) places_[rows_[i].item].push_back(i);
    for (auto& [item, places] : places_)
        std::stable_sort(places.begin(), places.end(),
                         [&](std::size_t a, std::size_t b) { return starts(rows_[a]) < starts(rows_[b]); });
}

bool PriceBook::has(std::string_view item) const { return places_.find(item) != places_.end(); }

double PriceBook::at(std::string_view item, int year) const {
    const auto found = places_.find(item);
    if (found == places_.end() || find_price_item(item) == nullptr)
        throw std::logic_error(fmt::format("the price book has no item \"{}\"", item));
    const std::vector<std::size_t>& places = found->second;
    for (auto place = places.rbegin(); place != places.rend(); ++place) {
        const PriceRow& row = rows_[*place];
        if (starts(row) <= year && (!row.to_year || year <= *row.to_year)) return value_in(row, year);
    }
    // No row reaches the year: the last that had begun, held at its end, else the first to come.
    const PriceRow* nearest = &rows_[places.front()];
    for (const std::size_t place : places)
        if (starts(rows_[place]) <= year) nearest = &rows_[place];
    return value_in(*nearest, std::min(year, nearest->to_year.value_or(year)));
}

PriceBook PriceBook::with_defaults(const PriceBook& defaults) const {
    std::vector<PriceRow> rows = rows_;
    for (const PriceRow& row : defaults.rows_)
        if (!has(row.item)) rows.push_back(row);
    return PriceBook(std::move(rows));
}

} // namespace unstring
