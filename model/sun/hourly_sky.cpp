#include "model/sun/hourly_sky.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "model/sun/diffuse.h"
#include "model/sun/transposition.h"

namespace unstring {
namespace {

std::vector<double> mean_year(const std::vector<double>& hours, int settling_years) {
    std::vector<double> mean(kHours, 0.0);
    const std::size_t first = static_cast<std::size_t>(settling_years) * kHours;
    for (std::size_t at = first; at < hours.size(); ++at) mean[at % kHours] += hours[at];
    for (double& value : mean) value /= static_cast<double>((hours.size() - first) / kHours);
    return mean;
}

} // namespace

HourlySky make_hourly_sky(const SunYear& sun, std::span<const double> day_clearness, int settling_years) {
    if (day_clearness.size() % kDays != 0)
        throw std::logic_error("hourly sky: whole years of days are wanted");
    HourlySky sky;
    sky.years = static_cast<int>(day_clearness.size() / kDays);
    sky.settling_years = settling_years;
    const std::size_t hours = day_clearness.size() * 24;
    sky.beam_like.assign(hours, 0.0);
    sky.even_sky.assign(hours, 0.0);
    sky.global.assign(hours, 0.0);
    for (std::size_t day = 0; day < day_clearness.size(); ++day) {
        const SunDay& today = sun.days[day % kDays];
        const double day_global = day_clearness[day] * today.outside_wh_m2;
        const double day_diffuse = day_global * erbs_day_frac(day_clearness[day], today.sunset_deg);
        for (std::size_t h = 0; h < 24; ++h) {
            const std::size_t of_year = (day % kDays) * 24 + h;
            const double global = day_global * sun.global_share[of_year];
            if (global <= 0) continue;
            const double diffuse = std::min(day_diffuse * sun.diffuse_share[of_year], global);
            const double beam = global - diffuse;
            const double cos_zenith = std::sin(sun.elevation_deg[of_year] * kRadPerDeg);
            const double around_sun = circumsolar_frac(beam, cos_zenith, today.outside_normal_w_m2);
            sky.beam_like[day * 24 + h] = beam + diffuse * around_sun;
            sky.even_sky[day * 24 + h] = diffuse * (1.0 - around_sun);
            sky.global[day * 24 + h] = global;
        }
    }
    sky.mean_beam_like = mean_year(sky.beam_like, settling_years);
    sky.mean_even_sky = mean_year(sky.even_sky, settling_years);
    sky.mean_global = mean_year(sky.global, settling_years);
    return sky;
}

} // namespace unstring
