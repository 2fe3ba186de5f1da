#pragma once
// Which cable of a loop stays live: the shortest walk station - live lamps in wiring order - station.
//
//   0 --leg 0-- 1 --leg 1-- 2 ... n --leg n-- n+1        a cut-back (a, b) skips the legs between positions a
//   and b

#include <span>
#include <vector>

#include "model/series/string_loop.h"

namespace unstring {

struct EnergisedLoop {
    double cable_m = 0;     ///< all that is energised, new cable included
    double new_cable_m = 0; ///< of which in cut-backs
    std::vector<int> used;  ///< places in the cut-backs given, along the loop
};

/// The energised loop of a state. A cut-back may be used where every lamp strictly between its ends is off;
/// those used lie side by side, never crossing or nested; one is used only where it is strictly shorter in
/// metres. No live lamp: 0 m. Exact, by dynamic programming over the positions, O(n + cut-backs).
/// @param legs_m  n + 1 conductor metres
/// @param live    n flags; std::logic_error where sizes or positions do not agree
[[nodiscard]] EnergisedLoop energised_loop(std::span<const double> legs_m, std::span<const char> live,
                                           std::span<const LoopCutBack> cutbacks);

} // namespace unstring
