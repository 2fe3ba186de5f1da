#include "model/solar/panel.h"

#include <vector>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

const std::vector<double> kMeanDays(kDays, 0.55);

SkyLayers crown_at(double bearing_deg) {
    SkyLayers layers;
    layers.solid = HorizonProfile(
        {{bearing_deg - 6, 0}, {bearing_deg - 6, 45}, {bearing_deg + 6, 45}, {bearing_deg + 6, 0}});
    return layers;
}

Monthly beam_of_months(const SunYear& sun, double crown_deg) {
    const HourlySky sky = make_hourly_sky(sun, kMeanDays, 0);
    const SkyLayers layers = crown_at(crown_deg);
    const PanelLight light = panel_light(sun, beam_through(sun, layers), layers, {15, 180, {}}, 1);
    Monthly beam{};
    for (std::size_t hour = 0; hour < kHours; ++hour)
        beam[static_cast<std::size_t>(sun.month_of_hour(hour) - 1)] +=
            sky.beam_like[hour] * light.beam_factor[hour];
    return beam;
}

} // namespace

TEST_CASE(
    "panel: behind a crown 12 degrees wide the month's beam is within 0.5 % of that in 1-minute steps") {
    const SunYear bulk = make_sun_year({0, 40}, DayModel::cooper, 5, 0, Sampling::staggered);
    const SunYear minutes = make_sun_year({0, 40}, DayModel::cooper, 1);
    for (double bearing = 0; bearing < 360; bearing += 15) {
        const Monthly coarse = beam_of_months(bulk, bearing);
        const Monthly fine = beam_of_months(minutes, bearing);
        for (std::size_t month = 0; month < 12; ++month)
            CHECK(coarse[month] == Approx(fine[month]).epsilon(0.005));
    }
}

TEST_CASE("panel: solid wins over evergreen, evergreen over deciduous") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    SkyLayers layers;
    layers.deciduous = HorizonProfile({{0, 80}});
    layers.deciduous_beam.fill(0.5);
    layers.evergreen_beam.fill(0.1);
    CHECK(beam_through(sun, layers)[0] == 0.5F);
    layers.evergreen = HorizonProfile({{0, 80}});
    CHECK(beam_through(sun, layers)[0] == 0.1F);
    layers.solid = HorizonProfile({{0, 80}});
    CHECK(beam_through(sun, layers)[0] == 0.0F);
}

TEST_CASE("panel: canopy lets its share of the even sky through, a wall none") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    SkyLayers layers;
    layers.deciduous = HorizonProfile({{0, 30}});
    layers.deciduous_diffuse.fill(0.4);
    const auto light = panel_light(sun, beam_through(sun, layers), layers, {0, 180, {}}, 0.5);
    CHECK(light.opaque_sky_frac == Approx(0.75).margin(1e-5));
    CHECK(light.sky_frac[0] == Approx(0.75 + 0.4 * 0.25).margin(1e-5));
    layers.solid = layers.deciduous;
    const auto walled = panel_light(sun, beam_through(sun, layers), layers, {0, 180, {}}, 0.5);
    CHECK(walled.sky_frac[0] == Approx(0.75).margin(1e-5));
}

TEST_CASE("panel: under an open sky nothing is in shade, and the score is nothing") {
    for (const int step_min : {5, 60})
        for (const DayModel model : {DayModel::cooper, DayModel::psa}) {
            const SunYear sun = make_sun_year({10, 52}, model, step_min);
            const HourlySky sky = make_hourly_sky(sun, kMeanDays, 0);
            const auto light = panel_light(sun, beam_through(sun, {}), {}, {20, 140, {}}, 0.02);
            CHECK(shade_score(monthly_light(sun, sky, light)) == Approx(0).margin(1e-9));
        }
}
