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
