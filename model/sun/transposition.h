#pragma once
// From the horizontal to a tilted panel. Bearings of the panel's downward tilt, clockwise from north like the
// azimuth.

namespace unstring {

/// Smallest cosine of the zenith angle used as a divisor: 1 degree above the horizon.
inline constexpr double kLowestCosZenith = 0.0175;

/// Cosine of the angle between the sun and the panel's normal; negative behind the panel.
[[nodiscard]] double cos_incidence(double tilt_deg, double bearing_deg, double elevation_deg,
                                   double azimuth_deg);

/// Beam on the panel over beam on the horizontal; 1 for a panel that lies flat.
[[nodiscard]] double beam_ratio(double cos_incidence_, double cos_zenith, double tilt_deg);

/// Share of the diffuse light that comes from around the sun.
/// Source: J.E. Hay, J.A. Davies (1980). @param beam_w_m2  horizontal
[[nodiscard]] double circumsolar_frac(double beam_w_m2, double cos_zenith, double outside_normal_w_m2);

/// Share of an even sky that a tilted panel sees. Source: Liu & Jordan, ASHRAE J. 3 (1962) 53.
[[nodiscard]] double even_sky_frac(double tilt_deg);
/// Share of the light from the ground (global times albedo) on a tilted panel.
[[nodiscard]] double ground_frac(double tilt_deg);

/// Sky diffuse on a tilted panel under an open sky, over diffuse on the horizontal: Hay & Davies.
[[nodiscard]] double hay_davies_ratio(double circumsolar, double beam_ratio_, double tilt_deg);

} // namespace unstring
