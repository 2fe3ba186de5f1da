#pragma once
// The ground of the sample city as map layers: streets.gpkg, buildings.gpkg, canopy.tif. The one file of the
// generator that knows GDAL.

#include <string>

#include "model/fault.h"
#include "sampledata/town.h"

namespace unstring::sample {

/// Canopy: crown height above ground in whole metres, cells of 0.5 m; above 200 million cells the cells grow
/// to 1, 2 .. metres. The same town gives the same features and cells.
/// @fault write_failed
[[nodiscard]] Expected<void> write_layers(const std::string& folder, const Town& town);

} // namespace unstring::sample
