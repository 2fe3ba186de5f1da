#include "model/sun/sun_position.h"

#include <algorithm>
#include <cmath>

namespace unstring {

double days_since_2000(int year, int month, int day, double hour_utc) {
    // Day count of the Gregorian calendar with the year begun in March, so that the leap day comes last.
    const int march_year = month <= 2 ? year - 1 : year;
    const int march_month = month <= 2 ? month + 9 : month - 3;
    const auto floor_div = [](int a, int b) { return a >= 0 ? a / b : -((-a + b - 1) / b); };
    const int days = 365 * march_year + floor_div(march_year, 4) - floor_div(march_year, 100) +
                     floor_div(march_year, 400) + (153 * march_month + 2) / 5 + day - 1;
    constexpr int kDaysTo2000 = 730425; // the same count for 2000-01-01
    return static_cast<double>(days - kDaysTo2000) + (hour_utc - 12.0) / 24.0;
}

SunPosition psa_sun(double n, LonLat place) {
    const double node = 2.267127827 - 9.300339267e-4 * n;
    const double mean_longitude = 4.895036035 + 1.720279602e-2 * n;
    const double anomaly = 6.239468336 + 1.720200135e-2 * n;
    const double longitude = mean_longitude + 3.338320972e-2 * std::sin(anomaly) +
                             3.497596876e-4 * std::sin(2 * anomaly) - 1.544353226e-4 -
                             8.689729360e-6 * std::sin(node);
    const double obliquity = 4.090904909e-1 - 6.213605399e-9 * n + 4.418094944e-5 * std::cos(node);
    const double ascension = std::atan2(std::cos(obliquity) * std::sin(longitude), std::cos(longitude));
    const double declination = std::asin(std::sin(obliquity) * std::sin(longitude));

    const double hour_utc = 24.0 * (n + 0.5 - std::floor(n + 0.5));
    const double sidereal_h = 6.697096103 + 6.570984737e-2 * n + hour_utc;
    const double hour_angle =
        std::remainder((15.0 * sidereal_h + place.lon_deg) * kRadPerDeg - ascension, 2 * std::numbers::pi);

    const double latitude = place.lat_deg * kRadPerDeg;
    const double cos_zenith = std::cos(latitude) * std::cos(hour_angle) * std::cos(declination) +
                              std::sin(declination) * std::sin(latitude);
    double zenith = std::acos(std::clamp(cos_zenith, -1.0, 1.0));
    const double azimuth = std::atan2(-std::sin(hour_angle), std::tan(declination) * std::cos(latitude) -
                                                                 std::sin(latitude) * std::cos(hour_angle));
    constexpr double kParallax = 6371.01 / 149597890.0; // radius of the Earth over its distance from the sun
    zenith += kParallax * std::sin(zenith);
    return {90.0 - zenith / kRadPerDeg, azimuth < 0 ? azimuth / kRadPerDeg + 360.0 : azimuth / kRadPerDeg,
            declination / kRadPerDeg, hour_angle / kRadPerDeg};
}

} // namespace unstring
