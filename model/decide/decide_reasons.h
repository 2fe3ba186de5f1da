#pragma once
// Why each pole got its choice, in numbers and words.

#include "model/decide/plan_tree.h"

namespace unstring {

/// Options with the marginal trench share as a line of rewire, break-even metres, reason, numbers, sources.
[[nodiscard]] std::vector<PoleDecision> pole_decisions(const MoneyInput& input,
                                                       const std::vector<PoleCase>& cases,
                                                       const JointPlan& plan,
                                                       const std::vector<Share>& shares);

} // namespace unstring
