// Worked examples of map projections, through the one place that talks to PROJ.

#include <string>

#include "geo/ground/crs.h"

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

constexpr double dms(double degrees, double minutes, double seconds) {
    return degrees + minutes / 60 + seconds / 3600;
}

struct Example {
    const char* name;
    const char* from;
    const char* to;
    double lon_deg, lat_deg;
    double east, north; ///< in the unit of the system
    double tolerance;   ///< same unit
};

// [P] printed in the source named; [M] from memory, recomputed by the series formulas of the same source.
const Example kExamples[] = {
    // IOGP Guidance Note 7-2, method 9802 Lambert conic conformal (2SP): NAD27 / Texas South Central, US
    // survey feet [P].
    // Printed to 0.01 ft; the datum is the same on both sides, so nothing but the projection is at work.
    {"LCC 2SP, Texas South Central", "EPSG:4267", "EPSG:32040", -96, 28.5, 2963503.91, 254759.80, 0.01},
    // The same note, method 9807 transverse Mercator: OSGB36 / British National Grid [P]. The example is
    // worked with the
    // rounded scale 0.9996013; the registry has 0.9996012717, which moves the point by 6 mm: tolerance 0.01
    // m.
    {"TM, British National Grid", "EPSG:4277", "EPSG:27700", 0.5, 50.5, 577274.99, 69740.50, 0.01},
    // The same note, method 9801 Lambert conic conformal (1SP): JAD69 / Jamaica National Grid [M].
    {"LCC 1SP, Jamaica", "EPSG:4242", "EPSG:24200", -dms(76, 56, 37.26), dms(17, 55, 55.80), 255966.58,
     142493.51, 0.01},
    // A tower in UTM zone 17 north [M], printed to a metre.
    {"UTM zone 17 north", "EPSG:4326", "EPSG:32617", -dms(79, 23, 13.7), dms(43, 38, 33.24), 630084, 4833438,
     1},
    // The same note, method 1024 popular visualisation pseudo-Mercator [M].
    {"pseudo-Mercator", "EPSG:4326", "EPSG:3857", -dms(100, 20, 0), dms(24, 22, 54.433), -11169055.58,
     2800000.00, 0.01},
};

} // namespace

TEST_CASE("published: projections meet the worked examples of the EPSG guidance note, there and back") {
    for (const Example& example : kExamples) {
        INFO(example.name);
        const auto there = CrsTransform::make(example.from, example.to);
        const auto back = CrsTransform::make(example.to, example.from);
        REQUIRE(there);
        REQUIRE(back);
        const auto map = (*there)(example.lon_deg, example.lat_deg);
        REQUIRE(map);
        CHECK(map->x_m == Approx(example.east).margin(example.tolerance).epsilon(0));
        CHECK(map->y_m == Approx(example.north).margin(example.tolerance).epsilon(0));
        const auto degrees = (*back)(map->x_m, map->y_m);
        REQUIRE(degrees);
        // 1e-9 degrees are 0.1 mm on the ground.
        CHECK(degrees->x_m == Approx(example.lon_deg).margin(1e-9).epsilon(0));
        CHECK(degrees->y_m == Approx(example.lat_deg).margin(1e-9).epsilon(0));
    }
}

TEST_CASE(
    "published: the scale of a UTM zone is 0.9996 on its central meridian, where grid north is true north") {
    // EPSG method 9807 with the parameters of every UTM zone: scale factor at natural origin 0.9996 [P].
    const MapPoint on_meridian{500000, 3763000};
    CHECK(*scale_factor("EPSG:32609", on_meridian) == Approx(0.9996).margin(1e-6));
    CHECK(*convergence_deg("EPSG:32609", on_meridian) == Approx(0).margin(1e-7));
}

TEST_CASE("published: convergence of a transverse Mercator grid is tan(dlon) sin(lat) to first order") {
    // Spherical formula tan g = tan(lon - lon0) sin(lat), Snyder, Map Projections: A Working Manual (USGS PP
    // 1395), from memory; on the ellipsoid it differs by less than 0.001 deg within 1 deg of the meridian.
    const LonLat place = *lon_lat_of("EPSG:32609", 406500, 3763000);
    const double expected =
        std::atan(std::tan((place.lon_deg + 129) * kRadPerDeg) * std::sin(place.lat_deg * kRadPerDeg)) /
        kRadPerDeg;
    CHECK(expected == Approx(-0.566).margin(0.01));
    CHECK(*convergence_deg("EPSG:32609", {406500, 3763000}) == Approx(expected).margin(0.001));
}
