#pragma once
// The city's plan as packages: sections that may move, hand and locked years held, costs and hours year by
// year, pool. Comes in: MoneyInput, decide's circuits. Goes out: a PackageCase for the search, one for the
// bound, and the way back from package plans to a Plan.

#include <memory>

#include "model/phase/packages.h"
#include "model/phase/phase_cash.h"
#include "model/phase/phase_plan.h"
#include "model/phase/string_years.h"
#include "model/phase/unit_years.h"
#include "model/series/sections.h"

namespace unstring {

struct CitySection {
    int section = 0;           ///< place in the sections
    std::vector<PoleIx> poles; ///< that move with it
    int earliest_t = 0;        ///< 0-based year before which it may not be done (owner, service)
};

struct CityString {
    StringIx string;
    std::vector<CitySection> sections; ///< from the far end inward, those with poles to move
    std::vector<int> fixed_year;       ///< [lamp of the loop] hand or locked year, 0 = none
    bool has_sections() const { return !sections.empty(); }
};

/// A span, or a circuit's connection: paid whole in the earliest year of any pole beyond it.
struct SharedItem {
    std::vector<std::pair<std::size_t, int>> firsts; ///< (string of the case, its outermost section beyond)
    int fixed_t = -1;                                ///< earliest hand year beyond, 0-based; -1 = none
    std::vector<double> cost;                        ///< [t] present value
    std::vector<Use> use;                            ///< [t]
    std::vector<double> dig_cost; ///< [t] more, where its duct is live; empty = no duct to wait for
    std::vector<Use> dig_use;     ///< [t]
    int span = -1;                ///< place in decide.spans, -1 = a connection
};

/// What the cases are made from: worked out once.
struct CityYears {
    const MoneyInput& input;
    const DecideResult& decide;
    CashBook& book;
    std::vector<StringLoop> loops;
    std::vector<Section> sections;
    std::unique_ptr<UnitKinds> kinds;
    std::vector<CityString> strings; ///< strings that burn today
    std::vector<SharedItem> items;
    std::vector<std::vector<std::vector<StringState>>> states;     ///< [string][t][n]
    std::vector<std::vector<std::vector<std::vector<char>>>> legs; ///< [string][t][n] live legs
    std::vector<std::vector<TransformerIx>> classes;               ///< units of each class of the pool
    std::vector<std::vector<int>> local_classes; ///< [string] places in `classes`, last kNoClass: no unit
    std::vector<int> start_class;                ///< [string] place in local_classes
    [[nodiscard]] int years() const { return input.plan.settings.years; }
    [[nodiscard]] int year(std::size_t t) const {
        return input.plan.settings.first_year + static_cast<int>(t);
    }
};

/// @fault cancelled
[[nodiscard]] Expected<std::unique_ptr<CityYears>> city_years(const MoneyInput& input,
                                                              const DecideResult& decide,
                                                              const PhaseChoices& choices, CashBook& book,
                                                              const Progress& progress);

/// For the search. An item that one string alone has sits on its section, the others are items of the case.
[[nodiscard]] PackageCase search_case(const CityYears& city);

/// For the bound: no plan of whole sections from the far end inward costs less than its strings one by one
/// and `fixed_cost` together. A shared item is paid in the earliest year of any string beyond it; here each
/// of those strings pays an equal share, at the cheapest price up to its own year, which is never more. An
/// item of one string alone is paid, and counts against the limits, with its outermost section; other items
/// count against no limit, nor do the line crew's hours, whose waits for the switching clearance do not add
/// up.
struct BoundCase {
    PackageCase packages;
    double fixed_cost = 0; ///< of what does not move: kept poles, hand years, the items that they reach
};
/// @param all_reached  every section is done by the last year
/// @param all_carried  every string that burns has a transformer that carries it
[[nodiscard]] BoundCase bound_case(const CityYears& city, bool all_reached, bool all_carried);

/// The plan with years and units of the answer written in.
[[nodiscard]] Plan with_years(const CityYears& city, const PackageCase& packages,
                              const std::vector<StringPlan>& plans);

} // namespace unstring
