#pragma once
// How long a battery lasts: cycles counted from its charge, calendar and cycle ageing, the year it is
// replaced.

#include <array>
#include <span>
#include <vector>

#include "model/sun/sun_year.h"

namespace unstring {

struct Cycle {
    double range = 0;    ///< in the unit of the series
    double count = 1;    ///< 1 or one half
    std::size_t end = 0; ///< place in the series of the later of its two turning points
};

struct Turn { ///< where a series turns; its first and last value count as turns
    double value = 0;
    std::size_t at = 0;
};
[[nodiscard]] std::vector<Turn> turning_points(std::span<const float> values);

/// Cycles of a series. Source: ASTM E1049-85 section 5.4.4. Checked in tests/published/battery.cpp.
[[nodiscard]] std::vector<Cycle> rainflow(std::span<const Turn> turns);

/// Ageing of a large-format lithium iron phosphate cell, capacity lost as a fraction.
/// Source: P. Gasper et al., J. Energy Storage (2023) 109042, as coded openly by NREL for the 250 Ah
/// prismatic cell; anode potential after M. Safari, C. Delacourt (2011).
/// @return  lost = rate * days^0.526
[[nodiscard]] double calendar_rate(double temp_c, double soc);
inline constexpr double kCalendarPower = 0.526;
/// @return  lost = rate * equivalent_full_cycles^0.828
[[nodiscard]] double cycle_rate(double temp_c, double depth, double c_rate);
inline constexpr double kCyclePower = 0.828;

inline constexpr double kLifeCap_yr = 12; ///< age at which a battery is replaced in any case [A]
inline constexpr double kEndOfLife = 0.2; ///< capacity lost at the end of its life

/// What a battery's charge went through over whole years.
struct ChargeHistory {
    std::vector<Turn> turns;
    std::array<double, 12> mean_soc{}; ///< per calendar month
    double c_rate = 0;                 ///< mean of the hours in which the charge moves [1/h]
    double years = 0;
};
/// @param soc  hours of whole years, one at the least; @param stride  every how many values one belongs to
/// this battery
[[nodiscard]] ChargeHistory charge_history(const SunYear& sun, std::span<const float> soc,
                                           std::size_t stride = 1);

/// The first year at whose end a new battery has lost kEndOfLife, or the cap. Varying stress is added up in
/// virtual time.
/// @param temp_c  of the battery, one per calendar month
[[nodiscard]] double battery_life_yr(const SunYear& sun, const ChargeHistory& history,
                                     const std::array<double, 12>& temp_c);

} // namespace unstring
