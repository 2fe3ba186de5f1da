#include "geo/ground/crs.h"

#include <random>

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("crs: a place gets the UTM zone that it lies in") {
    CHECK(fitting_utm({-130, 34}) == "EPSG:32609");
    CHECK(fitting_utm({-126.0001, 34}) == "EPSG:32609");
    CHECK(fitting_utm({-126, 34}) == "EPSG:32610");
    CHECK(fitting_utm({179.99, -1}) == "EPSG:32760");
    CHECK(fitting_utm({180, 1}) == "EPSG:32601");
    CHECK(fitting_utm({-180, 1}) == "EPSG:32601");
    CHECK(fitting_utm({5.3, 60.4}) == "EPSG:32632");  // south-west Norway lies in a widened zone
    CHECK(fitting_utm({15.6, 78.2}) == "EPSG:32633"); // Svalbard
}

TEST_CASE("crs: a system in feet gives way to the same projection in metres") {
    // NAD83 / California zone 5 (ftUS) and its form in metres.
    CHECK(*metric_crs("EPSG:2229", {-118.2, 34.0}) == "EPSG:26945");
    const auto to_feet = CrsTransform::make("EPSG:4269", "EPSG:2229");
    const auto to_metres = CrsTransform::make("EPSG:4269", "EPSG:26945");
    const auto feet = (*to_feet)(-118.2, 34.0);
    const auto metres = (*to_metres)(-118.2, 34.0);
    CHECK(feet->x_m * kMetresPerSurveyFoot == Approx(metres->x_m).margin(1e-3).epsilon(0));
    CHECK(feet->y_m * kMetresPerSurveyFoot == Approx(metres->y_m).margin(1e-3).epsilon(0));
}

TEST_CASE("crs: systems in metres and true to scale stay, degrees and pseudo-Mercator give way to UTM") {
    CHECK(*metric_crs("EPSG:32609", {-130, 34}) == "EPSG:32609");
    CHECK(*metric_crs("32609", {-130, 34}) == "EPSG:32609");
    CHECK(*metric_crs("epsg:32609", {-130, 34}) == "EPSG:32609");
    CHECK(*metric_crs("EPSG:4326", {-130, 34}) == "EPSG:32609");
    CHECK(*metric_crs("EPSG:3857", {-130, 34}) == "EPSG:32609");
}

TEST_CASE("crs: what is no code and no WKT never reaches the library") {
    for (const char* bad : {"", "EPSG:0", "EPSG:999999999", "nonsense", "+proj=utm +zone=9",
                            "+init=file:/etc/passwd", "/etc/hostname", "EPSG:5773"}) {
        INFO(bad);
        const auto facts = crs_facts(bad);
        REQUIRE_FALSE(facts);
        CHECK(facts.error().code == FaultCode::crs_unknown);
    }
}

TEST_CASE("crs: facts say the unit and whether the system counts in degrees") {
    CHECK(crs_facts("EPSG:4326")->is_geographic);
    CHECK(crs_facts("EPSG:2229")->unit_m == Approx(kMetresPerSurveyFoot).epsilon(1e-12));
    CHECK(crs_facts("EPSG:32609")->unit_m == 1.0);
    CHECK(crs_facts("EPSG:32609")->south_west.lon_deg == -132);
}

TEST_CASE("crs: random points come back from the project's system to a tenth of a millimetre") {
    const unsigned seed = 20260611;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> lon(-131.9, -126.1), lat(-70, 83);
    const auto there = CrsTransform::make("EPSG:4326", "EPSG:32609");
    const auto back = CrsTransform::make("EPSG:32609", "EPSG:4326");
    for (int i = 0; i < 1000; ++i) {
        const double x = lon(random), y = lat(random);
        const auto map = (*there)(x, y);
        REQUIRE(map);
        const auto degrees = (*back)(map->x_m, map->y_m);
        REQUIRE(degrees);
        CHECK(degrees->x_m == Approx(x).margin(1e-9).epsilon(0));
        CHECK(degrees->y_m == Approx(y).margin(1e-9).epsilon(0));
    }
}

TEST_CASE("crs: a point that has no place in a system comes back as nothing") {
    const auto there = CrsTransform::make("EPSG:4326", "EPSG:32609");
    CHECK_FALSE((*there)(34, -130));
    CHECK_FALSE((*there)(1e9, 1e9));
}
