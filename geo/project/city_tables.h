#pragma once
// The gathered tables in the project file: written whole by gather, read whole when the project opens.

#include <string>
#include <vector>

#include "geo/project/database.h"
#include "model/catalog/catalog.h"
#include "model/catalog/prices.h"
#include "model/city/city.h"
#include "model/finding.h"
#include "model/sun/climate.h"

namespace unstring {

struct TableCount {
    std::string table;
    long read = 0, kept = 0, set_aside = 0;
};

struct CityTables { ///< everything that gather settles
    City city;
    Catalog catalog;
    PriceBook prices;
    std::optional<Climate> climate;
    std::string canopy_raster, canopy_fingerprint, crs_from;
    std::vector<TableCount> counts;
};

/// Inside the caller's transaction. Layers come with their R-trees.
void write_city_tables(Database& database, const CityTables& tables);
[[nodiscard]] CityTables read_city_tables(Database& database);

/// Only the marks of records that vet set aside (or took back in), in the tables as they lie.
void write_set_aside(Database& database, const City& city);

} // namespace unstring
