#pragma once
// The exact sun: NREL's solar position algorithm, good to 0.0003 degrees from the year -2000 to 6000.
// Source: I. Reda, A. Andreas, Solar Energy 76 (2004) 577-589, corrigendum 81 (2007) 838; NREL/TP-560-34302.
// Checked in tests/published/sun_position.cpp, step by step.

#include "model/quantities.h"

namespace unstring {

struct SpaInput {
    double days_since_2000 = 0; ///< UTC, as days_since_2000() gives it
    LonLat place;
    double elevation_m = 0;
    double pressure_hpa = 1013.25;
    double temp_c = 12;
    double delta_t_s = 69;          ///< terrestrial minus universal time
    double refraction_deg = 0.5667; ///< at sunrise and sunset
};

struct SpaSun {
    double radius_au = 0;
    double earth_longitude_deg = 0, earth_latitude_deg = 0; ///< heliocentric
    double nutation_longitude_deg = 0, nutation_obliquity_deg = 0;
    double obliquity_deg = 0;                      ///< true, of the ecliptic
    double apparent_longitude_deg = 0;             ///< of the sun
    double sidereal_deg = 0;                       ///< apparent, at Greenwich
    double ascension_deg = 0, declination_deg = 0; ///< geocentric
    double hour_angle_deg = 0;                     ///< geocentric, 0..360
    double topocentric_hour_angle_deg = 0, topocentric_declination_deg = 0;
    double elevation_deg = 0; ///< topocentric, without refraction
    double refraction_deg = 0;
    double zenith_deg = 0;  ///< topocentric, with refraction
    double azimuth_deg = 0; ///< clockwise from true north
    double equation_of_time_min = 0;
};

[[nodiscard]] SpaSun spa_sun(const SpaInput& input);

/// How much the air lifts the sun [deg] at a true elevation; 0 once it has set.
[[nodiscard]] double air_refraction_deg(const SpaInput& input, double elevation_deg);

} // namespace unstring
