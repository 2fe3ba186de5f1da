#pragma once
// Where things are: the coordinates of each table brought into the project's coordinate system, in metres.

#include <optional>
#include <string>
#include <vector>

#include "geo/ground/crs.h"
#include "geo/imports/columns.h"
#include "geo/imports/table_reader.h"
#include "model/fault.h"

namespace unstring {

/// A table with what is known of its coordinates.
struct Placed {
    enum class Kind { none, columns, lon_lat, shapes } kind = Kind::none;
    std::string x_field, y_field; ///< of the vocabulary, where kind is columns or lon_lat
    std::string crs;              ///< empty = not known
    std::string crs_from;         ///< "file", "user", "guess"
    double to_crs_unit = 1; ///< by which a coordinate of the table is multiplied before it is of its crs
};

/// The system of the project and how it was come by.
struct ProjectCrs {
    std::string crs;      ///< in metres
    std::string crs_from; ///< "file", "user", "guess"
};

/// Which fields of a table hold its coordinates and in what system: the file's own, lon and lat columns (WGS
/// 84), the user's, or degrees by the look of the numbers.
/// @param user_crs  of --crs, or empty
[[nodiscard]] Expected<Placed> look_at_places(const Table& table, const Columns& columns,
                                              const std::string& user_crs);

/// Says what system the coordinates are of, and with it the unit that they come in. @fault crs_unknown
Expected<void> set_crs(Placed& placed, const Columns& columns, const std::string& crs,
                       const std::string& crs_from);

/// Middle of the coordinates of a table (medians), in its own system; nothing where it has none.
[[nodiscard]] std::optional<Xy> middle_of(const Table& table, const Columns& columns, const Placed& placed);

/// Coordinates of rows and shapes into the project's system.
class PlaceReader {
public:
    /// @fault crs_unknown
    static Expected<PlaceReader> make(TableReader& in, const Placed& placed, const std::string& project_crs);

    /// Of the row that the reader stands on: nothing where a coordinate is blank, unreadable or has no place
    /// in the project's system (the finding is made there).
    [[nodiscard]] std::optional<MapPoint> operator()() const;
    /// Every part of the row's shape; parts with a point that cannot be projected are left out.
    [[nodiscard]] std::vector<std::vector<MapPoint>> parts(const Shape& shape) const;

private:
    PlaceReader(TableReader& in, Placed placed, std::optional<CrsTransform> transform);
    [[nodiscard]] std::optional<MapPoint> projected(double x, double y) const;
    [[nodiscard]] std::optional<MapPoint> projected_or_said(double x, double y) const;
    TableReader* in_;
    Placed placed_;
    std::optional<CrsTransform> transform_; ///< none: the coordinates are of the project's system already
    std::optional<NumberField> x_, y_;
};

} // namespace unstring
