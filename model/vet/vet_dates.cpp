// Dates that cannot be.

#include <algorithm>

#include <fmt/format.h>

#include "model/series/dates.h"
#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

constexpr int kFirstYear = 1880; // before the first series street lighting
constexpr int kLastYear = 2150;

struct DateField {
    const char* name;
    const std::string& text;
};

/// Reports a date that cannot be read or is out of range; gives it where it is good.
std::optional<Date> vet_date(const VetInput& vet, const char* table, const RowRef& from,
                             const std::string& id, DateField field) {
    if (field.text.empty()) return std::nullopt;
    const int last_year = vet.year > 0 ? vet.year : kLastYear;
    const std::optional<Date> date = date_of(field.text);
    if (date && date->year >= kFirstYear && date->year <= last_year) return date;
    vet.add("date-odd", table, from, id, fmt::format("{} {}", field.name, field.text),
            fmt::format("YYYY, YYYY-MM or YYYY-MM-DD, {} to {}", kFirstYear, last_year),
            "mend the date, or leave it blank");
    return std::nullopt;
}

} // namespace

int year_of_records(const City& city) {
    int first_budget = 0;
    for (const YearBudget& row : city.budget)
        if (row.year > 0 && (first_budget == 0 || row.year < first_budget)) first_budget = row.year;
    if (first_budget > 0) return first_budget;
    int latest = 0;
    const auto consider = [&](const std::string& text) {
        if (const auto date = date_of(text); date && date->year <= kLastYear)
            latest = std::max(latest, date->year);
    };
    for (const Transformer& unit : city.transformers) consider(unit.tested);
    for (const SeriesString& string : city.strings) consider(string.asfound_date);
    return latest;
}

void vet_dates(const VetInput& vet) {
    for (const Transformer& unit : vet.city.transformers) {
        if (unit.set_aside) continue;
        const auto made = vet_date(vet, kTransformersTable, unit.from, unit.id, {"made", unit.made});
        const auto tested = vet_date(vet, kTransformersTable, unit.from, unit.id, {"tested", unit.tested});
        if (made && tested && tested->year < made->year)
            vet.add("date-odd", kTransformersTable, unit.from, unit.id,
                    fmt::format("tested {}, made {}", unit.tested, unit.made),
                    "a test after the unit was made", "check both on the nameplate and the test sheet");
    }
    for (const SeriesString& string : vet.city.strings)
        if (!string.set_aside)
            vet_date(vet, kCircuitsTable, string.from, string.id, {"asfound_date", string.asfound_date});
    for (const Pole& pole : vet.city.poles)
        if (!pole.set_aside && pole.earliest_year &&
            (*pole.earliest_year < kFirstYear || *pole.earliest_year > kLastYear))
            vet.add("date-odd", kPolesTable, pole.from, pole.id,
                    fmt::format("earliest_year {}", *pole.earliest_year),
                    fmt::format("a year, {} to {}", kFirstYear, kLastYear),
                    "mend the year, or leave it blank");
}

} // namespace unstring
