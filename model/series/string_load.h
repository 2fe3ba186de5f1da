#pragma once
// Volts and power of a series circuit as a phasor sum, and of its regulated-output transformer's input side.

#include <span>

#include "model/catalog/catalog.h"

namespace unstring {

/// Conductor temperature that strings are computed at: cable in the ground, lightly loaded.
inline constexpr double kStringCableC = 25;

struct StringLoad {
    double volts = 0, load_kw = 0, load_kva = 0, pf = 1;
    double cable_w = 0; ///< of load_kw
};

/// V = I (R + jX) L + sum V_i, each lamp |V_i| = P_i / (I pf_i), lagging; load_kw = I Re V, load_kva = I |V|.
/// @param cable_m      energised conductor metres, return included
/// @param lamp_w       system watts, 0 for a jumpered lamp
/// @param lamp_pf      in (0, 1], one per lamp
/// @param ageing_frac  multiplies each lamp's watts and volts by 1 + ageing_frac; its power factor stays
/// Source: phasor sum of a series circuit. Checked in tests/published/string.cpp
[[nodiscard]] StringLoad string_load(double current_a, const Cable& cable, double cable_m, double cable_c,
                                     std::span<const double> lamp_w, std::span<const double> lamp_pf,
                                     double ageing_frac = 0);

/// The AWG 8 copper that stands in where a catalogue lacks the size asked.
[[nodiscard]] const Cable& usual_string_cable();

struct PrimarySide {
    double kva = 0, kw = 0, pf = 0;
};

/// Input of a moving-coil unit: nearly constant kVA whatever its load, S = 1.04 rated / .78; a fixed loss of
/// 4 % of rating. Source: derived; the loss is from memory, pf .78 at full load is common practice.
[[nodiscard]] PrimarySide primary_side(double rated_kw, double load_kw);

} // namespace unstring
