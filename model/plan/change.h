#pragma once
// One generic change: rows with what they were and what they become. Undo swaps the sides; there is no class
// a command.

#include <cstdint>
#include <map>
#include <string>
#include <variant>
#include <vector>

namespace unstring {

using CellValue = std::variant<std::monostate, std::int64_t, double, std::string>;
using Cells =
    std::map<std::string, CellValue>; ///< column -> value; empty = the row does not exist on that side

struct RowChange {
    std::string table; ///< "plans", "plan_poles", "plan_units"
    std::string id;    ///< of the row in its table
    Cells before, after;
    bool operator==(const RowChange&) const = default;
};

struct Change {
    std::string plan;
    std::string label; ///< what the user did, in words: "boundary of S-07, 3 lamps to 2030"
    std::string who;
    std::vector<RowChange> rows;
    [[nodiscard]] bool is_empty() const { return rows.empty(); }
};

/// The same change with its sides swapped.
[[nodiscard]] Change inverse(const Change& change);

} // namespace unstring
