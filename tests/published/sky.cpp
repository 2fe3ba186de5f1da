// The sky over a horizon: closed forms, found by a second way of integrating them.

#include <cmath>
#include <vector>

#include <catch2/catch.hpp>

#include "model/quantities.h"
#include "model/sun/horizon.h"

using namespace unstring;

namespace {

double view(const HorizonProfile& profile, double tilt_deg = 0, double bearing_deg = 0) {
    return sky_view_frac({&profile, 1}, tilt_deg, bearing_deg);
}

HorizonProfile uniform(double height_deg) { return HorizonProfile({{0, height_deg}}); }

/// Endless walls: one whose top stands theta above the horizontal, square on, in each bearing given; every
/// half degree.
HorizonProfile walls(std::vector<std::pair<double, double>> bearing_theta_deg) {
    std::vector<HorizonPoint> points;
    for (double azimuth = 0; azimuth < 360; azimuth += 0.125) {
        double height = 0;
        for (const auto& [bearing, theta] : bearing_theta_deg)
            height = std::max(height, std::atan(std::tan(theta * kRadPerDeg) *
                                                std::max(0.0, std::cos((azimuth - bearing) * kRadPerDeg))) /
                                          kRadPerDeg);
        points.push_back({azimuth, height});
    }
    return HorizonProfile(std::move(points));
}

} // namespace

// Source: the integral of J. Dozier, J. Frew, IEEE Trans. Geosci. Remote Sens. 28 (1990) 963-969, in closed
// form.
TEST_CASE("sky: a uniform horizon leaves the square of its cosine") {
    struct Row {
        double height_deg, frac;
    };
    for (const Row& row : {Row{10, .969846}, Row{20, .883022}, Row{30, .75}, Row{45, .5}, Row{60, .25}})
        CHECK(view(uniform(row.height_deg)) == Approx(row.frac).margin(1e-6));
}

TEST_CASE("sky: a tilted panel under an open sky sees half of one plus the cosine of its tilt") {
    struct Row {
        double tilt_deg, frac;
    };
    for (const Row& row :
         {Row{5, .998097}, Row{10, .992404}, Row{15, .982963}, Row{30, .933013}, Row{90, .5}})
        for (const HorizonProfile& open : {HorizonProfile(), uniform(0)})
            CHECK(view(open, row.tilt_deg, 77) == Approx(row.frac).margin(1e-6));
}

TEST_CASE("sky: a tilted panel in a uniform horizon as high as its tilt or higher") {
    struct Row {
        double tilt_deg, height_deg, frac;
    };
    for (const Row& row : {Row{15, 15, .901221}, Row{15, 20, .852934}, Row{15, 30, .724444},
                           Row{10, 20, .869607}, Row{15, 10, .937863}})
        CHECK(view(uniform(row.height_deg), row.tilt_deg, 200) == Approx(row.frac).margin(1.5e-6));
}

TEST_CASE("sky: an endless wall leaves half of one plus its cosine") {
    struct Row {
        double theta_deg, frac;
    };
    for (const Row& row :
         {Row{10, .992404}, Row{30, .933013}, Row{45, .853553}, Row{60, .75}, Row{80, .586824}})
        CHECK(view(walls({{90, row.theta_deg}})) == Approx(row.frac).margin(1e-5));
}

// Canyon: T.R. Oke, Boundary Layer Climates, 2nd ed. (1987): cos(atan(2 H / W)) at its middle.
TEST_CASE("sky: the middle of a street canyon") {
    struct Row {
        double height_over_width, frac;
    };
    for (const Row& row : {Row{.25, .894427}, Row{.5, .707107}, Row{1, .447214}, Row{2, .242536}}) {
        const double theta_deg = std::atan(2 * row.height_over_width) / kRadPerDeg;
        CHECK(view(walls({{0, theta_deg}, {180, theta_deg}})) == Approx(row.frac).margin(1e-5));
    }
    CHECK(view(walls({{0, 30}, {180, 60}})) == Approx(.683013).margin(1e-5));
}

TEST_CASE("sky: a tilted panel that faces a wall, or leans away from it") {
    CHECK(view(walls({{90, 30}}), 15, 90) == Approx(.853553).margin(1e-5));
    CHECK(view(walls({{90, 45}}), 15, 90) == Approx(.75).margin(1e-5));
    CHECK(view(walls({{90, 30}}), 15, 270) == Approx(.965926).margin(1e-5));
    CHECK(view(walls({{90, 45}}), 15, 270) == Approx(.915976).margin(1e-5));
}

TEST_CASE("sky: one sector of 60 degrees, 40 degrees high") {
    CHECK(view(HorizonProfile({{100, 0}, {100, 40}, {160, 40}, {160, 0}})) == Approx(.931137).margin(1e-6));
    // Across north, rows in the order in which the sector is walked.
    CHECK(view(HorizonProfile({{330, 0}, {330, 40}, {30, 40}, {30, 0}})) == Approx(.931137).margin(1e-6));
}
