#pragma once
// The wiring order of a string where the files do not give it, or not for every lamp.

#include <vector>

#include "model/city/city.h"
#include "model/series/extent.h"
#include "model/series/street_index.h"
#include "model/series/string_loop.h"

namespace unstring {

struct SettledOrder {
    OrderFrom from = OrderFrom::given;
    double confidence_frac = 1; ///< share of neighbour pairs that stay when distances are shaken by 10 %
    std::vector<PoleIx> wiring;
};

/// All lamps numbered: that order. None: the shortest closed route station - lamps - station, a carriageway
/// crossed counting as 15 m more; the pole numbers' own order where it is as short. Some: the numbered ones
/// keep their order among themselves and the others go where they lengthen the loop least, into the gaps of
/// the numbering where those are as many as they. Lamps without a place come last. A guess either way: rings
/// and out-and-back strings come out well, strings with side spurs do not.
/// @param lamps  of one string, by number, then id (lamps_by_string)
[[nodiscard]] SettledOrder settle_order(const City& city, const Extent& extent, const StreetIndex& streets,
                                        StringIx string, const std::vector<PoleIx>& lamps);

} // namespace unstring
