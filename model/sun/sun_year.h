#pragma once
// The sun of one year of 365 days at one place, hour by hour and in short steps: made once, shared by all
// poles.

#include <array>
#include <cstdint>
#include <span>
#include <vector>

#include "model/quantities.h"

namespace unstring {

inline constexpr int kDays = 365, kHours = 8760,
                     kLampSteps = 12; ///< lamp switching is looked at every 5 minutes

/// cooper: declination of the day, solar time (no longitude). psa: the sun of 2025, clock time.
enum class DayModel { cooper, psa };

struct SunStep { ///< sun above the horizontal, at the middle of a step
    float azimuth_deg = 0, elevation_deg = 0;
    float east = 0, north = 0, up = 0; ///< unit vector to the sun
};

struct SunDay {
    int month = 1;
    double outside_wh_m2 = 0;       ///< irradiation of the horizontal outside the atmosphere
    double outside_normal_w_m2 = 0; ///< normal to the sun
    double sunset_deg = 0;
    std::uint32_t first_lit = 0,
                  end_lit = 0; ///< hours of the day (0..24) between which the sun gives anything
};

struct SunYear {
    std::array<SunDay, kDays> days;
    // One per hour, 0..23 of day 1 first. Shares are of the day and add up to 1, or are all 0 on a day
    // without sun.
    std::vector<double> global_share, diffuse_share;
    std::vector<double> elevation_deg, azimuth_deg; ///< at the hour's centre
    std::vector<double> solar_hour;                 ///< 0..24, of the hour's centre, solar time
    std::vector<std::uint32_t> first_step; ///< kHours + 1: the steps of hour h are first_step[h] .. [h + 1]
    std::vector<SunStep> steps;
    std::vector<float> lamp_step_deg; ///< elevation at the middle of each 5 minutes, kHours * kLampSteps
    std::array<std::uint32_t, kDays>
        noon; ///< first hour after mean solar noon, one per day: there a night ends

    [[nodiscard]] int month_of_hour(std::size_t hour) const { return days[hour / 24].month; }
};

enum class Sampling { centres, staggered };

/// @param step_min  length of a sun step, a divisor of 60; 60 = the hour's centre alone
/// @param clock_h   psa only: hours that the clock is ahead of UTC (0 = UTC)
/// @param sampling  centres: the sun at the middle of each step. Staggered: each day at another place within
/// the step, so
///                  that a crown's edge which falls on the same minute for weeks is not counted wrongly for
///                  weeks.
[[nodiscard]] SunYear make_sun_year(LonLat place, DayModel model, int step_min, double clock_h = 0,
                                    Sampling sampling = Sampling::centres);

/// Hours of a year with the sun below a height, by the 5-minute steps.
[[nodiscard]] double hours_below(const SunYear& year, double elevation_deg);

/// Mean over a month's days of the irradiation outside the atmosphere [Wh/m2].
[[nodiscard]] std::array<double, 12> monthly_outside_wh_m2(const SunYear& year);

} // namespace unstring
