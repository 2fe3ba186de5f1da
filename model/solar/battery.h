#pragma once
// The batteries of solar heads, hour by hour: which nights the lamp goes dark. Several batteries run side by
// side, since each hour waits for the one before it.

#include <array>
#include <optional>
#include <span>
#include <vector>

#include "model/sun/sun_year.h"

namespace unstring {

struct BatteryTerms {
    double capacity_wh = 0;
    double charge_frac = 0.95;    ///< of what the panel gives that is stored
    double discharge_frac = 0.97; ///< of what is taken from the cells that reaches the lamp
    double soc_min = 0.1;
    std::optional<double> cold_charge_c; ///< no charge in an hour with air below it; none = always
    double lost_frac_day = 0;            ///< self-discharge, taken once a day
    double standby_w = 0;                ///< of the electronics, day and night
    bool shrinks_in_cold = false;        ///< the usable part follows usable_frac
};

/// Part of the capacity that can be used at a temperature: linear between 1 at 25 C, 0.90 at 0 C, 0.75 at -20
/// C [A].
[[nodiscard]] double usable_frac(double temp_c);

inline constexpr std::size_t kLanes = 4; ///< batteries that run side by side

/// Up to kLanes batteries and what each hour of the year asks of them: tables of kHours * kLanes, lanes side
/// by side.
struct BatteryGroup {
    std::array<double, kLanes> capacity_wh, discharge_frac, kept_frac_day;
    std::vector<double> wanted_wh;                           ///< from the cells: lamp and standby
    std::vector<double> floor_wh;                            ///< charge that cannot be used
    std::vector<double> charge_frac;                         ///< 0 when too cold to charge
    std::array<std::array<double, 12>, kLanes> demand_kwh{}; ///< per calendar month: lamp and standby

    BatteryGroup(); ///< no lane in use
};

/// Sets one lane. @param load_wh, air_c  kHours
void set_lane(BatteryGroup& group, std::size_t lane, const SunYear& sun, std::span<const double> load_wh,
              std::span<const double> air_c, const BatteryTerms& battery);

/// Reported years only. Nights run noon to noon and count in the year of the noon that ends them; a night is
/// dark when any load went unmet.
struct BatteryRun {
    std::array<double, 12>
        supply_kwh{};     ///< per calendar month, mean of a year; what the panel gives, before losses
    double unmet_kwh = 0; ///< mean of a year
    std::vector<int> dark_in_year; ///< one per reported year
    int longest_dark_run = 0;      ///< nights
    double final_soc = 1;

    [[nodiscard]] double dark_a_year() const;
};

/// Each hour: charge first, clip at full, then discharge down to the floor. Starts full.
/// @param yield_wh_per_wp  hours of all years * kLanes;  @param panel_wp  aged, 0 = lane not in use
/// @param soc  hours of the reported years * kLanes, each hour's end; null = not wanted
[[nodiscard]] std::array<BatteryRun, kLanes> run_batteries(const SunYear& sun, const BatteryGroup& group,
                                                           std::span<const double> yield_wh_per_wp,
                                                           const std::array<double, kLanes>& panel_wp,
                                                           int settling_years, float* soc);

} // namespace unstring
