#pragma once
// The chosen edges as a tree: spans from the sources outward, circuits, and each pole's marginal share.

#include "model/decide/joint.h"

namespace unstring {

/// Spans (parent before child), circuits and their poles, trench metres and new services of the chosen plan into `result`.
void lay_out(const MoneyInput& input, const GroundGraph& graph, const std::vector<PoleCase>& cases, const JointPlan& plan, DecideResult& result);

struct Share {
    Cents cost = 0;        ///< present value
    double length_m = 0;
};

/// What the plan would cost less without this pole's connection; where the pole is not rewired, what its connection would
/// add. One per case; < 0 = no way reaches it.
[[nodiscard]] std::vector<Share> marginal_shares(const GroundGraph& graph, const std::vector<PoleCase>& cases, const JointPlan& plan);

}  // namespace unstring
