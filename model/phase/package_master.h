#pragma once
// The Dantzig-Wolfe master of packages: a column is a whole plan of one string, the rows are each year's
// limits and the pool; columns are priced by the dynamic programme of one string (Dantzig and Wolfe,
// Operations Research 8, 1960).

#include <optional>
#include <vector>

#include "model/phase/package_plan.h"
#include "model/progress.h"

namespace unstring {

struct MasterColumn {
    std::size_t string = 0;
    StringPlan plan;
    ColumnFigures figures;
};

struct MasterBranch { ///< what a branch of the exact search holds fixed
    std::vector<ColumnLimits> strings;
    std::vector<std::vector<double>> buy_low, buy_high; ///< [t][class]
};

enum class MasterAim { least_cost, any_plan };

struct MasterAnswer {
    double bound = 0;           ///< least_cost: no plan of the branch that keeps every limit costs less
    double overrun = 0;         ///< what the relaxed answer still over-runs, each limit as a share of itself
    bool is_infeasible = false; ///< any_plan: proved, no plan of the branch keeps every limit
    bool is_solved = false;     ///< the master came to its end
    std::vector<std::pair<std::size_t, double>> used; ///< place in the columns, share > 0
    std::vector<std::vector<double>> bought;          ///< [t][class]
};

[[nodiscard]] MasterBranch whole_branch(const PackageCase& packages);

/// Solves the relaxation of a branch; columns found are added to `columns` for the next one.
/// Aim any_plan minimises the over-runs alone, and stops as soon as it is certain whether some remain.
[[nodiscard]] MasterAnswer solve_master(const PackageCase& packages, const MasterBranch& branch,
                                        MasterAim aim, std::vector<MasterColumn>& columns,
                                        const Progress& progress);

/// Sum of each string's cheapest plan by itself, limits and pool left out: a bound for every plan, loose.
[[nodiscard]] double separate_bound(const PackageCase& packages);

} // namespace unstring
