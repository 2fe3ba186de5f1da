#pragma once
// A height raster as a file: opened under the rules for foreign files, and what is known of it before any
// cell is read.

#include <cstddef>
#include <memory>
#include <string>

#include "model/fault.h"
#include "model/quantities.h"

class GDALDataset;

namespace unstring {

struct RasterEnd {
    void operator()(GDALDataset* dataset) const;
};
using RasterFile = std::unique_ptr<GDALDataset, RasterEnd>;

struct RasterFacts {
    std::string crs;                ///< "EPSG:n" or WKT; empty where the file says none
    double west_m = 0, north_m = 0; ///< outer edges, in the raster's own system
    double cell_m = 1;
    std::size_t columns = 0, rows = 0;

    [[nodiscard]] MapPoint middle() const {
        return {west_m + cell_m * static_cast<double>(columns) / 2,
                north_m - cell_m * static_cast<double>(rows) / 2};
    }
};

/// @fault file_missing, file_broken (no listed driver, turned, cells not square)
[[nodiscard]] Expected<RasterFile> open_raster_file(const std::string& path);

/// @fault crs_unknown (not georeferenced), file_broken
[[nodiscard]] Expected<RasterFacts> raster_facts(const std::string& path);
[[nodiscard]] Expected<RasterFacts> raster_facts(GDALDataset& raster, const std::string& path);

} // namespace unstring
