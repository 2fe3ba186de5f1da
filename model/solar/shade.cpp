#include "model/solar/shade.h"

#include <algorithm>

namespace unstring {

// Poles stand in the order of the city, so their indices rise.
const PoleShade* ShadeResult::find(PoleIx pole) const {
    const auto at = std::lower_bound(poles.begin(), poles.end(), pole,
                                     [](const PoleShade& each, PoleIx wanted) { return each.pole < wanted; });
    return at != poles.end() && at->pole == pole ? &*at : nullptr;
}

} // namespace unstring
