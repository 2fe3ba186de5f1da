#pragma once
// How near a person may come, and which glove, for the open-circuit volts of a string. The owner's rules
// govern.

#include <string>

namespace unstring {

/// Minimum approach distance [m] for a.c., phase to phase, rounded table values; 0 = avoid contact (50 to 300
/// V). Source: 29 CFR 1910.269 table R-6; above 15 kV the next row. Above 36 kV -1: ask the owner.
[[nodiscard]] double approach_distance_m(double volts);

/// Glove class by its greatest use volts: 00 500, 0 1 000, 1 7 500, 2 17 000, 3 26 500, 4 36 000.
/// Source: 29 CFR 1910.137 table I-4, from memory.
[[nodiscard]] std::string glove_class(double volts);

/// "0.63 m, glove class 1"
[[nodiscard]] std::string approach_text(double volts);

} // namespace unstring
