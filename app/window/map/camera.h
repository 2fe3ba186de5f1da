#pragma once
// Which part of the ground the map shows, and at what scale.

#include <QPointF>
#include <QRectF>
#include <QSizeF>

#include "app/window/scene.h"

namespace unstring {

struct Camera {
    MapPoint centre;
    double m_per_px = 1.5;
    QSizeF size{800, 500};

    [[nodiscard]] QPointF to_screen(MapPoint point) const {
        return {size.width() / 2 + (point.x_m - centre.x_m) / m_per_px,
                size.height() / 2 - (point.y_m - centre.y_m) / m_per_px};
    }
    [[nodiscard]] MapPoint to_map(QPointF point) const {
        return {centre.x_m + (point.x() - size.width() / 2) * m_per_px,
                centre.y_m - (point.y() - size.height() / 2) * m_per_px};
    }
    [[nodiscard]] MapPoint low() const { return to_map({0, size.height()}); }
    [[nodiscard]] MapPoint high() const { return to_map({size.width(), 0}); }

    void pan(QPointF by_px);
    /// factor > 1 comes nearer; the ground under `at` stays where it is.
    void zoom(double factor, QPointF at);
    void fit(const MapBounds& bounds, double margin_px);
};

inline constexpr double kNearest_m_per_px = 0.02;
inline constexpr double kFarthest_m_per_px = 400;

} // namespace unstring
