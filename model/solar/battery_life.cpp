#include "model/solar/battery_life.h"

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

struct Turn {
    double value;
    std::size_t at;
};

std::vector<Turn> turning_points(std::span<const float> series) {
    std::vector<Turn> turns;
    for (std::size_t i = 0; i < series.size(); ++i) {
        const auto value = static_cast<double>(series[i]);
        if (!turns.empty() && turns.back().value == value) continue;
        const std::size_t n = turns.size();
        const bool goes_on = n >= 2 && (turns[n - 1].value > turns[n - 2].value) == (value > turns[n - 1].value);
        if (goes_on) turns.pop_back();
        turns.push_back({value, i});
    }
    return turns;
}

double range_of(const Turn& a, const Turn& b) { return std::abs(a.value - b.value); }

/// Potential of the graphite anode [V] over the state of charge.
double anode_v(double soc) {
    const double x = 0.0085 + 0.7715 * soc;
    return 0.6379 + 0.5416 * std::exp(-305.5309 * x) + 0.044 * std::tanh(-(x - 0.1958) / 0.1088) -
           0.1978 * std::tanh((x - 1.0571) / 0.0854) - 0.6875 * std::tanh((x + 0.0117) / 0.0529) -
           0.0175 * std::tanh((x - 0.5692) / 0.0875);
}

double kelvin(double temp_c) { return temp_c + 273.15; }

double mean_c_rate(std::span<const float> soc) {
    double moved = 0;
    int hours = 0;
    for (std::size_t i = 1; i < soc.size(); ++i) {
        const double step = std::abs(static_cast<double>(soc[i]) - static_cast<double>(soc[i - 1]));
        if (step < 1e-6) continue;
        moved += step;
        ++hours;
    }
    return hours > 0 ? moved / hours : 0;
}

/// One year of calendar stress, in the units in which stress of different days adds up.
double calendar_stress(const SunYear& sun, std::span<const float> soc, const std::array<double, 12>& temp_c) {
    std::array<double, 12> sum{}, days{};
    for (std::size_t i = 0; i < soc.size(); ++i) {
        const auto month = static_cast<std::size_t>(sun.month_of_hour(i % kHours) - 1);
        sum[month] += static_cast<double>(soc[i]);
        days[month] += 1.0 / 24.0;
    }
    double stress = 0;
    for (std::size_t month = 0; month < 12; ++month) {
        if (days[month] == 0) continue;
        const double rate = calendar_rate(temp_c[month], sum[month] / (days[month] * 24.0));
        stress += std::pow(rate, 1.0 / kCalendarPower) * days[month];
    }
    return stress;
}

double cycle_stress(const SunYear& sun, std::span<const float> soc, const std::array<double, 12>& temp_c) {
    const double c_rate = mean_c_rate(soc);
    double stress = 0;
    for (const Cycle& cycle : rainflow(soc)) {
        const auto month = static_cast<std::size_t>(sun.month_of_hour(cycle.end % kHours) - 1);
        const double rate = cycle_rate(temp_c[month], cycle.range, c_rate);
        stress += std::pow(rate, 1.0 / kCyclePower) * cycle.count * cycle.range;
    }
    return stress;
}

}  // namespace

std::vector<Cycle> rainflow(std::span<const float> series) {
    std::vector<Cycle> cycles;
    std::vector<Turn> open;
    for (const Turn& turn : turning_points(series)) {
        open.push_back(turn);
        while (open.size() >= 3) {
            const std::size_t n = open.size();
            const double last = range_of(open[n - 1], open[n - 2]);
            const double before = range_of(open[n - 2], open[n - 3]);
            if (last < before) break;
            if (n == 3) {  // the range before holds the start: half a cycle, and the start moves on
                cycles.push_back({before, 0.5, open[1].at});
                open.erase(open.begin());
            } else {
                cycles.push_back({before, 1.0, open[n - 2].at});
                open.erase(open.end() - 3, open.end() - 1);
            }
        }
    }
    for (std::size_t i = 1; i < open.size(); ++i)
        cycles.push_back({range_of(open[i], open[i - 1]), 0.5, open[i].at});
    return cycles;
}

double calendar_rate(double temp_c, double soc) {
    const double t = kelvin(temp_c);
    return 8.37e4 * std::exp(-5210.0 / t) * std::exp(-3560.0 * anode_v(soc) / t);
}

double cycle_rate(double temp_c, double depth, double c_rate) {
    const double t = kelvin(temp_c);
    return (4.38e-8 + 1.55e-8 * depth + 1.68e-7 * c_rate) * (std::exp(2190.0 / t) + std::exp(-1.55e5 / t));
}

double battery_life_yr(const SunYear& sun, std::span<const float> soc, const std::array<double, 12>& temp_c) {
    const double years = static_cast<double>(soc.size()) / kHours;
    const double calendar = calendar_stress(sun, soc, temp_c) / years;
    const double cycles = cycle_stress(sun, soc, temp_c) / years;
    for (double year = 1; year < kLifeCap_yr; ++year) {
        const double lost = std::pow(calendar * year, kCalendarPower) + std::pow(cycles * year, kCyclePower);
        if (lost >= kEndOfLife) return year;
    }
    return kLifeCap_yr;
}

}  // namespace unstring
