#include "model/sun/spa.h"

#include <algorithm>
#include <cmath>
#include <span>

#include "model/sun/spa_terms.h"

namespace unstring {
namespace {

using spa_terms::Term;

double in_circle(double deg) {
    const double rest = std::fmod(deg, 360.0);
    return rest < 0 ? rest + 360.0 : rest;
}
double sine(double deg) { return std::sin(deg * kRadPerDeg); }
double cosine(double deg) { return std::cos(deg * kRadPerDeg); }
double tangent(double deg) { return std::tan(deg * kRadPerDeg); }
double angle(double y, double x) { return std::atan2(y, x) / kRadPerDeg; }

double series(std::initializer_list<std::span<const Term>> powers, double millennia) {
    double sum = 0;
    double power = 1;
    for (const std::span<const Term> terms : powers) {
        double part = 0;
        for (const Term& term : terms) part += term.amplitude * std::cos(term.phase + term.rate * millennia);
        sum += part * power;
        power *= millennia;
    }
    return sum / 1e8;
}

double cubic(double x, double c0, double c1, double c2, double c3) {
    return c0 + x * (c1 + x * (c2 + x * c3));
}

void earth(double millennia, SpaSun& sun) {
    using namespace spa_terms;
    sun.earth_longitude_deg = in_circle(series({kL0, kL1, kL2, kL3, kL4, kL5}, millennia) / kRadPerDeg);
    sun.earth_latitude_deg = series({kB0, kB1}, millennia) / kRadPerDeg;
    sun.radius_au = series({kR0, kR1, kR2, kR3, kR4}, millennia);
}

void nutation(double centuries, SpaSun& sun) {
    const std::array<double, 5> arguments = {
        cubic(centuries, 297.85036, 445267.111480, -0.0019142, 1.0 / 189474), // moon from the sun
        cubic(centuries, 357.52772, 35999.050340, -0.0001603, -1.0 / 300000), // anomaly of the sun
        cubic(centuries, 134.96298, 477198.867398, 0.0086972, 1.0 / 56250),   // anomaly of the moon
        cubic(centuries, 93.27191, 483202.017538, -0.0036825, 1.0 / 327270),  // latitude of the moon
        cubic(centuries, 125.04452, -1934.136261, 0.0020708, 1.0 / 450000)};  // node of the moon
    double longitude = 0;
    double obliquity = 0;
    for (const spa_terms::NutationTerm& term : spa_terms::kNutation) {
        double sum_deg = 0;
        for (std::size_t i = 0; i < arguments.size(); ++i) sum_deg += term.multiple[i] * arguments[i];
        longitude += (term.sine + term.sine_rate * centuries) * sine(sum_deg);
        obliquity += (term.cosine + term.cosine_rate * centuries) * cosine(sum_deg);
    }
    sun.nutation_longitude_deg = longitude / 36000000.0;
    sun.nutation_obliquity_deg = obliquity / 36000000.0;
}

double mean_obliquity_deg(double millennia) {
    constexpr std::array<double, 11> kArcSeconds = {84381.448, -4680.93, -1.55, 1999.25, -51.38, -249.67,
                                                    -39.05,    7.12,     27.87, 5.79,    2.45};
    const double u = millennia / 10.0;
    double sum = 0;
    for (std::size_t i = kArcSeconds.size(); i-- > 0;) sum = sum * u + kArcSeconds[i];
    return sum / 3600.0;
}

double mean_sidereal_deg(double days, double centuries) {
    return in_circle(280.46061837 + 360.98564736629 * days +
                     centuries * centuries * (0.000387933 - centuries / 38710000.0));
}

void geocentric(double earth_latitude_deg, SpaSun& sun) {
    const double latitude_deg = -earth_latitude_deg;
    const double lambda = sun.apparent_longitude_deg;
    const double epsilon = sun.obliquity_deg;
    sun.ascension_deg = in_circle(
        angle(sine(lambda) * cosine(epsilon) - tangent(latitude_deg) * sine(epsilon), cosine(lambda)));
    sun.declination_deg = std::asin(sine(latitude_deg) * cosine(epsilon) +
                                    cosine(latitude_deg) * sine(epsilon) * sine(lambda)) /
                          kRadPerDeg;
}

/// From the Earth's centre to the place, on the ellipsoid.
void topocentric(const SpaInput& input, SpaSun& sun) {
    constexpr double kFlat = 0.99664719;
    constexpr double kRadius_m = 6378140;
    const double parallax_deg = 8.794 / (3600.0 * sun.radius_au);
    const double lat = input.place.lat_deg;
    const double u = std::atan(kFlat * tangent(lat));
    const double x = std::cos(u) + input.elevation_m / kRadius_m * cosine(lat);
    const double y = kFlat * std::sin(u) + input.elevation_m / kRadius_m * sine(lat);
    const double across = cosine(sun.declination_deg) - x * sine(parallax_deg) * cosine(sun.hour_angle_deg);
    const double shift_deg = angle(-x * sine(parallax_deg) * sine(sun.hour_angle_deg), across);
    sun.topocentric_declination_deg =
        angle((sine(sun.declination_deg) - y * sine(parallax_deg)) * cosine(shift_deg), across);
    sun.topocentric_hour_angle_deg = sun.hour_angle_deg - shift_deg;
}

void horizontal(const SpaInput& input, SpaSun& sun) {
    const double lat = input.place.lat_deg;
    const double dec = sun.topocentric_declination_deg;
    const double hour = sun.topocentric_hour_angle_deg;
    sun.elevation_deg =
        std::asin(std::clamp(sine(lat) * sine(dec) + cosine(lat) * cosine(dec) * cosine(hour), -1.0, 1.0)) /
        kRadPerDeg;
    sun.refraction_deg = air_refraction_deg(input, sun.elevation_deg);
    sun.zenith_deg = 90.0 - sun.elevation_deg - sun.refraction_deg;
    sun.azimuth_deg =
        in_circle(angle(sine(hour), cosine(hour) * sine(lat) - tangent(dec) * cosine(lat)) + 180.0);
}

double equation_of_time_min(double millennia, const SpaSun& sun) {
    const double m = millennia;
    const double mean_longitude_deg =
        280.4664567 +
        m * (360007.6982779 + m * (0.03032028 + m * (1.0 / 49931 + m * (-1.0 / 15300 - m / 2000000.0))));
    const double deg = mean_longitude_deg - 0.0057183 - sun.ascension_deg +
                       sun.nutation_longitude_deg * cosine(sun.obliquity_deg);
    return 4.0 * std::remainder(deg, 360.0);
}

} // namespace

double air_refraction_deg(const SpaInput& input, double elevation_deg) {
    constexpr double kSunRadius_deg = 0.26667;
    if (elevation_deg < -(kSunRadius_deg + input.refraction_deg)) return 0;
    return input.pressure_hpa / 1010.0 * 283.0 / (273.0 + input.temp_c) * 1.02 /
           (60.0 * tangent(elevation_deg + 10.3 / (elevation_deg + 5.11)));
}

SpaSun spa_sun(const SpaInput& input) {
    const double days = input.days_since_2000;
    const double ephemeris_centuries = (days + input.delta_t_s / 86400.0) / 36525.0;
    const double millennia = ephemeris_centuries / 10.0;
    SpaSun sun;
    earth(millennia, sun);
    nutation(ephemeris_centuries, sun);
    sun.obliquity_deg = mean_obliquity_deg(millennia) + sun.nutation_obliquity_deg;
    const double aberration_deg = -20.4898 / (3600.0 * sun.radius_au);
    sun.apparent_longitude_deg =
        in_circle(sun.earth_longitude_deg + 180.0 + sun.nutation_longitude_deg + aberration_deg);
    sun.sidereal_deg =
        mean_sidereal_deg(days, days / 36525.0) + sun.nutation_longitude_deg * cosine(sun.obliquity_deg);
    geocentric(sun.earth_latitude_deg, sun);
    sun.hour_angle_deg = in_circle(sun.sidereal_deg + input.place.lon_deg - sun.ascension_deg);
    topocentric(input, sun);
    horizontal(input, sun);
    sun.equation_of_time_min = equation_of_time_min(millennia, sun);
    return sun;
}

} // namespace unstring
