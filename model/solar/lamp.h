#pragma once
// What a lamp asks of its battery, hour by hour of the year.

#include <span>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/sun/sun_year.h"

namespace unstring {

/// Height of the sun at which a photocell set to 16.1 lx (1.5 footcandles) switches.
inline constexpr double kSwitch_deg = -4.6;

/// Energy asked per hour [Wh], kHours. Lit where the sun stands below switch_deg, by 5-minute steps. Dimming
/// counts from the start of the night's first lit step to the middle of the step, from <= t < to; a span that
/// no step names is full power. A night runs from noon to noon.
[[nodiscard]] std::vector<double> lamp_load_wh(const SunYear& sun, double led_w,
                                               std::span<const DimStep> dimming,
                                               double switch_deg = kSwitch_deg);

} // namespace unstring
