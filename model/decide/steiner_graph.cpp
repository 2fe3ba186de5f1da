#include "model/decide/steiner_graph.h"

#include <algorithm>
#include <numeric>
#include <queue>
#include <tuple>

namespace unstring::steiner {
namespace {

using Place = std::size_t;

/// Cost of a shortest spanning forest.
Cost spanning_cost(const SteinerProblem& problem) {
    std::vector<int> order(problem.edges.size()), set(problem.prize.size());
    std::iota(order.begin(), order.end(), 0);
    std::iota(set.begin(), set.end(), 0);
    std::sort(order.begin(), order.end(), [&](int a, int b) {
        return std::pair(problem.edges[Place(a)].cost, a) < std::pair(problem.edges[Place(b)].cost, b);
    });
    const auto find = [&](int v) {
        while (set[Place(v)] != v) v = set[Place(v)] = set[Place(set[Place(v)])];
        return v;
    };
    Cost sum = 0;
    for (const int e : order) {
        const int a = find(problem.edges[Place(e)].u), b = find(problem.edges[Place(e)].v);
        if (a == b) continue;
        set[Place(a)] = b;
        sum += problem.edges[Place(e)].cost;
    }
    return sum;
}

/// The graph while it is being reduced: edges by vertex, flagged when gone.
struct Draft {
    WorkGraph graph;
    std::vector<char> edge_gone, vertex_gone;
    std::vector<std::vector<int>> at; ///< edges of each vertex, gone ones swept now and then
    std::vector<Cost> distance;       ///< room for searches, -1 between them

    explicit Draft(const WorkGraph& from)
        : graph(from), edge_gone(from.edges.size(), 0), vertex_gone(from.prize.size(), 0),
          at(from.prize.size()), distance(from.prize.size(), -1) {
        for (Place e = 0; e < graph.edges.size(); ++e) {
            at[Place(graph.edges[e].u)].push_back(static_cast<int>(e));
            at[Place(graph.edges[e].v)].push_back(static_cast<int>(e));
        }
    }
    [[nodiscard]] int other(int e, int v) const {
        return graph.edges[Place(e)].u == v ? graph.edges[Place(e)].v : graph.edges[Place(e)].u;
    }
    void sweep(int v) {
        std::erase_if(at[Place(v)], [&](int e) { return edge_gone[Place(e)] != 0; });
    }
    void remove_vertex(int v) {
        vertex_gone[Place(v)] = 1;
        graph.constant += graph.prize[Place(v)];
        for (const int e : at[Place(v)]) edge_gone[Place(e)] = 1;
    }
};

/// Loops go; of parallel edges the cheapest stays.
void drop_parallel(Draft& draft) {
    std::vector<std::tuple<int, int, Cost, int>> list;
    for (Place e = 0; e < draft.graph.edges.size(); ++e) {
        if (draft.edge_gone[e]) continue;
        const WorkEdge& edge = draft.graph.edges[e];
        if (edge.u == edge.v)
            draft.edge_gone[e] = 1;
        else
            list.emplace_back(std::min(edge.u, edge.v), std::max(edge.u, edge.v), edge.cost,
                              static_cast<int>(e));
    }
    std::sort(list.begin(), list.end());
    for (Place i = 1; i < list.size(); ++i)
        if (std::get<0>(list[i]) == std::get<0>(list[i - 1]) &&
            std::get<1>(list[i]) == std::get<1>(list[i - 1]))
            draft.edge_gone[Place(std::get<3>(list[i]))] = 1;
}

/// An edge that is no shorter than another way between its ends is never needed.
class LongEdges {
public:
    explicit LongEdges(Draft& draft) : draft_(draft), distance_(draft.distance) {}

    void drop() {
        for (Place e = 0; e < draft_.graph.edges.size(); ++e)
            if (!draft_.edge_gone[e] && has_way_round(static_cast<int>(e))) draft_.edge_gone[e] = 1;
    }

private:
    using Item = std::pair<Cost, int>;
    using Queue = std::priority_queue<Item, std::vector<Item>, std::greater<>>;
    static constexpr int kLook = 120; ///< vertices looked at per edge

    bool has_way_round(int e) {
        const WorkEdge& edge = draft_.graph.edges[Place(e)];
        Queue queue;
        queue.emplace(0, edge.u);
        distance_[Place(edge.u)] = 0;
        touched_.assign(1, edge.u);
        for (int looked = 0; !queue.empty() && distance_[Place(edge.v)] < 0 && looked < kLook; ++looked) {
            const auto [d, v] = queue.top();
            queue.pop();
            if (d <= distance_[Place(v)]) spread(v, d, e, queue);
        }
        const bool found = distance_[Place(edge.v)] >= 0;
        for (const int v : touched_) distance_[Place(v)] = -1;
        return found;
    }
    void spread(int v, Cost d, int e, Queue& queue) {
        for (const int f : draft_.at[Place(v)]) {
            if (draft_.edge_gone[Place(f)] || f == e) continue;
            const int w = draft_.other(f, v);
            const Cost next = d + draft_.graph.edges[Place(f)].cost;
            Cost& known = distance_[Place(w)];
            if (next > draft_.graph.edges[Place(e)].cost || (known >= 0 && known <= next)) continue;
            if (known < 0) touched_.push_back(w);
            known = next;
            queue.emplace(next, w);
        }
    }

    Draft& draft_;
    std::vector<Cost>& distance_; ///< -1 = not reached
    std::vector<int> touched_;
};

/// Dead ends not worth their edge, and vertices with two edges that can only be passed through: a vertex
/// whose prize is at most its cheaper edge is never the end of a branch, so both edges or none are used.
bool contract(Draft& draft, Chains& chains) {
    WorkGraph& graph = draft.graph;
    std::vector<int> stack(graph.prize.size());
    std::iota(stack.rbegin(), stack.rend(), 0);
    bool changed = false;
    while (!stack.empty()) {
        const int v = stack.back();
        stack.pop_back();
        if (v == graph.root || draft.vertex_gone[Place(v)]) continue;
        draft.sweep(v);
        const std::vector<int> at = draft.at[Place(v)];
        const Cost prize = graph.prize[Place(v)];
        if (at.empty() || (at.size() == 1 && prize <= graph.edges[Place(at[0])].cost)) {
            draft.remove_vertex(v);
            if (!at.empty()) stack.push_back(draft.other(at[0], v));
            changed = changed || !at.empty();
        } else if (at.size() == 2) {
            const WorkEdge a = graph.edges[Place(at[0])], b = graph.edges[Place(at[1])];
            if (prize > std::min(a.cost, b.cost)) continue;
            const int x = draft.other(at[0], v), y = draft.other(at[1], v);
            draft.remove_vertex(v);
            if (x != y) {
                graph.edges.push_back({x, y, a.cost + b.cost - prize, chains.join(a.chain, b.chain)});
                draft.edge_gone.push_back(0);
                const int e = static_cast<int>(graph.edges.size()) - 1;
                draft.at[Place(x)].push_back(e);
                draft.at[Place(y)].push_back(e);
            }
            stack.push_back(x);
            stack.push_back(y);
            changed = true;
        }
    }
    return changed;
}

/// What the root cannot reach is left outside.
void drop_unreached(Draft& draft) {
    std::vector<char> seen(draft.graph.prize.size(), 0);
    std::vector<int> stack(1, draft.graph.root);
    seen[Place(draft.graph.root)] = 1;
    while (!stack.empty()) {
        const int v = stack.back();
        stack.pop_back();
        for (const int e : draft.at[Place(v)]) {
            if (draft.edge_gone[Place(e)]) continue;
            const int w = draft.other(e, v);
            if (seen[Place(w)]) continue;
            seen[Place(w)] = 1;
            stack.push_back(w);
        }
    }
    for (Place v = 0; v < seen.size(); ++v)
        if (!seen[v] && !draft.vertex_gone[v]) draft.remove_vertex(static_cast<int>(v));
}

WorkGraph compact(const Draft& draft) {
    WorkGraph out;
    out.constant = draft.graph.constant;
    out.must_prize = draft.graph.must_prize;
    std::vector<int> number(draft.graph.prize.size(), -1);
    for (Place v = 0; v < number.size(); ++v) {
        if (draft.vertex_gone[v]) continue;
        number[v] = out.size();
        out.prize.push_back(draft.graph.prize[v]);
    }
    out.root = number[Place(draft.graph.root)];
    for (Place e = 0; e < draft.graph.edges.size(); ++e) {
        if (draft.edge_gone[e]) continue;
        const WorkEdge& edge = draft.graph.edges[e];
        out.edges.push_back({number[Place(edge.u)], number[Place(edge.v)], edge.cost, edge.chain});
    }
    index_arcs(out);
    return out;
}

} // namespace

int Chains::join(int a, int b) {
    pairs_.emplace_back(a, b);
    return originals_ + static_cast<int>(pairs_.size()) - 1;
}

void Chains::unroll(int chain, std::vector<int>& out) const {
    std::vector<int> stack{chain};
    while (!stack.empty()) {
        const int c = stack.back();
        stack.pop_back();
        if (c < originals_) {
            out.push_back(c);
        } else {
            stack.push_back(pairs_[Place(c - originals_)].first);
            stack.push_back(pairs_[Place(c - originals_)].second);
        }
    }
}

void index_arcs(WorkGraph& graph) {
    graph.first.assign(graph.prize.size() + 1, 0);
    for (const WorkEdge& edge : graph.edges) {
        ++graph.first[Place(edge.u) + 1];
        ++graph.first[Place(edge.v) + 1];
    }
    std::partial_sum(graph.first.begin(), graph.first.end(), graph.first.begin());
    graph.arcs.resize(graph.edges.size() * 2);
    std::vector<int> next(graph.first.begin(), graph.first.end() - 1);
    for (Place e = 0; e < graph.edges.size(); ++e) {
        graph.arcs[Place(next[Place(graph.edges[e].u)]++)] = {graph.edges[e].v, static_cast<int>(e)};
        graph.arcs[Place(next[Place(graph.edges[e].v)]++)] = {graph.edges[e].u, static_cast<int>(e)};
    }
}

WorkGraph work_graph(const SteinerProblem& problem, int root) {
    WorkGraph out;
    out.root = root;
    // A spanning tree holds every vertex that must be in, so no best tree costs more than it.
    out.must_prize = spanning_cost(problem) + 1;
    out.prize.resize(problem.prize.size());
    for (Place v = 0; v < out.prize.size(); ++v)
        out.prize[v] = problem.must[v] ? out.must_prize : problem.prize[v];
    out.prize[Place(root)] = out.must_prize;
    for (Place e = 0; e < problem.edges.size(); ++e)
        out.edges.push_back(
            {problem.edges[e].u, problem.edges[e].v, problem.edges[e].cost, static_cast<int>(e)});
    Draft draft(out);
    drop_parallel(draft);
    drop_unreached(draft);
    // Only inside the root's part is a large prize as good as a must; outside it is paid in full.
    for (Cost& prize : draft.graph.prize) prize = std::min(prize, out.must_prize);
    return compact(draft);
}

WorkGraph reduced(const WorkGraph& graph, Chains& chains, const std::vector<char>& gone_vertex,
                  const std::vector<char>& gone_edge) {
    Draft draft(graph);
    for (Place e = 0; e < gone_edge.size(); ++e)
        if (gone_edge[e]) draft.edge_gone[e] = 1;
    for (Place v = 0; v < gone_vertex.size(); ++v)
        if (gone_vertex[v]) draft.remove_vertex(static_cast<int>(v));
    drop_unreached(draft);
    bool again = true;
    for (int round = 0; again && round < 4; ++round) {
        drop_parallel(draft);
        LongEdges(draft).drop();
        again = contract(draft, chains);
    }
    drop_parallel(draft);
    drop_unreached(draft);
    return compact(draft);
}

} // namespace unstring::steiner
