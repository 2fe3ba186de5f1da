#pragma once
// Each candidate pole with its three options priced, and what policy, marks and locks leave open of them.

#include "model/decide/joint.h"
#include "model/fault.h"

namespace unstring {

/// Options of every candidate at decide_year, without trench; a pole that no way reaches from a source cannot
/// be rewired.
/// @fault cancelled
[[nodiscard]] Expected<std::vector<PoleCase>> pole_cases(const MoneyInput& input, const GroundGraph& graph,
                                                         const Progress& progress);

/// Sets each case's mode from policy, marks and locks; says in `result` which marks are followed and refused,
/// and which locks break a check (finding "lock-breaks-check"), which keep locks stand against the policy
/// ("policy-end"), which poles have no option at all ("no-way"), which no way reaches ("pole-unreached").
void settle_modes(const MoneyInput& input, std::vector<PoleCase>& cases, DecideResult& result);

} // namespace unstring
