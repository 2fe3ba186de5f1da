#pragma once
// The horizon of a point from heights on a grid: along each direction the steepest thing that stands above the panel.

#include <vector>

#include "model/quantities.h"
#include "model/sun/height_source.h"

namespace unstring {

/// Height above ground at a place, bilinear between the four nearest cell centres; NaN where one of them is.
[[nodiscard]] double height_at_m(const HeightWindow& window, MapPoint place);

struct ScannedHorizon {
    std::vector<float> height_deg;  ///< at directions i * 360 / size, clockwise from grid north, 0 or above
    std::vector<float> unknown_deg;  ///< directions in which a sample within reach had no height
};

/// Marches from one cell away from the point to reach_m in steps of half a cell; the ground counts as level.
/// Unknown samples are left out of the maximum and the direction is named.
/// @param panel_m  height of the panel above the ground
[[nodiscard]] ScannedHorizon scan_horizon(const HeightWindow& window, MapPoint place, double panel_m, double reach_m,
                                          int directions);

}  // namespace unstring
