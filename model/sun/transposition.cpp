#include "model/sun/transposition.h"

#include <algorithm>
#include <cmath>

#include "model/quantities.h"

namespace unstring {

double cos_incidence(double tilt_deg, double bearing_deg, double elevation_deg, double azimuth_deg) {
    const double tilt = tilt_deg * kRadPerDeg;
    const double elevation = elevation_deg * kRadPerDeg;
    return std::cos(tilt) * std::sin(elevation) +
           std::sin(tilt) * std::cos(elevation) * std::cos((azimuth_deg - bearing_deg) * kRadPerDeg);
}

double beam_ratio(double cos_incidence_, double cos_zenith, double tilt_deg) {
    if (tilt_deg == 0) return 1;
    return std::max(0.0, cos_incidence_) / std::max(kLowestCosZenith, cos_zenith);
}

double circumsolar_frac(double beam_w_m2, double cos_zenith, double outside_normal_w_m2) {
    return std::clamp(beam_w_m2 / std::max(kLowestCosZenith, cos_zenith) / outside_normal_w_m2, 0.0, 1.0);
}

double even_sky_frac(double tilt_deg) { return 0.5 * (1.0 + std::cos(tilt_deg * kRadPerDeg)); }
double ground_frac(double tilt_deg) { return 0.5 * (1.0 - std::cos(tilt_deg * kRadPerDeg)); }

double hay_davies_ratio(double circumsolar, double beam_ratio_, double tilt_deg) {
    return circumsolar * beam_ratio_ + (1.0 - circumsolar) * even_sky_frac(tilt_deg);
}

} // namespace unstring
