#include "app/paper/loop_sketch.h"

#include <algorithm>
#include <cmath>

#include <QFontMetricsF>

namespace unstring {
namespace {

constexpr double kSign = 4.2 * kPoint;

struct View { ///< metres to paper
    double west = 0, north = 0, scale = 1, x = 0, y = 0;
    QPointF operator()(MapPoint place) const {
        return {x + (place.x_m - west) * scale, y + (north - place.y_m) * scale};
    }
};

View view_of(const std::vector<LoopBead>& loop, double x, double y, double width, double height) {
    double west = loop.front().place.x_m, east = west, south = loop.front().place.y_m, north = south;
    for (const LoopBead& bead : loop) {
        west = std::min(west, bead.place.x_m);
        east = std::max(east, bead.place.x_m);
        south = std::min(south, bead.place.y_m);
        north = std::max(north, bead.place.y_m);
    }
    const double pad = 22 * kPoint;
    View view;
    view.scale = std::min((width - 2 * pad) / std::max(1.0, east - west),
                          (height - 2 * pad) / std::max(1.0, north - south));
    view.west = west;
    view.north = north;
    view.x = x + (width - (east - west) * view.scale) / 2;
    view.y = y + (height - (north - south) * view.scale) / 2;
    return view;
}

void draw_legs(QPainter& painter, const std::vector<LoopBead>& loop, const View& view) {
    for (std::size_t i = 1; i < loop.size(); ++i) {
        const bool is_live = loop[i - 1].cable_live_after && loop[i].cable_live_after;
        painter.setPen(
            QPen(Qt::black, (is_live ? 1.6 : 0.8) * kPoint, is_live ? Qt::SolidLine : Qt::DashLine));
        painter.drawLine(view(loop[i - 1].place), view(loop[i].place));
    }
}

void draw_sign(QPainter& painter, const LoopBead& bead, QPointF at) {
    painter.setPen(QPen(Qt::black, 1.2 * kPoint));
    if (!bead.leaves_now && !bead.burns_after) {
        painter.drawLine(at + QPointF(-kSign / 2, -kSign / 2), at + QPointF(kSign / 2, kSign / 2));
        painter.drawLine(at + QPointF(-kSign / 2, kSign / 2), at + QPointF(kSign / 2, -kSign / 2));
        return;
    }
    painter.setBrush(bead.leaves_now ? Qt::black : Qt::white);
    painter.drawEllipse(at, kSign, kSign);
    painter.setBrush(Qt::NoBrush);
}

/// Names where they hide neither a sign nor another name; poles of this order first, all of them stand in the
/// table too.
void draw_names(QPainter& painter, const std::vector<LoopBead>& loop, const View& view, const QRectF& frame) {
    std::vector<QRectF> taken;
    for (const LoopBead& bead : loop) {
        const QPointF at = view(bead.place);
        taken.emplace_back(at.x() - kSign, at.y() - kSign, 2 * kSign, 2 * kSign);
    }
    for (const bool for_now : {true, false}) {
        const QFont font = paper_font(for_now ? Type::strong : Type::small);
        const QFontMetricsF metrics(font, painter.device());
        painter.setFont(font);
        for (const LoopBead& bead : loop) {
            if (bead.leaves_now != for_now) continue;
            const QString name = QString::fromStdString(bead.id);
            const double w = metrics.horizontalAdvance(name), h = metrics.height();
            const QPointF at = view(bead.place);
            for (const QPointF& corner : {QPointF(kSign * 1.4, -h / 2), QPointF(-kSign * 1.4 - w, -h / 2),
                                          QPointF(-w / 2, kSign * 1.3), QPointF(-w / 2, -kSign * 1.3 - h)}) {
                const QRectF place(at + corner, QSizeF(w, h));
                const auto hides = [&](const QRectF& other) { return other.intersects(place); };
                if (!frame.contains(place) || std::any_of(taken.begin(), taken.end(), hides)) continue;
                painter.fillRect(place, Qt::white);
                painter.setPen(Qt::black);
                painter.drawText(place, Qt::AlignCenter, name);
                taken.push_back(place);
                break;
            }
        }
    }
}

void draw_scale(const Sheet& sheet, const View& view, double x, double y, double height) {
    double bar_m = 1000;
    while (bar_m * view.scale > 120 * kPoint && bar_m > 1)
        bar_m = bar_m == 1000 || bar_m == 100 || bar_m == 10 ? bar_m / 2 : bar_m / 5;
    const double at = y + height - 12 * kPoint, from = x + 8 * kPoint;
    sheet.rule(from, from + bar_m * view.scale, at, 1.2);
    sheet.text(from, at + 1 * kPoint, 100 * kPoint, QStringLiteral("%1 m, north up").arg(bar_m), Type::small);
}

} // namespace

void draw_loop(const Sheet& sheet, const WorkOrder& order, double x, double y, double width, double height) {
    sheet.box(x, y, width, height, 0.8);
    if (sheet.painter() == nullptr || order.loop.empty()) return;
    QPainter& painter = *sheet.painter();
    painter.save();
    painter.setClipRect(QRectF(x, y, width, height));
    const View view = view_of(order.loop, x, y, width, height);
    draw_legs(painter, order.loop, view);
    for (const LoopBead& bead : order.loop) draw_sign(painter, bead, view(bead.place));
    draw_names(painter, order.loop, view,
               QRectF(x, y, width, height).adjusted(2 * kPoint, 2 * kPoint, -2 * kPoint, -2 * kPoint));
    draw_scale(sheet, view, x, y, height);
    painter.restore();
}

} // namespace unstring
