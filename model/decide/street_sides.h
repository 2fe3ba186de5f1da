#pragma once
// Both sides of every street as lines that a trench can follow, with crossings at poles and corners.

#include <vector>

#include "model/decide/ground_graph.h"

namespace unstring {

/// Adds the sides of the streets to the graph and a lead from each of `vertices` (poles, services) to the
/// nearest one within `reach_m`. Streets that cross or touch are joined; at a corner one walks on without
/// crossing, across an arm with a bore.
/// @return one per vertex asked: whether it got a lead
[[nodiscard]] std::vector<char> add_street_sides(const City& city, const std::vector<int>& vertices,
                                                 double reach_m, GroundGraph& graph);

} // namespace unstring
