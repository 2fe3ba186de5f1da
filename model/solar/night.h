#pragma once
// One solar lamp by itself, as `work-out night` runs it: one battery state, one run, every term in the input.

#include <array>
#include <cstdint>
#include <optional>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/solar/battery.h"
#include "model/solar/lamp.h"
#include "model/solar/panel.h"
#include "model/sun/generated_weather.h"

namespace unstring {

enum class Weather { mean, generated };

struct NightCase {
    LonLat place;
    Monthly clearness{}; ///< of the month's mean day
    Monthly temp_c{};
    double temp_swing_k = 0; ///< times cos 15(h - 15), h in solar time
    PanelPlace panel;
    double panel_wp = 0;
    PanelTerms terms;
    BatteryTerms battery;
    double led_w = 0;
    std::vector<DimStep> dimming;
    double switch_deg = kSwitch_deg;
    SkyLayers layers;
    int years = 1;
    std::uint64_t seed = 1;
    Weather weather = Weather::mean;
    double day_to_day = kDayToDay;
    DayModel day_model = DayModel::cooper;
    int sun_step_min = 5;
};

struct NightAnswer { ///< means of a reported year
    double ghi_kwh_m2 = 0, panel_kwh = 0, demand_kwh = 0, unmet_kwh = 0;
    double nights_dark_year = 0, lolp_energy = 0, lolp_nights = 0, cycles_year = 0, battery_years = 0,
           final_soc = 0;
    double shade_score = 0;
    int worst_month = 0; ///< 1..12; 0 = the lamp is never lit
    int years_run = 0;
    double sky_view_frac = 1, lit_h_year = 0;
    MonthlyLight light;
    Monthly supply_kwh{}, month_demand_kwh{};
    std::vector<int> dark_in_year;
    int longest_dark_run = 0;
};

/// Air temperature of each hour of the year [C]: a step per month, and the day's swing about it.
[[nodiscard]] std::vector<double> hourly_air_c(const SunYear& sun, const Monthly& temp_c, double swing_k);

/// The month with the least energy over need, 1..12; months that ask nothing are left out; 0 when none asks.
[[nodiscard]] int worst_month(const Monthly& supply_kwh, const Monthly& demand_kwh);

[[nodiscard]] NightAnswer run_night(const NightCase& input);

} // namespace unstring
