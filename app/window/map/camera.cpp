#include "app/window/map/camera.h"

#include <algorithm>

namespace unstring {

void Camera::pan(QPointF by_px) {
    centre.x_m -= by_px.x() * m_per_px;
    centre.y_m += by_px.y() * m_per_px;
}

void Camera::zoom(double factor, QPointF at) {
    const MapPoint held = to_map(at);
    m_per_px = std::clamp(m_per_px / factor, kNearest_m_per_px, kFarthest_m_per_px);
    const MapPoint moved = to_map(at);
    centre.x_m += held.x_m - moved.x_m;
    centre.y_m += held.y_m - moved.y_m;
}

void Camera::fit(const MapBounds& bounds, double margin_px) {
    if (bounds.is_empty) return;
    centre = {(bounds.west_m + bounds.east_m) / 2, (bounds.south_m + bounds.north_m) / 2};
    const double wide = std::max(1.0, size.width() - 2 * margin_px),
                 high = std::max(1.0, size.height() - 2 * margin_px);
    m_per_px =
        std::clamp(std::max((bounds.east_m - bounds.west_m) / wide, (bounds.north_m - bounds.south_m) / high),
                   0.15, kFarthest_m_per_px);
}

} // namespace unstring
