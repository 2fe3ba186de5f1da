#pragma once
// Heights of what stands on the ground, read window by window. geo/ground fills it from rasters and polygons.

#include <cstddef>
#include <vector>

#include "model/fault.h"
#include "model/quantities.h"

namespace unstring {

struct HeightWindow { ///< row 0 is the north row, column 0 the west one; values stand for cell centres
    double west_m = 0, north_m = 0; ///< outer edges of the north-west cell
    double cell_m = 1;
    std::size_t columns = 0, rows = 0;
    std::vector<float> height_m; ///< above ground, rows x columns; NaN = nodata or beyond the raster's edge
};

class HeightSource {
public:
    virtual ~HeightSource() = default;
    [[nodiscard]] virtual double cell_m() const = 0;
    /// The cells whose centres lie within reach_m of a point, east-west and north-south. Safe to call from
    /// one thread at a time only.
    [[nodiscard]] virtual Expected<HeightWindow> window(MapPoint centre, double reach_m) = 0;
};

} // namespace unstring
