#include "model/phase/fund_check.h"

#include <algorithm>
#include <string_view>

#include <fmt/format.h>

#include "model/series/dates.h"

namespace unstring {
namespace {

/// Whether a list as the budget gives it ("N; E", "solar") holds a word; an empty list holds all.
bool holds(std::string_view list, std::string_view word) {
    if (list.empty()) return true;
    std::size_t at = 0;
    while (at <= list.size()) {
        const std::size_t end = std::min(list.find_first_of(";,|", at), list.size());
        std::string_view part = list.substr(at, end - at);
        while (!part.empty() && part.front() == ' ') part.remove_prefix(1);
        while (!part.empty() && part.back() == ' ') part.remove_suffix(1);
        if (part == word) return true;
        at = end + 1;
    }
    return false;
}

} // namespace

std::vector<Finding> fund_findings(const PhaseFacts& facts, CashBook& book) {
    std::vector<Finding> findings;
    for (const YearBudget& row : facts.city.budget) {
        const auto by = date_of(row.spend_by);
        if (row.fund.empty() || !row.money || !by) continue;
        Cents spent = 0;
        for (std::size_t i = 0; i < facts.pole_year.size(); ++i) {
            const int year = facts.pole_year[i];
            if (year < row.year || year > by->year) continue;
            const PolePlan& plan = facts.plan.poles[i];
            if (!holds(row.wards, facts.city.poles[i].ward) || !holds(row.kinds, text_of(plan.choice)))
                continue;
            spent += book.pole({PoleIx(i), plan.choice, year,
                                plan.choice == Choice::solar ? plan.head : std::string()})
                         .capital_sum();
        }
        if (to_dollars(spent) >= *row.money) continue;
        findings.push_back(
            make_finding("fund-lapse", row.from.file, row.from.row, row.fund,
                         fmt::format("{:.0f} of {:.0f} spent by {}", to_dollars(spent), *row.money, by->year),
                         "all of it spent in its wards and kinds",
                         "move work that it pays for to an earlier year", "budget"));
    }
    return findings;
}

} // namespace unstring
