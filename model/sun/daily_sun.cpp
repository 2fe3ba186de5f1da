#include "model/sun/daily_sun.h"

#include <algorithm>
#include <array>
#include <cmath>

#include "model/quantities.h"

namespace unstring {
namespace {

constexpr std::array<int, 13> kMonthStart = {0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334, 365};
constexpr double kPi = std::numbers::pi;

double outside_scale_wh_m2(double lat_deg, double declination_deg, double sines, double arc_deg) {
    const double lat = lat_deg * kRadPerDeg;
    const double dec = declination_deg * kRadPerDeg;
    return std::cos(lat) * std::cos(dec) * sines + arc_deg * kRadPerDeg * std::sin(lat) * std::sin(dec);
}

/// What both shares have in common.
double cosine_share(double hour_angle_deg, double sunset_deg) {
    const double sunset = sunset_deg * kRadPerDeg;
    const double above = std::cos(hour_angle_deg * kRadPerDeg) - std::cos(sunset);
    if (sunset_deg <= 0 || above <= 0) return 0;
    return kPi / 24.0 * above / (std::sin(sunset) - sunset * std::cos(sunset));
}

} // namespace

int month_of_day(int day_of_year) {
    int month = 1;
    while (month < 12 && day_of_year > kMonthStart[static_cast<std::size_t>(month)]) ++month;
    return month;
}

int days_in_month(int month) {
    return kMonthStart[static_cast<std::size_t>(month)] - kMonthStart[static_cast<std::size_t>(month - 1)];
}

double cooper_declination_deg(int day_of_year) {
    return 23.45 * std::sin(360.0 * (284 + day_of_year) / 365.0 * kRadPerDeg);
}

double sunset_hour_angle_deg(double lat_deg, double declination_deg) {
    const double cosine = -std::tan(lat_deg * kRadPerDeg) * std::tan(declination_deg * kRadPerDeg);
    return std::acos(std::clamp(cosine, -1.0, 1.0)) / kRadPerDeg;
}

double distance_factor(int day_of_year) {
    return 1.0 + 0.033 * std::cos(360.0 * day_of_year / 365.0 * kRadPerDeg);
}

double day_outside_wh_m2(double lat_deg, double declination_deg, int day_of_year,
                         double solar_constant_w_m2) {
    const double sunset_deg = sunset_hour_angle_deg(lat_deg, declination_deg);
    const double scale =
        outside_scale_wh_m2(lat_deg, declination_deg, std::sin(sunset_deg * kRadPerDeg), sunset_deg);
    return std::max(0.0, 24.0 / kPi * solar_constant_w_m2 * distance_factor(day_of_year) * scale);
}

double hours_outside_wh_m2(double lat_deg, double declination_deg, int day_of_year, double from_deg,
                           double to_deg) {
    const double sines = std::sin(to_deg * kRadPerDeg) - std::sin(from_deg * kRadPerDeg);
    return 12.0 / kPi * kSolarConstant_w_m2 * distance_factor(day_of_year) *
           outside_scale_wh_m2(lat_deg, declination_deg, sines, to_deg - from_deg);
}

double hour_share_global(double hour_angle_deg, double sunset_deg) {
    const double shift = (sunset_deg - 60.0) * kRadPerDeg;
    const double a = 0.409 + 0.5016 * std::sin(shift);
    const double b = 0.6609 - 0.4767 * std::sin(shift);
    return (a + b * std::cos(hour_angle_deg * kRadPerDeg)) * cosine_share(hour_angle_deg, sunset_deg);
}

double hour_share_diffuse(double hour_angle_deg, double sunset_deg) {
    return cosine_share(hour_angle_deg, sunset_deg);
}

} // namespace unstring
