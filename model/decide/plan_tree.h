#pragma once
// The chosen edges as a tree: spans from the sources outward, circuits, and each pole's marginal share.

#include "model/decide/joint.h"

namespace unstring {

struct Rooted {                    ///< the chosen tree seen from the root
    std::vector<int> order;        ///< its vertices, the nearer to the root first
    std::vector<int> parent, edge; ///< one per vertex of the graph, -1 at the root and outside
    std::vector<int> lamps;        ///< rewired poles at the vertex and beyond
    std::vector<int>
        source; ///< first vertex under the root on the way: a service, or a pole with a tap; -1 outside
    std::vector<char> is_rewired;
};
[[nodiscard]] Rooted rooted(const GroundGraph& graph, const std::vector<PoleCase>& cases,
                            const JointPlan& plan);

/// Spans (parent before child), circuits and their poles, trench metres and new services of the chosen plan
/// into `result`.
void lay_out(const MoneyInput& input, const GroundGraph& graph, const std::vector<PoleCase>& cases,
             const JointPlan& plan, DecideResult& result);

struct Share {
    Cents cost = 0; ///< present value
    double length_m = 0;
};

/// What the plan would cost less without this pole's connection; where the pole is not rewired, what its
/// connection would add. One per case; < 0 = no way reaches it.
[[nodiscard]] std::vector<Share> marginal_shares(const GroundGraph& graph, const std::vector<PoleCase>& cases,
                                                 const JointPlan& plan);

} // namespace unstring
