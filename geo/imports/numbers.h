#pragma once
// Numbers as people write them: decimal point or comma, thousands set off or not. Which one a column uses is
// judged over the whole column, so that 1,234 is not once a thousand and once a little over one.

#include <optional>
#include <string_view>

namespace unstring {

enum class DecimalMark { point, comma };

/// Counts what the cells of a column, or of a file, say about the decimal mark.
struct DecimalEvidence {
    long point = 0, comma = 0; ///< cells that can only be read one way
    long either = 0;           ///< "1,234" or "1.234"

    void add(std::string_view cell);
    void add(const DecimalEvidence& other);
};

/// The mark of a column: what most of its own cells say, else what the whole file says, else comma in a file
/// whose cells are set apart by semicolons, else point.
[[nodiscard]] DecimalMark judge_mark(const DecimalEvidence& column, const DecimalEvidence& file,
                                     char delimiter);

/// The number, or nothing where the cell is none. Takes a sign, an exponent, and thousands set off by the
/// other mark, a blank, a no-break blank or an apostrophe, in groups of three. Never NaN or infinite.
[[nodiscard]] std::optional<double> read_number(std::string_view cell, DecimalMark mark);

/// Cells that say "nothing here": empty, "n/a", "null", "<null>", "-".
[[nodiscard]] bool is_blank_cell(std::string_view cell);

} // namespace unstring
