#include "model/sun/horizon_polygons.h"

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

void raise(float& height_deg, double above_m, double distance_m) {
    const double angle_deg = std::atan(above_m / std::max(kNearStart_m, distance_m)) / kRadPerDeg;
    height_deg = std::max(height_deg, static_cast<float>(angle_deg));
}

/// Distance along a ray to the line through an edge; negative behind.
double ray_to_edge_m(MapPoint place, double azimuth_deg, MapPoint a, MapPoint b) {
    const double east = std::sin(azimuth_deg * kRadPerDeg);
    const double north = std::cos(azimuth_deg * kRadPerDeg);
    const double along_x = b.x_m - a.x_m;
    const double along_y = b.y_m - a.y_m;
    const double across = east * along_y - north * along_x;
    if (across == 0) return std::min(distance_m(place, a), distance_m(place, b));
    return ((a.x_m - place.x_m) * along_y - (a.y_m - place.y_m) * along_x) / across;
}

void raise_by_edge(MapPoint a, MapPoint b, double above_m, MapPoint place, std::span<float> height_deg) {
    const double from_deg = bearing_deg(place, a);
    const double turn_deg = std::remainder(bearing_deg(place, b) - from_deg, 360.0);
    const double low_deg = std::min(from_deg, from_deg + turn_deg);
    const double step_deg = 360.0 / static_cast<double>(height_deg.size());
    const auto size = static_cast<long>(height_deg.size());
    const auto first = static_cast<long>(std::ceil(low_deg / step_deg));
    const auto last = static_cast<long>(std::floor((low_deg + std::abs(turn_deg)) / step_deg));
    for (long i = first; i <= last; ++i) {
        const double reach_m = ray_to_edge_m(place, step_deg * static_cast<double>(i), a, b);
        if (reach_m >= 0)
            raise(height_deg[static_cast<std::size_t>((i % size + size) % size)], above_m, reach_m);
    }
}

} // namespace

bool is_inside(std::span<const MapPoint> ring, MapPoint place) {
    bool inside = false;
    for (std::size_t i = 0, before = ring.size() - 1; i < ring.size(); before = i++) {
        const MapPoint& a = ring[i];
        const MapPoint& b = ring[before];
        if ((a.y_m > place.y_m) == (b.y_m > place.y_m)) continue;
        if (place.x_m < (b.x_m - a.x_m) * (place.y_m - a.y_m) / (b.y_m - a.y_m) + a.x_m) inside = !inside;
    }
    return inside;
}

void raise_by_block(std::span<const MapPoint> ring, double above_m, MapPoint place,
                    std::span<float> height_deg) {
    if (above_m <= 0 || ring.size() < 3) return;
    if (is_inside(ring, place))
        for (float& height : height_deg) raise(height, above_m, kNearStart_m);
    for (std::size_t i = 0; i < ring.size(); ++i)
        raise_by_edge(ring[i], ring[(i + 1) % ring.size()], above_m, place, height_deg);
}

} // namespace unstring
