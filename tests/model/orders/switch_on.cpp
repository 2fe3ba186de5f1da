#include "model/orders/switch_on.h"

#include <catch2/catch.hpp>

#include "model/orders/approach.h"

using namespace unstring;

TEST_CASE("switch-on: at the equator the sun takes 18 minutes from the horizon to -4.6 degrees in March") {
    CHECK(switch_on_h(0, 3) == Approx(18 + 4.6 / 15).margin(0.01));
}

TEST_CASE("switch-on: winter is early and summer late in the north, the other way round in the south") {
    const auto north = switch_on_year_h(34), south = switch_on_year_h(-34);
    CHECK(north[11] < 17.5);
    CHECK(north[5] > 19.3);
    CHECK(south[11] > north[11]);
    CHECK(south[5] < north[5]);
}

TEST_CASE("switch-on: polar day and night stay on the clock") {
    CHECK(switch_on_h(80, 6) == 24);
    CHECK(switch_on_h(80, 12) == 12);
    CHECK(clock_text(17.069) == "17:04");
    CHECK(clock_text(16.9999) == "17:00");
}

TEST_CASE("approach: distances of the published table, gloves by use volts") {
    // 29 CFR 1910.269 table R-6, metres, phase to phase.
    CHECK(approach_distance_m(250) == 0);
    CHECK(approach_distance_m(700) == 0.33);
    CHECK(approach_distance_m(5000) == 0.63);
    CHECK(approach_distance_m(6300) == 0.68);
    CHECK(approach_distance_m(40000) == -1);
    CHECK(glove_class(2100) == "1");
    CHECK(glove_class(6300) == "1");
    CHECK(glove_class(8000) == "2");
}
