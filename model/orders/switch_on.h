#pragma once
// When the lights are due on: the hour at which a crew must be done, or must have begun to restore.

#include <array>
#include <string>

namespace unstring {

/// Solar time [h] at which the sun sinks to `switch_deg` on the middle day of a month, 12 .. 24; 12 where it
/// never rises above that, 24 where it never sinks below. @param month 1..12
[[nodiscard]] double switch_on_h(double lat_deg, int month, double switch_deg = -4.6);

/// The twelve months. Solar time: clock time differs by longitude, equation of time and summer time.
[[nodiscard]] std::array<double, 12> switch_on_year_h(double lat_deg);

/// "17:04"
[[nodiscard]] std::string clock_text(double hours);

} // namespace unstring
