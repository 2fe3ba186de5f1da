#pragma once
// Which way the panel of a solar head leans, from the arm it hangs on.

#include <string>

#include "model/city/city.h"

namespace unstring {

inline constexpr double kStreetNear_m = 60; ///< a street line further away says nothing about the arm

struct PanelBearing {
    double bearing_deg = 180; ///< of the downward tilt, clockwise from grid north
    std::string from;         ///< "file", "street", "south" ("north" south of the equator)
};

/// The arm's bearing from the file, else square to the nearest street line and over it, else toward the
/// equator.
[[nodiscard]] PanelBearing arm_bearing(const City& city, const Pole& pole);

/// The arm's bearing turned by the head's own turn (0: the panel leans away from the pole); toward the
/// equator it is not turned.
[[nodiscard]] PanelBearing panel_bearing(const PanelBearing& arm, double turn_deg);

} // namespace unstring
