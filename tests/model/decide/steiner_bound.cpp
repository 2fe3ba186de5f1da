#include "model/decide/steiner_bound.h"

#include <catch2/catch.hpp>

#include <algorithm>
#include <random>

using namespace unstring;

TEST_CASE("trench bound: no reduced cost and no prize left is ever negative, and the rise is what the prizes "
          "gave up") {
    const unsigned long seed = 31;
    std::mt19937_64 random(seed);
    const auto below = [&](int n) { return static_cast<int>(random() % static_cast<unsigned long>(n)); };
    for (int i = 0; i < 200; ++i) {
        // Small prizes against the edges: many cuts end because their prize is used up.
        const int n = 20 + below(100);
        SteinerProblem problem;
        problem.prize.assign(static_cast<std::size_t>(n), 0);
        problem.must.assign(static_cast<std::size_t>(n), 0);
        for (int v = 1; v < n; ++v) problem.edges.push_back({v, below(v), 1 + below(10)});
        for (int e = 0; e < n / 2; ++e) problem.edges.push_back({below(n), below(n), 1 + below(10)});
        for (int v = 0; v < n; v += 2) problem.prize[static_cast<std::size_t>(v)] = 1 + below(10);
        const steiner::WorkGraph graph = steiner::work_graph(problem, below(n));
        const steiner::DualAscent dual = steiner::raise_duals(graph, {});
        INFO("seed " << seed << " graph " << i);
        CHECK(*std::min_element(dual.reduced.begin(), dual.reduced.end()) >= 0);
        steiner::Cost given = graph.constant;
        for (std::size_t v = 0; v < graph.prize.size(); ++v) {
            CHECK(dual.prize_left[v] >= 0);
            if (static_cast<int>(v) != graph.root) given += graph.prize[v] - dual.prize_left[v];
        }
        CHECK(dual.bound == given);
    }
}
