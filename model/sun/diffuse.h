#pragma once
// How much of the sun's light comes from the sky instead of straight from the sun, from the clearness index
// alone. Source: D.G. Erbs, S.A. Klein, J.A. Duffie, Solar Energy 28 (1982) 293-302. Checked in
// tests/published/weather.cpp.

namespace unstring {

/// Of an hour. @param clearness  global over extraterrestrial, both horizontal
[[nodiscard]] double erbs_hour_frac(double clearness);
/// Of a day; the two curves meet the clear-sky value with a jump of up to 0.015, as published.
[[nodiscard]] double erbs_day_frac(double clearness, double sunset_deg);
/// Of a month's mean day; fitted for a clearness of 0.3 to 0.8.
[[nodiscard]] double erbs_month_frac(double clearness, double sunset_deg);

} // namespace unstring
