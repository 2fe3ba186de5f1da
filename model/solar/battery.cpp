#include "model/solar/battery.h"

#include <algorithm>
#include <numeric>

namespace unstring {
namespace {

constexpr double kDark_wh = 1e-9;
using Lanes = std::array<double, kLanes>;

/// One hour of all lanes. What is wanted in vain is added to `unmet`; use never sinks the charge below the
/// floor, and a floor that has risen above the charge leaves it where it is.
inline void one_hour(const double* yield, const double* charge_frac, const double* wanted,
                     const double* floor, const Lanes& panel_wp, const Lanes& capacity, Lanes& charge,
                     Lanes& unmet) {
    for (std::size_t l = 0; l < kLanes; ++l) {
        const double filled = charge[l] + yield[l] * panel_wp[l] * charge_frac[l];
        const double full = filled < capacity[l] ? filled : capacity[l];
        const double least = full < floor[l] ? full : floor[l];
        const double used = full - wanted[l];
        const double left = used > least ? used : least;
        unmet[l] += left - used;
        charge[l] = left;
    }
}

/// Counts dark nights of one lane as the noons pass.
struct NightCount {
    int run_length = 0;
    void noon(double unmet_wh, BatteryRun& run) {
        const bool is_dark = unmet_wh > kDark_wh;
        run_length = is_dark ? run_length + 1 : 0;
        run.longest_dark_run = std::max(run.longest_dark_run, run_length);
        if (is_dark) ++run.dark_in_year.back();
    }
};

/// The run over the years, one day at a time.
class Runner {
public:
    Runner(const SunYear& sun, const BatteryGroup& group, std::span<const double> yield,
           const Lanes& panel_wp)
        : sun_(sun), group_(group), yield_(yield), panel_wp_(panel_wp), charge_(group.capacity_wh) {
        for (std::size_t l = 0; l < kLanes; ++l) per_capacity_[l] = 1.0 / charge_[l];
    }

    void year(std::size_t year, bool is_reported, float* soc, std::array<BatteryRun, kLanes>& runs) {
        Lanes unmet{};
        for (std::size_t day = 0; day < kDays; ++day) {
            for (std::size_t l = 0; l < kLanes; ++l) charge_[l] *= group_.kept_frac_day[l];
            const std::size_t noon = sun_.noon[day];
            hours(year, day * 24, noon, soc, unmet);
            for (std::size_t l = 0; l < kLanes; ++l) {
                if (is_reported) nights_[l].noon(tonight_[l], runs[l]);
                tonight_[l] = 0;
            }
            hours(year, noon, day * 24 + 24, soc, unmet);
        }
        if (!is_reported) return;
        for (std::size_t l = 0; l < kLanes; ++l)
            runs[l].unmet_kwh += unmet[l] * group_.discharge_frac[l] / 1000.0;
    }
    [[nodiscard]] const Lanes& charge() const { return charge_; }

private:
    void hours(std::size_t year, std::size_t from, std::size_t to, float* soc, Lanes& year_unmet) {
        Lanes unmet{};
        Lanes charge = charge_;
        for (std::size_t h = from; h < to; ++h) {
            const std::size_t of_year = h * kLanes;
            one_hour(yield_.data() + (year * kHours + h) * kLanes, group_.charge_frac.data() + of_year,
                     group_.wanted_wh.data() + of_year, group_.floor_wh.data() + of_year, panel_wp_,
                     group_.capacity_wh, charge, unmet);
            if (soc == nullptr) continue;
            for (std::size_t l = 0; l < kLanes; ++l)
                soc[of_year + l] = static_cast<float>(charge[l] * per_capacity_[l]);
        }
        charge_ = charge;
        for (std::size_t l = 0; l < kLanes; ++l) {
            tonight_[l] += unmet[l];
            year_unmet[l] += unmet[l];
        }
    }

    const SunYear& sun_;
    const BatteryGroup& group_;
    std::span<const double> yield_;
    const Lanes& panel_wp_;
    Lanes charge_, per_capacity_;
    Lanes tonight_{};
    std::array<NightCount, kLanes> nights_;
};

/// What each lane's panel gives per calendar month, mean of the reported years.
std::array<std::array<double, 12>, kLanes> supply_kwh(const SunYear& sun, std::span<const double> yield,
                                                      const Lanes& panel_wp, std::size_t first_year,
                                                      std::size_t years) {
    std::array<std::array<double, 12>, kLanes> supply{};
    for (std::size_t day = first_year * kDays; day < years * kDays; ++day) {
        const SunDay& today = sun.days[day % kDays];
        Lanes sum{};
        for (std::size_t h = today.first_lit; h < today.end_lit; ++h)
            for (std::size_t l = 0; l < kLanes; ++l) sum[l] += yield[(day * 24 + h) * kLanes + l];
        for (std::size_t l = 0; l < kLanes; ++l)
            supply[l][static_cast<std::size_t>(today.month - 1)] += sum[l];
    }
    for (std::size_t l = 0; l < kLanes; ++l)
        for (double& month : supply[l])
            month *= panel_wp[l] / 1000.0 / static_cast<double>(years - first_year);
    return supply;
}

} // namespace

double usable_frac(double temp_c) {
    if (temp_c >= 25) return 1;
    if (temp_c >= 0) return 0.90 + 0.10 * temp_c / 25.0;
    return std::max(0.5, 0.90 + 0.15 * temp_c / 20.0);
}

double BatteryRun::dark_a_year() const {
    if (dark_in_year.empty()) return 0;
    return std::accumulate(dark_in_year.begin(), dark_in_year.end(), 0.0) /
           static_cast<double>(dark_in_year.size());
}

BatteryGroup::BatteryGroup()
    : wanted_wh(kHours * kLanes, 0.0), floor_wh(kHours * kLanes, 0.0), charge_frac(kHours * kLanes, 0.0) {
    capacity_wh.fill(1);
    discharge_frac.fill(1);
    kept_frac_day.fill(1);
}

void set_lane(BatteryGroup& group, std::size_t lane, const SunYear& sun, std::span<const double> load_wh,
              std::span<const double> air_c, const BatteryTerms& battery) {
    group.capacity_wh[lane] = battery.capacity_wh;
    group.discharge_frac[lane] = battery.discharge_frac;
    group.kept_frac_day[lane] = 1.0 - battery.lost_frac_day;
    group.demand_kwh[lane].fill(0);
    for (std::size_t h = 0; h < kHours; ++h) {
        const double asked_wh = load_wh[h] + battery.standby_w;
        const double usable = battery.shrinks_in_cold ? usable_frac(air_c[h]) : 1.0;
        const bool is_cold = battery.cold_charge_c && air_c[h] < *battery.cold_charge_c;
        group.wanted_wh[h * kLanes + lane] = asked_wh / battery.discharge_frac;
        group.floor_wh[h * kLanes + lane] = (1.0 - usable * (1.0 - battery.soc_min)) * battery.capacity_wh;
        group.charge_frac[h * kLanes + lane] = is_cold ? 0.0 : battery.charge_frac;
        group.demand_kwh[lane][static_cast<std::size_t>(sun.month_of_hour(h) - 1)] += asked_wh / 1000.0;
    }
}

std::array<BatteryRun, kLanes> run_batteries(const SunYear& sun, const BatteryGroup& group,
                                             std::span<const double> yield_wh_per_wp, const Lanes& panel_wp,
                                             int settling_years, float* soc) {
    std::array<BatteryRun, kLanes> runs;
    const std::size_t years = yield_wh_per_wp.size() / (kHours * kLanes);
    const auto first_year = static_cast<std::size_t>(settling_years);
    Runner runner(sun, group, yield_wh_per_wp, panel_wp);
    for (std::size_t year = 0; year < years; ++year) {
        const bool is_reported = year >= first_year;
        if (is_reported)
            for (BatteryRun& run : runs) run.dark_in_year.push_back(0);
        float* soc_of_year =
            is_reported && soc != nullptr ? soc + (year - first_year) * kHours * kLanes : nullptr;
        runner.year(year, is_reported, soc_of_year, runs);
    }
    const auto supply = supply_kwh(sun, yield_wh_per_wp, panel_wp, first_year, years);
    for (std::size_t l = 0; l < kLanes; ++l) {
        runs[l].supply_kwh = supply[l];
        runs[l].unmet_kwh /= static_cast<double>(years - first_year);
        runs[l].final_soc = runner.charge()[l] / group.capacity_wh[l];
    }
    return runs;
}

} // namespace unstring
