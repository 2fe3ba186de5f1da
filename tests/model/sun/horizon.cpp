#include "model/sun/horizon.h"

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("horizon: heights are linear between points, round past north, and never below the horizontal") {
    const HorizonProfile profile({{350, 10}, {10, 30}, {90, -5}});
    CHECK(profile.height_deg(0) == Approx(20));
    CHECK(profile.height_deg(360) == Approx(20));
    CHECK(profile.height_deg(50) == Approx(15));
    CHECK(profile.height_deg(90) == 0);
    CHECK(profile.height_deg(220) == Approx(5));
}

TEST_CASE("horizon: at a step the piece that begins counts, and the piece that ends can be asked for") {
    const HorizonProfile profile({{100, 0}, {100, 40}, {160, 40}, {160, 0}});
    CHECK(profile.height_deg(100) == 40);
    CHECK(profile.height_before_deg(100) == 0);
    CHECK(profile.height_deg(160) == 0);
    CHECK(profile.height_before_deg(160) == 40);
    CHECK(profile.height_deg(130) == 40);
    CHECK(profile.height_deg(200) == 0);
}

TEST_CASE("horizon: rows at 0 and at 360 may differ") {
    const HorizonProfile profile({{0, 10}, {180, 10}, {360, 30}});
    CHECK(profile.height_deg(0) == 10);
    CHECK(profile.height_before_deg(360) == 30);
    CHECK(profile.height_deg(270) == Approx(20));
}

TEST_CASE("horizon: the higher of two profiles hides the sky") {
    const HorizonProfile low({{0, 20}}), high({{0, 30}});
    const HorizonProfile both[] = {low, high};
    CHECK(sky_view_frac(both, 0, 0) == Approx(0.75).margin(1e-6));
}
