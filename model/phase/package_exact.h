#pragma once
// Packages solved to proof: the master's relaxation, branched on sections done, on classes and on purchases.

#include "model/phase/package_master.h"

namespace unstring {

struct PackageAnswer {
    PackagePlan plan;
    bool is_feasible = false; ///< the plan keeps every limit
    bool is_proved_infeasible = false;
    double bound = 0; ///< proven; of plans that keep every limit (any plan, where there is none)
    int branches = 0;
};

/// Search, then bound, then up to `branches` branches of the exact search. Repeatable.
[[nodiscard]] PackageAnswer solve_packages(const PackageCase& packages, int search_rounds, int branches,
                                           const Progress& progress);

} // namespace unstring
