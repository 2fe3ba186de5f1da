#include "model/sun/horizon_scan.h"

#include <algorithm>
#include <cmath>
#include <functional>
#include <random>
#include <vector>

#include <catch2/catch.hpp>

#include "model/sun/horizon.h"
#include "tests/support/shade_scene.h"

using namespace unstring;

namespace {

constexpr double kPanel_m = 6;
using Formula = std::function<double(MapPoint)>;

ScannedHorizon scanned(const Formula& heights, MapPoint place, double reach_m, int directions = 72,
                       double cell_m = 0.5) {
    FormulaHeights source(heights, cell_m);
    const auto window = source.window(place, reach_m + 2 * cell_m);
    return scan_horizon(*window, bounds_of(*window), place, kPanel_m, reach_m, directions);
}

double view_of(const ScannedHorizon& horizon) {
    const HorizonProfile profile = HorizonProfile::from_directions(horizon.height_deg);
    return sky_view_frac({&profile, 1}, 0, 0, 0.1);
}

} // namespace

// A face drawn at 20 m lies between the last empty cell centre at 19.75 m and the first full one at 20.25 m,
// where its full height is first found, at most a quarter cell later.
TEST_CASE(
    "horizon scan: a single wall stands at its closed form in every direction, and so does the sky over it") {
    constexpr double kFace = 20.25, kStep = 0.125;
    const auto wall = scanned([](MapPoint p) { return p.y_m >= 20 ? 18.0 : 0.0; }, {0, 0}, 400, 360);
    for (int direction = 0; direction < 360; ++direction) {
        const auto found = static_cast<double>(wall.height_deg[static_cast<std::size_t>(direction)]);
        const double cosine = std::cos(direction * kRadPerDeg);
        if (std::abs(cosine) < 0.1) continue; // the wall ends at the reach there
        if (cosine < 0) CHECK(found == 0);
        if (cosine < 0) continue;
        CHECK(found <= std::atan(12 / (kFace / cosine)) / kRadPerDeg + 1e-3);
        CHECK(found >= std::atan(12 / (kFace / cosine + kStep)) / kRadPerDeg - 1e-3);
    }
    CHECK(view_of(wall) == Approx((1 + std::cos(std::atan(12 / kFace))) / 2).margin(0.005));
}

TEST_CASE("horizon scan: in a round basin the horizon is the same all round, and the sky the square of its "
          "cosine") {
    constexpr double kRadius = 30;
    const auto basin =
        scanned([](MapPoint p) { return std::hypot(p.x_m, p.y_m) >= kRadius ? 20.0 : 0.0; }, {0, 0}, 60);
    const double height = std::atan(14 / kRadius);
    for (const float each : basin.height_deg)
        CHECK(static_cast<double>(each) == Approx(height / kRadPerDeg).margin(0.5));
    CHECK(view_of(basin) == Approx(std::pow(std::cos(height), 2)).margin(0.005));
}

TEST_CASE("horizon scan: a cone with its tip cut off is seen at the near edge of the cut, a canyon from its "
          "middle") {
    // 24 m high and 10 m in radius, cut at 20 m: the cut begins 5/3 m before the axis, which stands 25 m
    // east.
    const auto cone = scanned(
        [](MapPoint p) { return std::clamp(24 * (1 - std::hypot(p.x_m - 25, p.y_m) / 10), 0.0, 20.0); },
        {0, 0}, 60);
    CHECK(static_cast<double>(cone.height_deg[18]) ==
          Approx(std::atan(14 / (25 - 5 / 3.0)) / kRadPerDeg).margin(0.5));
    CHECK(cone.height_deg[54] == 0);
    constexpr double kFace = 10.25;
    const auto canyon =
        scanned([](MapPoint p) { return std::abs(p.x_m) >= 10 ? 16.0 : 0.0; }, {0, 0}, 600, 360);
    CHECK(view_of(canyon) == Approx(std::cos(std::atan(10 / kFace))).margin(0.005));
}

TEST_CASE(
    "horizon scan: within half a degree of a march in 5 cm steps at 95 of 100 directions, without bias") {
    // Seed 42: 60 crowns strewn about; poles with nothing above the panel within 3 m.
    std::mt19937_64 random(42);
    std::uniform_real_distribution<double> place(-60, 60), height(7, 20), radius(2, 6);
    struct Crown {
        double x, y, top, r;
    };
    std::vector<Crown> crowns;
    for (int i = 0; i < 60; ++i)
        crowns.push_back({place(random), place(random), height(random), radius(random)});
    const Formula heights = [&](MapPoint p) {
        double top = 0;
        for (const Crown& crown : crowns) {
            const double away = std::hypot(p.x_m - crown.x, p.y_m - crown.y) / crown.r;
            if (away < 1) top = std::max(top, crown.top * std::sqrt(1 - away * away / 2));
        }
        return top;
    };
    FormulaHeights source(heights);
    const auto window = *source.window({0, 0}, 130);
    std::vector<double> errors;
    double bias = 0;
    std::uniform_real_distribution<double> stand(-60, 60);
    for (int pole = 0; pole < 60; ++pole) {
        const MapPoint at{stand(random), stand(random)};
        bool is_open = true;
        for (double a = 0; a < 360; a += 5)
            for (double d = 0; d <= 3; d += 0.25)
                is_open = is_open && height_at_m(window, {at.x_m + d * std::sin(a * kRadPerDeg),
                                                          at.y_m + d * std::cos(a * kRadPerDeg)}) <= kPanel_m;
        if (!is_open) continue;
        const ScannedHorizon found = scan_horizon(window, bounds_of(window), at, kPanel_m, 60, 72);
        for (int direction = 0; direction < 72; ++direction) {
            const double azimuth = direction * 5 * kRadPerDeg;
            double steepest = 0;
            for (double d = 0.05; d <= 60; d += 0.05)
                steepest = std::max(steepest, (height_at_m(window, {at.x_m + d * std::sin(azimuth),
                                                                    at.y_m + d * std::cos(azimuth)}) -
                                               kPanel_m) /
                                                  d);
            errors.push_back(static_cast<double>(found.height_deg[static_cast<std::size_t>(direction)]) -
                             std::atan(steepest) / kRadPerDeg);
            bias += errors.back();
        }
    }
    REQUIRE(errors.size() > 500);
    bias /= static_cast<double>(errors.size());
    for (double& error : errors) error = std::abs(error);
    std::sort(errors.begin(), errors.end());
    CAPTURE(bias, errors.size(), errors[errors.size() * 95 / 100]);
    CHECK(errors[errors.size() * 95 / 100] < 0.5);
    CHECK(std::abs(bias) < 0.15);
}

TEST_CASE("horizon scan: cut into windows differently, the same scene gives the same answer") {
    const Formula heights = [](MapPoint p) { return p.x_m > 15.1 && p.y_m > -8.3 ? 14.0 : 0.0; };
    FormulaHeights source(heights);
    const MapPoint place{3.2, -1.7};
    const auto scan_in = [&](MapPoint centre, double reach_m) {
        const HeightWindow window = *source.window(centre, reach_m);
        return scan_horizon(window, bounds_of(window), place, kPanel_m, 60, 72);
    };
    const auto small = scan_in(place, 62);
    const auto large = scan_in({40, 30}, 150);
    CHECK(small.height_deg == large.height_deg);
}

TEST_CASE("horizon scan: beyond the edge and over nodata the sky is unknown, and named") {
    FormulaHeights source([](MapPoint) { return 0.0; }, 0.5, 50);
    const auto scan_at = [&](MapPoint place) {
        const HeightWindow window = *source.window(place, 32);
        return scan_horizon(window, bounds_of(window), place, kPanel_m, 30, 72);
    };
    const auto found = scan_at({40, 0});
    CHECK(std::find(found.unknown_deg.begin(), found.unknown_deg.end(), 90.0F) != found.unknown_deg.end());
    CHECK(std::find(found.unknown_deg.begin(), found.unknown_deg.end(), 270.0F) == found.unknown_deg.end());
    CHECK(scan_at({0, 0}).unknown_deg.empty());
}

TEST_CASE("horizon scan: heights are bilinear between cell centres") {
    HeightWindow window{0, 2, 1, 2, 2, {1, 3, 5, 11}};
    CHECK(height_at_m(window, {0.5, 1.5}) == 1);
    CHECK(height_at_m(window, {1.5, 0.5}) == 11);
    CHECK(height_at_m(window, {1.0, 1.0}) == Approx(5));
    CHECK(height_at_m(window, {0.75, 1.5}) == Approx(1.5));
    CHECK(std::isnan(height_at_m(window, {0.4, 1.0})));
}
