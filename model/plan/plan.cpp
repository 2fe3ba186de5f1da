#include "model/plan/plan.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include "model/plan/plan_rows.h"

namespace unstring {

double Plan::factor(int calendar_year) const {
    return std::pow(1 + settings.rate, -(calendar_year - settings.first_year + 1));
}

Plan new_plan(const City& city, std::string name) {
    Plan plan;
    plan.settings.name = std::move(name);
    if (!city.budget.empty()) {
        int first = city.budget.front().year;
        int last = first;
        for (const YearBudget& row : city.budget) {
            first = std::min(first, row.year);
            last = std::max(last, row.year);
        }
        plan.settings.first_year = first;
        plan.settings.years = last - first + 1;
    }
    plan.poles.resize(city.poles.size());
    return plan;
}

Change plan_difference(const City& city, const Plan& before, const Plan& after, std::string label) {
    Change change;
    change.plan = after.settings.name;
    change.label = std::move(label);
    const auto add = [&](const char* table, std::string id, Cells old_cells, Cells new_cells) {
        if (old_cells == new_cells) return;
        change.rows.push_back({table, std::move(id), std::move(old_cells), std::move(new_cells)});
    };
    add(kPlansTable, after.settings.name, settings_cells(before.settings), settings_cells(after.settings));
    for (std::size_t i = 0; i < city.poles.size(); ++i) {
        if (before.poles[i] == after.poles[i]) continue;
        add(kPlanPolesTable, city.poles[i].id, pole_cells(before.poles[i]), pole_cells(after.poles[i]));
    }
    std::map<std::string, std::pair<Cells, Cells>> units;
    for (const StringUnit& unit : before.units) units[unit_row_id(city, unit)].first = unit_cells(city, unit);
    for (const StringUnit& unit : after.units) units[unit_row_id(city, unit)].second = unit_cells(city, unit);
    for (auto& [id, sides] : units) add(kPlanUnitsTable, id, std::move(sides.first), std::move(sides.second));
    return change;
}

void apply_change(const City& city, const Change& change, Plan& plan) {
    if (change.plan != plan.settings.name) return;
    std::map<std::string_view, std::size_t> place_of;
    for (std::size_t i = city.poles.size(); i-- > 0;)
        place_of[city.poles[i].id] = i; // the first of a doubled id wins
    for (const RowChange& row : change.rows) {
        if (row.table == kPlansTable) {
            const std::string name = plan.settings.name;
            plan.settings = settings_from(row.after);
            plan.settings.name = name;
        } else if (row.table == kPlanPolesTable) {
            const auto at = place_of.find(row.id);
            if (at != place_of.end()) plan.poles[at->second] = pole_from(row.after);
        } else if (row.table == kPlanUnitsTable) {
            const StringUnit unit = unit_from(city, row.id, row.after);
            if (!unit.string.is_valid()) continue;
            const auto same = [&](const StringUnit& each) {
                return each.string == unit.string && each.year == unit.year;
            };
            plan.units.erase(std::remove_if(plan.units.begin(), plan.units.end(), same), plan.units.end());
            if (!row.after.empty()) plan.units.push_back(unit);
        }
    }
    std::sort(plan.units.begin(), plan.units.end(), [](const StringUnit& a, const StringUnit& b) {
        return std::pair(a.string, a.year) < std::pair(b.string, b.year);
    });
}

const char* text_of(Choice value) {
    switch (value) {
    case Choice::undecided:
        return "";
    case Choice::keep:
        return "keep";
    case Choice::rewire:
        return "rewire";
    case Choice::solar:
        return "solar";
    }
    return "";
}

const char* text_of(YearBy value) {
    switch (value) {
    case YearBy::none:
        return "";
    case YearBy::solver:
        return "solver";
    case YearBy::hand:
        return "hand";
    }
    return "";
}

const char* text_of(Policy value) {
    switch (value) {
    case Policy::end:
        return "end";
    case Policy::may_stay:
        return "may-stay";
    case Policy::must_stay:
        return "must-stay";
    }
    return "";
}

template <>
std::optional<Choice> read_word(std::string_view text) {
    for (const Choice value : {Choice::undecided, Choice::keep, Choice::rewire, Choice::solar})
        if (text == text_of(value)) return value;
    return std::nullopt;
}

template <>
std::optional<YearBy> read_word(std::string_view text) {
    for (const YearBy value : {YearBy::none, YearBy::solver, YearBy::hand})
        if (text == text_of(value)) return value;
    return std::nullopt;
}

template <>
std::optional<Policy> read_word(std::string_view text) {
    for (const Policy value : {Policy::end, Policy::may_stay, Policy::must_stay})
        if (text == text_of(value)) return value;
    return std::nullopt;
}

} // namespace unstring
