#include "model/decide/steiner_bound.h"

#include <algorithm>
#include <limits>
#include <queue>

namespace unstring::steiner {
namespace {

using Place = std::size_t;
constexpr Cost kFar = std::numeric_limits<Cost>::max() / 4;

/// Arc of edge e that enters v.
Place entering(const WorkGraph& graph, int e, int v) {
    return Place(2 * e + (graph.edges[Place(e)].v == v ? 0 : 1));
}
Place leaving(const WorkGraph& graph, int e, int v) {
    return Place(2 * e + (graph.edges[Place(e)].u == v ? 0 : 1));
}

struct CutArc {
    int tail = 0;
    Place arc = 0;
};

/// The set that reaches one prize vertex over saturated arcs, and the arcs that enter it.
class Cut {
public:
    explicit Cut(const WorkGraph& graph) : graph_(graph), stamp_(graph.prize.size(), 0) {}

    void start(int t) {
        ++mark_;
        entering_.clear();
        stack_.clear(); // a cut whose prize was used up leaves vertices that it never took in
        has_root_ = false;
        add(t);
    }
    /// Takes in everything whose arc into the set is saturated. False once the root is inside.
    bool grow(const std::vector<Cost>& reduced, long& work) {
        while (!stack_.empty() && !has_root_) {
            const int v = stack_.back();
            stack_.pop_back();
            work += graph_.degree(v);
            for (const Arc* a = graph_.begin_of(v); a != graph_.end_of(v); ++a) {
                if (is_in(a->to)) continue;
                const Place arc = entering(graph_, a->edge, v);
                if (reduced[arc] == 0)
                    add(a->to);
                else
                    entering_.push_back({a->to, arc});
            }
        }
        if (has_root_) stack_.clear();
        return !has_root_;
    }
    /// Sweeps arcs that have become inner ones; the smallest reduced cost of the rest.
    Cost smallest(const std::vector<Cost>& reduced, long& work) {
        std::erase_if(entering_, [&](const CutArc& c) { return is_in(c.tail); });
        work += static_cast<long>(entering_.size());
        Cost least = kFar;
        for (const CutArc& c : entering_) least = std::min(least, reduced[c.arc]);
        return least;
    }
    void lower(std::vector<Cost>& reduced, Cost by) {
        for (const CutArc& c : entering_) {
            reduced[c.arc] -= by;
            if (reduced[c.arc] == 0 && !is_in(c.tail)) add(c.tail);
        }
    }
    [[nodiscard]] long width() const { return static_cast<long>(entering_.size()); }

private:
    [[nodiscard]] bool is_in(int v) const { return stamp_[Place(v)] == mark_; }
    void add(int v) {
        stamp_[Place(v)] = mark_;
        stack_.push_back(v);
        has_root_ = has_root_ || v == graph_.root;
    }
    const WorkGraph& graph_;
    std::vector<int> stamp_;
    std::vector<int> stack_;
    std::vector<CutArc> entering_;
    int mark_ = 0;
    bool has_root_ = false;
};

} // namespace

DualAscent raise_duals(const WorkGraph& graph, const Progress& progress) {
    DualAscent out;
    out.bound = graph.constant;
    out.reduced.resize(graph.edges.size() * 2);
    for (Place e = 0; e < graph.edges.size(); ++e)
        out.reduced[2 * e] = out.reduced[2 * e + 1] = graph.edges[e].cost;
    out.prize_left = graph.prize;

    using Key = std::pair<long, int>;
    std::priority_queue<Key, std::vector<Key>, std::greater<>> queue;
    for (int t = 0; t < graph.size(); ++t)
        if (t != graph.root && graph.prize[Place(t)] > 0) queue.emplace(graph.degree(t), t);

    Cut cut(graph);
    while (!queue.empty() && !progress.is_cancelled()) {
        const auto [key, t] = queue.top();
        queue.pop();
        cut.start(t);
        Cost& left = out.prize_left[Place(t)];
        bool keeps_on = true;
        while (keeps_on && left > 0 && cut.grow(out.reduced, out.work)) {
            const Cost least = cut.smallest(out.reduced, out.work);
            const long next_key = queue.empty() ? std::numeric_limits<long>::max() : queue.top().first;
            if (cut.width() > key && cut.width() > next_key) {
                queue.emplace(cut.width(), t);
                keeps_on = false;
                break;
            }
            const Cost by = std::min(least, left);
            cut.lower(out.reduced, by);
            left -= by;
            out.bound += by;
        }
    }
    return out;
}

std::vector<char> reached_by_root(const WorkGraph& graph, const DualAscent& dual) {
    std::vector<char> in(graph.prize.size(), 0);
    std::vector<int> stack{graph.root};
    in[Place(graph.root)] = 1;
    while (!stack.empty()) {
        const int v = stack.back();
        stack.pop_back();
        for (const Arc* a = graph.begin_of(v); a != graph.end_of(v); ++a) {
            if (in[Place(a->to)] || dual.reduced[leaving(graph, a->edge, v)] != 0) continue;
            in[Place(a->to)] = 1;
            stack.push_back(a->to);
        }
    }
    return in;
}

Fixed fix_by_reduced_cost(const WorkGraph& graph, const DualAscent& dual, Cost upper) {
    using Item = std::pair<Cost, int>;
    const auto shortest = [&](std::vector<Cost>& distance, bool from_root) {
        std::priority_queue<Item, std::vector<Item>, std::greater<>> queue;
        for (int v = 0; v < graph.size(); ++v)
            if (distance[Place(v)] == 0) queue.emplace(0, v);
        while (!queue.empty()) {
            const auto [d, v] = queue.top();
            queue.pop();
            if (d > distance[Place(v)]) continue;
            for (const Arc* a = graph.begin_of(v); a != graph.end_of(v); ++a) {
                const Place arc = from_root ? leaving(graph, a->edge, v) : entering(graph, a->edge, v);
                const Cost next = d + dual.reduced[arc];
                if (next >= distance[Place(a->to)]) continue;
                distance[Place(a->to)] = next;
                queue.emplace(next, a->to);
            }
        }
    };
    std::vector<Cost> from(graph.prize.size(), kFar), on(graph.prize.size(), kFar);
    from[Place(graph.root)] = 0;
    shortest(from, true);
    for (Place v = 0; v < graph.prize.size(); ++v)
        if (graph.prize[v] > 0) on[v] = 0;
    shortest(on, false);

    Fixed out;
    out.gone_edge.assign(graph.edges.size(), 0);
    out.gone_vertex.assign(graph.prize.size(), 0);
    out.is_in.assign(graph.prize.size(), 0);
    const Cost room = upper - dual.bound;
    for (Place e = 0; e < graph.edges.size(); ++e) {
        const Place u = Place(graph.edges[e].u), v = Place(graph.edges[e].v);
        if (from[u] + dual.reduced[2 * e] + on[v] < room || from[v] + dual.reduced[2 * e + 1] + on[u] < room)
            continue;
        out.gone_edge[e] = 1;
        ++out.edges;
    }
    for (Place v = 0; v < graph.prize.size(); ++v) {
        if (static_cast<int>(v) == graph.root) continue;
        if (from[v] + on[v] >= room && !graph.is_must(static_cast<int>(v))) {
            out.gone_vertex[v] = 1;
            ++out.vertices;
        } else if (graph.prize[v] > 0 && !graph.is_must(static_cast<int>(v)) && dual.prize_left[v] >= room) {
            out.is_in[v] = 1;
            ++out.in;
        }
    }
    return out;
}

} // namespace unstring::steiner
