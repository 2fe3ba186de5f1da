#pragma once
// A table as it was read, before anyone knows what its columns mean: text cells by row and column, and, from
// a vector file, one shape a row. Comes in: a file. Goes out: to columns.h and table_reader.h, which turn
// cells into records.

#include <cstddef>
#include <deque>
#include <string>
#include <string_view>
#include <vector>

namespace unstring {

struct Xy { ///< a coordinate pair in the file's own system and unit, x east (or longitude), y north (or
            ///< latitude)
    double x = 0, y = 0;
};

enum class ShapeKind { none, point, line, area };

struct Shape {
    ShapeKind kind = ShapeKind::none;
    std::vector<std::vector<Xy>> parts; ///< one point, or lines, or outer rings (holes are left out)
};

struct Table {
    std::string name; ///< "poles", "circuits" ..
    std::string file; ///< path as given
    std::vector<std::string> columns;
    std::vector<std::string_view> cells; ///< rows x columns, views into `pool`
    std::vector<long> lines;   ///< one per row: line in the file, 1 = its first; in a vector file the feature
    std::vector<Shape> shapes; ///< one per row, or none at all
    std::string crs;           ///< "EPSG:n" or WKT where the file says it, else empty
    char delimiter = ',';
    long read = 0; ///< rows in the file, broken ones too; blank lines are no rows
    std::deque<std::string> pool;

    Table() = default;
    Table(const Table&) = delete; // the cells look into the pool
    Table& operator=(const Table&) = delete;
    Table(Table&&) = default;
    Table& operator=(Table&&) = default;
    ~Table() = default;

    [[nodiscard]] std::size_t rows() const { return lines.size(); }
    [[nodiscard]] std::string_view cell(std::size_t row, std::size_t column) const {
        return cells[row * columns.size() + column];
    }
};

} // namespace unstring
