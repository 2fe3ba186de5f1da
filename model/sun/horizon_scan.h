#pragma once
// The horizon of a point from heights on a grid: along each direction the steepest thing that stands above
// the panel.

#include <vector>

#include "model/quantities.h"
#include "model/sun/height_source.h"

namespace unstring {

/// Height above ground at a place, bilinear between the four nearest cell centres; NaN where one of them is.
[[nodiscard]] double height_at_m(const HeightWindow& window, MapPoint place);

struct ScannedHorizon {
    std::vector<float> height_deg;  ///< at directions i * 360 / size, clockwise from grid north, 0 or above
    std::vector<float> unknown_deg; ///< directions in which a sample within reach had no height
};

/// What a march may leave out: where nothing in the window is higher, and no height is missing, it ends
/// early.
struct WindowBounds {
    double highest_m = 0;
    bool has_unknown = true;
};
[[nodiscard]] WindowBounds bounds_of(const HeightWindow& window);

/// Marches from one cell away from the point to reach_m in steps of a quarter cell; the ground counts as
/// level. Unknown samples are left out of the maximum and the direction is named.
/// @param panel_m  height of the panel above the ground
/// @param bounds   of this window
[[nodiscard]] ScannedHorizon scan_horizon(const HeightWindow& window, const WindowBounds& bounds,
                                          MapPoint place, double panel_m, double reach_m, int directions);

} // namespace unstring
