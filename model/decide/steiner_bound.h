#pragma once
// Lower bound by Wong's dual ascent on the directed form of the prize-collecting tree: every prize vertex t
// has a copy t' that is reached either from t for nothing or straight from the root for its prize.
//
//   root --prize--> t' <--0-- t <--cost-- ...

#include "model/decide/steiner_graph.h"

namespace unstring::steiner {

struct DualAscent {
    Cost bound = 0;               ///< with the graph's constant
    std::vector<Cost> reduced;    ///< of arc 2e = u to v, 2e + 1 = v to u
    std::vector<Cost> prize_left; ///< reduced cost of root -> t'
    long work = 0;                ///< arcs looked at
};

/// Raises the duals cut by cut, the prize vertex with the smallest cut first.
/// Other orders were tried (those left outside first, those that must be in first): each gave a weaker bound.
[[nodiscard]] DualAscent raise_duals(const WorkGraph& graph, const Progress& progress);

/// Vertices that the root reaches over arcs of reduced cost 0.
[[nodiscard]] std::vector<char> reached_by_root(const WorkGraph& graph, const DualAscent& dual);

struct Fixed {
    std::vector<char> gone_edge, gone_vertex; ///< in no tree cheaper than `upper`
    std::vector<char> is_in;                  ///< in every tree cheaper than `upper`
    int edges = 0, vertices = 0, in = 0;      ///< how many
};

/// Reduced-cost fixing: bound + way from the root + arc + way on to a prize >= upper.
[[nodiscard]] Fixed fix_by_reduced_cost(const WorkGraph& graph, const DualAscent& dual, Cost upper);

} // namespace unstring::steiner
