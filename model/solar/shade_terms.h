#pragma once
// The terms that the shade step takes where the files say nothing. [A]: assumed, no source.

namespace unstring {

inline constexpr int kSettlingYears = 1; ///< run before the years that are reported

struct ShadeTerms {
    int weather_years = 20;            ///< generated, after one year of settling that is not counted
    double temp_swing_k = 5;           ///< of the day about the month's mean [A]
    double cold_charge_c = 0;          ///< lithium iron phosphate is not charged below freezing
    double lost_frac_day = 0.001;      ///< self-discharge, 3 % a month (general literature, from memory)
    double standby_w = 0.2;            ///< electronics, .1-.5 W (general literature, from memory)
    double panel_ages_frac_yr = 0.005; ///< D.C. Jordan, S.R. Kurtz, Prog. Photovolt. 21 (2013) 12-29, median
    double end_of_life_frac = 0.8;     ///< of the battery's capacity when it is replaced
    int sun_step_min = 5;
    double sky_step_deg = 1;
};

} // namespace unstring
