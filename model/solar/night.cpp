#include "model/solar/night.h"

#include <cmath>
#include <numeric>
#include <span>

#include "model/solar/battery_life.h"
#include "model/solar/shade_terms.h"
#include "model/sun/daily_sun.h"

namespace unstring {
namespace {

std::vector<double> day_clearness(const NightCase& input) {
    const int years = input.years + kSettlingYears;
    if (input.weather == Weather::generated)
        return generate_clearness(input.clearness, years, input.seed, input.day_to_day);
    std::vector<double> days;
    for (int year = 0; year < years; ++year)
        for (int day = 1; day <= kDays; ++day)
            days.push_back(input.clearness[static_cast<std::size_t>(month_of_day(day) - 1)]);
    return days;
}

double sum_of(std::span<const double> values) { return std::accumulate(values.begin(), values.end(), 0.0); }

} // namespace

std::vector<double> hourly_air_c(const SunYear& sun, const Monthly& temp_c, double swing_k) {
    std::vector<double> air(kHours);
    for (std::size_t hour = 0; hour < kHours; ++hour)
        air[hour] = temp_c[static_cast<std::size_t>(sun.month_of_hour(hour) - 1)] +
                    swing_k * std::cos(15.0 * (sun.solar_hour[hour] - 15.0) * kRadPerDeg);
    return air;
}

int worst_month(const Monthly& supply_kwh, const Monthly& demand_kwh) {
    int worst = 0;
    double least = 0;
    for (std::size_t month = 0; month < 12; ++month) {
        if (demand_kwh[month] <= 0) continue;
        const double covers = supply_kwh[month] / demand_kwh[month];
        if (worst != 0 && covers >= least) continue;
        least = covers;
        worst = static_cast<int>(month) + 1;
    }
    return worst;
}

NightAnswer run_night(const NightCase& input) {
    const SunYear sun = make_sun_year(input.place, input.day_model, input.sun_step_min);
    const HourlySky sky = make_hourly_sky(sun, day_clearness(input), kSettlingYears);
    const std::vector<double> air_c = hourly_air_c(sun, input.temp_c, input.temp_swing_k);
    const PanelLight light =
        panel_light(sun, beam_through(sun, input.layers), input.layers, input.panel, 0.02);
    std::vector<double> yield(sky.global.size() * kLanes, 0.0);
    write_yield_wh_per_wp(sun, sky, light, air_c, input.terms, yield.data(), kLanes);
    BatteryGroup group;
    set_lane(group, 0, sun, lamp_load_wh(sun, input.led_w, input.dimming, input.switch_deg), air_c,
             input.battery);
    std::vector<float> soc(static_cast<std::size_t>(input.years) * kHours * kLanes);
    const BatteryRun run = run_batteries(sun, group, yield, {input.panel_wp}, kSettlingYears, soc.data())[0];

    NightAnswer answer;
    answer.years_run = input.years;
    answer.light = monthly_light(sun, sky, light);
    answer.supply_kwh = run.supply_kwh;
    answer.month_demand_kwh = group.demand_kwh[0];
    answer.dark_in_year = run.dark_in_year;
    answer.longest_dark_run = run.longest_dark_run;
    answer.ghi_kwh_m2 = sum_of(sky.mean_global) / 1000.0;
    answer.panel_kwh = sum_of(run.supply_kwh);
    answer.demand_kwh = sum_of(group.demand_kwh[0]);
    answer.unmet_kwh = run.unmet_kwh;
    answer.nights_dark_year = run.dark_a_year();
    answer.lolp_energy = answer.demand_kwh > 0 ? run.unmet_kwh / answer.demand_kwh : 0;
    answer.lolp_nights = answer.nights_dark_year / kDays;
    answer.cycles_year = (answer.demand_kwh - run.unmet_kwh) * 1000.0 / input.battery.discharge_frac /
                         input.battery.capacity_wh;
    answer.battery_years = battery_life_yr(sun, charge_history(sun, soc, kLanes), input.temp_c);
    answer.final_soc = run.final_soc;
    answer.shade_score = shade_score(answer.light);
    answer.worst_month = worst_month(run.supply_kwh, group.demand_kwh[0]);
    answer.sky_view_frac = light.opaque_sky_frac;
    answer.lit_h_year = hours_below(sun, input.switch_deg);
    return answer;
}

} // namespace unstring
