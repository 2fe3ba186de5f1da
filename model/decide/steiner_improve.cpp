#include "model/decide/steiner_tree.h"

#include <algorithm>
#include <limits>
#include <queue>
#include <random>

namespace unstring::steiner {
namespace {

using Place = std::size_t;
constexpr Cost kFar = std::numeric_limits<Cost>::max() / 4;
using Item = std::pair<Cost, int>;
constexpr int kClimb = 600;           ///< steps walked up the tree for one exchange
constexpr std::size_t kBranch = 4000; ///< vertices of a branch that is still moved as a whole

/// Makes `v` the head of its branch by turning the parents round from v up to `top`.
void turn_round(Tree& tree, int v, int top) {
    int child = v, above = tree.parent[Place(v)], edge = tree.parent_edge[Place(v)];
    while (child != top) {
        const int next = tree.parent[Place(above)], next_edge = tree.parent_edge[Place(above)];
        tree.parent[Place(above)] = child;
        tree.parent_edge[Place(above)] = edge;
        child = above;
        above = next;
        edge = next_edge;
    }
}

/// Puts vertices in: each joins by its cheapest edge, and every further edge of it drives out the dearest of
/// the circle.
class VertexInsertion {
public:
    VertexInsertion(const WorkGraph& graph, Tree& tree)
        : graph_(graph), tree_(tree), stamp_(graph.prize.size(), 0) {}

    bool run() {
        bool better = false;
        for (int v = 0; v < graph_.size(); ++v)
            if (!tree_.in[Place(v)] && try_vertex(v)) better = true;
        return better;
    }

private:
    struct Was {
        int vertex, parent, edge;
    };
    [[nodiscard]] Cost cost(int e) const { return graph_.edges[Place(e)].cost; }

    bool try_vertex(int v) {
        const Arc* best = nullptr;
        int ways = 0;
        for (const Arc* a = graph_.begin_of(v); a != graph_.end_of(v); ++a) {
            if (!tree_.in[Place(a->to)]) continue;
            ++ways;
            if (best == nullptr || cost(a->edge) < cost(best->edge)) best = a;
        }
        if (best == nullptr || (ways < 2 && graph_.prize[Place(v)] <= cost(best->edge))) return false;
        was_.clear();
        set(v, best->to, best->edge);
        tree_.in[Place(v)] = 1;
        Cost gain = graph_.prize[Place(v)] - cost(best->edge);
        for (const Arc* a = graph_.begin_of(v); a != graph_.end_of(v); ++a)
            if (a != best && tree_.in[Place(a->to)]) gain += exchange(v, a->to, a->edge);
        if (gain > 0) {
            tree_.cost -= gain;
            return true;
        }
        for (auto at = was_.rbegin(); at != was_.rend(); ++at) {
            tree_.parent[Place(at->vertex)] = at->parent;
            tree_.parent_edge[Place(at->vertex)] = at->edge;
        }
        tree_.in[Place(v)] = 0;
        return false;
    }
    void set(int v, int parent, int edge) {
        was_.push_back({v, tree_.parent[Place(v)], tree_.parent_edge[Place(v)]});
        tree_.parent[Place(v)] = parent;
        tree_.parent_edge[Place(v)] = edge;
    }
    /// Adds edge v-w and takes out the dearest edge of the circle; the gain, 0 when the new one is the
    /// dearest.
    Cost exchange(int v, int w, int edge) {
        ++mark_;
        int x = v;
        for (int step = 0; x >= 0 && step < kClimb; ++step, x = tree_.parent[Place(x)])
            stamp_[Place(x)] = mark_;
        Cost dearest = cost(edge);
        int cut = -1, meet = w;
        for (int step = 0; meet >= 0 && stamp_[Place(meet)] != mark_;
             ++step, meet = tree_.parent[Place(meet)]) {
            if (step >= kClimb || tree_.parent[Place(meet)] < 0) return 0;
            if (cost(tree_.parent_edge[Place(meet)]) > dearest)
                dearest = cost(tree_.parent_edge[Place(meet)]), cut = meet;
        }
        bool on_w_side = cut >= 0;
        for (x = v; x != meet; x = tree_.parent[Place(x)])
            if (cost(tree_.parent_edge[Place(x)]) > dearest)
                dearest = cost(tree_.parent_edge[Place(x)]), cut = x, on_w_side = false;
        if (cut < 0) return 0;
        hang(on_w_side ? w : v, cut, on_w_side ? v : w, edge);
        return dearest - cost(edge);
    }
    /// Hangs the branch below `cut` by its vertex `head` to `onto`.
    void hang(int head, int cut, int onto, int edge) {
        int child = head, above = tree_.parent[Place(head)], above_edge = tree_.parent_edge[Place(head)];
        set(head, onto, edge);
        while (child != cut) {
            const int next = tree_.parent[Place(above)], next_edge = tree_.parent_edge[Place(above)];
            set(above, child, above_edge);
            child = above;
            above = next;
            above_edge = next_edge;
        }
    }

    const WorkGraph& graph_;
    Tree& tree_;
    std::vector<int> stamp_;
    std::vector<Was> was_;
    int mark_ = 0;
};

/// Key-path exchange: the chain from a branch up to the next fork is cut, the branch joins again where it is
/// cheapest, at the root (another service) too.
class KeyPaths {
public:
    KeyPaths(const WorkGraph& graph, Tree& tree)
        : graph_(graph), tree_(tree), children_(graph.prize.size(), 0), branch_(graph.prize.size(), 0),
          chain_mark_(graph.prize.size(), 0), distance_(graph.prize.size(), kFar),
          before_(graph.prize.size(), -1), before_edge_(graph.prize.size(), -1) {}

    bool run(const Progress& progress) {
        std::fill(children_.begin(), children_.end(), 0);
        for (const int parent : tree_.parent)
            if (parent >= 0) ++children_[Place(parent)];
        bool better = false;
        for (int v = 0; v < graph_.size(); ++v) {
            if (!tree_.in[Place(v)] || v == graph_.root) continue;
            if (children_[Place(v)] == 1 && graph_.prize[Place(v)] == 0) continue;
            if (progress.is_cancelled()) break;
            if (try_branch(v)) better = true;
        }
        return better;
    }

private:
    [[nodiscard]] Cost cost(int e) const { return graph_.edges[Place(e)].cost; }

    /// The chain above v whose removal saves most: fills chain_ with its inner vertices, answers the saving.
    Cost best_chain(int v) {
        chain_.clear();
        Cost saved = 0, best = 0;
        std::size_t best_length = 0;
        for (int x = v;;) {
            saved += cost(tree_.parent_edge[Place(x)]);
            if (saved > best) best = saved, best_length = chain_.size();
            const int y = tree_.parent[Place(x)];
            if (y == graph_.root || children_[Place(y)] != 1 || graph_.is_must(y)) break;
            saved -= graph_.prize[Place(y)];
            chain_.push_back(y);
            x = y;
        }
        chain_.resize(best_length);
        return best;
    }
    bool collect_branch(int v) {
        branch_list_.assign(1, v);
        for (Place i = 0; i < branch_list_.size(); ++i) {
            const int x = branch_list_[i];
            branch_[Place(x)] = mark_;
            for (const Arc* a = graph_.begin_of(x); a != graph_.end_of(x); ++a)
                if (tree_.parent[Place(a->to)] == x && tree_.parent_edge[Place(a->to)] == a->edge)
                    branch_list_.push_back(a->to);
            if (branch_list_.size() > kBranch) return false;
        }
        return true;
    }
    /// Nearest vertex of the remaining tree within `room`, prizes on the way counted as cheaper edges; -1 =
    /// none.
    int rejoin(Cost room) {
        std::priority_queue<Item, std::vector<Item>, std::greater<>> queue;
        touched_.clear();
        for (const int x : branch_list_) {
            distance_[Place(x)] = 0;
            before_[Place(x)] = -1;
            touched_.push_back(x);
            queue.emplace(0, x);
        }
        while (!queue.empty()) {
            const auto [d, x] = queue.top();
            queue.pop();
            if (d > distance_[Place(x)]) continue;
            if (tree_.in[Place(x)] && branch_[Place(x)] != mark_ && chain_mark_[Place(x)] != mark_) return x;
            for (const Arc* a = graph_.begin_of(x); a != graph_.end_of(x); ++a) {
                const int y = a->to;
                const bool is_outside = !tree_.in[Place(y)] || chain_mark_[Place(y)] == mark_;
                const Cost next =
                    d + std::max<Cost>(0, cost(a->edge) - (is_outside ? graph_.prize[Place(y)] : 0));
                if (next >= room || next >= distance_[Place(y)]) continue;
                if (distance_[Place(y)] == kFar) touched_.push_back(y);
                distance_[Place(y)] = next;
                before_[Place(y)] = x;
                before_edge_[Place(y)] = a->edge;
                queue.emplace(next, y);
            }
        }
        return -1;
    }
    bool try_branch(int v) {
        ++mark_;
        const Cost saving = best_chain(v);
        if (!collect_branch(v)) return false;
        for (const int x : chain_) chain_mark_[Place(x)] = mark_;
        const int target = rejoin(saving);
        const bool better = target >= 0 && join(v, target, saving);
        for (const int x : touched_) distance_[Place(x)] = kFar;
        return better;
    }
    bool join(int v, int target, Cost saving) {
        Cost price = 0;
        int x = target;
        for (; before_[Place(x)] >= 0; x = before_[Place(x)]) {
            price += cost(before_edge_[Place(x)]);
            if (x != target) price -= graph_.prize[Place(x)];
        }
        if (price >= saving) return false;
        const int top = chain_.empty() ? tree_.parent[Place(v)] : tree_.parent[Place(chain_.back())];
        for (const int c : chain_) {
            tree_.in[Place(c)] = 0;
            tree_.parent[Place(c)] = tree_.parent_edge[Place(c)] = -1;
            children_[Place(c)] = 0;
        }
        --children_[Place(top)];
        turn_children(x, v);
        turn_round(tree_, x, v);
        for (int at = target; before_[Place(at)] >= 0; at = before_[Place(at)]) {
            const int below = before_[Place(at)];
            tree_.in[Place(below)] = 1;
            tree_.parent[Place(below)] = at;
            tree_.parent_edge[Place(below)] = before_edge_[Place(at)];
            ++children_[Place(at)];
        }
        tree_.cost -= saving - price;
        return true;
    }
    /// Child counts when the branch of v is turned to hang by x.
    void turn_children(int x, int v) {
        for (int at = x; at != v; at = tree_.parent[Place(at)]) {
            --children_[Place(tree_.parent[Place(at)])];
            ++children_[Place(at)];
        }
    }

    const WorkGraph& graph_;
    Tree& tree_;
    std::vector<int> children_, branch_, chain_mark_;
    std::vector<Cost> distance_;
    std::vector<int> before_, before_edge_, chain_, branch_list_, touched_;
    int mark_ = 0;
};

bool take_if_better(Tree& tree, Tree&& other) {
    if (other.cost >= tree.cost) return false;
    tree = std::move(other);
    return true;
}

} // namespace

void improve(const WorkGraph& graph, Tree& tree, const Progress& progress) {
    for (int round = 0; round < 30 && !progress.is_cancelled(); ++round) {
        const Cost before = tree.cost;
        for (const bool only_paying : {false, true}) {
            std::vector<char> in = tree.in;
            reach_out(graph, in, only_paying);
            take_if_better(tree, spanning_tree(graph, in));
        }
        VertexInsertion(graph, tree).run();
        KeyPaths(graph, tree).run(progress);
        take_if_better(tree, spanning_tree(graph, tree.in));
        if (tree.cost >= before) break;
    }
}

void shake(const WorkGraph& graph, Tree& tree, int times, const Progress& progress) {
    std::mt19937_64 random(graph.prize.size() * 1'000'003 + graph.edges.size());
    const auto below = [&](std::size_t n) { return static_cast<std::size_t>(random() % n); };
    std::vector<int> ball;
    for (int i = 0; i < times && !progress.is_cancelled(); ++i) {
        const std::size_t size = 6 + below(std::min<std::size_t>(50, graph.prize.size()));
        ball.assign(1, static_cast<int>(below(graph.prize.size())));
        std::vector<char> seen(graph.prize.size(), 0);
        seen[Place(ball[0])] = 1;
        for (Place at = 0; at < ball.size() && ball.size() < size; ++at)
            for (const Arc* a = graph.begin_of(ball[at]); a != graph.end_of(ball[at]); ++a)
                if (!seen[Place(a->to)]) seen[Place(a->to)] = 1, ball.push_back(a->to);
        std::vector<char> in = tree.in;
        const std::size_t drop = 1 + below(4), add = 1 + below(6);
        for (const int v : ball) {
            if (v == graph.root) continue;
            if (in[Place(v)])
                in[Place(v)] = below(5) >= drop ? 1 : 0;
            else
                in[Place(v)] = below(8) < add ? 1 : 0;
        }
        // What lost the root comes back by the shortest ways.
        Tree start = spanning_tree(graph, in);
        std::vector<char> mended = start.in;
        reach_out(graph, mended, i % 2 == 0);
        for (const int v : ball)
            if (in[Place(v)]) mended[Place(v)] = 1;
        Tree next = spanning_tree(graph, mended);
        improve(graph, next, progress);
        if (next.cost <= tree.cost) tree = std::move(next);
    }
}

} // namespace unstring::steiner
