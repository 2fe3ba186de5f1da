#pragma once
// What keeps a solar head off a pole, whatever the sky: asked of the records alone.

#include <string>

#include "model/catalog/catalog.h"
#include "model/city/city.h"

namespace unstring {

inline constexpr double kCriticalGoal = 0.3; ///< nights dark a year at a critical pole

/// The first thing that stops it, in words and numbers; empty when nothing does. An unknown pole strength
/// does not stop it (it is an expected cost elsewhere), nor do attachments.
[[nodiscard]] std::string what_stops(const Pole& pole, const Head& head);

/// Nights dark a year that this pole may have.
[[nodiscard]] double goal_of(const Pole& pole, double nights_goal);

} // namespace unstring
