#include "model/sun/hourly_sky.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "model/sun/diffuse.h"
#include "model/sun/transposition.h"

namespace unstring {

HourlySky make_hourly_sky(const SunYear& sun, std::span<const double> day_clearness) {
    if (day_clearness.size() % kDays != 0) throw std::logic_error("hourly sky: whole years of days are wanted");
    HourlySky sky;
    sky.years = static_cast<int>(day_clearness.size() / kDays);
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
    return sky;
}

}  // namespace unstring
