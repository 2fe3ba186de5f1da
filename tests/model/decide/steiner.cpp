#include "model/decide/steiner.h"

#include <catch2/catch.hpp>

#include <algorithm>
#include <atomic>
#include <limits>
#include <numeric>
#include <random>

using namespace unstring;

namespace {

SteinerProblem random_problem(std::mt19937_64& random, int vertices, int edges, int prizes, int musts,
                              bool has_root) {
    const auto below = [&](int n) { return static_cast<int>(random() % static_cast<unsigned long>(n)); };
    SteinerProblem out;
    out.prize.assign(static_cast<std::size_t>(vertices), 0);
    out.must.assign(static_cast<std::size_t>(vertices), 0);
    for (int v = 1; v < vertices; ++v) out.edges.push_back({v, below(v), 1 + below(1000)});
    for (int e = vertices - 1; e < edges; ++e)
        out.edges.push_back({below(vertices), below(vertices), 1 + below(1000)});
    for (int i = 0; i < prizes; ++i) out.prize[static_cast<std::size_t>(below(vertices))] = 1 + below(1200);
    for (int i = 0; i < musts; ++i) out.must[static_cast<std::size_t>(below(vertices))] = 1;
    if (has_root) out.root = below(vertices);
    return out;
}

/// Every set of vertices, its cheapest spanning tree by Kruskal: no part of the solver.
std::int64_t brute_force(const SteinerProblem& problem) {
    const unsigned n = static_cast<unsigned>(problem.prize.size());
    std::vector<SteinerEdge> edges = problem.edges;
    std::sort(edges.begin(), edges.end(),
              [](const SteinerEdge& a, const SteinerEdge& b) { return a.cost < b.cost; });
    std::int64_t best = std::numeric_limits<std::int64_t>::max();
    for (unsigned set = 0; set < (1U << n); ++set) {
        std::int64_t cost = 0;
        bool is_allowed = problem.root < 0 || ((set >> problem.root) & 1U);
        for (unsigned v = 0; v < n; ++v) {
            if ((set >> v) & 1U) continue;
            if (problem.must[v]) is_allowed = false;
            cost += problem.prize[v];
        }
        if (!is_allowed || cost >= best) continue;
        std::vector<unsigned> part(n);
        std::iota(part.begin(), part.end(), 0U);
        unsigned parts = 0;
        for (unsigned v = 0; v < n; ++v) parts += (set >> v) & 1U;
        for (const SteinerEdge& edge : edges) {
            const unsigned u = static_cast<unsigned>(edge.u), v = static_cast<unsigned>(edge.v);
            if (!((set >> u) & 1U) || !((set >> v) & 1U) || part[u] == part[v]) continue;
            const unsigned from = part[v], to = part[u];
            for (unsigned& p : part)
                if (p == from) p = to;
            cost += edge.cost;
            --parts;
        }
        if (parts <= 1) best = std::min(best, cost);
    }
    return best;
}

} // namespace

TEST_CASE("trench: the tree costs what trying every set of vertices finds, on 400 random graphs") {
    const unsigned long seed = 20270104;
    std::mt19937_64 random(seed);
    for (int i = 0; i < 400; ++i) {
        const int n = 5 + i % 8;
        const SteinerProblem problem = random_problem(random, n, n + static_cast<int>(random() % 14),
                                                      2 + i % 7, i % 3 == 0 ? 2 : 0, i % 4 != 0);
        const std::int64_t best = brute_force(problem);
        for (const long branch_work : {0L, 60'000'000L}) {
            SteinerLimits limits;
            limits.branch_work = branch_work;
            const SteinerAnswer answer = solve_steiner(problem, limits);
            INFO("seed " << seed << " graph " << i << " branch work " << branch_work);
            CHECK(answer.feasible);
            CHECK(answer.cost >= best);
            CHECK(answer.bound <= best);
            if (branch_work > 0) CHECK(answer.cost == best);
            if (branch_work > 0) CHECK(answer.is_proven);
            const SteinerCheck check = check_steiner(problem, answer.edges, answer.vertices);
            CHECK(check.is_tree);
            CHECK(check.holds_musts);
            CHECK(check.cost == answer.cost);
        }
    }
}

TEST_CASE(
    "trench: without the exact search the bound stays under the cost and the gap under 3 % in the mean") {
    std::mt19937_64 random(7);
    SteinerLimits limits;
    limits.branch_work = 0;
    limits.shakes = 0;
    double gaps = 0;
    for (int i = 0; i < 20; ++i) {
        const SteinerProblem problem = random_problem(random, 300, 600, 80, i % 4, true);
        const SteinerAnswer answer = solve_steiner(problem, limits);
        CHECK(answer.bound <= answer.cost);
        gaps += static_cast<double>(answer.cost - answer.bound) / static_cast<double>(answer.cost) / 20;
    }
    CHECK(gaps < 0.03);
}

TEST_CASE("trench: an empty tree is the answer when no prize pays an edge and there is no root") {
    SteinerProblem problem;
    problem.prize = {3, 0, 2};
    problem.must = {0, 0, 0};
    problem.edges = {{0, 1, 10}, {1, 2, 10}};
    const SteinerAnswer answer = solve_steiner(problem);
    // One vertex alone is a tree too: the dearest prize is collected for nothing.
    CHECK(answer.cost == 2);
    CHECK(answer.bound == 2);
    CHECK(answer.vertices == std::vector<int>{0});

    problem.prize = {0, 0, 0};
    const SteinerAnswer nothing = solve_steiner(problem);
    CHECK(nothing.cost == 0);
    CHECK(nothing.vertices.empty());
}

TEST_CASE("trench: a vertex that has to be in and cannot be reached makes the answer infeasible, not wrong") {
    SteinerProblem problem;
    problem.root = 0;
    problem.prize = {0, 5, 0};
    problem.must = {0, 0, 1};
    problem.edges = {{0, 1, 3}};
    const SteinerAnswer answer = solve_steiner(problem);
    CHECK_FALSE(answer.feasible);
    CHECK_FALSE(answer.is_proven);
    CHECK(answer.cost == 3);
    CHECK(answer.bound <= answer.cost);
}

TEST_CASE("trench: a prize beyond all edges acts like one that has to be in, and is paid in full where "
          "nothing reaches it") {
    SteinerProblem problem;
    problem.root = 0;
    problem.prize = {0, 1'000'000'000'000, 2'000'000'000'000};
    problem.must = {0, 0, 0};
    problem.edges = {{0, 1, 3}};
    const SteinerAnswer answer = solve_steiner(problem);
    CHECK(answer.cost == 2'000'000'000'003);
    CHECK(answer.bound == answer.cost);
}

TEST_CASE("trench: two runs give the same tree, and a cancelled run says so with a valid bound") {
    std::mt19937_64 random(11);
    const SteinerProblem problem = random_problem(random, 400, 900, 100, 3, true);
    const SteinerAnswer first = solve_steiner(problem), second = solve_steiner(problem);
    CHECK(first.edges == second.edges);
    CHECK(first.bound == second.bound);

    const std::atomic<bool> cancel{true};
    Progress progress;
    progress.cancel = &cancel;
    const SteinerAnswer stopped = solve_steiner(problem, {}, progress);
    CHECK(stopped.was_cancelled);
    CHECK(stopped.bound <= first.cost);
}
