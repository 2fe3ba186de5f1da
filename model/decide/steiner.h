#pragma once
// The prize-collecting Steiner tree: connect vertices to a root where that is cheaper than leaving their
// prize outside. Comes in: a plain graph with prizes. Goes out: a tree, its cost, and a lower bound on the
// cost of any tree. Knows nothing of poles; ground_graph.h makes the graph.

#include <cstdint>
#include <vector>

#include "model/progress.h"

namespace unstring {

struct SteinerEdge {
    int u = 0, v = 0;
    std::int64_t cost = 0; ///< >= 0
};

struct SteinerProblem {
    int root = -1;                   ///< always in the tree; -1 = free (the best tree, or none at all)
    std::vector<std::int64_t> prize; ///< one per vertex, >= 0: what it costs to leave it outside
    std::vector<char> must;          ///< one per vertex: has to be in; its prize is then never paid
    std::vector<SteinerEdge> edges;  ///< loops and parallel edges are allowed
};

struct SteinerLimits {             ///< in counted steps, so that answers repeat
    int rounds = 3;                ///< of bound, search and fixing
    long branch_work = 60'000'000; ///< arcs looked at by the exact search; 0 = no exact search
    int exact_vertices = 2500;     ///< larger parts are not searched exactly
    int shakes = 150;              ///< iterated local search, on parts of at most exact_vertices
};

struct SteinerAnswer {
    bool feasible = false;      ///< every vertex that must be in is in
    std::vector<int> edges;     ///< places in SteinerProblem.edges, ascending
    std::vector<int> vertices;  ///< in the tree, ascending; empty = no tree
    std::int64_t cost = 0;      ///< edges of the tree + prizes left outside
    std::int64_t bound = 0;     ///< no tree costs less
    bool is_proven = false;     ///< bound == cost
    bool was_cancelled = false; ///< the best so far
};

/// Method: reductions, Wong's dual ascent (Math. Programming 28, 1984) on the directed form, strong pruning,
/// local search with key-path exchange, fixing by reduced cost, branch and bound on small parts. Costs are
/// 64-bit integers: the sum of all edges times (vertices that must be in + 1) plus all prizes has to stay
/// under 4e18. Throws std::logic_error for sizes or indices that do not fit together.
[[nodiscard]] SteinerAnswer solve_steiner(const SteinerProblem& problem, const SteinerLimits& limits = {},
                                          const Progress& progress = {});

struct SteinerCheck {
    bool is_tree = false; ///< the edges form one tree (that holds the root where there is one)
    bool holds_musts = false;
    std::int64_t cost = 0; ///< edges + prizes outside
};

/// Evaluates an answer from nothing but the problem, its edges and its vertices; shares no code with the
/// solver.
[[nodiscard]] SteinerCheck check_steiner(const SteinerProblem& problem, const std::vector<int>& edges,
                                         const std::vector<int>& vertices);

} // namespace unstring
