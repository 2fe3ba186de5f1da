#include "model/solar/lamp.h"

#include <numeric>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

double sum(const std::vector<double>& values) { return std::accumulate(values.begin(), values.end(), 0.0); }

} // namespace

TEST_CASE("lamp: undimmed it burns its watts for the hours of darkness") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    CHECK(sum(lamp_load_wh(sun, 12, {})) == Approx(12 * hours_below(sun, kSwitch_deg)));
}

TEST_CASE("lamp: dimming counts from the night's first lit step, across midnight") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    const std::vector<DimStep> first_hours = {{0, 5, 1}, {5, 24, 0}};
    const std::vector<double> load = lamp_load_wh(sun, 10, first_hours);
    CHECK(sum(load) == Approx(10 * 5 * 365).epsilon(1e-9));
    // Night of day 355 begins about 17:00 and is dark from 22:00 on.
    CHECK(load[354 * 24 + 18] == Approx(10));
    CHECK(load[354 * 24 + 23] == 0);
    CHECK(load[355 * 24 + 3] == 0);
}

TEST_CASE("lamp: a span that no step names is full power") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    const std::vector<DimStep> middle = {{4, 6, .5}};
    CHECK(sum(lamp_load_wh(sun, 10, {})) - sum(lamp_load_wh(sun, 10, middle)) == Approx(10 * .5 * 2 * 365));
}

TEST_CASE("lamp: in the polar night each noon begins a night anew, in the polar day it is never lit") {
    const SunYear sun = make_sun_year({0, 85}, DayModel::cooper, 60);
    const std::vector<double> load = lamp_load_wh(sun, 10, std::vector<DimStep>{{0, 1, 1}, {1, 24, 0}});
    double december = 0;
    for (std::size_t hour = 350 * 24; hour < 351 * 24; ++hour) december += load[hour];
    CHECK(december == Approx(10));
    for (std::size_t hour = 170 * 24; hour < 171 * 24; ++hour) CHECK(load[hour] == 0);
}
