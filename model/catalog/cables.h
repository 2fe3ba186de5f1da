#pragma once
// Conductors as the code book's tables give them, and their resistance at another temperature.

#include <vector>

#include "model/catalog/catalog.h"
#include "model/quantities.h"

namespace unstring {

/// AWG 14 to 4/0, copper then aluminium, thin to thick: resistance DC at 75 C, stranded, uncoated (NFPA 70
/// ch. 9 table 8), reactance in PVC at 60 Hz (table 9), area over THWN-2 insulation (table 5), ampacity at 75
/// C (table 310.16). AWG 14 aluminium has no ampacity (0): it may be calculated, never chosen. User's figures
/// replace these (catalogue.json).
[[nodiscard]] std::vector<Cable> default_cables();

/// Resistance of one conductor [ohm/km] at a conductor temperature: R = R75 (1 + a (T - 75)), a = 0.00323
/// copper, 0.00330 aluminium. Good from about -40 C to 90 C. Source: NFPA 70 ch. 9 table 8 note 2. Checked in
/// tests/published/conductors.cpp
[[nodiscard]] double cable_ohm_per_km_at(const Cable& cable, double temp_c);

/// "8", "1/0" .. as the trade writes it.
[[nodiscard]] std::string awg_text(int awg);

/// Ohm per 1000 ft as the code book prints it, to ohm/km.
[[nodiscard]] constexpr double ohm_per_km(double ohm_per_kft) { return ohm_per_kft / kMetresPerFoot; }

} // namespace unstring
