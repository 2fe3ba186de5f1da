#pragma once
// A plan: what is to become of each pole and when, the wishes and orders of people, and which transformer
// carries which string in which year. Comes in: City. Goes out: plain rows, and the difference of two plans
// as one Change.

#include <string>
#include <string_view>
#include <vector>

#include "model/city/city.h"
#include "model/plan/change.h"
#include "model/quantities.h"

namespace unstring {

enum class Choice { undecided, keep, rewire, solar };
enum class YearBy { none, solver, hand };
enum class Policy { end, may_stay, must_stay };

struct PlanSettings {
    std::string name = "first";
    int first_year = 2027;  ///< calendar year of t = 1
    int years = 8;          ///< years in which work may fall
    int horizon_years = 20; ///< years over which money is counted
    double rate = 0.03;     ///< real discount rate
    Policy policy = Policy::end;
    std::vector<std::string> must_stay; ///< string ids
    double nights_goal = 3;             ///< nights dark a year at the end of battery life
    int decide_year = 0;                ///< calendar year that decide prices at; 0 = the middle of the plan
    bool services_anywhere = false;
    int block_poles = 4; ///< smallest run of one kind along a street
    bool operator==(const PlanSettings&) const = default;
};

struct PolePlan {
    Choice choice = Choice::undecided;
    std::string head; ///< of the catalogue, where the choice is solar
    int year = 0;     ///< calendar year of the work; 0 = none (kept, or not reached)
    YearBy year_by = YearBy::none;
    bool year_locked = false;
    Choice mark = Choice::undecided; ///< a wish of the staff
    Choice lock = Choice::undecided; ///< an order of the planner
    std::string who, note;           ///< of the mark
    bool operator==(const PolePlan&) const = default;
};

struct StringUnit { ///< the transformer of one string at the end of one year
    StringIx string;
    int year = 0; ///< calendar year
    TransformerIx transformer;
    double tap = 1;
    bool operator==(const StringUnit&) const = default;
};

struct Plan {
    PlanSettings settings;
    std::vector<PolePlan> poles;   ///< one per pole of the city, same order
    std::vector<StringUnit> units; ///< by string, then year

    [[nodiscard]] int last_year() const { return settings.first_year + settings.years - 1; }
    [[nodiscard]] int decide_year() const {
        return settings.decide_year != 0 ? settings.decide_year
                                         : settings.first_year + (settings.years - 1) / 2;
    }
    /// Discount factor of a calendar year's flows, (1 + rate)^-t with t = 1 in first_year.
    [[nodiscard]] double factor(int calendar_year) const;
};

/// An empty plan for a city: no decisions, years from the budget's rows where there are any.
[[nodiscard]] Plan new_plan(const City& city, std::string name);

/// The rows in which two plans of one city differ, as one change; `before` and `after` in ids, never in
/// indices.
[[nodiscard]] Change plan_difference(const City& city, const Plan& before, const Plan& after,
                                     std::string label);

/// Brings a plan to the `after` side of a change (rows of other plans and tables are passed over).
void apply_change(const City& city, const Change& change, Plan& plan);

[[nodiscard]] const char* text_of(Choice value); ///< "", "keep", "rewire", "solar"
[[nodiscard]] const char* text_of(YearBy value); ///< "", "solver", "hand"
[[nodiscard]] const char* text_of(Policy value); ///< "end", "may-stay", "must-stay"
template <>
[[nodiscard]] std::optional<Choice> read_word(std::string_view text);
template <>
[[nodiscard]] std::optional<YearBy> read_word(std::string_view text);
template <>
[[nodiscard]] std::optional<Policy> read_word(std::string_view text);

} // namespace unstring
