#pragma once
// Trees on the work graph: built, pruned, and improved by local search.

#include "model/decide/steiner_bound.h"
#include "model/decide/steiner_graph.h"

namespace unstring::steiner {

struct Tree {
    std::vector<char> in;
    std::vector<int> parent, parent_edge; ///< -1 at the root and outside
    Cost cost = 0;                        ///< edges + prizes outside + the graph's constant
};

/// Shortest spanning tree of the vertices `in` that hang together with the root, then strong pruning: a
/// branch stays where what it collects is worth more than its edges.
[[nodiscard]] Tree spanning_tree(const WorkGraph& graph, const std::vector<char>& in);

/// Adds to `in` the shortest ways from the tree to prizes outside: to every prize, or only where the prize
/// pays the way (each way counts from the tree as it has grown by then).
void reach_out(const WorkGraph& graph, std::vector<char>& in, bool only_paying);

/// Improves until nothing helps: reaching out, vertices put in, key paths exchanged.
void improve(const WorkGraph& graph, Tree& tree, const Progress& progress);

/// Iterated search: a ball of vertices is thrown about, the tree mended and improved; worse trees are
/// dropped.
void shake(const WorkGraph& graph, Tree& tree, int times, const Progress& progress);

/// Sum of edges and of prizes outside, counted anew.
[[nodiscard]] Cost cost_of(const WorkGraph& graph, const Tree& tree);

} // namespace unstring::steiner
