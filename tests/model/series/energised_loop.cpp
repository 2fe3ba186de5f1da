#include "model/series/energised_loop.h"

#include <algorithm>
#include <limits>
#include <random>
#include <stdexcept>

#include <catch2/catch.hpp>

namespace unstring {
namespace {

LoopCutBack cutback(int a, int b, double new_cable_m) {
    return {a, b, new_cable_m, 0, true, CutBackKind::pullbox};
}

/// Tries every set of cut-backs: no two overlap, each with only lamps that are off between its ends; counts
/// metres leg by leg.
double by_brute_force_m(const std::vector<double>& legs_m, const std::vector<char>& live,
                        const std::vector<LoopCutBack>& cutbacks) {
    if (std::none_of(live.begin(), live.end(), [](char is_live) { return is_live != 0; })) return 0;
    double shortest_m = std::numeric_limits<double>::infinity();
    for (unsigned set = 0; set < (1U << cutbacks.size()); ++set) {
        std::vector<int> skipped(legs_m.size(), 0);
        double metres = 0;
        bool is_legal = true;
        for (std::size_t k = 0; k < cutbacks.size(); ++k) {
            if ((set >> k & 1U) == 0) continue;
            metres += cutbacks[k].new_cable_m;
            for (int leg = cutbacks[k].a; leg < cutbacks[k].b; ++leg)
                ++skipped[static_cast<std::size_t>(leg)];
            for (int p = cutbacks[k].a + 1; p < cutbacks[k].b; ++p)
                is_legal = is_legal && live[static_cast<std::size_t>(p - 1)] == 0;
        }
        for (std::size_t leg = 0; leg < legs_m.size(); ++leg) {
            is_legal = is_legal && skipped[leg] <= 1;
            if (skipped[leg] == 0) metres += legs_m[leg];
        }
        if (is_legal) shortest_m = std::min(shortest_m, metres);
    }
    return shortest_m;
}

} // namespace

TEST_CASE("energised loop: equals brute force over every set of cut-backs on 500 random strings of up to 12 "
          "lamps") {
    const unsigned seed = 20270;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    const auto whole = [&](int low, int high) {
        return std::uniform_int_distribution<int>(low, high)(random);
    };
    int with_cutback = 0;
    for (int round = 0; round < 500; ++round) {
        const int n = whole(1, 12);
        std::vector<double> legs_m;
        std::vector<char> live;
        std::vector<LoopCutBack> cutbacks;
        for (int leg = 0; leg <= n; ++leg) legs_m.push_back(whole(1, 60));
        for (int p = 1; p <= n; ++p) live.push_back(whole(0, 2) == 0 ? 1 : 0);
        for (int k = whole(0, 8); k > 0; --k) {
            const int a = whole(0, n);
            cutbacks.push_back(cutback(a, whole(a + 1, n + 1), whole(0, 80)));
        }
        const EnergisedLoop loop = energised_loop(legs_m, live, cutbacks);
        CAPTURE(round, n);
        REQUIRE(loop.cable_m == Approx(by_brute_force_m(legs_m, live, cutbacks)).margin(1e-9));
        double new_cable_m = 0;
        int end = 0;
        for (const int k : loop.used) {
            REQUIRE(cutbacks[static_cast<std::size_t>(k)].a >= end);
            end = cutbacks[static_cast<std::size_t>(k)].b;
            new_cable_m += cutbacks[static_cast<std::size_t>(k)].new_cable_m;
        }
        REQUIRE(loop.new_cable_m == new_cable_m);
        with_cutback += loop.used.empty() ? 0 : 1;
    }
    CHECK(with_cutback > 100);
}

TEST_CASE("energised loop: a cut-back of the same length as the legs it skips is not used") {
    const std::vector<double> legs_m{10, 20, 30, 40};
    const std::vector<char> live{1, 0, 1};
    CHECK(energised_loop(legs_m, live, std::vector{cutback(1, 3, 50)}).used.empty());
    const EnergisedLoop loop = energised_loop(legs_m, live, std::vector{cutback(1, 3, 49.5)});
    CHECK(loop.used == std::vector<int>{0});
    CHECK(loop.cable_m == 99.5);
    CHECK(loop.new_cable_m == 49.5);
}

TEST_CASE("energised loop: tenths of metres that add up to the cut-back's own are not taken for a saving") {
    CHECK(energised_loop(std::vector<double>{0.1, 0.2, 5}, std::vector<char>{0, 1},
                         std::vector{cutback(0, 2, 0.3)})
              .used.empty());
}

TEST_CASE("energised loop: the whole cable is live while every lamp is on, and none once every lamp is off") {
    const std::vector<double> legs_m{10, 20, 30};
    CHECK(energised_loop(legs_m, std::vector<char>{1, 1}, std::vector{cutback(0, 2, 1)}).cable_m == 60);
    CHECK(energised_loop(legs_m, std::vector<char>{0, 0}, std::vector{cutback(0, 2, 1)}).cable_m == 0);
}

TEST_CASE("energised loop: crossing cut-backs are never both used") {
    const std::vector<double> legs_m{10, 10, 10, 10, 10, 10};
    const EnergisedLoop loop = energised_loop(legs_m, std::vector<char>{1, 0, 0, 0, 1},
                                              std::vector{cutback(1, 4, 1), cutback(2, 5, 2)});
    CHECK(loop.used == std::vector<int>{0});
    CHECK(loop.cable_m == 31);
}

TEST_CASE("energised loop: a cut-back outside the loop is a bug") {
    CHECK_THROWS_AS(
        energised_loop(std::vector<double>{1, 1}, std::vector<char>{1}, std::vector{cutback(0, 3, 1)}),
        std::logic_error);
    CHECK_THROWS_AS(energised_loop(std::vector<double>{1}, std::vector<char>{1}, std::vector<LoopCutBack>{}),
                    std::logic_error);
}

} // namespace unstring
