#include "model/decide/steiner.h"

#include <numeric>

namespace unstring {

SteinerCheck check_steiner(const SteinerProblem& problem, const std::vector<int>& edges,
                           const std::vector<int>& vertices) {
    SteinerCheck out;
    std::vector<int> set(problem.prize.size());
    std::iota(set.begin(), set.end(), 0);
    const auto find = [&](int v) {
        while (set[static_cast<std::size_t>(v)] != v) v = set[static_cast<std::size_t>(v)];
        return v;
    };
    std::vector<char> in(problem.prize.size(), 0);
    for (const int v : vertices) in[static_cast<std::size_t>(v)] = 1;

    bool is_forest = true;
    for (const int e : edges) {
        const SteinerEdge& edge = problem.edges[static_cast<std::size_t>(e)];
        out.cost += edge.cost;
        const int a = find(edge.u), b = find(edge.v);
        is_forest = is_forest && a != b && in[static_cast<std::size_t>(edge.u)] &&
                    in[static_cast<std::size_t>(edge.v)];
        set[static_cast<std::size_t>(a)] = b;
    }
    const bool root_in = problem.root < 0 || in[static_cast<std::size_t>(problem.root)];
    out.is_tree =
        is_forest && root_in && (vertices.empty() ? edges.empty() : edges.size() + 1 == vertices.size());
    out.holds_musts = true;
    for (std::size_t v = 0; v < in.size(); ++v) {
        if (in[v]) continue;
        if (problem.must[v])
            out.holds_musts = false;
        else
            out.cost += problem.prize[v];
    }
    return out;
}

} // namespace unstring
