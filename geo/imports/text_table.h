#pragma once
// Delimited text (CSV and its kin) to a Table: delimiter, quotes and line ends are found out, never asked.

#include <string>
#include <vector>

#include "geo/imports/table.h"
#include "model/fault.h"
#include "model/finding.h"

namespace unstring {

/// Rows whose number of cells is not the header's, and rows with a quote that never closes, come as
/// `row-broken` findings and are kept out (counted in `read`). Cells over 64 KiB are broken rows too.
/// @param name  of the table, for the findings
/// @fault file_missing, file_broken (empty, no text, more than 5 million rows or 2 000 columns), bad_usage
/// (encoding)
[[nodiscard]] Expected<Table> read_text_table(const std::string& path, const std::string& name,
                                              const std::string& encoding, std::vector<Finding>& findings);

/// The same from text that is UTF-8 already; `file` is only named.
[[nodiscard]] Expected<Table> parse_text_table(std::string utf8, const std::string& file,
                                               const std::string& name, std::vector<Finding>& findings);

} // namespace unstring
