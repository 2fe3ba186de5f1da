#pragma once
// The two searches behind route.h: exact for few stops, iterated local search for many.

#include <vector>

#include "model/series/route.h"

namespace unstring {

/// Order of the shortest route from stop 0 over all, closed or open. At most kExactStops stops.
[[nodiscard]] std::vector<int> exact_order(const DistanceTable& distances, bool is_closed);

/// Order of a short closed tour from stop 0; 5 stops or more.
[[nodiscard]] std::vector<int> searched_tour(const DistanceTable& distances, const RouteEffort& effort);

} // namespace unstring
