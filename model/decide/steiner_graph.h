#pragma once
// The graph that the Steiner solver works on: reduced, numbered anew, each edge knowing the original edges it
// stands for.

#include <cstdint>
#include <utility>
#include <vector>

#include "model/decide/steiner.h"

namespace unstring::steiner {

using Cost = std::int64_t;

/// What an edge of a reduced graph stands for: an original edge, or two chains one after the other.
class Chains {
public:
    explicit Chains(int originals) : originals_(originals) {}
    [[nodiscard]] int join(int a, int b);
    /// Appends the original edges of a chain.
    void unroll(int chain, std::vector<int>& out) const;

private:
    int originals_;
    std::vector<std::pair<int, int>> pairs_;
};

struct WorkEdge {
    int u = 0, v = 0;
    Cost cost = 0;
    int chain = 0;
};

struct Arc { ///< from the vertex in whose list it stands
    int to = 0;
    int edge = 0;
};

struct WorkGraph {
    int root = 0;
    Cost constant = 0;       ///< paid by every tree
    Cost must_prize = 0;     ///< prize that stands for "has to be in": more than any good tree costs
    std::vector<Cost> prize; ///< at most must_prize
    std::vector<WorkEdge> edges;
    std::vector<int> first; ///< arcs of v: first[v] .. first[v + 1]
    std::vector<Arc> arcs;

    [[nodiscard]] int size() const { return static_cast<int>(prize.size()); }
    [[nodiscard]] bool is_must(int v) const { return prize[static_cast<std::size_t>(v)] >= must_prize; }
    [[nodiscard]] const Arc* begin_of(int v) const {
        return arcs.data() + first[static_cast<std::size_t>(v)];
    }
    [[nodiscard]] const Arc* end_of(int v) const {
        return arcs.data() + first[static_cast<std::size_t>(v) + 1];
    }
    [[nodiscard]] int degree(int v) const {
        return first[static_cast<std::size_t>(v) + 1] - first[static_cast<std::size_t>(v)];
    }
};

/// Fills the arc lists from the edges.
void index_arcs(WorkGraph& graph);

/// The part of the problem that hangs together with the root; what lies elsewhere goes into the constant (a
/// vertex that must be in and cannot is counted at must_prize).
[[nodiscard]] WorkGraph work_graph(const SteinerProblem& problem, int root);

/// Reductions that keep an optimal tree: dead ends, vertices with two edges, edges longer than a way round,
/// parallel edges, parts that lost the root. @param gone_vertex, gone_edge  removed first; may be empty
[[nodiscard]] WorkGraph reduced(const WorkGraph& graph, Chains& chains, const std::vector<char>& gone_vertex,
                                const std::vector<char>& gone_edge);

} // namespace unstring::steiner
