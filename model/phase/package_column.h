#pragma once
// One string's plan as a column: its cost and use, and the cheapest one by dynamic programming over (year, n,
// class).

#include "model/phase/packages.h"

namespace unstring {

struct ColumnFigures {
    double cost = 0;           ///< discounted; kNever where a state is not legal
    double penalty = 0;        ///< of the string's own: sections left, jumps and states to be avoided
    std::vector<Use> use;      ///< [t]
    std::vector<int> in_class; ///< [t] place in PackageCase.classes in service at the year's end, kNoClass =
                               ///< none of the pool
};

[[nodiscard]] ColumnFigures column_figures(const PackageCase& packages, std::size_t string,
                                           const StringPlan& plan);

/// What a year's use and a unit of the pool are priced at while one string is planned.
struct RowPrices {
    std::vector<Use> use;                  ///< [t][limit] a unit of use, >= 0
    std::vector<std::vector<double>> unit; ///< [t][class] a unit in service at the year's end, >= 0
};

/// What the other strings leave: beyond it use is charged steeply, a unit at its purchase.
struct Room {
    std::vector<Use> use; ///< [t][limit] left; may be negative
    std::vector<std::vector<char>>
        unit_is_there; ///< [t][class] one more may be in service without a purchase
    Use over_price{};  ///< of a unit of over-run
    /// What the string adds to shared items, and the waits that it would break. Empty = nothing.
    std::vector<std::vector<double>> section_cost;           ///< [t][k] of doing section k in year t
    std::vector<std::vector<Use>> section_use;               ///< [t][k]
    std::vector<std::vector<double>> state_cost;             ///< [t][n] of being there at the end of year t
    std::vector<std::vector<Use>> state_use;                 ///< [t][n]
    std::vector<std::vector<std::vector<double>>> jump_cost; ///< as PackageString::jump_cost
    std::vector<std::vector<std::vector<Use>>> jump_use;
};

struct ColumnLimits {             ///< of a branch of the exact search
    std::vector<int> least, most; ///< [t]
    std::vector<std::vector<char>>
        banned; ///< [t][place in PackageString.classes]; a live string may not use it
};

struct PricedColumn {
    StringPlan plan;
    double value = kNever; ///< cost with the prices; kNever = no plan
};

/// The cheapest plan of one string at linear prices. Exact. `within` may be null.
[[nodiscard]] PricedColumn cheapest_column(const PackageCase& packages, std::size_t string,
                                           const RowPrices& prices, const ColumnLimits* within);
/// The cheapest plan of one string in the room that the others leave. Exact for over-runs; a purchase is
/// charged once for years in a row.
[[nodiscard]] PricedColumn best_column_in(const PackageCase& packages, std::size_t string, const Room& room);

} // namespace unstring
