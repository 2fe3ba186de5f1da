#pragma once
// The ground that the city covers. A place far outside it is a typing error: it is found by vet, and no leg
// is laid to it.

#include "model/city/city.h"

namespace unstring {

struct Extent {
    MapPoint centre;
    double reach_m = 0; ///< 0 = too few places to judge
};

/// Median place of the poles, and five times the median distance from it (3 km at the least). Poles set aside
/// count too, so that setting records aside does not move it.
[[nodiscard]] Extent extent_of(const City& city);

/// Finite, and not far outside the extent.
[[nodiscard]] bool is_believed(const Extent& extent, MapPoint place);
/// Not believed as it stands, but so with x and y exchanged.
[[nodiscard]] bool is_swapped(const Extent& extent, MapPoint place);

} // namespace unstring
