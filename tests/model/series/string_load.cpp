#include "model/series/string_load.h"

#include <cmath>
#include <stdexcept>
#include <vector>

#include <catch2/catch.hpp>

namespace unstring {

TEST_CASE("string load: thirty 150 W lamps out and back give 1 096 V, and the change of volts when ten leave "
          "is theirs and their cable's") {
    // Worked by hand: 30 x 188 / 6.6 = 854.5 V real, x .75 = 640.9 V reactive; 2 300 m at 2.140 and .1706
    // ohm/km.
    const std::vector<double> w(30, 188), pf(30, 0.8);
    const StringLoad whole = string_load(6.6, usual_string_cable(), 2 * (30 * 35 + 100), 25, w, pf);
    CHECK(whole.volts == Approx(1096).margin(0.6));
    CHECK(whole.load_kva == Approx(7.23).margin(0.006));
    CHECK(whole.load_kva / 10 == Approx(0.72).margin(0.005));
    const std::vector<double> w20(20, 188), pf20(20, 0.8);
    const StringLoad shrunk = string_load(6.6, usual_string_cable(), 2 * (20 * 35 + 100), 25, w20, pf20);
    CHECK(shrunk.volts == Approx(731).margin(0.6));
    CHECK(shrunk.load_kva == Approx(4.83).margin(0.006));
    CHECK(whole.volts - shrunk.volts == Approx(364).margin(0.6));
}

TEST_CASE("string load: a warm cable loses more, by the resistance of its temperature") {
    const StringLoad cool = string_load(6.6, usual_string_cable(), 1000, 25, {}, {});
    const StringLoad warm = string_load(6.6, usual_string_cable(), 1000, 75, {}, {});
    CHECK(warm.cable_w == Approx(6.6 * 6.6 * 0.778 / 0.3048));
    CHECK(cool.cable_w / warm.cable_w == Approx(1 - 0.00323 * 50));
}

TEST_CASE("string load: ageing raises the lamps' watts and volts and leaves the cable") {
    const std::vector<double> w{188, 295}, pf{0.8, 0.9};
    const StringLoad young = string_load(6.6, usual_string_cable(), 1000, 25, w, pf);
    const StringLoad aged = string_load(6.6, usual_string_cable(), 1000, 25, w, pf, 0.1);
    CHECK(aged.cable_w == young.cable_w);
    CHECK(aged.load_kw - young.load_kw == Approx(0.1 * (188 + 295) / 1000));
}

TEST_CASE("string load: lamps of one power factor add as numbers, of two as phasors") {
    const std::vector<double> w{300, 300};
    const auto volts = [&](double a, double b) {
        return string_load(6.6, usual_string_cable(), 0, 25, w, std::vector<double>{a, b}).volts;
    };
    CHECK(volts(0.5, 0.5) == Approx(2 * 300 / (6.6 * 0.5)));
    const double real_v = 2 * 300 / 6.6, reactive_v = 300 / 6.6 * std::tan(std::acos(0.5));
    CHECK(volts(1, 0.5) == Approx(std::hypot(real_v, reactive_v)));
    CHECK(volts(1, 0.5) < 300 / 6.6 + 300 / (6.6 * 0.5));
}

TEST_CASE("string load: a power factor of zero is a bug") {
    CHECK_THROWS_AS(
        string_load(6.6, usual_string_cable(), 0, 25, std::vector<double>{1}, std::vector<double>{0}),
        std::logic_error);
}

TEST_CASE("primary side: the kVA stay while the load falls, so the power factor falls with it") {
    CHECK(primary_side(20, 20).kva == primary_side(20, 5).kva);
    CHECK(primary_side(20, 20).pf == Approx(0.78));
    CHECK(primary_side(20, 5).pf < 0.3);
}

} // namespace unstring
