#pragma once
// Geometries as GeoPackage stores them: a header with the envelope, then well-known binary (little endian, x
// then y). Source: OGC 12-128r18, clause 2.1.3 (StandardGeoPackageBinary).

#include <optional>
#include <span>
#include <vector>

#include "model/quantities.h"

namespace unstring {

struct MapBox {
    MapPoint low, high;
};

[[nodiscard]] std::vector<unsigned char> point_blob(MapPoint point, int srs_id);
/// Empty when there are fewer than two points.
[[nodiscard]] std::vector<unsigned char> line_blob(std::span<const MapPoint> line, int srs_id);
/// One outer ring, closed here when it is not; empty when there are fewer than three points.
[[nodiscard]] std::vector<unsigned char> polygon_blob(std::span<const MapPoint> ring, int srs_id);

/// The points of a point, line or one-ring polygon; nothing when the bytes are not such a geometry.
[[nodiscard]] std::optional<std::vector<MapPoint>> points_of_blob(std::span<const unsigned char> blob);
/// From the header where it is there, else from the points.
[[nodiscard]] std::optional<MapBox> geometry_envelope(std::span<const unsigned char> blob);

} // namespace unstring
