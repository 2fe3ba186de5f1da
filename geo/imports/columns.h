#pragma once
// Which column of a file is which field of a record: by our own names, by the user's map, or by guess from
// the words that the field uses. Each guess is said.

#include <map>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "geo/imports/table.h"
#include "model/fault.h"

namespace unstring {

enum class FieldKind { text, number, length_m, area_m2, coordinate };

struct Field {
    std::string_view name; ///< our column name, as in the contract
    FieldKind kind = FieldKind::text;
    std::string_view
        synonyms; ///< other names, blank between, letters and digits only, lower case, without unit
};

/// The fields of a table ("poles"); empty for a table that there is none of.
[[nodiscard]] std::span<const Field> fields_of(std::string_view table);

/// What the user said in `--columns`.
struct ColumnMap {
    std::map<std::string, std::map<std::string, std::string>>
        columns;                    ///< table, field, column; "" = no column
    std::optional<double> length_m; ///< metres per unit of length, where "units" says so
};

/// @fault file_missing, file_broken (no JSON), value_unknown (no such table, field or unit)
[[nodiscard]] Expected<ColumnMap> read_column_map(const std::string& path);

struct FieldColumn {
    std::optional<std::size_t> column;
    double to_si = 1;       ///< by which a number of this column is multiplied
    bool says_unit = false; ///< the column's own name carries its unit ("X_ft")
    bool is_told = false;   ///< the unit is known: by the name, or by the user's map
};

struct Columns {
    std::map<std::string, FieldColumn, std::less<>> fields; ///< every field of the table
    std::vector<std::string> guessed;                       ///< "pole_id from \"PoleNum\""
    std::vector<std::string> unused;                        ///< columns of the file that no field takes

    [[nodiscard]] const FieldColumn&
    at(std::string_view field) const; ///< throws std::logic_error for no field
    [[nodiscard]] bool has(std::string_view field) const { return at(field).column.has_value(); }
};

/// @fault column_missing (a column that the map names is not in the file)
[[nodiscard]] Expected<Columns> match_columns(const Table& table, const ColumnMap& map);

} // namespace unstring
