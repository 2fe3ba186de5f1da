#pragma once
// Lamps without a number put into a loop whose other lamps have one.

#include <optional>
#include <vector>

#include "model/series/route.h"

namespace unstring {

/// Closed order of all stops from stop 0 (the station): stops with a number keep their sequence, the others
/// are put where they lengthen the loop least and moved while that shortens it. Where the gaps in 1..n are as
/// many as the stops without a number, these fill exactly the gaps.
/// @param numbers  one per stop; none for stop 0
[[nodiscard]] std::vector<int> insert_unnumbered(const DistanceTable& distances,
                                                 const std::vector<std::optional<int>>& numbers);

} // namespace unstring
