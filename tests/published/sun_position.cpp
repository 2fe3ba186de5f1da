// Sun position against published examples and against ERFA, an independent library.

#include <cmath>
#include <random>

#include <catch2/catch.hpp>
#include <erfa.h>
#include <erfam.h>

#include "model/sun/spa.h"
#include "model/sun/sun_position.h"

using namespace unstring;

namespace {

SpaInput spa_example() {
    SpaInput input;
    input.days_since_2000 = days_since_2000(2003, 10, 17, 19 + 30 / 60.0 + 30 / 3600.0);
    input.place = {-105.1786, 39.742476};
    input.elevation_m = 1830.14;
    input.pressure_hpa = 820;
    input.temp_c = 11;
    input.delta_t_s = 67;
    return input;
}

} // namespace

// Source: I. Reda, A. Andreas, NREL/TP-560-34302, worked example; figures as in pvlib-python
// tests/test_spa.py.
TEST_CASE("sun: the worked example of the solar position algorithm comes out step by step") {
    const SpaSun sun = spa_sun(spa_example());
    CHECK(spa_example().days_since_2000 + 2451545.0 == Approx(2452930.312847).epsilon(0).margin(5e-7));
    CHECK(sun.earth_longitude_deg == Approx(24.0182616917).margin(5e-9));
    CHECK(sun.radius_au == Approx(0.9965422974).margin(5e-11));
    CHECK(sun.nutation_longitude_deg == Approx(-0.00399840).margin(5e-9));
    CHECK(sun.nutation_obliquity_deg == Approx(0.00166657).margin(5e-9));
    CHECK(sun.obliquity_deg == Approx(23.440465).margin(5e-7));
    CHECK(sun.apparent_longitude_deg == Approx(204.0085519281).margin(5e-9));
    CHECK(sun.sidereal_deg == Approx(318.511910).margin(5e-7));
    CHECK(sun.ascension_deg == Approx(202.227408).margin(5e-7));
    CHECK(sun.declination_deg == Approx(-9.31434).margin(5e-6));
    CHECK(sun.hour_angle_deg == Approx(11.10590).margin(5e-6));
    CHECK(sun.topocentric_hour_angle_deg == Approx(11.10627).margin(5e-6));
    CHECK(sun.elevation_deg == Approx(39.872046).margin(5e-7));
    CHECK(90 - sun.zenith_deg == Approx(39.888378).margin(5e-7));
    CHECK(sun.zenith_deg == Approx(50.11162).margin(5e-6));
    CHECK(sun.azimuth_deg == Approx(194.340241).margin(5e-7));
    CHECK(sun.equation_of_time_min == Approx(14.64).margin(5e-3));
}

// Source: solposx (open library), tests/test_solarposition.py, PSA with the coefficients of 2020.
TEST_CASE("sun: the fast algorithm gives its published check values") {
    struct Row {
        double hour_utc, lat_deg, lon_deg, elevation_deg, azimuth_deg;
    };
    for (const Row& row :
         {Row{12.5, 45, 10, 32.21595946, 204.9167547}, Row{12.5, 0, 10, 66.85741664, 245.08558596},
          Row{3.5, 45, 10, -23.41028925, 79.54884709}}) {
        const SunPosition sun =
            psa_sun(days_since_2000(2020, 10, 17, row.hour_utc), {row.lon_deg, row.lat_deg});
        CHECK(sun.elevation_deg == Approx(row.elevation_deg).margin(5e-9));
        CHECK(sun.azimuth_deg == Approx(row.azimuth_deg).margin(5e-8));
    }
}

// Source: JPL Horizons, 2020-01-01, 50 N 10 E, as in solposx tests (fixture expected_nasa). 0.001 degrees
// allow for the difference between UTC and universal time, 0.18 s on that day, which neither algorithm is
// told.
TEST_CASE("sun: both algorithms agree with the ephemeris of JPL") {
    struct Row {
        double hour_utc, azimuth_deg, elevation_deg;
    };
    for (const Row& row :
         {Row{9, 146.804482, 10.367984}, Row{11, 174.399466, 16.791713}, Row{15, 228.325009, 2.693785}}) {
        SpaInput input;
        input.days_since_2000 = days_since_2000(2020, 1, 1, row.hour_utc);
        input.place = {10, 50};
        const SpaSun spa = spa_sun(input);
        CHECK(spa.azimuth_deg == Approx(row.azimuth_deg).margin(1e-3));
        CHECK(spa.elevation_deg == Approx(row.elevation_deg).margin(1e-3));
        const SunPosition psa = psa_sun(input.days_since_2000, input.place);
        CHECK(psa.azimuth_deg == Approx(row.azimuth_deg).margin(0.01));
        CHECK(psa.elevation_deg == Approx(row.elevation_deg).margin(0.01));
    }
}

namespace {

struct Horizontal {
    double elevation_deg, azimuth_deg;
};

/// The sun by ERFA: Earth's place, aberration, precession and nutation, sidereal time, parallax; on a sphere
/// at sea level.
Horizontal erfa_sun(double days, LonLat place, double delta_t_s) {
    const double tt = days + delta_t_s / 86400.0;
    double heliocentric[2][3], barycentric[2][3];
    eraEpv00(ERFA_DJ00, tt, heliocentric, barycentric);
    double to_sun[3], velocity[3], apparent[3];
    const double distance = std::hypot(heliocentric[0][0], heliocentric[0][1], heliocentric[0][2]);
    double speed2 = 0;
    for (int i = 0; i < 3; ++i) {
        to_sun[i] = -heliocentric[0][i] / distance;
        velocity[i] = barycentric[1][i] * 0.005775518331; // of light, from AU a day
        speed2 += velocity[i] * velocity[i];
    }
    eraAb(to_sun, velocity, distance, std::sqrt(1 - speed2), apparent);
    double rotation[3][3], of_date[3], ascension, declination, azimuth, elevation;
    eraPnm06a(ERFA_DJ00, tt, rotation);
    eraRxp(rotation, apparent, of_date);
    eraC2s(of_date, &ascension, &declination);
    const double sidereal = eraGst06a(ERFA_DJ00, days, ERFA_DJ00, tt);
    eraHd2ae(sidereal + place.lon_deg * kRadPerDeg - ascension, declination, place.lat_deg * kRadPerDeg,
             &azimuth, &elevation);
    elevation -= 8.794 / 3600.0 * kRadPerDeg / distance * std::cos(elevation);
    return {elevation / kRadPerDeg, azimuth / kRadPerDeg};
}

/// Angle between two directions.
double apart_deg(double elevation_a, double azimuth_a, double elevation_b, double azimuth_b) {
    const double mean = 0.5 * (elevation_a + elevation_b) * kRadPerDeg;
    return std::hypot(elevation_a - elevation_b,
                      std::remainder(azimuth_a - azimuth_b, 360.0) * std::cos(mean));
}

} // namespace

// Source: ERFA 2.0 (liberfa), the open form of the IAU's SOFA. Seed 20200101.
TEST_CASE("sun: over random instants and places the exact algorithm is within 0.0003, the fast one within "
          "0.01 degrees of ERFA") {
    std::mt19937_64 random(20200101);
    std::uniform_real_distribution<double> days(days_since_2000(2020, 1, 1, 0),
                                                days_since_2000(2050, 1, 1, 0));
    std::uniform_real_distribution<double> latitude(-65, 65), longitude(-180, 180);
    double worst_spa = 0;
    double worst_psa = 0;
    for (int i = 0; i < 1500; ++i) {
        SpaInput input;
        input.days_since_2000 = days(random);
        input.place = {longitude(random), latitude(random)};
        const Horizontal reference = erfa_sun(input.days_since_2000, input.place, input.delta_t_s);
        const SpaSun spa = spa_sun(input);
        const SunPosition psa = psa_sun(input.days_since_2000, input.place);
        worst_spa = std::max(worst_spa, apart_deg(spa.elevation_deg, spa.azimuth_deg, reference.elevation_deg,
                                                  reference.azimuth_deg));
        worst_psa = std::max(worst_psa, apart_deg(psa.elevation_deg, psa.azimuth_deg, reference.elevation_deg,
                                                  reference.azimuth_deg));
    }
    CAPTURE(worst_spa, worst_psa);
    CHECK(worst_spa < 0.0003);
    CHECK(worst_psa < 0.01);
}
