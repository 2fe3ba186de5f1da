// Light on a tilted panel, its temperature, its power.

#include <cmath>

#include <catch2/catch.hpp>

#include "model/quantities.h"
#include "model/solar/canopy_months.h"
#include "model/solar/panel.h"
#include "model/sun/daily_sun.h"
#include "model/sun/diffuse.h"
#include "model/sun/transposition.h"

using namespace unstring;

namespace {

struct Instant { // pvlib-python tests/test_irradiance.py
    double direct, diffuse, global, outside_normal, zenith_deg, azimuth_deg;
};
constexpr Instant kInstants[] = {
    {316.1949056, 40.46149818, 79.73860422, 1321.1655834833, 82.85457044, 66.71410338},
    {939.95469881, 118.45831879, 1042.48031487, 1321.1655834833, 10.56413562, 144.76567754},
    {646.22886049, 62.03376265, 257.20751138, 1321.1655834833, 72.41687122, 287.04104128}};

struct OnPanel {
    double beam, isotropic, hay_davies;
};

OnPanel on_panel(const Instant& now, double tilt_deg) {
    const double cosine = cos_incidence(tilt_deg, 180, 90 - now.zenith_deg, now.azimuth_deg);
    const double cos_zenith = std::cos(now.zenith_deg * kRadPerDeg);
    const double ratio = beam_ratio(cosine, cos_zenith, tilt_deg);
    const double around = circumsolar_frac(now.direct * cos_zenith, cos_zenith, now.outside_normal);
    return {now.direct * std::max(0.0, cosine), now.diffuse * even_sky_frac(tilt_deg),
            now.diffuse * hay_davies_ratio(around, ratio, tilt_deg)};
}

} // namespace

// Source: pvlib-python tests/test_irradiance.py (tilt 40); tilts 15 and 10 run with that library.
TEST_CASE("panel: sky diffuse, isotropic and by Hay and Davies") {
    struct Row {
        double tilt_deg, isotropic[3], hay_davies[3];
    };
    for (const Row& row : {Row{40, {35.728402, 104.601328, 54.777191}, {27.1775, 102.9949, 33.1909}},
                           Row{15, {39.772152, 116.440134, 60.976888}, {31.703688, 118.327040, 53.197367}},
                           Row{10, {40.154148, 117.558495, 61.562547}, {34.777945, 119.147630, 56.459420}}})
        for (std::size_t i = 0; i < 3; ++i) {
            const OnPanel light = on_panel(kInstants[i], row.tilt_deg);
            CHECK(light.isotropic == Approx(row.isotropic[i]).margin(1e-4));
            CHECK(light.hay_davies == Approx(row.hay_davies[i]).margin(1e-4));
        }
    CHECK(100 * even_sky_frac(40) == Approx(88.302222).margin(5e-7));
}

// Source: run with pvlib-python (beam); its tests/test_irradiance.py (ground, albedo .4).
TEST_CASE("panel: beam and light from the ground") {
    const double beam[3] = {5.890161, 928.968048, 141.841288};
    const double ground[3] = {3.731058, 48.778813, 12.035025};
    for (std::size_t i = 0; i < 3; ++i) {
        CHECK(on_panel(kInstants[i], 15).beam == Approx(beam[i]).margin(1e-4));
        CHECK(kInstants[i].global * 0.4 * ground_frac(40) == Approx(ground[i]).margin(1e-4));
    }
}

// Source: D&B examples 1.6.1 and 1.6.2 (14 S and 35; 66.5 and 79.6 degrees, from memory). The book rounds the
// declination of 13 February to -14 before it goes on, and so do the figures here.
TEST_CASE("panel: angles between sun and panel") {
    CHECK(cooper_declination_deg(44) == Approx(-13.946).margin(5e-4));
    const double declination = -14 * kRadPerDeg;
    const double lat = 43 * kRadPerDeg;
    const auto zenith_deg = [&](double dec, double hour_deg) {
        return std::acos(std::sin(lat) * std::sin(dec) +
                         std::cos(lat) * std::cos(dec) * std::cos(hour_deg * kRadPerDeg)) /
               kRadPerDeg;
    };
    CHECK(zenith_deg(declination, -37.5) == Approx(66.547).margin(5e-4));
    CHECK(zenith_deg(cooper_declination_deg(182) * kRadPerDeg, 97.5) == Approx(79.630).margin(5e-4));
    const double zenith = zenith_deg(declination, -22.5);
    const double north = std::cos(lat) * std::sin(declination) -
                         std::sin(lat) * std::cos(declination) * std::cos(-22.5 * kRadPerDeg);
    const double east = -std::cos(declination) * std::sin(-22.5 * kRadPerDeg);
    const double azimuth = std::atan2(east, north) / kRadPerDeg;
    CHECK(std::acos(cos_incidence(45, 180 + 15, 90 - zenith, azimuth)) / kRadPerDeg ==
          Approx(35.18).margin(5e-3));
}

// Source: D&B examples 2.15.1 and 2.16.1, 20 February, 40 N, panel 60 degrees south, 9-10 h, 1.04 MJ (from
// memory).
TEST_CASE("panel: an hour on a steep panel, isotropic and by Hay and Davies") {
    const double declination = cooper_declination_deg(51);
    const double outside = hours_outside_wh_m2(40, declination, 51, -45, -30) * 0.0036;
    const double clearness = 1.04 / outside;
    const double diffuse = 1.04 * erbs_hour_frac(clearness);
    const double beam = 1.04 - diffuse;
    CHECK(outside == Approx(2.3349).margin(5e-5));
    CHECK(clearness == Approx(.4454).margin(5e-5));
    CHECK(diffuse == Approx(.7961).margin(5e-5));
    const double lat = 40 * kRadPerDeg, dec = declination * kRadPerDeg, hour = -37.5 * kRadPerDeg;
    const double cos_zenith = std::sin(lat) * std::sin(dec) + std::cos(lat) * std::cos(dec) * std::cos(hour);
    const double north = std::cos(lat) * std::sin(dec) - std::sin(lat) * std::cos(dec) * std::cos(hour);
    const double azimuth = std::atan2(-std::cos(dec) * std::sin(hour), north) / kRadPerDeg;
    const double elevation = std::asin(cos_zenith) / kRadPerDeg;
    const double ratio = beam_ratio(cos_incidence(60, 180, elevation, azimuth), cos_zenith, 60);
    CHECK(ratio == Approx(1.7133).margin(5e-5));
    const double ground = 1.04 * 0.6 * ground_frac(60);
    CHECK(beam * ratio + diffuse * even_sky_frac(60) + ground == Approx(1.1709).margin(1e-4));
    CHECK(beam * ratio + diffuse * hay_davies_ratio(beam / outside, ratio, 60) + ground ==
          Approx(1.2510).margin(1e-4));
}

// Source: D. Faiman (2008), values of pvlib-python tests/test_temperature.py; nominal temperature: R.G. Ross
// (1976).
TEST_CASE("panel: cell temperature") {
    CHECK(cell_temp_c(900, 20, 5) == Approx(35.203).margin(5e-4));
    CHECK(cell_temp_c(900, 20, 5, 22, 6) == Approx(37.308).margin(5e-4));
    CHECK(cell_temp_c(500, 10, 5) == Approx(18.446).margin(5e-4));
    CHECK(cell_temp_by_noct_c(1000, 30, 45) == Approx(61.25));
}

// Source: PVWatts, NREL/TP-6A20-62641, value of pvlib-python tests/test_pvsystem.py; second row computed
// twice.
TEST_CASE("panel: power") {
    CHECK(panel_power_w(100, 900, 30, -0.003) == Approx(88.65).margin(5e-3));
    CHECK(cell_temp_c(800, 35, 1) == Approx(60.126).margin(5e-4));
    CHECK(panel_power_w(80, 800, cell_temp_c(800, 35, 1), -0.004) == Approx(55.008).margin(5e-4));
}

// Source: G.M. Heisler, Urban Ecology 9 (1986) 337-359, and J. Konarska et al. (2014), the latter from
// memory: beam through a crown in leaf .02-.20, bare .30-.65.
TEST_CASE("canopy: what a crown lets through stays in the measured range, and the seasons turn south of the "
          "equator") {
    const Monthly north = canopy_through(Leaf::deciduous, 40);
    CHECK(north[6] >= .02);
    CHECK(north[6] <= .20);
    CHECK(north[0] >= .30);
    CHECK(north[0] <= .65);
    CHECK(north[3] == Approx(.45 + .3 * (.05 - .45)));
    CHECK(canopy_through(Leaf::deciduous, -40)[0] == north[6]);
    CHECK(canopy_through(Leaf::evergreen, 40)[0] == canopy_through(Leaf::evergreen, 40)[6]);
}
