#pragma once
// The horizon of each pole at the height of its panel, from the height raster and from the outlines of crowns
// and buildings. Directions from grid north.

#include <vector>

#include "model/city/city.h"
#include "model/fault.h"
#include "model/progress.h"
#include "model/sun/height_source.h"

namespace unstring {

inline constexpr int kDirections = 120;
inline constexpr double kReach_m = 120;         ///< how far the raster is searched
inline constexpr double kMount_m = 9;           ///< where mount_m is blank [A]
inline constexpr double kLowestOutline_deg = 3; ///< outlines that stay lower are left out

struct PoleHorizon {
    double panel_height_m = kMount_m;
    std::vector<float> deciduous_deg, evergreen_deg, solid_deg; ///< kDirections each
    std::vector<float> unknown_deg;
};

/// One per pole given. Cells of the raster count as deciduous canopy; without raster and outlines every
/// direction is unknown and open. The raster is read in windows that neighbouring poles share.
/// @fault cancelled, or what the height source reports
[[nodiscard]] Expected<std::vector<PoleHorizon>> pole_horizons(const City& city,
                                                               const std::vector<PoleIx>& poles,
                                                               HeightSource* heights,
                                                               const Progress& progress);

} // namespace unstring
