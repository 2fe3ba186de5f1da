#include "model/solar/battery_life.h"

#include <algorithm>
#include <cmath>

#include "model/sun/daily_sun.h"

namespace unstring {
namespace {

/// Takes a series value by value and keeps where it turns.
class TurnFinder {
public:
    TurnFinder(float first, std::vector<Turn>& turns) : turns_(turns), before_(first) {
        turns_.push_back({static_cast<double>(first), 0});
    }
    /// True when the value differs from the one before.
    bool add(float value, std::size_t at) {
        const float step = value - before_;
        if (step == 0) return false;
        if (step * way_ < 0) turns_.push_back({static_cast<double>(before_), moved_at_});
        way_ = step > 0 ? 1.0F : -1.0F;
        before_ = value;
        moved_at_ = at;
        return true;
    }
    void finish() {
        if (moved_at_ > 0) turns_.push_back({static_cast<double>(before_), moved_at_});
    }

private:
    std::vector<Turn>& turns_;
    float before_;
    float way_ = 0; ///< of the last step that moved
    std::size_t moved_at_ = 0;
};

double range_of(const Turn& a, const Turn& b) { return std::abs(a.value - b.value); }

/// Potential of the graphite anode [V] over the state of charge.
double anode_v(double soc) {
    const double x = 0.0085 + 0.7715 * soc;
    return 0.6379 + 0.5416 * std::exp(-305.5309 * x) + 0.044 * std::tanh(-(x - 0.1958) / 0.1088) -
           0.1978 * std::tanh((x - 1.0571) / 0.0854) - 0.6875 * std::tanh((x + 0.0117) / 0.0529) -
           0.0175 * std::tanh((x - 0.5692) / 0.0875);
}

double kelvin(double temp_c) { return temp_c + 273.15; }

/// One year of calendar stress, in the unit in which stress of different days adds up.
double calendar_stress(const ChargeHistory& history, const std::array<double, 12>& temp_c) {
    double stress = 0;
    for (std::size_t month = 0; month < 12; ++month)
        stress += std::pow(calendar_rate(temp_c[month], history.mean_soc[month]), 1.0 / kCalendarPower) *
                  days_in_month(static_cast<int>(month) + 1);
    return stress;
}

double heat_of_cycles(double temp_c) {
    const double t = kelvin(temp_c);
    return std::exp(2190.0 / t) + std::exp(-1.55e5 / t);
}

double wear_of_depth(double depth, double c_rate) { return 4.38e-8 + 1.55e-8 * depth + 1.68e-7 * c_rate; }

/// wear_of_depth raised to the power in which stress adds up, between 65 places: it is all but linear in the
/// depth, so that the error stays below 1e-5 of the value.
class WearTable {
public:
    explicit WearTable(double c_rate) {
        for (std::size_t i = 0; i < wear_.size(); ++i)
            wear_[i] = std::pow(wear_of_depth(static_cast<double>(i) / kPieces, c_rate), 1.0 / kCyclePower);
    }
    [[nodiscard]] double at(double depth) const {
        const double place = std::clamp(depth, 0.0, 1.0) * kPieces;
        const auto from = std::min(static_cast<std::size_t>(place), wear_.size() - 2);
        return wear_[from] + (wear_[from + 1] - wear_[from]) * (place - static_cast<double>(from));
    }

private:
    static constexpr double kPieces = 64;
    std::array<double, 65> wear_;
};

/// All years of cycle stress.
double cycle_stress(const SunYear& sun, const ChargeHistory& history, const std::array<double, 12>& temp_c) {
    std::array<double, 12> heat{};
    for (std::size_t month = 0; month < 12; ++month)
        heat[month] = std::pow(heat_of_cycles(temp_c[month]), 1.0 / kCyclePower);
    const WearTable wear(history.c_rate);
    double stress = 0;
    for (const Cycle& cycle : rainflow(history.turns)) {
        const auto month = static_cast<std::size_t>(sun.month_of_hour(cycle.end % kHours) - 1);
        stress += heat[month] * wear.at(cycle.range) * cycle.count * cycle.range;
    }
    return stress;
}

} // namespace

std::vector<Turn> turning_points(std::span<const float> values) {
    std::vector<Turn> turns;
    if (values.empty()) return turns;
    TurnFinder finder(values[0], turns);
    for (std::size_t i = 1; i < values.size(); ++i) finder.add(values[i], i);
    finder.finish();
    return turns;
}

std::vector<Cycle> rainflow(std::span<const Turn> turns) {
    std::vector<Cycle> cycles;
    cycles.reserve(turns.size());
    std::vector<Turn> open;
    std::size_t start = 0; // the turns before it are done with
    for (const Turn& turn : turns) {
        open.push_back(turn);
        while (open.size() - start >= 3) {
            const std::size_t n = open.size();
            const double last = range_of(open[n - 1], open[n - 2]);
            const double before = range_of(open[n - 2], open[n - 3]);
            if (last < before) break;
            if (n - start == 3) { // the range before holds the start: half a cycle, and the start moves on
                cycles.push_back({before, 0.5, open[n - 2].at});
                ++start;
            } else {
                cycles.push_back({before, 1.0, open[n - 2].at});
                open[n - 3] = open[n - 1];
                open.resize(n - 2);
            }
        }
    }
    for (std::size_t i = start + 1; i < open.size(); ++i)
        cycles.push_back({range_of(open[i], open[i - 1]), 0.5, open[i].at});
    return cycles;
}

ChargeHistory charge_history(const SunYear& sun, std::span<const float> soc, std::size_t stride) {
    ChargeHistory history;
    const std::size_t days = soc.size() / stride / 24;
    history.years = static_cast<double>(days) / kDays;
    TurnFinder finder(soc[0], history.turns);
    std::size_t moving_hours = 0;
    for (std::size_t day = 0; day < days; ++day) {
        float sum = 0;
        for (std::size_t hour = day * 24; hour < day * 24 + 24; ++hour) {
            sum += soc[hour * stride];
            moving_hours += finder.add(soc[hour * stride], hour) ? 1 : 0;
        }
        history.mean_soc[static_cast<std::size_t>(sun.days[day % kDays].month - 1)] +=
            static_cast<double>(sum);
    }
    finder.finish();
    for (std::size_t month = 0; month < 12; ++month)
        history.mean_soc[month] /= 24.0 * days_in_month(static_cast<int>(month) + 1) * history.years;
    double moved = 0;
    for (std::size_t i = 1; i < history.turns.size(); ++i)
        moved += range_of(history.turns[i], history.turns[i - 1]);
    if (moving_hours > 0) history.c_rate = moved / static_cast<double>(moving_hours);
    return history;
}

double calendar_rate(double temp_c, double soc) {
    const double t = kelvin(temp_c);
    return 8.37e4 * std::exp(-5210.0 / t) * std::exp(-3560.0 * anode_v(soc) / t);
}

double cycle_rate(double temp_c, double depth, double c_rate) {
    return wear_of_depth(depth, c_rate) * heat_of_cycles(temp_c);
}

double battery_life_yr(const SunYear& sun, const ChargeHistory& history,
                       const std::array<double, 12>& temp_c) {
    const double calendar = calendar_stress(history, temp_c);
    const double cycles = cycle_stress(sun, history, temp_c) / history.years;
    for (double year = 1; year < kLifeCap_yr; ++year) {
        const double lost = std::pow(calendar * year, kCalendarPower) + std::pow(cycles * year, kCyclePower);
        if (lost >= kEndOfLife) return year;
    }
    return kLifeCap_yr;
}

} // namespace unstring
