#pragma once
// The shade step over the whole city.

#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/city/city.h"
#include "model/fault.h"
#include "model/progress.h"
#include "model/solar/shade.h"
#include "model/sun/climate.h"
#include "model/sun/height_source.h"

namespace unstring {

struct ShadeInput {
    const City& city;
    const Catalog& catalog;
    const Climate& climate;
    HeightSource* heights = nullptr; ///< null = no raster: only polygons; without either, sky-unknown
    double nights_goal = 3;          ///< nights dark a year at the end of battery life (critical poles: 0.3)
    std::vector<std::string> heads;  ///< empty = all of the catalogue
};

/// Candidates only. Streets give the bearing where the file does not.
/// @fault cancelled, or what the height source reports
[[nodiscard]] Expected<ShadeResult> shade_city(const ShadeInput& input, const Progress& progress);

} // namespace unstring
