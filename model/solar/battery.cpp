#include "model/solar/battery.h"

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

constexpr double kDark_wh = 1e-9;

/// Counts dark nights as the noons pass.
class NightCount {
  public:
    void unmet(double wh) { tonight_wh_ += wh; }
    void noon(BatteryRun& run, bool is_reported) {
        const bool is_dark = tonight_wh_ > kDark_wh;
        tonight_wh_ = 0;
        if (!is_reported) return;
        run_length_ = is_dark ? run_length_ + 1 : 0;
        run.longest_dark_run = std::max(run.longest_dark_run, run_length_);
        if (is_dark) ++run.dark_in_year.back();
    }

  private:
    double tonight_wh_ = 0;
    int run_length_ = 0;
};

}  // namespace

double usable_frac(double temp_c) {
    if (temp_c >= 25) return 1;
    if (temp_c >= 0) return 0.90 + 0.10 * temp_c / 25.0;
    return std::max(0.5, 0.90 + 0.15 * temp_c / 20.0);
}

std::vector<BatteryHour> battery_hours(std::span<const double> load_wh, std::span<const double> air_c,
                                       const BatteryTerms& battery) {
    std::vector<BatteryHour> hours(kHours);
    for (std::size_t h = 0; h < kHours; ++h) {
        const double usable = battery.shrinks_in_cold ? usable_frac(air_c[h]) : 1.0;
        const bool is_cold = battery.cold_charge_c && air_c[h] < *battery.cold_charge_c;
        hours[h].load_wh = load_wh[h] + battery.standby_w;
        hours[h].floor_wh = (1.0 - usable * (1.0 - battery.soc_min)) * battery.capacity_wh;
        hours[h].charge_frac = is_cold ? 0.0 : battery.charge_frac;
    }
    return hours;
}

BatteryRun run_battery(const BatteryInput& input, std::vector<float>* soc) {
    const double capacity_wh = input.battery.capacity_wh;
    const double per_taken = input.battery.discharge_frac;
    const double kept_frac = 1.0 - input.battery.lost_frac_day / 24.0;
    const int all_years = static_cast<int>(input.yield_wh_per_wp.size() / kHours);
    BatteryRun run;
    run.years = all_years - input.settling_years;
    if (soc != nullptr) soc->clear();
    NightCount nights;
    double charge_wh = capacity_wh;
    for (int year = 0; year < all_years; ++year) {
        const bool is_reported = year >= input.settling_years;
        if (is_reported) run.dark_in_year.push_back(0);
        const double* yield = input.yield_wh_per_wp.data() + static_cast<std::size_t>(year) * kHours;
        for (std::size_t day = 0; day < kDays; ++day) {
            double supply_wh = 0, asked_wh = 0, unmet_wh = 0, taken_wh = 0;
            for (std::size_t h = day * 24; h < day * 24 + 24; ++h) {
                if (h == input.sun.noon[day]) nights.noon(run, is_reported);
                const BatteryHour& now = input.hours[h];
                const double panel_wh = yield[h] * input.panel_wp;
                charge_wh = std::min(capacity_wh, charge_wh * kept_frac + panel_wh * now.charge_frac);
                const double wanted_wh = now.load_wh / per_taken;
                const double cell_wh = std::clamp(charge_wh - now.floor_wh, 0.0, wanted_wh);
                const double short_wh = (wanted_wh - cell_wh) * per_taken;
                charge_wh -= cell_wh;
                nights.unmet(short_wh);
                supply_wh += panel_wh;
                asked_wh += now.load_wh;
                unmet_wh += short_wh;
                taken_wh += cell_wh;
                if (!is_reported) continue;
                run.lowest_soc = std::min(run.lowest_soc, charge_wh / capacity_wh);
                if (soc != nullptr) soc->push_back(static_cast<float>(charge_wh / capacity_wh));
            }
            if (!is_reported) continue;
            const auto month = static_cast<std::size_t>(input.sun.days[day].month - 1);
            run.supply_kwh[month] += supply_wh / 1000.0;
            run.demand_kwh[month] += asked_wh / 1000.0;
            run.panel_kwh += supply_wh / 1000.0;
            run.lamp_kwh += asked_wh / 1000.0;
            run.unmet_kwh += unmet_wh / 1000.0;
            run.taken_kwh += taken_wh / 1000.0;
        }
    }
    for (std::size_t month = 0; month < 12; ++month) {
        run.supply_kwh[month] /= run.years;
        run.demand_kwh[month] /= run.years;
    }
    run.final_soc = charge_wh / capacity_wh;
    return run;
}

}  // namespace unstring
