#pragma once
// A height raster of any GDAL format as a HeightSource.

#include <memory>
#include <string>

#include "model/sun/height_source.h"

namespace unstring {

/// Opens the first band; georeferenced, square cells, metres. Cells that are nodata come as NaN.
/// @fault file_missing, file_broken, crs_unknown (not georeferenced)
[[nodiscard]] Expected<std::unique_ptr<HeightSource>> open_height_raster(const std::string& path);

} // namespace unstring
