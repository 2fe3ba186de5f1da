#include "model/decide/steiner_tree.h"

#include <algorithm>
#include <limits>
#include <queue>

namespace unstring::steiner {
namespace {

using Place = std::size_t;
constexpr Cost kFar = std::numeric_limits<Cost>::max() / 4;
using Item = std::pair<Cost, int>;
using Queue = std::priority_queue<Item, std::vector<Item>, std::greater<>>;

/// Strong pruning; `order` is the order in which the tree grew.
void prune(const WorkGraph& graph, Tree& tree, const std::vector<int>& order) {
    std::vector<Cost> worth(graph.prize.size(), 0);
    for (const int v : order) worth[Place(v)] = graph.prize[Place(v)];
    for (auto at = order.rbegin(); at != order.rend(); ++at) {
        const int v = *at;
        if (v == graph.root) continue;
        const Cost net = worth[Place(v)] - graph.edges[Place(tree.parent_edge[Place(v)])].cost;
        if (net > 0)
            worth[Place(tree.parent[Place(v)])] += net;
        else
            tree.in[Place(v)] = 0;
    }
    for (const int v : order) {
        if (v == graph.root) continue;
        if (!tree.in[Place(v)] || !tree.in[Place(tree.parent[Place(v)])]) {
            tree.in[Place(v)] = 0;
            tree.parent[Place(v)] = tree.parent_edge[Place(v)] = -1;
        }
    }
}

} // namespace

Cost cost_of(const WorkGraph& graph, const Tree& tree) {
    Cost sum = graph.constant;
    for (Place v = 0; v < graph.prize.size(); ++v) {
        if (!tree.in[v])
            sum += graph.prize[v];
        else if (tree.parent_edge[v] >= 0)
            sum += graph.edges[Place(tree.parent_edge[v])].cost;
    }
    return sum;
}

Tree spanning_tree(const WorkGraph& graph, const std::vector<char>& in) {
    Tree tree;
    tree.in.assign(graph.prize.size(), 0);
    tree.parent.assign(graph.prize.size(), -1);
    tree.parent_edge.assign(graph.prize.size(), -1);
    std::vector<Cost> key(graph.prize.size(), kFar);
    std::vector<int> order;
    Queue queue;
    key[Place(graph.root)] = 0;
    queue.emplace(0, graph.root);
    while (!queue.empty()) {
        const auto [k, v] = queue.top();
        queue.pop();
        if (tree.in[Place(v)]) continue;
        tree.in[Place(v)] = 1;
        order.push_back(v);
        for (const Arc* a = graph.begin_of(v); a != graph.end_of(v); ++a) {
            const Cost cost = graph.edges[Place(a->edge)].cost;
            if (!in[Place(a->to)] || tree.in[Place(a->to)] || cost >= key[Place(a->to)]) continue;
            key[Place(a->to)] = cost;
            tree.parent[Place(a->to)] = v;
            tree.parent_edge[Place(a->to)] = a->edge;
            queue.emplace(cost, a->to);
        }
    }
    prune(graph, tree, order);
    tree.cost = cost_of(graph, tree);
    return tree;
}

void reach_out(const WorkGraph& graph, std::vector<char>& in, bool only_paying) {
    std::vector<Cost> distance(graph.prize.size(), kFar);
    std::vector<int> before(graph.prize.size(), -1);
    Queue queue;
    for (int v = 0; v < graph.size(); ++v) {
        if (!in[Place(v)]) continue;
        distance[Place(v)] = 0;
        queue.emplace(0, v);
    }
    std::vector<char> next_in = in;
    while (!queue.empty()) {
        const auto [d, v] = queue.top();
        queue.pop();
        if (d > distance[Place(v)]) continue;
        const Cost prize = graph.prize[Place(v)];
        Cost from = d;
        if (!next_in[Place(v)] && prize > 0 && (!only_paying || prize >= d)) {
            for (int w = v; w >= 0 && !next_in[Place(w)]; w = before[Place(w)]) {
                next_in[Place(w)] = 1;
                if (!only_paying) continue;
                distance[Place(w)] = 0;
                if (w != v) queue.emplace(0, w);
            }
            if (only_paying) from = 0;
        }
        for (const Arc* a = graph.begin_of(v); a != graph.end_of(v); ++a) {
            const Cost next = from + graph.edges[Place(a->edge)].cost;
            if (next >= distance[Place(a->to)]) continue;
            distance[Place(a->to)] = next;
            before[Place(a->to)] = v;
            queue.emplace(next, a->to);
        }
    }
    in = std::move(next_in);
}

} // namespace unstring::steiner
