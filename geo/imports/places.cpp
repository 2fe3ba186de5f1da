#include "geo/imports/places.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include <fmt/format.h>

namespace unstring {
namespace {

constexpr double kAnyNumber = 1e9;
constexpr double kWidestCity_deg = 3; ///< numbers that spread further are not taken for degrees
constexpr const char* kWgs84 = "EPSG:4326";

double middle(std::vector<double> values) {
    const auto half = values.begin() + static_cast<long>(values.size() / 2);
    std::nth_element(values.begin(), half, values.end());
    return *half;
}

struct Coordinates {
    std::vector<double> x, y;
};

void add_shape(const Shape& shape, Coordinates& all) {
    for (const auto& part : shape.parts)
        if (!part.empty()) {
            all.x.push_back(part.front().x);
            all.y.push_back(part.front().y);
        }
}

/// What can be read of a table's coordinates, as given.
Coordinates coordinates_of(const Table& table, const Columns& columns, const Placed& placed) {
    Coordinates all;
    if (placed.kind == Placed::Kind::shapes)
        for (const Shape& shape : table.shapes) add_shape(shape, all);
    if (placed.kind != Placed::Kind::columns && placed.kind != Placed::Kind::lon_lat) return all;
    const auto x_column = *columns.at(placed.x_field).column;
    const auto y_column = *columns.at(placed.y_field).column;
    DecimalEvidence evidence;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        evidence.add(table.cell(row, x_column));
        evidence.add(table.cell(row, y_column));
    }
    const DecimalMark mark = judge_mark(evidence, {}, table.delimiter);
    for (std::size_t row = 0; row < table.rows(); ++row) {
        const auto x = read_number(table.cell(row, x_column), mark);
        const auto y = read_number(table.cell(row, y_column), mark);
        if (!x || !y) continue;
        all.x.push_back(*x * placed.to_crs_unit);
        all.y.push_back(*y * placed.to_crs_unit);
    }
    return all;
}

bool spreads_like_a_city(std::vector<double> values) {
    std::sort(values.begin(), values.end());
    const std::size_t tail = values.size() / 20;
    return values[values.size() - 1 - tail] - values[tail] < kWidestCity_deg;
}

bool look_like_degrees(const Coordinates& all) {
    if (all.x.empty() || !spreads_like_a_city(all.x) || !spreads_like_a_city(all.y)) return false;
    const double x = std::abs(middle(all.x)), y = std::abs(middle(all.y));
    const auto is_whole = [](double value) { return value == std::floor(value); };
    const bool all_whole = std::all_of(all.x.begin(), all.x.end(), is_whole) &&
                           std::all_of(all.y.begin(), all.y.end(), is_whole);
    return !all_whole && ((x <= 180 && y <= 90) || (x <= 90 && y <= 180));
}

Placed find_fields(const Table& table, const Columns& columns) {
    Placed placed;
    if (!table.shapes.empty()) {
        placed.kind = Placed::Kind::shapes;
        return placed;
    }
    const bool is_circuits = table.name == "circuits";
    const std::string x = is_circuits ? "station_e" : "easting", y = is_circuits ? "station_n" : "northing";
    const auto has = [&](const std::string& field) {
        return columns.fields.contains(field) && columns.has(field);
    };
    if (has(x) && has(y)) return {Placed::Kind::columns, x, y, {}, {}, 1};
    if (has("lon") && has("lat")) return {Placed::Kind::lon_lat, "lon", "lat", {}, {}, 1};
    return placed;
}

/// Feet in the columns stay feet where the system itself counts in feet.
Expected<double> column_factor(const Columns& columns, const Placed& placed) {
    const auto facts = crs_facts(placed.crs);
    if (!facts) return tl::unexpected(facts.error());
    const FieldColumn& x = columns.at(placed.x_field);
    if (facts->is_geographic) return 1.0;
    const bool crs_in_feet = facts->unit_m < 0.5;
    const bool column_in_feet = x.to_si < 0.5;
    if (crs_in_feet) return x.says_unit && !column_in_feet ? 1.0 / facts->unit_m : 1.0;
    return x.to_si / facts->unit_m;
}

} // namespace

Expected<Placed> look_at_places(const Table& table, const Columns& columns, const std::string& user_crs) {
    Placed placed = find_fields(table, columns);
    if (placed.kind == Placed::Kind::none) return placed;
    if (!table.crs.empty()) {
        if (auto done = set_crs(placed, columns, table.crs, "file"); !done)
            return tl::unexpected(done.error());
        return placed;
    }
    if (placed.kind == Placed::Kind::lon_lat) {
        const auto user = user_crs.empty() ? Expected<CrsFacts>(CrsFacts()) : crs_facts(user_crs);
        if (!user) return tl::unexpected(user.error());
        placed.crs = user->is_geographic ? user_crs : kWgs84;
        placed.crs_from = user->is_geographic ? "user" : "guess";
        return placed;
    }
    std::string crs = user_crs, from = "user";
    if (crs.empty() && look_like_degrees(coordinates_of(table, columns, placed))) {
        crs = kWgs84;
        from = "guess";
    }
    if (!crs.empty())
        if (auto done = set_crs(placed, columns, crs, from); !done) return tl::unexpected(done.error());
    return placed;
}

Expected<void> set_crs(Placed& placed, const Columns& columns, const std::string& crs,
                       const std::string& crs_from) {
    placed.crs = crs;
    placed.crs_from = crs_from;
    if (placed.kind != Placed::Kind::columns) return {};
    const auto factor = column_factor(columns, placed);
    if (!factor) return tl::unexpected(factor.error());
    placed.to_crs_unit = *factor;
    return {};
}

std::optional<Xy> middle_of(const Table& table, const Columns& columns, const Placed& placed) {
    Coordinates all = coordinates_of(table, columns, placed);
    if (all.x.empty()) return std::nullopt;
    return Xy{middle(std::move(all.x)), middle(std::move(all.y))};
}

Expected<PlaceReader> PlaceReader::make(TableReader& in, const Placed& placed,
                                        const std::string& project_crs) {
    std::optional<CrsTransform> transform;
    if (placed.kind != Placed::Kind::none && placed.crs != project_crs) {
        auto made = CrsTransform::make(placed.crs, project_crs);
        if (!made) return tl::unexpected(made.error());
        transform = std::move(*made);
    }
    return PlaceReader(in, placed, std::move(transform));
}

PlaceReader::PlaceReader(TableReader& in, Placed placed, std::optional<CrsTransform> transform)
    : in_(&in), placed_(std::move(placed)), transform_(std::move(transform)) {
    if (placed_.kind != Placed::Kind::columns && placed_.kind != Placed::Kind::lon_lat) return;
    x_.emplace(in, placed_.x_field, -kAnyNumber, kAnyNumber);
    y_.emplace(in, placed_.y_field, -kAnyNumber, kAnyNumber);
}

std::optional<MapPoint> PlaceReader::projected(double x, double y) const {
    if (!transform_) return MapPoint{x, y};
    return (*transform_)(x, y);
}

std::optional<MapPoint> PlaceReader::projected_or_said(double x, double y) const {
    const auto place = projected(x, y);
    if (!place)
        in_->add_finding("number-unreadable", fmt::format("coordinates {}, {}", x, y),
                         fmt::format("a place in {}", placed_.crs.substr(0, 40)),
                         "mend the coordinates; the record is without a place until then");
    return place;
}

std::optional<MapPoint> PlaceReader::operator()() const {
    if (placed_.kind == Placed::Kind::shapes) {
        const Shape& shape = in_->table().shapes[in_->row()];
        if (shape.kind != ShapeKind::point || shape.parts.empty() || shape.parts.front().empty())
            return std::nullopt;
        return projected_or_said(shape.parts.front().front().x, shape.parts.front().front().y);
    }
    if (!x_ || !y_) return std::nullopt;
    const auto x = x_->as_given();
    const auto y = y_->as_given();
    if (!x || !y) return std::nullopt;
    return projected_or_said(*x * placed_.to_crs_unit, *y * placed_.to_crs_unit);
}

std::vector<std::vector<MapPoint>> PlaceReader::parts(const Shape& shape) const {
    std::vector<std::vector<MapPoint>> all;
    for (const auto& part : shape.parts) {
        std::vector<MapPoint> points;
        points.reserve(part.size());
        for (const Xy at : part)
            if (const auto point = projected(at.x, at.y)) points.push_back(*point);
        if (points.size() == part.size()) all.push_back(std::move(points));
    }
    return all;
}

} // namespace unstring
