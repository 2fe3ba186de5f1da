#pragma once
// The shade step: will a solar head stay lit on this pole? Comes in: poles, heads, climate, the height of
// what stands around. Goes out: per pole the horizon, per pole and head the nights dark, the battery's years,
// eligible or why not.

#include <array>
#include <string>
#include <vector>

#include "model/quantities.h"

namespace unstring {

struct HeadAnswer {
    std::string head;
    double sky_view_frac = 1; ///< of the panel, canopy opaque, open sky = 1 minus its tilt's share
    double shade_score = 0;   ///< 0 open, 1 dark
    int worst_month = 0;      ///< 1..12, the month with the smallest energy over need
    std::array<double, 12> panel_kwh_m2{}; ///< on the panel, mean of the years, per calendar month
    std::array<double, 12>
        supply_kwh{}; ///< electrical, what the panel gives, per calendar month, end of life
    std::array<double, 12> demand_kwh{}; ///< what the lamp asks, per calendar month
    double nights_dark_year = 0;         ///< mean, at the end of battery life
    double nights_dark_worst_year = 0;   ///< at the end of battery life
    double nights_dark_year_new = 0;
    int longest_dark_run = 0; ///< nights
    double battery_years = 0;
    bool eligible = false;
    std::string why; ///< the first thing that stops it, with the number; empty when eligible
};

struct PoleShade {
    PoleIx pole;
    int best =
        -1; ///< place in `heads`: the cheapest eligible, else the one with fewest nights dark; -1 = none
    double panel_height_m = 0, bearing_deg = 0; ///< of the panel's downward tilt, grid
    std::string bearing_from;                   ///< "file", "street", "south"
    std::vector<HeadAnswer> heads;              ///< in the catalogue's order
    std::vector<float> canopy_deg,
        solid_deg; ///< horizon heights at directions i * 360 / size, clockwise from grid north
    std::vector<float> unknown_deg; ///< directions in which the sky could not be known
};

struct ShadeResult {
    std::vector<PoleShade> poles; ///< candidates only, in the order of the city
    double seconds = 0;
    [[nodiscard]] const PoleShade* find(PoleIx pole) const;
};

} // namespace unstring
