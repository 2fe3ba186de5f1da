#pragma once
// catalogue.json: lamps, solar heads, luminaires, cables.

#include <string>
#include <string_view>

#include "model/catalog/catalog.h"
#include "model/fault.h"

namespace unstring {

/// The catalogue that the program carries, with the conductor tables.
[[nodiscard]] Catalog default_catalog();

/// A catalogue from JSON; a list that the file does not have ("heads") is taken from `defaults` as a whole.
/// @param file  named in faults
/// @fault file_broken (no JSON), value_unreadable (a field that is missing, no number, or out of its range),
/// value_unknown
[[nodiscard]] Expected<Catalog> parse_catalogue(std::string_view json, const std::string& file,
                                                const Catalog& defaults);

/// @fault as parse_catalogue, file_missing
[[nodiscard]] Expected<Catalog> read_catalogue(const std::string& path, const Catalog& defaults);

} // namespace unstring
