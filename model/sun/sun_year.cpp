#include "model/sun/sun_year.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "model/sun/daily_sun.h"
#include "model/sun/sun_position.h"

namespace unstring {
namespace {

constexpr int kYear = 2025; // of the psa model: not a leap year

/// Gives the sun of a day (0..364) at any hour of its clock.
class Sky {
public:
    Sky(LonLat place, DayModel model, double clock_h) : place_(place), model_(model), clock_h_(clock_h) {}

    [[nodiscard]] SunPosition at(int day, double hour) const {
        if (model_ == DayModel::psa) return psa_sun(first_day_ + day + (hour - clock_h_) / 24.0, place_);
        SunPosition sun;
        sun.declination_deg = cooper_declination_deg(day + 1);
        sun.hour_angle_deg = 15.0 * (hour - 12.0);
        const double lat = place_.lat_deg * kRadPerDeg;
        const double dec = sun.declination_deg * kRadPerDeg;
        const double angle = sun.hour_angle_deg * kRadPerDeg;
        const double up = std::sin(lat) * std::sin(dec) + std::cos(lat) * std::cos(dec) * std::cos(angle);
        const double north = std::cos(lat) * std::sin(dec) - std::sin(lat) * std::cos(dec) * std::cos(angle);
        const double east = -std::cos(dec) * std::sin(angle);
        sun.elevation_deg = std::asin(std::clamp(up, -1.0, 1.0)) / kRadPerDeg;
        const double azimuth_deg = std::atan2(east, north) / kRadPerDeg;
        sun.azimuth_deg = azimuth_deg < 0 ? azimuth_deg + 360.0 : azimuth_deg;
        return sun;
    }

private:
    LonLat place_;
    DayModel model_;
    double clock_h_;
    double first_day_ = days_since_2000(kYear, 1, 1, 0);
};

SunDay sun_day(const Sky& sky, double lat_deg, int day) {
    SunDay out;
    const double declination_deg = sky.at(day, 12.0).declination_deg;
    out.month = month_of_day(day + 1);
    out.outside_wh_m2 = day_outside_wh_m2(lat_deg, declination_deg, day + 1);
    out.outside_normal_w_m2 = kSolarConstant_w_m2 * distance_factor(day + 1);
    out.sunset_deg = sunset_hour_angle_deg(lat_deg, declination_deg);
    return out;
}

void normalise(std::span<double> shares) {
    double sum = 0;
    for (const double share : shares) sum += share;
    if (sum <= 0) return;
    for (double& share : shares) share /= sum;
}

SunStep sun_step(const SunPosition& sun) {
    const double elevation = sun.elevation_deg * kRadPerDeg;
    const double azimuth = sun.azimuth_deg * kRadPerDeg;
    return {static_cast<float>(sun.azimuth_deg), static_cast<float>(sun.elevation_deg),
            static_cast<float>(std::cos(elevation) * std::sin(azimuth)),
            static_cast<float>(std::cos(elevation) * std::cos(azimuth)),
            static_cast<float>(std::sin(elevation))};
}

/// Where in its step the sun of a day is taken: the golden section spreads any run of days evenly.
double place_in_step(Sampling sampling, int day) {
    if (sampling == Sampling::centres) return 0.5;
    const double turned = 0.6180339887498949 * day;
    return turned - std::floor(turned);
}

void add_hour(SunYear& year, const Sky& sky, int day, int hour, int step_min, double in_step) {
    const SunPosition centre = sky.at(day, hour + 0.5);
    const SunDay& today = year.days[static_cast<std::size_t>(day)];
    year.elevation_deg.push_back(centre.elevation_deg);
    year.azimuth_deg.push_back(centre.azimuth_deg);
    year.global_share.push_back(hour_share_global(centre.hour_angle_deg, today.sunset_deg));
    year.diffuse_share.push_back(hour_share_diffuse(centre.hour_angle_deg, today.sunset_deg));
    year.solar_hour.push_back(12.0 + centre.hour_angle_deg / 15.0);
    for (int k = 0; k < kLampSteps; ++k)
        year.lamp_step_deg.push_back(
            static_cast<float>(sky.at(day, hour + (k + 0.5) / kLampSteps).elevation_deg));
    const int steps = 60 / step_min;
    for (int k = 0; k < steps; ++k) {
        const SunPosition sun = sky.at(day, hour + (k + in_step) / steps);
        if (sun.elevation_deg > 0) year.steps.push_back(sun_step(sun));
    }
    year.first_step.push_back(static_cast<std::uint32_t>(year.steps.size()));
}

void bound_light(SunYear& year, std::size_t day) {
    SunDay& today = year.days[day];
    for (std::uint32_t hour = 0; hour < 24; ++hour) {
        if (year.global_share[day * 24 + hour] <= 0) continue;
        if (today.end_lit == 0) today.first_lit = hour;
        today.end_lit = hour + 1;
    }
}

/// The hour of the day (0..23) whose centre is the first at or after mean solar noon. The equation of time is
/// left out: no lamp burns within a quarter of an hour of noon, and a boundary that stays put never meets a
/// day's end twice.
std::uint32_t noon_hour(LonLat place, DayModel model, double clock_h) {
    const double noon_h = model == DayModel::psa ? 12.0 - place.lon_deg / 15.0 + clock_h : 12.0;
    const double hour = std::ceil(noon_h - 0.5 - 1e-9);
    return static_cast<std::uint32_t>(hour - 24.0 * std::floor(hour / 24.0));
}

} // namespace

SunYear make_sun_year(LonLat place, DayModel model, int step_min, double clock_h, Sampling sampling) {
    if (step_min < 1 || 60 % step_min != 0) throw std::logic_error("sun year: the step must divide an hour");
    const Sky sky(place, model, clock_h);
    SunYear year;
    year.first_step.push_back(0);
    const std::uint32_t noon = noon_hour(place, model, clock_h);
    for (int day = 0; day < kDays; ++day) {
        year.days[static_cast<std::size_t>(day)] = sun_day(sky, place.lat_deg, day);
        for (int hour = 0; hour < 24; ++hour)
            add_hour(year, sky, day, hour, step_min, place_in_step(sampling, day));
        const auto first = static_cast<std::size_t>(day) * 24;
        normalise(std::span(year.global_share).subspan(first, 24));
        normalise(std::span(year.diffuse_share).subspan(first, 24));
        bound_light(year, static_cast<std::size_t>(day));
        year.noon[static_cast<std::size_t>(day)] = static_cast<std::uint32_t>(first) + noon;
    }
    return year;
}

double hours_below(const SunYear& year, double elevation_deg) {
    const auto dark =
        std::count_if(year.lamp_step_deg.begin(), year.lamp_step_deg.end(),
                      [&](float step_deg) { return static_cast<double>(step_deg) < elevation_deg; });
    return static_cast<double>(dark) / kLampSteps;
}

std::array<double, 12> monthly_outside_wh_m2(const SunYear& year) {
    std::array<double, 12> sums{};
    for (const SunDay& day : year.days) sums[static_cast<std::size_t>(day.month - 1)] += day.outside_wh_m2;
    for (int month = 1; month <= 12; ++month)
        sums[static_cast<std::size_t>(month - 1)] /= days_in_month(month);
    return sums;
}

} // namespace unstring
