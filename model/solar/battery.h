#pragma once
// The battery of a solar head, hour by hour: which nights the lamp goes dark.

#include <array>
#include <optional>
#include <span>
#include <vector>

#include "model/sun/sun_year.h"

namespace unstring {

struct BatteryTerms {
    double capacity_wh = 0;
    double charge_frac = 0.95;     ///< of what the panel gives that is stored
    double discharge_frac = 0.97;  ///< of what is taken from the cells that reaches the lamp
    double soc_min = 0.1;
    std::optional<double> cold_charge_c;  ///< no charge in an hour with air below it; none = always
    double lost_frac_day = 0;             ///< self-discharge
    double standby_w = 0;                 ///< of the electronics, day and night
    bool shrinks_in_cold = false;         ///< usable part 1 at 25 C, 0.90 at 0 C, 0.75 at -20 C, linear [A]
};

/// What an hour of the year asks, and what the battery can do in it.
struct BatteryHour {
    double load_wh = 0;      ///< lamp and standby
    double floor_wh = 0;     ///< charge that cannot be used
    double charge_frac = 0;  ///< 0 when too cold to charge
};

/// One per hour of the year. @param load_wh, air_c  kHours
[[nodiscard]] std::vector<BatteryHour> battery_hours(std::span<const double> load_wh, std::span<const double> air_c,
                                                     const BatteryTerms& battery);

struct BatteryInput {
    const SunYear& sun;
    std::span<const double> yield_wh_per_wp;  ///< hours of all years
    double panel_wp = 0;                      ///< aged
    std::span<const BatteryHour> hours;       ///< kHours
    const BatteryTerms& battery;
    int settling_years = 1;  ///< run first, not reported
};

/// Sums over the reported years. Nights run noon to noon and count in the year of the noon that ends them; a night is
/// dark when any load went unmet.
struct BatteryRun {
    int years = 0;
    std::array<double, 12> supply_kwh{}, demand_kwh{};  ///< per calendar month, mean of a year; supply before losses
    double panel_kwh = 0, lamp_kwh = 0, unmet_kwh = 0, taken_kwh = 0;  ///< all years; taken = from the cells
    std::vector<int> dark_in_year;
    int longest_dark_run = 0;
    double lowest_soc = 1, final_soc = 1;
};

/// Each hour: charge first, clip at full, then discharge down to soc_min. Starts full.
/// @param soc  takes the charge at each reported hour's end, for the battery's ageing; null = not wanted
[[nodiscard]] BatteryRun run_battery(const BatteryInput& input, std::vector<float>* soc);

/// Part of the capacity that can be used at a temperature: linear between 1 at 25 C, 0.90 at 0 C, 0.75 at -20 C [A].
[[nodiscard]] double usable_frac(double temp_c);

}  // namespace unstring
