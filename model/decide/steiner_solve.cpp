#include "model/decide/steiner.h"

#include <algorithm>
#include <numeric>
#include <optional>
#include <stdexcept>

#include "model/decide/steiner_tree.h"

namespace unstring {
namespace steiner {
namespace {

using Place = std::size_t;

/// The best tree so far, in original edges.
struct Best {
    bool exists = false;
    Cost cost = 0;
    int root = -1; ///< -1 = no tree at all
    std::vector<int> edges;
};

struct Search {
    const SteinerLimits& limits;
    const Progress& progress;
    Chains& chains;
    Best& best;
    Cost step;     ///< every cost is a multiple of it
    int root = -1; ///< of the trees that are being looked for
};

/// No tree can cost between two multiples of the step.
Cost rounded_up(Cost bound, Cost step) { return (bound + step - 1) / step * step; }

void offer(Search& search, const WorkGraph& graph, const Tree& tree) {
    if (search.best.exists && tree.cost >= search.best.cost) return;
    search.best.exists = true;
    search.best.cost = tree.cost;
    search.best.root = search.root;
    search.best.edges.clear();
    for (const int e : tree.parent_edge)
        if (e >= 0) search.chains.unroll(graph.edges[Place(e)].chain, search.best.edges);
}

/// A tree from the saturated arcs, one from the shortest paying ways; the better one, improved.
Tree first_tree(const WorkGraph& graph, const DualAscent& dual, const Progress& progress) {
    const std::vector<char> reached = reached_by_root(graph, dual);
    Tree tree = spanning_tree(graph, reached);
    std::vector<char> in(graph.prize.size(), 0);
    in[Place(graph.root)] = 1;
    reach_out(graph, in, true);
    Tree other = spanning_tree(graph, in);
    if (other.cost < tree.cost) tree = std::move(other);
    improve(graph, tree, progress);
    return tree;
}

struct Node {
    WorkGraph graph;
    Cost bound = 0;
};

/// Bound, tree, fixing in rounds. Nothing left: the node holds no tree cheaper than the best.
std::optional<Node> work_through(Search& search, WorkGraph graph, int rounds, int shakes, long& work) {
    Cost bound = graph.constant;
    for (int round = 0; round < rounds; ++round) {
        DualAscent dual = raise_duals(graph, search.progress);
        work += dual.work + static_cast<long>(graph.arcs.size()) * 4;
        if (search.progress.is_cancelled())
            return Node{std::move(graph), std::max(bound, rounded_up(dual.bound, search.step))};
        bound = std::max(bound, rounded_up(dual.bound, search.step));
        if (search.best.exists && bound >= search.best.cost) return std::nullopt;
        Tree tree = first_tree(graph, dual, search.progress);
        work += static_cast<long>(graph.arcs.size()) * 20;
        if (round == 0) shake(graph, tree, shakes, search.progress);
        offer(search, graph, tree);
        if (bound >= search.best.cost) return std::nullopt;
        const Fixed fixed = fix_by_reduced_cost(graph, dual, search.best.cost);
        const int before = graph.size() + static_cast<int>(graph.edges.size());
        for (Place v = 0; v < fixed.is_in.size(); ++v)
            if (fixed.is_in[v]) graph.prize[v] = graph.must_prize;
        graph = reduced(graph, search.chains, fixed.gone_vertex, fixed.gone_edge);
        const int after = graph.size() + static_cast<int>(graph.edges.size());
        if (graph.size() == 1) {
            // Only the root is left: its tree is the constant.
            Tree alone = spanning_tree(graph, std::vector<char>(1, 1));
            offer(search, graph, alone);
            return std::nullopt;
        }
        if (after > before - before / 10) break;
    }
    return Node{std::move(graph), bound};
}

/// The vertex to branch on: undecided, in or near the tree of the bound, with most edges; ties by number.
int branch_vertex(const WorkGraph& graph) {
    int best = -1;
    for (int v = 0; v < graph.size(); ++v)
        if (v != graph.root && !graph.is_must(v) && (best < 0 || graph.degree(v) > graph.degree(best)))
            best = v;
    return best;
}

/// Branch and bound, the node with the least bound first. The bound over all that is still open (best.cost:
/// none is).
Cost branch_and_bound(Search& search, Node start) {
    std::vector<Node> open;
    open.push_back(std::move(start));
    long work = 0;
    const auto later = [](const Node& a, const Node& b) { return a.bound > b.bound; };
    while (!open.empty() && work < search.limits.branch_work && !search.progress.is_cancelled()) {
        std::pop_heap(open.begin(), open.end(), later);
        Node node = std::move(open.back());
        open.pop_back();
        if (node.bound >= search.best.cost) break;
        const int v = branch_vertex(node.graph);
        if (v < 0) {
            // Every vertex has to be in: the shortest spanning tree is the answer of this node.
            offer(search, node.graph,
                  spanning_tree(node.graph, std::vector<char>(node.graph.prize.size(), 1)));
            continue;
        }
        for (const bool is_in : {true, false}) {
            WorkGraph graph = node.graph;
            std::vector<char> gone(graph.prize.size(), 0);
            if (is_in)
                graph.prize[Place(v)] = graph.must_prize;
            else
                gone[Place(v)] = 1;
            std::optional<Node> next =
                work_through(search, reduced(graph, search.chains, gone, {}), 3, 0, work);
            if (!next) continue;
            next->bound = std::max(next->bound, node.bound);
            open.push_back(std::move(*next));
            std::push_heap(open.begin(), open.end(), later);
        }
    }
    Cost bound = search.best.cost;
    for (const Node& node : open) bound = std::min(bound, node.bound);
    return bound;
}

/// The graph cut at its root: what hangs together without it, each with a root of its own and no constant.
std::vector<WorkGraph> parts_at_root(const WorkGraph& graph) {
    std::vector<int> part(graph.prize.size(), -1), number(graph.prize.size(), 0);
    std::vector<WorkGraph> parts;
    for (int start = 0; start < graph.size(); ++start) {
        if (start == graph.root || part[Place(start)] >= 0) continue;
        WorkGraph next;
        next.must_prize = graph.must_prize;
        next.prize.assign(1, graph.must_prize);
        std::vector<int> stack{start};
        part[Place(start)] = static_cast<int>(parts.size());
        while (!stack.empty()) {
            const int v = stack.back();
            stack.pop_back();
            number[Place(v)] = next.size();
            next.prize.push_back(graph.prize[Place(v)]);
            for (const Arc* a = graph.begin_of(v); a != graph.end_of(v); ++a) {
                if (a->to == graph.root || part[Place(a->to)] >= 0) continue;
                part[Place(a->to)] = static_cast<int>(parts.size());
                stack.push_back(a->to);
            }
        }
        parts.push_back(std::move(next));
    }
    for (const WorkEdge& edge : graph.edges) {
        const int inner = edge.u == graph.root ? edge.v : edge.u;
        WorkGraph& at = parts[Place(part[Place(inner)])];
        at.edges.push_back({edge.u == graph.root ? 0 : number[Place(edge.u)],
                            edge.v == graph.root ? 0 : number[Place(edge.v)], edge.cost, edge.chain});
    }
    for (WorkGraph& each : parts) index_arcs(each);
    return parts;
}

/// What is left after fixing, part by part: each searched by itself, exactly where it is small.
Cost solve_parts(Search& search, const Node& node) {
    Cost bound = node.graph.constant, cost = node.graph.constant;
    std::vector<int> edges;
    const std::vector<WorkGraph> parts = parts_at_root(node.graph);
    for (const WorkGraph& part : parts) {
        Best best;
        SteinerLimits limits = search.limits;
        limits.branch_work = static_cast<long>(static_cast<double>(limits.branch_work) *
                                               static_cast<double>(part.edges.size()) /
                                               static_cast<double>(node.graph.edges.size()));
        Search inner{limits, search.progress, search.chains, best, search.step, search.root};
        long work = 0;
        const bool is_small = part.size() <= limits.exact_vertices;
        std::optional<Node> left =
            work_through(inner, part, is_small ? 2 : 1, is_small ? limits.shakes : 0, work);
        Cost part_bound = best.cost;
        if (left && limits.branch_work > 0 && left->graph.size() <= limits.exact_vertices)
            part_bound = branch_and_bound(inner, std::move(*left));
        else if (left)
            part_bound = std::min(best.cost, left->bound);
        if (!best.exists) return std::min(node.bound, search.best.cost); // cancelled
        bound += part_bound;
        cost += best.cost;
        edges.insert(edges.end(), best.edges.begin(), best.edges.end());
    }
    if (cost < search.best.cost) search.best = {true, cost, search.root, std::move(edges)};
    return std::min(std::max(bound, node.bound), search.best.cost);
}

/// Best tree with this root; bound on all of them. `best` may hold a cost to beat.
Cost solve_rooted(const SteinerProblem& problem, int root, Cost constant, Search& search) {
    search.root = root;
    WorkGraph graph = work_graph(problem, root);
    graph.constant += constant;
    graph = reduced(graph, search.chains, {}, {});
    long work = 0;
    std::optional<Node> node =
        work_through(search, std::move(graph), std::max(1, search.limits.rounds), 0, work);
    if (!node) return search.best.cost;
    const bool is_searched = search.limits.branch_work > 0 || search.limits.shakes > 0;
    if (!is_searched || search.progress.is_cancelled()) return std::min(node->bound, search.best.cost);
    return solve_parts(search, *node);
}

/// No root given and none that has to be in: the best tree holds the vertex of the largest prize, or does not
/// and then the next one, and so on, until the prizes given up cost more than the best tree.
Cost solve_free(const SteinerProblem& problem, Search& search) {
    const Cost all = std::accumulate(problem.prize.begin(), problem.prize.end(), Cost{0});
    search.best = {true, all, -1, {}};
    std::vector<int> order(problem.prize.size());
    std::iota(order.begin(), order.end(), 0);
    std::stable_sort(order.begin(), order.end(),
                     [&](int a, int b) { return problem.prize[Place(a)] > problem.prize[Place(b)]; });
    SteinerProblem rest = problem;
    Cost given_up = 0, bound = all;
    for (const int v : order) {
        if (problem.prize[Place(v)] == 0 || given_up >= search.best.cost || search.progress.is_cancelled())
            break;
        bound = std::min(bound, solve_rooted(rest, v, given_up, search));
        given_up += problem.prize[Place(v)];
        rest.prize[Place(v)] = 0;
        for (SteinerEdge& edge : rest.edges)
            if (edge.u == v || edge.v == v) edge.v = edge.u; // a loop: gone, and the places stay
    }
    if (search.progress.is_cancelled()) bound = 0;
    return std::min(bound, search.best.cost);
}

void check_input(const SteinerProblem& problem) {
    const int n = static_cast<int>(problem.prize.size());
    if (problem.must.size() != problem.prize.size())
        throw std::logic_error("solve_steiner: one must per prize");
    if (problem.root >= n) throw std::logic_error("solve_steiner: root out of range");
    for (const Cost prize : problem.prize)
        if (prize < 0) throw std::logic_error("solve_steiner: negative prize");
    for (const SteinerEdge& edge : problem.edges)
        if (edge.u < 0 || edge.u >= n || edge.v < 0 || edge.v >= n || edge.cost < 0)
            throw std::logic_error("solve_steiner: edge out of range or negative");
}

Cost common_step(const SteinerProblem& problem) {
    Cost step = 0;
    for (const Cost prize : problem.prize) step = std::gcd(step, prize);
    for (const SteinerEdge& edge : problem.edges) step = std::gcd(step, edge.cost);
    return std::max<Cost>(1, step);
}

} // namespace
} // namespace steiner

SteinerAnswer solve_steiner(const SteinerProblem& problem, const SteinerLimits& limits,
                            const Progress& progress) {
    using namespace steiner;
    check_input(problem);
    int root = problem.root;
    for (Place v = 0; v < problem.must.size() && root < 0; ++v)
        if (problem.must[v]) root = static_cast<int>(v);

    Chains chains(static_cast<int>(problem.edges.size()));
    Best best;
    Search search{limits, progress, chains, best, common_step(problem)};
    SteinerAnswer answer;
    answer.bound = root >= 0 ? solve_rooted(problem, root, 0, search) : solve_free(problem, search);
    answer.was_cancelled = progress.is_cancelled();

    std::vector<char> in(problem.prize.size(), 0);
    if (best.root >= 0)
        in[Place(best.root)] = 1;
    else if (root >= 0)
        in[Place(root)] = 1;
    answer.edges = std::move(best.edges);
    std::sort(answer.edges.begin(), answer.edges.end());
    for (const int e : answer.edges)
        in[Place(problem.edges[Place(e)].u)] = in[Place(problem.edges[Place(e)].v)] = 1;
    for (Place v = 0; v < in.size(); ++v)
        if (in[v]) answer.vertices.push_back(static_cast<int>(v));

    const SteinerCheck check = check_steiner(problem, answer.edges, answer.vertices);
    if (!check.is_tree) throw std::logic_error("solve_steiner: the answer is no tree");
    answer.cost = check.cost;
    answer.feasible = check.holds_musts;
    answer.bound = std::min(answer.bound, answer.cost);
    answer.is_proven = answer.feasible && answer.bound == answer.cost;
    return answer;
}

} // namespace unstring
