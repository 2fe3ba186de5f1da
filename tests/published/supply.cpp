// Volts along lighting circuits: closed forms, the moment method, and a worked public example's inputs.

#include "model/supply/radial.h"

#include <cmath>

#include <catch2/catch.hpp>

#include "model/catalog/cables.h"
#include "model/supply/conduit.h"
#include "model/supply/protection.h"

using namespace unstring;

namespace {

constexpr double kAwg8OhmPerFt = 0.778 / 1000; // NFPA 70 ch. 9 table 8

RadialNode lamp_of(int parent, double feet, double watts, double amps, double ohm_per_ft = kAwg8OhmPerFt) {
    RadialNode node;
    node.parent = parent;
    node.r_ohm = ohm_per_ft * feet;
    node.watts = watts;
    node.amps = amps;
    return node;
}

RadialCase row_of(int lamps, double first_ft, double feet, double watts, double amps) {
    RadialCase radial;
    for (int i = 0; i < lamps; ++i)
        radial.nodes.push_back(lamp_of(i - 1, i == 0 ? first_ft : feet, watts, amps));
    return radial;
}

} // namespace

TEST_CASE("supply V1: the highway manual's twin lamp, 480 V, 2 x 0.52 A, 200 ft of #8, drops 0.2721 V") {
    // TxDOT Highway Illumination Manual, example's inputs: loop 0.001308 ohm/ft at 25 C.
    RadialCase radial{480, 2, {lamp_of(-1, 200, 0, 1.04, .001308 / 2)}};
    CHECK(480 - solve_radial(radial).volts[0] == Approx(0.2721).margin(0.00005));
}

TEST_CASE(
    "supply V3: ten lamps of 0.5 A at 150 ft on #8 drop 6.4185 V, with a first run of 400 ft 8.3635 V") {
    // Moment method in closed form: 2 r I s n (n + 1) / 2, and 2 r I (n L0 + s n (n - 1) / 2).
    CHECK(240 - solve_radial(row_of(10, 150, 150, 0, .5)).volts.back() == Approx(6.4185).margin(1e-8));
    CHECK(240 - solve_radial(row_of(10, 400, 150, 0, .5)).volts.back() == Approx(8.3635).margin(1e-8));
}

TEST_CASE(
    "supply V4: ten drivers of 120 W end at 233.431015 V; 5.097865 A and 23.48769 W lost at the source") {
    // Second way: shooting. Guess the end volts, walk to the source adding lamp currents, bisect until the
    // source is 240 V.
    const auto walk = [](double end_v, double& source_a, double& loss_w) {
        const double loop = 2 * kAwg8OhmPerFt * 150;
        double v = end_v, amps = 0;
        loss_w = 0;
        for (int lamp = 0; lamp < 10; ++lamp) {
            amps += 120 / v;
            v += loop * amps;
            loss_w += loop * amps * amps;
        }
        source_a = amps;
        return v;
    };
    double low = 200, high = 240, source_a = 0, loss_w = 0;
    for (int round = 0; round < 200; ++round)
        (walk((low + high) / 2, source_a, loss_w) < 240 ? low : high) = (low + high) / 2;
    walk(low, source_a, loss_w);
    const RadialResult result = solve_radial(row_of(10, 150, 150, 120, 0));
    REQUIRE(result.converged);
    CHECK(result.volts.back() == Approx(233.431015).margin(5e-7));
    CHECK(result.volts.back() == Approx(low).margin(1e-9));
    CHECK(result.worst_drop_frac == Approx(.027371).margin(5e-7));
    CHECK(result.source_a == Approx(5.097865).margin(5e-7));
    CHECK(result.source_a == Approx(source_a).margin(1e-9));
    CHECK(result.loss_w == Approx(23.48769).margin(5e-6));
    CHECK(result.loss_w == Approx(loss_w).margin(1e-8));
    CHECK(result.source_w == Approx(1200 + result.loss_w).margin(1e-7));
}

TEST_CASE("supply V6: one load of 1200 W at 1000 ft, against the closed root; more than V^2 / 4R collapses") {
    const double loop = 2 * .778, p = 1200;
    const double b = 2 * p * loop - 240.0 * 240.0;
    const double closed = std::sqrt((-b + std::sqrt(b * b - 4 * p * p * loop * loop)) / 2);
    const RadialResult result = solve_radial(row_of(1, 1000, 1000, p, 0));
    CHECK(result.volts[0] == Approx(231.949989).margin(5e-7));
    CHECK(result.volts[0] == Approx(closed).margin(1e-9));
    const double most_w = 240.0 * 240.0 / (4 * loop);
    CHECK(most_w == Approx(9254.4987).margin(5e-5));
    CHECK(solve_radial(row_of(1, 1000, 1000, .995 * most_w, 0)).converged);
    CHECK_FALSE(solve_radial(row_of(1, 1000, 1000, 1.005 * most_w, 0)).converged);
}

TEST_CASE("supply V7: a branched circuit by the moment method") {
    RadialCase radial;
    radial.nodes.push_back(lamp_of(-1, 200, 0, 0, .491 / 1000)); // the junction
    for (int i = 0; i < 3; ++i) radial.nodes.push_back(lamp_of(i == 0 ? 0 : i, 100, 0, .6));
    for (int i = 0; i < 2; ++i) radial.nodes.push_back(lamp_of(i == 0 ? 0 : 4, 150, 0, .6));
    const RadialResult result = solve_radial(radial);
    CHECK(240 - result.volts[0] == Approx(.5892).margin(1e-8));
    CHECK(240 - result.volts[3] == Approx(1.14936).margin(1e-8));
    CHECK(240 - result.volts[5] == Approx(1.00932).margin(1e-8));
}

TEST_CASE("supply V8: a balanced 120/240 V circuit drops a quarter of the same lamps on 120 V") {
    RadialCase three{240, 3, {}};
    for (int pole = 0; pole < 5; ++pole) {
        for (const Leg leg : {Leg::a, Leg::b}) {
            RadialNode node = lamp_of(pole == 0 ? -1 : 2 * (pole - 1), leg == Leg::a ? 150 : 0, 0, 1);
            if (leg == Leg::b) node.parent = 2 * pole;
            node.leg = leg;
            three.nodes.push_back(node);
        }
    }
    const RadialResult legs = solve_radial(three);
    CHECK(120 - legs.volts[8] == Approx(1.7505).margin(1e-8));
    CHECK(120 - legs.volts[9] == Approx(1.7505).margin(1e-8));
    CHECK(legs.source_neutral_a == Approx(0).margin(1e-9));
    RadialCase two = row_of(5, 150, 150, 0, 2);
    two.source_v = 120;
    CHECK(120 - solve_radial(two).volts.back() == Approx(7.002).margin(1e-8));
}

TEST_CASE("supply V11: the exact drop with reactance, 240 V received, 10 A at pf 0.9, is 7.2459 V") {
    const double sent =
        std::sqrt(std::pow(240 * .9 + 10 * .778, 2) + std::pow(240 * std::sqrt(1 - .81) + 10 * .052, 2));
    RadialNode node;
    node.r_ohm = .778 / 2;
    node.x_ohm = .052 / 2;
    node.amps = 10;
    node.pf = .9;
    const RadialResult result = solve_radial({sent, 2, {node}});
    CHECK(sent - result.volts[0] == Approx(7.2459).margin(5e-5));
    CHECK(result.volts[0] == Approx(240).margin(1e-8));
}

TEST_CASE("supply: 20 lamps of 120 W at pf 0.95 on 240 V want a 15 A device; 16 A continuous wants 20 A") {
    // NFPA 70 210.20(A), from memory; the 80 % rule of a city standard says the same.
    CHECK(device_for(20 * 120 / .95 / 240) == 15);
    CHECK(device_for(16) == 20);
    CHECK(device_for(16.01) == 25);
}

TEST_CASE("supply: copper 14, 12 and 10 may be protected at 15, 20 and 30 A, copper 8 at 50 A") {
    Catalog catalog;
    catalog.cables = default_cables();
    const std::pair<int, int> rows[] = {{14, 15}, {12, 20}, {10, 30}, {8, 50}, {6, 70}, {4, 90}};
    for (const auto& [awg, device] : rows) {
        INFO("AWG " << awg);
        CHECK(largest_device(*find_cable(catalog, awg, Metal::copper)) == device);
    }
    CHECK(largest_device(*find_cable(catalog, 14, Metal::aluminium)) == 0);
}

TEST_CASE("supply: conduit fill answers a worked example of an electrical code forum with 1 1/4 in") {
    // Schedule 80 PVC, 10 x #12 + 5 x #10 + 3 x #8 THHN: 0.3483 in2; 1 in allows 0.275, 1-1/4 in 0.495.
    Catalog catalog;
    catalog.cables = default_cables();
    const auto area = [&](int awg) { return find_cable(catalog, awg, Metal::copper)->area_mm2; };
    std::vector<double> wires(10, area(12));
    wires.insert(wires.end(), 5, area(10));
    wires.insert(wires.end(), 3, area(8));
    CHECK(conduit_for(Schedule::pvc_80, wires) == 1.25);
    CHECK(conduit_for(Schedule::pvc_40, std::vector<double>{area(8), area(8), area(8), area(10)}) == 0.75);
    CHECK(conduit_for(Schedule::pvc_40, std::vector<double>(9, area(8))) == 1.0);
    CHECK(conduit_for(Schedule::pvc_40, std::vector<double>(10, area(8))) == 1.25);
    CHECK(conduit_for(Schedule::pvc_80, std::vector<double>{area(6), area(6), area(8), area(8), area(10)}) ==
          1.0);
    CHECK_FALSE(conduit_for(Schedule::pvc_40, std::vector<double>(80, area(8))).has_value());
}
