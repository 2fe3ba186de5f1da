#pragma once
// Where the sun stands. Comes in: an instant (UTC) and a place. Goes out: angles, true north, without
// refraction. This is the fast one, used in bulk; spa.h is the exact one.

#include "model/quantities.h"

namespace unstring {

struct SunPosition {
    double elevation_deg = 0; ///< topocentric, without refraction
    double azimuth_deg = 0;   ///< clockwise from true north, 0..360
    double declination_deg = 0;
    double hour_angle_deg = 0; ///< -180..180, 0 at solar noon, afternoon positive
};

/// Days since 2000-01-01 12:00 UTC (julian day minus 2451545) of a Gregorian instant; hour may be any
/// fraction.
[[nodiscard]] double days_since_2000(int year, int month, int day, double hour_utc);

/// Sun position by the PSA algorithm with the coefficients of 2020: within 0.01 degrees in 2000-2050.
/// Source: M. Blanco et al., Solar Energy 212 (2020) 339-341; form: M. Blanco-Muriel et al., Solar Energy 70
/// (2001) 431-441. Checked in tests/published/sun_position.cpp.
[[nodiscard]] SunPosition psa_sun(double days_since_2000, LonLat place);

} // namespace unstring
