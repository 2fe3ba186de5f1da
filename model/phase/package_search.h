#pragma once
// A plan of packages by construction and large-neighbourhood search: strings are taken out a few at a time
// and put back by the exact dynamic programme of one string. Limits may be over-run at a steep price, so
// there is always a plan.

#include "model/phase/package_plan.h"
#include "model/progress.h"

namespace unstring {

struct SearchChoices {
    int rounds = 2000; ///< of taking out and putting back
    unsigned seed = 1;
    std::vector<StringPlan> start; ///< may be empty
};

/// The best plan found; an empty one when a string has no legal plan at all. Repeatable: limits are rounds,
/// not seconds.
[[nodiscard]] PackagePlan search_packages(const PackageCase& packages, const SearchChoices& choices,
                                          const Progress& progress);

} // namespace unstring
