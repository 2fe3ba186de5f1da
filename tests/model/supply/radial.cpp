#include "model/supply/radial.h"

#include <cmath>
#include <random>
#include <stdexcept>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

RadialCase random_tree(std::mt19937& random, int wires) {
    std::uniform_int_distribution<int> count(1, 30), leg(0, 2);
    std::uniform_real_distribution<double> unit(0, 1);
    RadialCase radial{240, wires, {}};
    const int n = count(random);
    for (int i = 0; i < n; ++i) {
        RadialNode node;
        node.parent = std::uniform_int_distribution<int>(-1, i - 1)(random);
        node.r_ohm = .05 * unit(random);
        node.x_ohm = .01 * unit(random);
        node.watts = 150 * unit(random);
        node.pf = .8 + .2 * unit(random);
        node.leg = wires == 3 ? static_cast<Leg>(leg(random)) : Leg::ab;
        radial.nodes.push_back(node);
    }
    return radial;
}

double load_sum(const RadialCase& radial) {
    double sum = 0;
    for (const RadialNode& node : radial.nodes) sum += node.watts;
    return sum;
}

} // namespace

TEST_CASE("radial: what the source gives is what the lamps take and the wires lose, in every random tree") {
    const unsigned seed = 411;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    for (int round = 0; round < 200; ++round) {
        const RadialCase radial = random_tree(random, 2 + round % 2);
        const RadialResult result = solve_radial(radial);
        REQUIRE(result.converged);
        REQUIRE(result.source_w == Approx(load_sum(radial) + result.loss_w).epsilon(1e-9));
    }
}

TEST_CASE("radial: three wires with loads from leg to leg are two wires of the same volts") {
    std::mt19937 random(7);
    for (int round = 0; round < 50; ++round) {
        RadialCase radial = random_tree(random, 2);
        const RadialResult two = solve_radial(radial);
        radial.wires = 3;
        const RadialResult three = solve_radial(radial);
        for (std::size_t i = 0; i < two.volts.size(); ++i)
            REQUIRE(three.volts[i] == Approx(two.volts[i]).margin(1e-8));
        REQUIRE(three.source_neutral_a == Approx(0).margin(1e-8));
    }
}

TEST_CASE("radial: the unloaded leg of an unbalanced circuit rises by the neutral's drop") {
    RadialNode node;
    node.r_ohm = .5;
    node.amps = 4;
    node.leg = Leg::a;
    RadialNode other;
    other.parent = 0;
    other.leg = Leg::b;
    const RadialResult result = solve_radial({240, 3, {node, other}});
    CHECK(result.volts[0] == Approx(120 - 2 * .5 * 4));
    CHECK(result.volts[1] == Approx(120 + .5 * 4));
    CHECK(result.drop_frac[1] < 0);
    CHECK(result.source_neutral_a == Approx(4));
}

TEST_CASE("radial: the order of the nodes in the list changes nothing") {
    RadialNode near_node, far_node;
    near_node.r_ohm = far_node.r_ohm = .3;
    near_node.watts = 100;
    far_node.watts = 200;
    far_node.parent = 0;
    const RadialResult first = solve_radial({240, 2, {near_node, far_node}});
    far_node.parent = 1;
    const RadialResult second = solve_radial({240, 2, {far_node, near_node}});
    CHECK(first.volts[1] == second.volts[0]);
    CHECK(first.volts[0] == second.volts[1]);
}

TEST_CASE("radial: parents in a circle, or three phases asked for, is a bug of the caller") {
    RadialNode a, b;
    a.parent = 1;
    b.parent = 0;
    CHECK_FALSE(radial_order({a, b}).has_value());
    CHECK_THROWS_AS(solve_radial({240, 2, {a, b}}), std::logic_error);
    CHECK_THROWS_AS(solve_radial({240, 4, {RadialNode()}}), std::logic_error);
}
