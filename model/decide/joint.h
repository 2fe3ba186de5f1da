#pragma once
// The joint choice: which poles the trench takes along. Turns poles and ground graph into a Steiner problem
// and back.

#include <array>
#include <vector>

#include "model/decide/ground_graph.h"
#include "model/decide/steiner.h"

namespace unstring {

enum class Mode {
    open,   ///< rewire or solar, whatever the plan is cheaper with
    rewire, ///< has to be on the tree
    solar,
    keep,
    stuck, ///< no option is possible
};

struct PoleCase {
    PoleIx pole;
    std::array<OptionCost, 3> own; ///< keep, rewire, solar: without any trench
    Mode mode = Mode::open;
    bool is_locked = false, mark_followed = false;
    [[nodiscard]] const OptionCost& of(Choice choice) const {
        return own[static_cast<std::size_t>(choice) - 1];
    }
    [[nodiscard]] OptionCost& of(Choice choice) { return own[static_cast<std::size_t>(choice) - 1]; }
    [[nodiscard]] Cents cents(Choice choice) const {
        return choice == Choice::undecided ? 0 : to_cents(of(choice).cost);
    }
};

struct JointPlan {
    std::vector<Choice> choices; ///< one per case
    std::vector<int> edges;      ///< of the ground graph, those at the root included
    Cents cost = 0;              ///< own costs of the choices + edges, present value
    Cents bound = 0;
    bool feasible = true; ///< every pole of mode rewire is on the tree
};

/// Prize of a pole = cost(solar) - cost(rewire before trench) where that is positive; a pole for which solar
/// is the cheaper even without trench is solar though the trench passes.
[[nodiscard]] JointPlan solve_joint(const GroundGraph& graph, const std::vector<PoleCase>& cases,
                                    const SteinerLimits& limits, const Progress& progress);

/// Each pole takes the cheaper by its own shortest way to a source; ways that fall together are paid once.
[[nodiscard]] JointPlan greedy_plan(const GroundGraph& graph, const std::vector<PoleCase>& cases);

struct Ways {                ///< shortest ways from a set of vertices
    std::vector<Cents> cost; ///< < 0 = not reached
    std::vector<double> length_m;
    std::vector<int> edge; ///< the last one, -1 at the set
};
[[nodiscard]] Ways shortest_ways(const GroundGraph& graph, const std::vector<int>& from);

} // namespace unstring
