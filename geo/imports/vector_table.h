#pragma once
// Any listed vector file to a Table: attributes as text, one shape a feature, the file's own coordinate
// system.

#include <string>
#include <vector>

#include "geo/imports/table.h"
#include "model/fault.h"
#include "model/finding.h"

namespace unstring {

/// Reads the layer of the table's name, else the only one, else the first that has the wanted shapes.
/// Opens read-only, with a closed list of drivers, without network, without the views and triggers of a
/// database.
/// @param wanted  shapes of the table; none = any
/// @fault file_missing, file_broken (no listed driver, no layer, over 5 million features or 50 million
/// points)
[[nodiscard]] Expected<Table> read_vector_table(const std::string& path, const std::string& name,
                                                ShapeKind wanted, const std::string& encoding,
                                                std::vector<Finding>& findings,
                                                std::vector<std::string>& notes);

/// Whether the file says by its first bytes that it is a raster (a canopy may be either).
[[nodiscard]] bool is_raster_file(const std::string& path);

} // namespace unstring
