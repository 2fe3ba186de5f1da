#include "model/solar/night.h"

#include <cmath>
#include <numeric>

#include "model/solar/battery_life.h"
#include "model/sun/daily_sun.h"

namespace unstring {
namespace {

constexpr int kSettlingYears = 1;

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

double yearly_global_kwh_m2(const HourlySky& sky) {
    const auto first = sky.global.begin() + static_cast<std::ptrdiff_t>(kSettlingYears) * kHours;
    return std::accumulate(first, sky.global.end(), 0.0) / 1000.0 / (sky.years - kSettlingYears);
}

}  // namespace

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
    const HourlySky sky = make_hourly_sky(sun, day_clearness(input));
    const std::vector<double> air_c = hourly_air_c(sun, input.temp_c, input.temp_swing_k);
    const PanelLight light = panel_light(sun, beam_through(sun, input.layers), input.layers, input.panel, 0.02);
    std::vector<double> yield(sky.global.size());
    write_yield_wh_per_wp(sun, sky, light, air_c, input.terms, yield);
    const std::vector<double> load = lamp_load_wh(sun, input.led_w, input.dimming, input.switch_deg);

    NightAnswer answer;
    const std::vector<BatteryHour> hours = battery_hours(load, air_c, input.battery);
    std::vector<float> soc;
    answer.run = run_battery({sun, yield, input.panel_wp, hours, input.battery, kSettlingYears}, &soc);
    const BatteryRun& run = answer.run;
    answer.years_run = run.years;
    answer.light = monthly_light(sun, sky, light, kSettlingYears);
    answer.ghi_kwh_m2 = yearly_global_kwh_m2(sky);
    answer.panel_kwh = run.panel_kwh / run.years;
    answer.demand_kwh = run.lamp_kwh / run.years;
    answer.unmet_kwh = run.unmet_kwh / run.years;
    const int dark = std::accumulate(run.dark_in_year.begin(), run.dark_in_year.end(), 0);
    answer.nights_dark_year = static_cast<double>(dark) / run.years;
    answer.lolp_energy = run.lamp_kwh > 0 ? run.unmet_kwh / run.lamp_kwh : 0;
    answer.lolp_nights = answer.nights_dark_year / kDays;
    answer.cycles_year = run.taken_kwh * 1000.0 / input.battery.capacity_wh / run.years;
    answer.battery_years = battery_life_yr(sun, soc, input.temp_c);
    answer.final_soc = run.final_soc;
    answer.shade_score = shade_score(answer.light);
    answer.worst_month = worst_month(run.supply_kwh, run.demand_kwh);
    answer.sky_view_frac = light.opaque_sky_frac;
    answer.lit_h_year = hours_below(sun, input.switch_deg);
    return answer;
}

}  // namespace unstring
