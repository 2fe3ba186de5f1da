#pragma once
// The conduit that holds a set of wires.

#include <optional>
#include <span>

namespace unstring {

enum class Schedule { pvc_40, pvc_80 };

/// Share of the inner area that wires may fill: 53 % one, 31 % two, 40 % three or more.
/// Source: NFPA 70 ch. 9 table 1.
[[nodiscard]] double fill_frac(int wires);

/// Inner area of a trade size in inches (0.5, 0.75, 1, 1.25, 1.5, 2) [mm2]; nothing for another size.
/// Source: NFPA 70 ch. 9 table 4.
[[nodiscard]] std::optional<double> inner_area_mm2(Schedule schedule, double trade_in);

/// Smallest trade size [in] for these wires; nothing where 2 in is not enough.
/// @param area_mm2  area of each wire over its insulation, grounding wire included
[[nodiscard]] std::optional<double> conduit_for(Schedule schedule, std::span<const double> area_mm2);

} // namespace unstring
