#pragma once
// A string's loop as it lies on the ground: legs, far end, cut-backs of the file and candidates by nearness.

#include <optional>
#include <vector>

#include "model/city/city.h"
#include "model/series/extent.h"
#include "model/series/street_index.h"
#include "model/series/string_loop.h"

namespace unstring {

/// Two places of one loop no further apart than this may be spliced across (assumption).
inline constexpr double kCutBackReach_m = 30;

/// Places by position, 0 and n + 1 the station's terminals; none where it is not given or not believed
/// (extent.h).
using LoopPlaces = std::vector<std::optional<MapPoint>>;
[[nodiscard]] LoopPlaces loop_places(const City& city, const Extent& extent, StringIx string,
                                     const std::vector<PoleIx>& lamps);

/// Straight legs station - lamps - station, not yet scaled: one more than lamps. A lamp without a place has a
/// leg of 0 m. Without a station each home leg is half the run from the last lamp to the first.
[[nodiscard]] std::vector<double> straight_legs_m(const LoopPlaces& places);

/// The position that maximises the smaller of the two cable distances to the station, the lowest of equals; 0
/// = no lamp.
[[nodiscard]] int far_position_of(const std::vector<double>& legs_m);

/// Rows of cutbacks.csv on this string, a < b; rows with a pole that is not on the string are passed over
/// (vet names them).
[[nodiscard]] std::vector<LoopCutBack> cutbacks_of_file(const City& city, StringIx string,
                                                        const std::vector<PoleIx>& lamps,
                                                        const LoopPlaces& places);

/// Pairs of the loop within kCutBackReach_m with two lamps or more between and less new cable than the legs
/// they skip; kind crossing where the straight line crosses a street. Pairs that loop.cutbacks has are left
/// out.
[[nodiscard]] std::vector<LoopCutBack> cutback_candidates(const StringLoop& loop, const LoopPlaces& places,
                                                          const StreetIndex& streets);

} // namespace unstring
