#pragma once
// The sample city on disk, in the default columns that gather reads.

#include <string>

#include "model/fault.h"

namespace unstring::sample {

struct CityOrder {
    long poles = 1400;
    std::uint64_t seed = 34130;
    std::string folder;      ///< made when it is not there
    bool with_layers = true; ///< streets, buildings and canopy too
};

struct CityCount {
    long poles = 0, series_poles = 0, strings = 0, units = 0;
};

/// Writes poles.csv, circuits.csv and the other tables tile by tile, then streets.gpkg, buildings.gpkg,
/// canopy.tif. The same order gives the same bytes of every csv.
/// @fault bad_usage for fewer than 1 or more than 20 million poles; write_failed
[[nodiscard]] Expected<CityCount> write_city(const CityOrder& order);

} // namespace unstring::sample
