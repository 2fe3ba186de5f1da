#pragma once
// The sun of a day in closed form: declination, length of the day, irradiation outside the atmosphere, and
// how a day's irradiation spreads over its hours. Days run 1..365. Angles in degrees.

namespace unstring {

inline constexpr double kSolarConstant_w_m2 = 1367.0;

/// Month 1..12 of a day 1..365.
[[nodiscard]] int month_of_day(int day_of_year);
[[nodiscard]] int days_in_month(int month);

/// Declination [deg]. Source: P.I. Cooper, Solar Energy 12 (1969) 333.
[[nodiscard]] double cooper_declination_deg(int day_of_year);

/// Sunset hour angle [deg], 0 in the polar night, 180 in the polar day.
[[nodiscard]] double sunset_hour_angle_deg(double lat_deg, double declination_deg);

/// Factor of the solar constant for the day's distance from the sun, 1 + 0.033 cos(360 n / 365).
[[nodiscard]] double distance_factor(int day_of_year);

/// Irradiation of a horizontal square metre outside the atmosphere over a day [Wh/m2].
/// Source: J.A. Duffie, W.A. Beckman, Solar Engineering of Thermal Processes, 4th ed. (2013), eq. 1.10.3.
[[nodiscard]] double day_outside_wh_m2(double lat_deg, double declination_deg, int day_of_year,
                                       double solar_constant_w_m2 = kSolarConstant_w_m2);
/// The same between two hour angles, both while the sun is up [Wh/m2]. Source: ibid., eq. 1.10.4.
[[nodiscard]] double hours_outside_wh_m2(double lat_deg, double declination_deg, int day_of_year,
                                         double from_deg, double to_deg);

/// Share of a day's global irradiation that falls in the hour around an hour angle, 0 while the sun is down.
/// Its sum over a day differs from 1 by up to 0.8 %: normalise it.
/// Source: M. Collares-Pereira, A. Rabl, Solar Energy 22 (1979) 155-164.
[[nodiscard]] double hour_share_global(double hour_angle_deg, double sunset_deg);
/// Share of a day's diffuse irradiation that falls in the hour around an hour angle, 0 while the sun is down.
/// Source: B.Y.H. Liu, R.C. Jordan, Solar Energy 4 (1960) 1-19.
[[nodiscard]] double hour_share_diffuse(double hour_angle_deg, double sunset_deg);

} // namespace unstring
