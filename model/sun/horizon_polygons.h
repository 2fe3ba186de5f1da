#pragma once
// The horizon that a crown or a building makes, from its outline and its height.

#include <span>

#include "model/quantities.h"

namespace unstring {

/// Nearest distance at which anything counts: the pole and its own luminaire stand inside it.
inline constexpr double kNearStart_m = 0.5;

/// Raises the horizon at directions i * 360 / size (clockwise from grid north) to the top of an upright
/// block. Inside its outline every direction is raised to what stands at kNearStart_m.
/// @param above_m  top of the block above the panel; nothing happens at 0 and below
void raise_by_block(std::span<const MapPoint> ring, double above_m, MapPoint place,
                    std::span<float> height_deg);

[[nodiscard]] bool is_inside(std::span<const MapPoint> ring, MapPoint place);

} // namespace unstring
