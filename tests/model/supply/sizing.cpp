#include "model/supply/sizing.h"

#include <random>

#include <catch2/catch.hpp>

#include "model/catalog/cables.h"
#include "model/supply/protection.h"

using namespace unstring;

namespace {

SizingLimits copper_limits(std::vector<int> sizes) {
    SizingLimits limits;
    Catalog catalog;
    catalog.cables = default_cables();
    for (const int awg : sizes) limits.cables.push_back(*find_cable(catalog, awg, Metal::copper));
    limits.price_m = [](const Cable& cable) { return 2 + 10 / cable.ohm_per_km; };
    return limits;
}

/// Cheapest of all size sets by trying every one; infinity where none keeps the limits.
double brute_force(const std::vector<SizingSpan>& spans, const SizingLimits& limits, int device_a) {
    double best = 1e300;
    std::vector<std::size_t> sizes(spans.size(), 0);
    for (;;) {
        RadialCase radial{limits.source_v, limits.wires, {}};
        double cost = 0;
        bool is_protected = true;
        for (std::size_t i = 0; i < spans.size(); ++i) {
            const Cable& cable = limits.cables[sizes[i]];
            is_protected = is_protected && largest_device(cable) >= device_a;
            const double km = spans[i].length_m / 1000;
            radial.nodes.push_back({spans[i].parent, cable.ohm_per_km * km, cable.x_ohm_per_km * km,
                                    spans[i].watts, spans[i].pf, 0, Leg::ab});
            cost += limits.price_m(cable) * spans[i].length_m;
        }
        const RadialResult volts = solve_radial(radial);
        if (is_protected && volts.converged && volts.worst_drop_frac <= limits.drop_frac + 1e-12)
            best = std::min(best, cost);
        std::size_t i = 0;
        while (i < sizes.size() && ++sizes[i] == limits.cables.size()) sizes[i++] = 0;
        if (i == sizes.size()) return best;
    }
}

std::vector<SizingSpan> row_of(int lamps, double spacing_m, double watts) {
    std::vector<SizingSpan> spans;
    for (int i = 0; i < lamps; ++i) spans.push_back({i - 1, spacing_m, watts, .95});
    return spans;
}

} // namespace

TEST_CASE("sizing: a short circuit takes the thinnest wire, a long one thicker wire near the source") {
    const SizingLimits limits = copper_limits({10, 8, 6, 4});
    const SizingResult near = size_wires(row_of(4, 30, 60), limits);
    REQUIRE(near.possible);
    CHECK(near.awg == std::vector<int>{10, 10, 10, 10});
    CHECK(near.device_a == 15);
    const SizingResult far = size_wires(row_of(16, 40, 100), limits);
    REQUIRE(far.possible);
    CHECK(far.awg.front() < far.awg.back());
    CHECK(far.volts.worst_drop_frac <= .03);
    CHECK(far.grounding_awg < grounding_awg(far.device_a)); // grows with the phase wire
}

TEST_CASE("sizing: random trees of up to seven spans cost what trying every set of sizes finds") {
    const unsigned seed = 90210;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> unit(0, 1);
    int possible = 0;
    for (int round = 0; round < 40; ++round) {
        std::vector<SizingSpan> spans;
        const int n = std::uniform_int_distribution<int>(2, 7)(random);
        for (int i = 0; i < n; ++i)
            spans.push_back({std::uniform_int_distribution<int>(-1, i - 1)(random), 40 + 160 * unit(random),
                             100 + 250 * unit(random), .95});
        const SizingLimits limits = copper_limits({10, 8, 6, 4});
        const SizingResult result = size_wires(spans, limits);
        const double best = brute_force(spans, limits, result.possible ? result.device_a : 15);
        REQUIRE(result.possible == (best < 1e300));
        if (!result.possible) continue;
        ++possible;
        REQUIRE(result.volts.worst_drop_frac <= .03 + 1e-12);
        REQUIRE(result.cost >= best - 1e-9);
        REQUIRE(result.cost <= best * 1.005);
    }
    REQUIRE(possible > 20);
}

TEST_CASE("sizing: what cannot be is said with its number") {
    SizingLimits limits = copper_limits({10, 8});
    CHECK(size_wires(row_of(20, 120, 100), limits).stopped_by.find("drop") != std::string::npos);
    CHECK(size_wires(row_of(60, 40, 2000), limits).stopped_by.find("A is more than") != std::string::npos);
    CHECK(size_wires(row_of(3, 10, 3000), limits).stopped_by.find("device") != std::string::npos);
    limits.least_v = 250;
    CHECK(size_wires(row_of(3, 10, 60), limits).stopped_by.find("250 V") != std::string::npos);
}

TEST_CASE("sizing: the driver's least volts tighten the drop") {
    SizingLimits limits = copper_limits({10, 8, 6, 4});
    const SizingResult loose = size_wires(row_of(12, 40, 100), limits);
    limits.least_v = 235;
    const SizingResult tight = size_wires(row_of(12, 40, 100), limits);
    REQUIRE(loose.possible);
    REQUIRE(tight.possible);
    CHECK(tight.cost > loose.cost);
    for (const double v : tight.volts.volts) CHECK(v >= 235 - 1e-9);
}

TEST_CASE(
    "sizing: wire that the circuit's device may not protect is not chosen even where its drop would do") {
    const SizingResult result = size_wires(row_of(3, 5, 2000), copper_limits({12, 10, 8}));
    REQUIRE(result.possible);
    CHECK(result.device_a == 35);
    for (const int awg : result.awg) CHECK(awg == 8);
}
