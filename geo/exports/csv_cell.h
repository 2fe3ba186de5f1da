#pragma once
// Cells of our own CSV files.

#include <initializer_list>
#include <string>
#include <string_view>

namespace unstring {

/// Text that a spreadsheet takes as text: control characters other than tab and line feed dropped, and an
/// apostrophe put before a cell that begins (blanks aside) with = + - @ tab or line feed and is no plain
/// number. Not yet quoted.
[[nodiscard]] std::string safe_text(std::string_view text);

/// One row by RFC 4180, each cell made safe, quoted where it must be; ends with CR LF.
[[nodiscard]] std::string csv_row(std::initializer_list<std::string_view> cells);

} // namespace unstring
