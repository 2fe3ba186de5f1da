#pragma once
// Policy "may stay": which strings live on because that is cheaper. Whole strings, each compared with and
// without.

#include "model/decide/joint.h"

namespace unstring {

struct StringCost { ///< what the string itself costs over the horizon, present value
    StringIx string;
    std::vector<int> cases; ///< its poles among the cases
    Cents live = 0;         ///< it stays to the horizon
    Cents end = 0;          ///< it retires in decide_year: mobilisation and removal of the unit within
    bool is_forced = false; ///< a lock or a followed mark keeps a lamp on it
    bool stays = false;
    Cents saving = 0; ///< where it stays: what ending it would cost more
};

/// Every series string with its two costs; unit and cable as they stand today.
[[nodiscard]] std::vector<StringCost> string_costs(const MoneyInput& input,
                                                   const std::vector<PoleCase>& cases);

/// Sets mode keep on the poles of the strings that stay, flipping one string at a time while the whole plan
/// gets cheaper. Poles with a lock or a followed mark stay as they are.
void choose_stays(const GroundGraph& graph, std::vector<PoleCase>& cases, std::vector<StringCost>& strings,
                  const Progress& progress);

/// Lower bound with keep allowed: each lamp may be kept at its keep cost and an equal part of what its string
/// costs more alive. That asks less than the real rule, so the bound holds. String costs are within.
[[nodiscard]] Cents bound_with_stays(const GroundGraph& graph, std::vector<PoleCase> cases,
                                     const std::vector<StringCost>& strings, const Progress& progress);

/// Sum of the strings' own costs as they are chosen.
[[nodiscard]] Cents sum_of(const std::vector<StringCost>& strings);

} // namespace unstring
