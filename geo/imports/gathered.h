#pragma once
// What `gather` reads: the files of a city in, one value out. Every row is in a table or in a finding.

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/catalog/prices.h"
#include "model/city/city.h"
#include "model/fault.h"
#include "model/finding.h"
#include "model/plan/plan.h"
#include "model/progress.h"
#include "model/sun/climate.h"

namespace unstring {

struct GatherFiles { ///< paths, empty = not given
    std::string poles, circuits, transformers, services, streets, canopy, obstacles, climate, prices,
        catalogue, budget, cutbacks, marks, asbuilt;
    std::string crs;      ///< "EPSG:n"; empty = from the files, else guessed
    std::string columns;  ///< map.json
    std::string encoding; ///< name of the character set
};

struct MarkRow {
    std::string pole_id;
    Choice mark = Choice::undecided;
    bool lock = false;
    std::optional<int> year;
    std::string who, note;
    RowRef from;
};

struct RowCount {
    long read = 0, kept = 0, set_aside = 0; ///< read = kept + set_aside
};

struct Gathered {
    City city;
    Catalog catalog;  ///< the default catalogue where no file was given
    PriceBook prices; ///< rows of the file over those of the default book
    std::optional<Climate> climate;
    std::string canopy_raster;            ///< absolute path of a height raster
    std::string canopy_fingerprint;       ///< changes when the raster's content does
    std::vector<MarkRow> marks;           ///< of this call's file only
    std::string crs_from;                 ///< "file", "user", "guess"
    std::map<std::string, RowCount> rows; ///< by table: "poles", "circuits" ..
    std::vector<Finding> findings;        ///< of every table that is in, Finding::table set
    std::vector<std::string>
        notes; ///< for people: columns matched by guess, CRS and where it came from, sums
};

/// Reads the files given; the other tables stay as they were in `earlier` (null = a new project: defaults).
/// References (string of a pole, strings of a unit) are resolved anew over the whole.
/// @fault file_missing, file_broken, column_missing, crs_unknown, value_unknown, cancelled ..
[[nodiscard]] Expected<Gathered> read_files(const GatherFiles& files, const Gathered* earlier,
                                            const Progress& progress);

} // namespace unstring
