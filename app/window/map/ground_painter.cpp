#include <QPainterPath>

#include <algorithm>
#include <cmath>
#include <set>

#include "app/window/look/words.h"
#include "app/window/map/map_painter.h"

namespace unstring {
namespace {

QRectF view_rectangle(const Camera& camera) { return {QPointF(-40, -40), camera.size + QSizeF(80, 80)}; }

QPolygonF on_screen(const std::vector<MapPoint>& line, const Camera& camera) {
    QPolygonF points;
    points.reserve(int(line.size()));
    for (const MapPoint point : line) points << camera.to_screen(point);
    return points;
}

// A level line has a box of no height, which intersects nothing.
bool is_in_view(const QPolygonF& points, const QRectF& view) {
    return view.intersects(points.boundingRect().adjusted(-0.5, -0.5, 0.5, 0.5));
}

void paint_streets(QPainter& painter, const Look& look, const Camera& camera, const City& city,
                   const QRectF& view) {
    for (const Street& street : city.streets) {
        const bool is_main = street.road_class == "arterial" || street.road_class == "collector";
        if (camera.m_per_px > 8 && !is_main) continue;
        const QPolygonF points = on_screen(street.line, camera);
        if (!is_in_view(points, view)) continue;
        const double width = std::max(street.width_m.value_or(is_main ? 14.0 : 10.0) / camera.m_per_px,
                                      camera.m_per_px > 4 ? 1.2 : 2.0);
        painter.setPen(QPen(look.street, width, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
        painter.drawPolyline(points);
    }
}

void paint_areas(QPainter& painter, const Look& look, const Camera& camera, const City& city,
                 const QRectF& view) {
    if (camera.m_per_px <= 3) {
        painter.setPen(QPen(look.block_edge, 0.8));
        painter.setBrush(look.building);
        for (const Obstacle& building : city.obstacles) {
            const QPolygonF points = on_screen(building.ring, camera);
            if (is_in_view(points, view)) painter.drawPolygon(points);
        }
    }
    if (camera.m_per_px > 8) return;
    QPainterPath crowns; // one path, so that crowns that overlap are no darker
    crowns.setFillRule(Qt::WindingFill);
    for (const CanopyArea& crown : city.canopy) {
        const QPolygonF points = on_screen(crown.ring, camera);
        if (is_in_view(points, view)) crowns.addPolygon(points);
    }
    painter.fillPath(crowns, look.canopy);
}

void paint_tint(QPainter& painter, const Look& look, const Camera& camera, const CanopyTint& tint) {
    if (tint.is_empty() || camera.m_per_px > 8) return;
    // Only the cells in view are coloured, so that a close look costs no more than a far one.
    const MapPoint low = camera.low(), high = camera.high();
    const int left = std::max(0, int((low.x_m - tint.west_m) / tint.cell_m) - 1);
    const int right = std::min(tint.cover.width(), int((high.x_m - tint.west_m) / tint.cell_m) + 2);
    const int top = std::max(0, int((tint.north_m - high.y_m) / tint.cell_m) - 1);
    const int bottom = std::min(tint.cover.height(), int((tint.north_m - low.y_m) / tint.cell_m) + 2);
    if (left >= right || top >= bottom) return;
    QImage part = tint.cover.copy(left, top, right - left, bottom - top);
    QImage coloured(part.size(), QImage::Format_ARGB32_Premultiplied);
    coloured.fill(look.canopy);
    QPainter mask(&coloured);
    mask.setCompositionMode(QPainter::CompositionMode_DestinationIn);
    mask.drawImage(0, 0, part);
    mask.end();
    const QPointF corner =
        camera.to_screen({tint.west_m + left * tint.cell_m, tint.north_m - top * tint.cell_m});
    const double scale = tint.cell_m / camera.m_per_px;
    painter.setRenderHint(QPainter::SmoothPixmapTransform);
    painter.drawImage(QRectF(corner, QSizeF(coloured.width() * scale, coloured.height() * scale)), coloured);
}

// A name stands once, on the longest straight piece in view that can hold it.
void paint_street_names(QPainter& painter, const Look& look, const Camera& camera, const City& city,
                        const QRectF& view) {
    if (camera.m_per_px > 2) return;
    const QFont font = text_font(10.5);
    const QFontMetricsF metrics(font);
    painter.setFont(font);
    std::set<std::string> named;
    std::vector<QRectF> taken;
    for (const Street& street : city.streets) {
        if (street.name.empty() || named.contains(street.name)) continue;
        const QString name = to_q(street.name);
        const double width = metrics.horizontalAdvance(name);
        for (std::size_t i = 1; i < street.line.size(); ++i) {
            const QPointF a = camera.to_screen(street.line[i - 1]), b = camera.to_screen(street.line[i]);
            const QPointF middle = (a + b) / 2;
            const QRectF box(middle - QPointF(width / 2, width / 2), QSizeF(width, width));
            const bool is_free = std::none_of(taken.begin(), taken.end(),
                                              [&box](const QRectF& other) { return other.intersects(box); });
            if (std::hypot(b.x() - a.x(), b.y() - a.y()) < width + 30 || !view.contains(box) || !is_free)
                continue;
            double angle = std::atan2(b.y() - a.y(), b.x() - a.x()) / kRadPerDeg;
            if (angle > 90) angle -= 180;
            if (angle <= -90) angle += 180;
            painter.save();
            painter.translate(middle);
            painter.rotate(angle);
            QPainterPath text;
            text.addText(-width / 2, metrics.capHeight() / 2, font, name);
            painter.strokePath(text, QPen(look.street, 3, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
            painter.fillPath(text, look.ink3);
            painter.restore();
            named.insert(street.name);
            taken.push_back(box);
            break;
        }
    }
}

} // namespace

void paint_ground(QPainter& painter, const Desk& desk, const Camera& camera, const CanopyTint& tint) {
    const Look& look = desk.look();
    const City& city = desk.view().city;
    const QRectF view = view_rectangle(camera);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.fillRect(view, look.block);
    paint_streets(painter, look, camera, city, view);
    paint_areas(painter, look, camera, city, view);
    paint_tint(painter, look, camera, tint);
    paint_street_names(painter, look, camera, city, view);
}

void paint_scale(QPainter& painter, const Look& look, const Camera& camera) {
    double step_m = 1;
    for (const double candidate_m : {2., 5., 10., 20., 50., 100., 200., 500., 1000., 2000., 5000., 10000.})
        if (candidate_m / camera.m_per_px <= 150) step_m = candidate_m;
    const double length = step_m / camera.m_per_px;
    const QPointF from(18, camera.size.height() - 14);
    const QFont font = text_font(11);
    const QFontMetricsF metrics(font);
    const QString end =
        step_m < 1000 ? QObject::tr("%1 m").arg(step_m) : QObject::tr("%1 km").arg(step_m / 1000);
    QColor ground = look.sheet;
    ground.setAlpha(215);
    painter.fillRect(QRectF(8, from.y() - 26, length + metrics.horizontalAdvance(end) + 46, 36), ground);
    painter.setPen(QPen(look.ink, 1.4));
    painter.setFont(font);
    painter.drawLine(from, from + QPointF(length, 0));
    for (const double part : {0.0, 0.5, 1.0})
        painter.drawLine(from + QPointF(length * part, 0), from + QPointF(length * part, -5));
    painter.drawText(from + QPointF(-4, -9), QStringLiteral("0"));
    painter.drawText(from + QPointF(length - 8, -9), end);
    const QPointF north = from + QPointF(length + metrics.horizontalAdvance(end) + 8, -2);
    QPainterPath needle;
    needle.moveTo(north + QPointF(0, -18)), needle.lineTo(north + QPointF(5, 2));
    needle.lineTo(north + QPointF(0, -3)), needle.lineTo(north + QPointF(-5, 2));
    needle.closeSubpath();
    painter.fillPath(needle, look.ink);
    painter.drawText(north + QPointF(8, 0), QObject::tr("N"));
}

} // namespace unstring
