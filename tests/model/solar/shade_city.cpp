#include "model/solar/shade_city.h"

#include <atomic>
#include <cmath>

#include <catch2/catch.hpp>

#include "model/solar/shade_findings.h"
#include "tests/support/shade_scene.h"

using namespace unstring;

TEST_CASE("shade: without raster and outlines the sky is unknown, reckoned as open, and said so") {
    ShadeScene scene(3);
    const auto result = shade_city(scene.input(), {});
    REQUIRE(result);
    REQUIRE(result->poles.size() == 3);
    const PoleShade& pole = result->poles[0];
    CHECK(pole.unknown_deg.size() == pole.solid_deg.size());
    CHECK(pole.heads[0].shade_score == Approx(0).margin(1e-9));
    CHECK(pole.heads[0].why.find("sky unknown") != std::string::npos);
    const auto findings = shade_findings(scene.city, *result);
    REQUIRE(findings.size() == 1);
    CHECK(findings[0].code == "sky-unknown");
    CHECK(findings[0].severity == Severity::warning);
}

TEST_CASE("shade: every candidate is answered, in the order of the city, and found by its index") {
    ShadeScene scene(5);
    scene.city.poles[1].status = PoleStatus::down;
    scene.city.poles[3].set_aside = true;
    const auto result = shade_city(scene.input(), {});
    REQUIRE(result);
    REQUIRE(result->poles.size() == 3);
    CHECK(result->find(PoleIx(2))->pole == PoleIx(2));
    CHECK(result->find(PoleIx(1)) == nullptr);
    CHECK(result->find(PoleIx(3)) == nullptr);
    CHECK(result->find(PoleIx(4))->heads.size() == scene.catalog.heads.size());
}

namespace {

/// A wall 12 m above the panels, 15 m away on one side, long enough for every pole.
FormulaHeights wall(bool is_south) {
    return FormulaHeights([is_south](MapPoint p) { return (is_south ? -p.y_m : p.y_m) >= 15 ? 20.0 : 0.0; });
}

const HeadAnswer& small_head(const Expected<ShadeResult>& result) {
    REQUIRE(result);
    return result->poles[0].heads[0];
}

} // namespace

TEST_CASE("shade: trees to the south cost winter light, the same trees to the north cost little") {
    ShadeScene scene(1);
    auto south_trees = wall(true);
    auto north_trees = wall(false);
    const auto south = shade_city(scene.input(&south_trees), {});
    const auto north = shade_city(scene.input(&north_trees), {});
    CHECK(small_head(south).shade_score > 0.4);
    CHECK(small_head(north).shade_score < 0.25);
    CHECK(small_head(south).nights_dark_year > small_head(north).nights_dark_year);
    // An endless wall 12 m above and 15 m away, panel tilted by 10 degrees towards it, or away from it.
    const double theta = std::atan(12 / 15.0), tilt = 10 * kRadPerDeg, right = 90 * kRadPerDeg;
    CHECK(small_head(south).sky_view_frac == Approx((1 + std::sin(right - theta - tilt)) / 2).margin(0.01));
    CHECK(small_head(north).sky_view_frac ==
          Approx((std::sin(right - theta + tilt) + std::sin(right - tilt)) / 2).margin(0.01));
    CHECK(south->poles[0].unknown_deg.empty());
}

TEST_CASE("shade: the same pole with its arm turned to the north gets less winter light") {
    ShadeScene scene(1);
    scene.catalog.heads[0].tilt_deg = 15;
    const double south = small_head(shade_city(scene.input(), {})).panel_kwh_m2[11];
    scene.city.poles[0].arm_deg = 0;
    const double north = small_head(shade_city(scene.input(), {})).panel_kwh_m2[11];
    CHECK(south > 55);
    CHECK(north < 0.75 * south);
    scene.catalog.heads[0].turn_deg = 180;
    CHECK(small_head(shade_city(scene.input(), {})).panel_kwh_m2[11] == Approx(south).epsilon(1e-6));
}

TEST_CASE("shade: a building in outline is darker than a crown in outline, evergreen darker than deciduous") {
    const std::vector<MapPoint> ring = {{-30, -25}, {30, -25}, {30, -15}, {-30, -15}};
    ShadeScene open(1), deciduous(1), evergreen(1), solid(1);
    open.city.obstacles.push_back({{{500, 500}, {510, 500}, {510, 510}}, 9});
    deciduous.city.canopy.push_back({ring, 20, Leaf::deciduous, false});
    evergreen.city.canopy.push_back({ring, 20, Leaf::evergreen, false});
    solid.city.obstacles.push_back({ring, 20});
    const auto january = [](const ShadeScene& scene) {
        const auto result = shade_city(scene.input(), {});
        CHECK(result->poles[0].unknown_deg.empty());
        return small_head(result).panel_kwh_m2[0];
    };
    CHECK(january(open) > january(deciduous));
    CHECK(january(deciduous) > january(evergreen));
    CHECK(january(evergreen) > january(solid));
}

TEST_CASE("shade: grid north turned against true north turns the trees with it") {
    ShadeScene scene(1);
    auto trees = wall(true);
    const double straight = small_head(shade_city(scene.input(&trees), {})).panel_kwh_m2[11];
    scene.city.convergence_deg = 180; // the grid's south is the true north
    scene.city.poles[0].arm_deg = 0;  // so that the panel still leans to the true south
    const double turned = small_head(shade_city(scene.input(&trees), {})).panel_kwh_m2[11];
    CHECK(turned > 1.3 * straight);
}

TEST_CASE("shade: a small battery, an old one, a cold one and a bright lamp all cost nights") {
    ShadeScene scene(1);
    const HeadAnswer base = small_head(shade_city(scene.input(), {}));
    CHECK(base.nights_dark_year >= base.nights_dark_year_new);
    CHECK(base.nights_dark_worst_year >= base.nights_dark_year);
    ShadeScene bright = scene;
    bright.catalog.heads[0].dimming.clear();
    CHECK(small_head(shade_city(bright.input(), {})).nights_dark_year > base.nights_dark_year);
    ShadeScene little = scene;
    little.catalog.heads[0].battery_wh /= 3;
    CHECK(small_head(shade_city(little.input(), {})).nights_dark_year > base.nights_dark_year);
    ShadeScene cold = scene;
    for (double& temp_c : cold.climate.temp_c) temp_c -= 15;
    CHECK(small_head(shade_city(cold.input(), {})).nights_dark_year > base.nights_dark_year);
    ShadeScene white = scene;
    white.catalog.heads[0].tilt_deg = 60;
    const double grey = small_head(shade_city(white.input(), {})).panel_kwh_m2[0];
    white.climate.albedo.fill(0.7);
    CHECK(small_head(shade_city(white.input(), {})).panel_kwh_m2[0] > grey);
}

TEST_CASE("shade: the cheapest eligible head is the best; where none is, the one with fewest nights dark") {
    ShadeScene scene(2);
    scene.catalog.heads[0].led_w = 3;
    scene.catalog.heads[1].led_w = 8;
    scene.city.poles[1].need_lm = 9000;
    const auto result = shade_city(scene.input(), {});
    REQUIRE(result);
    REQUIRE(result->poles[0].heads[0].eligible);
    REQUIRE(result->poles[0].heads[1].eligible);
    CHECK(result->poles[0].best == 0);
    const PoleShade& bright = result->poles[1];
    CHECK_FALSE(bright.heads[0].eligible);
    CHECK(bright.heads[0].why.find("9000 lm are needed, the head gives 1800 lm") == 0);
    const std::size_t other = static_cast<std::size_t>(1 - bright.best);
    CHECK(bright.heads[static_cast<std::size_t>(bright.best)].nights_dark_year <=
          bright.heads[other].nights_dark_year);
}

TEST_CASE(
    "shade: too many dark nights are a reason with both numbers; a critical pole has a goal of its own") {
    ShadeScene scene(1);
    scene.city.poles[0].critical = true;
    scene.city.poles[0].solar_ok = true;
    scene.catalog.heads[0].led_w = 40;
    const HeadAnswer answer = small_head(shade_city(scene.input(), {}));
    CHECK_FALSE(answer.eligible);
    CHECK(answer.why.find("nights dark a year at the end of battery life, 0.3 are allowed") !=
          std::string::npos);
}

TEST_CASE("shade: only the heads asked for are run; one that the catalogue has not is refused") {
    ShadeScene scene(1);
    ShadeInput input = scene.input();
    input.heads = {"large"};
    const auto large = shade_city(input, {});
    REQUIRE(large);
    REQUIRE(large->poles[0].heads.size() == 1);
    CHECK(large->poles[0].heads[0].head == "large");
    input.heads = {"huge"};
    CHECK(shade_city(input, {}).error().code == FaultCode::value_unknown);
}

TEST_CASE("shade: more heads than run side by side give each the answer it has alone") {
    ShadeScene scene(1);
    for (const char* name : {"a", "b", "c", "d"})
        scene.catalog.heads.push_back(ShadeScene::head(name, 60, 400, 8, 1200));
    scene.catalog.heads[5].tilt_deg = 35;
    const auto together = shade_city(scene.input(), {});
    ShadeInput alone = scene.input();
    alone.heads = {"d"};
    const auto last = shade_city(alone, {});
    REQUIRE(together);
    REQUIRE(last);
    CHECK(together->poles[0].heads[5].nights_dark_year == last->poles[0].heads[0].nights_dark_year);
    CHECK(together->poles[0].heads[5].supply_kwh == last->poles[0].heads[0].supply_kwh);
    CHECK(together->poles[0].heads[4].supply_kwh != together->poles[0].heads[5].supply_kwh);
}

TEST_CASE("shade: a climate that cannot be is refused by its month") {
    ShadeScene scene(1);
    scene.climate.ghi_kwh_m2_day[0] = 9;
    const auto result = shade_city(scene.input(), {});
    REQUIRE_FALSE(result);
    CHECK(result.error().field == "ghi_kwh_m2_day of month 1");
    scene.climate.ghi_kwh_m2_day[0] = std::nan("");
    CHECK_FALSE(shade_city(scene.input(), {}));
}

TEST_CASE("shade: cancelled, it answers a fault; its progress reaches the end otherwise") {
    ShadeScene scene(4);
    const std::atomic<bool> stop{true};
    CHECK(shade_city(scene.input(), {{}, &stop}).error().code == FaultCode::cancelled);
    double last = 0;
    REQUIRE(shade_city(scene.input(), {[&](double done) { last = std::max(last, done); }, nullptr}));
    CHECK(last > 0.9);
}
