#pragma once
// A small city as nobody wants to get it: Latin-1, CRLF, semicolons, decimal commas, feet, other column
// names, and one or more records for each finding that gather and vet know. Each trouble is written down
// beside the files.

#include <string>

#include "model/fault.h"

namespace unstring::sample {

/// Writes poles.csv, circuits.csv, transformers.csv, cutbacks.csv, services.csv, marks.csv, map.json,
/// no-place.csv, expected.csv (code, file, line, record) and README.md with the same table in words. Always
/// the same bytes.
/// @fault write_failed
[[nodiscard]] Expected<void> write_dirty(const std::string& folder);

} // namespace unstring::sample
