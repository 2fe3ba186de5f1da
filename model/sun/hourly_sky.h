#pragma once
// Light on the horizontal, hour by hour over the years of a weather: the same for every pole of a city.

#include <span>
#include <vector>

#include "model/sun/sun_year.h"

namespace unstring {

/// One value per hour of every year, sorted for the panel: what follows the beam's shadow (beam and the
/// diffuse light from around the sun), the even rest of the sky, and the global light that the ground throws
/// back. W/m2.
struct HourlySky {
    int years = 0, settling_years = 0; ///< all years; of these the first ones are not reported
    std::vector<double> beam_like, even_sky, global;
    std::vector<double> mean_beam_like, mean_even_sky, mean_global; ///< kHours: mean of the reported years
};

/// From the clearness of each day: global by the day's sum, diffuse by Erbs' daily fraction, both spread over
/// the hours so that the day's energy is kept; circumsolar share by Hay & Davies.
/// @param day_clearness  365 values a year
[[nodiscard]] HourlySky make_hourly_sky(const SunYear& sun, std::span<const double> day_clearness,
                                        int settling_years);

} // namespace unstring
