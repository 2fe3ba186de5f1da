#include "model/solar/pole_shade.h"

#include <vector>

#include <catch2/catch.hpp>
#include <tbb/global_control.h>

#include "tests/support/shade_scene.h"

using namespace unstring;

TEST_CASE("pole: the shared directions give the light that the exact profile gives") {
    ShadeScene scene(1);
    scene.city.canopy.push_back({{{-8, -30}, {12, -30}, {12, -12}, {-8, -12}}, 19, Leaf::deciduous, false});
    scene.city.obstacles.push_back({{{20, -20}, {45, -20}, {45, 10}, {20, 10}}, 16});
    const ShadeInput input = scene.input();
    const auto result = shade_city(input, {});
    const auto light = city_light(input, {});
    REQUIRE(result);
    REQUIRE(light);
    const PoleShade& pole = result->poles[0];
    SkyLayers layers;
    layers.solid = HorizonProfile::from_directions(pole.solid_deg);
    layers.deciduous = HorizonProfile::from_directions(pole.canopy_deg);
    layers.deciduous_beam = layers.deciduous_diffuse = light->deciduous;
    const auto panel = panel_light(light->sun, beam_through(light->sun, layers), layers,
                                   {scene.catalog.heads[0].tilt_deg, pole.bearing_deg, light->albedo}, 0.1);
    const MonthlyLight exact = monthly_light(light->sun, light->sky, panel);
    CHECK(pole.heads[0].shade_score > 0.02);
    CHECK(pole.heads[0].shade_score == Approx(shade_score(exact)).margin(1e-3));
    for (std::size_t month = 0; month < 12; ++month)
        CHECK(pole.heads[0].panel_kwh_m2[month] == Approx(exact.panel_kwh_m2[month]).epsilon(1e-3));
}

TEST_CASE("pole: the answer does not depend on the number of threads") {
    ShadeScene scene(6);
    FormulaHeights trees(
        [](MapPoint p) { return p.y_m < -12 && static_cast<long>(p.x_m) % 40 < 15 ? 15.0 : 0.0; });
    const auto run = [&](std::size_t threads) {
        const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, threads);
        return *shade_city(scene.input(&trees), {});
    };
    const ShadeResult one = run(1);
    const ShadeResult two = run(2);
    for (std::size_t i = 0; i < one.poles.size(); ++i) {
        CHECK(one.poles[i].canopy_deg == two.poles[i].canopy_deg);
        CHECK(one.poles[i].heads[0].supply_kwh == two.poles[i].heads[0].supply_kwh);
        CHECK(one.poles[i].heads[1].nights_dark_year == two.poles[i].heads[1].nights_dark_year);
    }
}
