#include <QPainterPath>

#include <algorithm>
#include <array>
#include <cmath>

#include "app/window/look/words.h"
#include "app/window/map/map_painter.h"

namespace unstring {
namespace {

struct LoopPens {
    QPen live, dead, casing;
};

LoopPens pens_of(const Look& look, bool is_chosen, double m_per_px) {
    QColor ink = look.ink;
    ink.setAlphaF(is_chosen ? 1.0F : 0.62F);
    const double thin = m_per_px > 8 ? 0.7 : 1.0;
    LoopPens pens{QPen(ink, (is_chosen ? 2.4 : 1.35) * thin, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin),
                  QPen(look.dead, (is_chosen ? 1.8 : 1.2) * thin, Qt::SolidLine, Qt::FlatCap),
                  QPen(look.street, is_chosen ? 6 : 3.5, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin)};
    pens.dead.setDashPattern(is_chosen ? QVector<double>{2.8, 2.2} : QVector<double>{2.9, 2.9});
    return pens;
}

// Places of positions 0..n+1; a station that is not known stands at the lamp next to it.
std::vector<QPointF> loop_points(const City& city, const StringLoop& loop, const Camera& camera) {
    std::vector<QPointF> points;
    const auto& station = city.strings[loop.string.place()].station;
    const auto at = [&](PoleIx pole) { return camera.to_screen(city.poles[pole.place()].place); };
    points.push_back(station ? camera.to_screen(*station) : at(loop.lamps.front()));
    for (const PoleIx lamp : loop.lamps) points.push_back(at(lamp));
    points.push_back(station ? camera.to_screen(*station) : at(loop.lamps.back()));
    return points;
}

void paint_loop(QPainter& painter, const Desk& desk, const Camera& camera, const StringLoop& loop,
                bool is_chosen) {
    const std::vector<QPointF> points = loop_points(desk.view().city, loop, camera);
    QPolygonF all;
    for (const QPointF point : points) all << point;
    if (!QRectF(QPointF(), camera.size).intersects(all.boundingRect().adjusted(-8, -8, 8, 8))) return;
    const LiveLoop live = live_loop(loop, desk.plan(), desk.year());
    const LoopPens pens = pens_of(desk.look(), is_chosen, camera.m_per_px);
    painter.setPen(pens.casing);
    if (camera.m_per_px < 4) painter.drawPolyline(all);
    QPainterPath whole, broken;
    for (std::size_t leg = 0; leg + 1 < points.size(); ++leg) {
        QPainterPath& path = live.legs[leg] != 0 ? whole : broken;
        if (path.elementCount() == 0 || path.currentPosition() != points[leg]) path.moveTo(points[leg]);
        path.lineTo(points[leg + 1]);
    }
    for (const int used : live.used) {
        const LoopCutBack& cut = loop.cutbacks[std::size_t(used)];
        whole.moveTo(points[std::size_t(cut.a)]);
        whole.lineTo(points[std::size_t(cut.b)]);
    }
    painter.setBrush(Qt::NoBrush);
    painter.setPen(pens.dead), painter.drawPath(broken);
    painter.setPen(pens.live), painter.drawPath(whole);
    if (camera.m_per_px > 4 || (!is_chosen && camera.m_per_px > 2)) return;
    for (const LoopCutBack& cut : loop.cutbacks) {
        const QPointF middle = (points[std::size_t(cut.a)] + points[std::size_t(cut.b)]) / 2;
        draw_cutback(painter, desk.look().ink, desk.look().street, middle, is_chosen ? 5 : 4, cut.confirmed);
    }
}

void paint_station(QPainter& painter, const Desk& desk, const Camera& camera, StringIx string,
                   std::vector<QRectF>& taken) {
    const City& city = desk.view().city;
    const Look& look = desk.look();
    const bool is_chosen = string == desk.chosen_string();
    const StringLoop& loop = desk.scene().loops[string.place()];
    const auto& station = city.strings[string.place()].station;
    const QPointF at = camera.to_screen(station ? *station : city.poles[loop.lamps.front().place()].place);
    if (station && camera.m_per_px <= 8) {
        painter.setPen(Qt::NoPen), painter.setBrush(look.street);
        painter.drawEllipse(at, 10, 7);
        draw_transformer(painter, look.ink, look.street, at, 5.2);
    }
    const QFont font = text_font(is_chosen ? 15 : 13, Weight::bold);
    const QFontMetricsF metrics(font);
    const QString name = to_q(city.strings[string.place()].id);
    // Beside the station where there is room; else a little lower or higher, else not at all.
    const double wide = metrics.horizontalAdvance(name);
    const std::array<QPointF, 6> shifts{QPointF(12, -6),          QPointF(12, 16),
                                        QPointF(-wide / 2, -24),  QPointF(-wide / 2, 34),
                                        QPointF(-12 - wide, -28), QPointF(-12 - wide, 40)};
    for (const QPointF shift : shifts) {
        const QRectF box = metrics.tightBoundingRect(name).translated(at + shift).adjusted(-4, -3, 4, 3);
        const bool is_free = std::none_of(taken.begin(), taken.end(),
                                          [&box](const QRectF& other) { return other.intersects(box); });
        const bool is_inside = QRectF(QPointF(), camera.size).contains(box);
        if ((!is_free || !is_inside) && !(is_chosen && shift == shifts.back())) continue;
        QPainterPath text;
        text.addText(at + shift, font, name);
        painter.strokePath(text, QPen(look.block, 4, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
        painter.fillPath(text, look.ink);
        taken.push_back(box);
        return;
    }
}

QPen span_pen(const Look& look, SpanKind kind) {
    QPen pen(look.rewire, 1.6, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin);
    if (kind == SpanKind::aerial) pen.setDashPattern({1, 3});
    if (kind == SpanKind::conduit) pen.setDashPattern({6, 2});
    return pen;
}

} // namespace

LiveLoop live_loop(const StringLoop& loop, const Plan& plan, int year) {
    LiveLoop live;
    std::vector<char> on(loop.lamps.size(), 1);
    for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
        on[i] = loop.burns[i] != 0 && !is_done_by(plan, loop.lamps[i], year) ? 1 : 0;
        live.lamps += on[i];
    }
    live.legs.assign(loop.lamps.size() + 1, live.lamps > 0 ? 1 : 0);
    if (live.lamps == 0) return live;
    live.used = string_state(loop, on).used;
    for (const int used : live.used) {
        const LoopCutBack& cut = loop.cutbacks[std::size_t(used)];
        for (int leg = cut.a; leg < cut.b; ++leg) live.legs[std::size_t(leg)] = 0;
    }
    return live;
}

void paint_strings(QPainter& painter, const Desk& desk, const Camera& camera) {
    painter.setRenderHint(QPainter::Antialiasing);
    const StringIx chosen = desk.chosen_string();
    for (const StringIx string : desk.scene().series)
        if (string != chosen) paint_loop(painter, desk, camera, desk.scene().loops[string.place()], false);
    const bool has_chosen = chosen.is_valid() && !desk.scene().loops[chosen.place()].lamps.empty();
    if (has_chosen) paint_loop(painter, desk, camera, desk.scene().loops[chosen.place()], true);
}

void paint_stations(QPainter& painter, const Desk& desk, const Camera& camera) {
    painter.setRenderHint(QPainter::Antialiasing);
    const StringIx chosen = desk.chosen_string();
    const bool has_chosen = chosen.is_valid() && !desk.scene().loops[chosen.place()].lamps.empty();
    std::vector<QRectF> taken;
    if (has_chosen) paint_station(painter, desk, camera, chosen, taken);
    for (const StringIx string : desk.scene().series)
        if (string != chosen) paint_station(painter, desk, camera, string, taken);
}

void paint_circuits(QPainter& painter, const Desk& desk, const Camera& camera) {
    if (camera.m_per_px > 4) return;
    const Look& look = desk.look();
    painter.setRenderHint(QPainter::Antialiasing);
    if (desk.view().decide) {
        painter.setFont(text_font(10));
        for (const CircuitSpan& span : desk.view().decide->spans) {
            QPolygonF points;
            for (const MapPoint point : span.line) points << camera.to_screen(point);
            const QRectF box = points.boundingRect().adjusted(-4, -4, 4, 4);
            if (points.size() < 2 || !QRectF(QPointF(), camera.size).intersects(box)) continue;
            painter.setPen(QPen(look.street, 4.4, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
            painter.drawPolyline(points);
            painter.setPen(span_pen(look, span.kind));
            painter.drawPolyline(points);
            if (camera.m_per_px >= 0.6) continue;
            const QPointF middle = (points.first() + points.last()) / 2;
            painter.setPen(look.ink2);
            painter.drawText(
                middle + QPointF(5, -4),
                QObject::tr("%1 AWG, %2 m")
                    .arg(span.awg > 0 ? QString::number(span.awg) : QStringLiteral("%1/0").arg(1 - span.awg),
                         number_text(span.length_m)));
        }
    }
    if (camera.m_per_px > 2.5) return;
    for (const ServicePoint& service : desk.view().city.services)
        if (service.has_place)
            draw_service(painter, look, service.kind, camera.to_screen(service.place),
                         camera.m_per_px < 0.6 ? 5.5 : 4);
}

} // namespace unstring
