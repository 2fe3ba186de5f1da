#pragma once
// How much light a crown lets through, month by month.

#include "model/city/city.h"
#include "model/solar/panel.h"

namespace unstring {

struct CanopyTerms { ///< shares of the beam let through
    double deciduous_leaf_on = 0.05,
           deciduous_leaf_off = 0.45; ///< J. Konarska et al., Theor. Appl. Climatol. 117
                                      ///< (2014) 363-376: .013-.053 and .40-.52 (from memory)
    double evergreen = 0.07;          ///< conifers .05-.10
    /// Share of the leaves that are out, January first, on the northern half of the Earth.
    Monthly leaves = {0, 0, 0, .3, .8, 1, 1, 1, .9, .6, .2, 0};
};

/// @param lat_deg  south of the equator the year of the leaves is turned by six months
[[nodiscard]] Monthly canopy_through(Leaf leaf, double lat_deg, const CanopyTerms& terms = {});

} // namespace unstring
