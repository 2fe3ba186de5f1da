#pragma once
// A whole plan of packages: what the strings' plans add up to against the years' limits and the pool.

#include "model/phase/package_column.h"

namespace unstring {

/// Adds up: cost, purchases as whole units in the first year that needs them, over-runs of limits, penalties.
/// @param over_price  penalty of a unit of over-run
[[nodiscard]] PackagePlan add_up(const PackageCase& packages, std::vector<StringPlan> strings,
                                 const Use& over_price);

/// The year (0-based) at whose end a section is done; -1 = never.
[[nodiscard]] int year_done(const StringPlan& plan, int section);
/// The year in which an item is paid; years of the case = never. @param counts  strings that count, null =
/// all
[[nodiscard]] int item_year(const PackageItem& item, const std::vector<StringPlan>& strings,
                            const std::vector<char>* counts);
[[nodiscard]] bool is_broken(const PackageWait& wait, const std::vector<StringPlan>& strings);

/// Steep enough that no saving pays for an over-run: a year's limit over-run whole costs over_weight dearest
/// plans.
[[nodiscard]] Use steep_over_price(const PackageCase& packages);

/// Units of a class to buy until the end of year t so that `in_class` may be in service.
[[nodiscard]] int units_wanting(const PackageCase& packages, std::size_t t, std::size_t cls, int in_service);

} // namespace unstring
