#pragma once
// Electrical limits of the chosen circuits: what a service can give, the drop, the device. They come after
// the joint choice.

#include "model/decide/plan_tree.h"

namespace unstring {

inline constexpr double kDropLimitFrac =
    0.03; ///< on the lighting circuit: NFPA 70, 210.19 informational note

/// Changes the plan until every circuit keeps its limits or nothing more can be done: larger wire where that
/// is enough (see size_circuits), else the cheapest of moving a branch to another source and giving one to
/// solar. What stays over a limit is said as finding "circuit-over". Repeatable; at most 400 changes.
[[nodiscard]] JointPlan keep_limits(const MoneyInput& input, const GroundGraph& graph,
                                    const std::vector<PoleCase>& cases, JointPlan plan,
                                    std::vector<Finding>& findings, const Progress& progress);

/// Load, volts, device of every circuit; where AWG 8 drops too much, the cheapest larger sizes go into its
/// spans.
/// @return volts at each pole of a circuit, by pole of the city; 0 elsewhere
[[nodiscard]] std::vector<double> size_circuits(const MoneyInput& input, DecideResult& result);

/// Volts of a circuit's source: the service's, 240 at a tap.
[[nodiscard]] double source_volts(const City& city, ServiceIx service);

} // namespace unstring
