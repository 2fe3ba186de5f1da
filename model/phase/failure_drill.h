#pragma once
// The failure drill: each RO transformer in service fails tonight; is there one that fits, and how long is it
// dark?

#include "model/phase/phase_facts.h"
#include "model/phase/phase_result.h"

namespace unstring {

struct DrillYear {
    double dark_transformers = 0, dark_cable = 0; ///< expected lamp-nights in the year
    std::vector<SpareCover> spares;               ///< by rating, current, primary volts
};

/// Chance that a unit fails within a year: unit_fail_frac of the price book to 40 years of age, rising in a
/// straight line to unit_fail_old_frac at 60 (assumption); a unit of unknown age counts as young.
[[nodiscard]] double failure_frac(const PriceBook& prices, const Transformer& unit, int year);

/// @param t  0 = today. Lamps of strings whose control is taken from a failed string go dark with it.
[[nodiscard]] DrillYear drill_year(const PhaseFacts& facts, std::size_t t);

/// The string whose lamp position switches this one: by its own id, or by a pole's; not valid = its own
/// control.
[[nodiscard]] StringIx control_string(const City& city, StringIx string);

} // namespace unstring
