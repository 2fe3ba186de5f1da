#pragma once
// The bare problem of years: strings with sections, the classes of transformer that can carry what is left,
// money and crew hours per year, a pool of units. Comes in: tables of discounted cost and undiscounted use
// (made from the city by city_packages, or from a file by years_form). Goes out: for each string how many
// sections are done at each year's end, and the class in service. Knows no city and no ledger.
//
//   state at the end of year t: (n sections done, class c in service); n never falls; c = kNoClass once
//   nothing burns

#include <array>
#include <limits>
#include <utility>
#include <vector>

namespace unstring {

inline constexpr std::size_t kLimits = 5; ///< money, then line, civil, lighting and electric hours
using Use = std::array<double, kLimits>;  ///< undiscounted, counted against a year's limits
inline constexpr double kNever = std::numeric_limits<double>::infinity();
inline constexpr int kNoClass = -1;

[[nodiscard]] const char* limit_text(std::size_t limit); ///< "money", "line-hours", ..

struct PackageString {
    int sections = 0;
    int start_class = kNoClass; ///< place in `classes`; kNoClass = nothing in service today
    std::vector<int>
        classes; ///< places in PackageCase.classes that may ever carry it; kNoClass = outside the pool
    std::vector<int> least, most;               ///< [t] sections done at the end of year t, both included
    std::vector<std::vector<double>> work_cost; ///< [t][k] of doing section k in year t
    std::vector<std::vector<Use>> work_use;     ///< [t][k]
    std::vector<std::vector<std::vector<double>>>
        state_cost;                  ///< [t][n][c] of a string that burns; kNever = not legal
    std::vector<char> ends;          ///< [t] nothing burns at the year's end once all sections are done
    std::vector<double> done_cost;   ///< [t] of a string that has ended
    std::vector<double> finish_cost; ///< [t] once, in the year in which it ends
    std::vector<Use> finish_use;     ///< [t]; may be empty
    /// [t][n][next - n - 1] of going from n to `next` sections done in one year, beside the sections' own
    /// work: jumpers, splices, new cable. May be empty.
    std::vector<std::vector<std::vector<double>>> jump_cost;
    std::vector<std::vector<std::vector<Use>>> jump_use;
    std::vector<double> mobilise_cost,
        swap_cost; ///< [t] once a year with work; when another class goes in service
    std::vector<Use> mobilise_use, swap_use; ///< [t]
    std::vector<std::vector<std::vector<double>>>
        jump_penalty; ///< as jump_cost; steers the search only; may be empty
    std::vector<std::vector<std::vector<double>>> state_penalty; ///< as state_cost; likewise
    std::vector<double>
        left_penalty; ///< [n] steers the search away from stopping at n < sections; no cost; may be empty
};

/// A section that may not be done while another string is in certain states: a control that it still needs.
struct PackageWait {
    std::size_t waiting = 0;  ///< string
    int section = 0;          ///< of the waiting string
    std::size_t blocking = 0; ///< string, another one (within one string a wait is part of jump_penalty)
    std::vector<std::vector<char>>
        blocks; ///< [t][n] the section may not be done in year t that ends in this state
};

/// Work that several strings share, a trench: paid whole in the earliest year of any of them, dearer where
/// the duct that it would reuse is still live.
struct PackageItem {
    std::vector<std::pair<std::size_t, int>> firsts; ///< (string, its outermost section that needs it)
    int fixed_t = -1;                    ///< year in which it is needed whatever the strings do, -1 = none
    std::vector<double> cost;            ///< [t]
    std::vector<Use> use;                ///< [t]
    int duct_string = -1;                ///< whose cable lies in the duct, -1 = none is waited for
    std::vector<std::vector<char>> live; ///< [t][n] of that string
    std::vector<double> dig_cost;        ///< [t] more where it is live
    std::vector<Use> dig_use;            ///< [t]
};

struct PackageCase {
    int years = 0;
    int classes = 0;
    double pool_factor = 1;                 ///< in service x this <= owned + bought
    std::vector<std::vector<double>> owned; ///< [t][class]
    std::vector<double> buy_cost; ///< [t] of one whole unit, there from year t on; kNever = none to be had
    std::vector<PackageItem> items;
    std::vector<PackageWait> waits; ///< kept by the search at wait_penalty, left out of bounds
    double wait_penalty = 1e7;
    double over_weight = 10;   ///< a limit over-run by its whole costs this many dearest plans
    double unit_penalty = 1e7; ///< for a unit that is not there, where none can be bought
    std::vector<Use> limit;    ///< [t], kNever = no limit
    std::vector<PackageString> strings;
};

struct StringPlan {        ///< one string's years
    std::vector<int> done; ///< [t] sections done at the end of year t
    std::vector<int> cls;  ///< [t] place in PackageString.classes, kNoClass once it has ended
    bool operator==(const StringPlan&) const = default;
};

struct Overrun {
    int year = 0; ///< 0-based
    std::size_t limit = 0;
    double by = 0;
};

struct PackagePlan {
    std::vector<StringPlan> strings;
    std::vector<std::vector<int>> bought; ///< [t][class] whole units
    double cost = 0;                      ///< discounted, purchases in, penalties not
    double penalty = 0; ///< of over-runs, missing units, sections left: 0 = keeps every limit
    std::vector<Overrun> over;
};

} // namespace unstring
