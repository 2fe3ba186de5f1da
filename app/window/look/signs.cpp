#include "app/window/look/signs.h"

#include <QFontMetricsF>
#include <QPainterPath>

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

QPainterPath notched_disc(double r, double half_angle_deg, double apex_below_top) {
    QPainterPath path;
    path.moveTo(0, -r + apex_below_top);
    path.arcTo(QRectF(-r, -r, 2 * r, 2 * r), 90 - half_angle_deg, -(360 - 2 * half_angle_deg));
    path.closeSubpath();
    return path;
}

QPainterPath cross(double r) {
    QPainterPath path;
    path.moveTo(-r, -r), path.lineTo(r, r);
    path.moveTo(-r, r), path.lineTo(r, -r);
    return path;
}

} // namespace

PoleSign sign_of(Choice choice) {
    switch (choice) {
    case Choice::keep:
        return PoleSign::keep;
    case Choice::rewire:
        return PoleSign::rewire;
    case Choice::solar:
        return PoleSign::solar;
    case Choice::undecided:
        break;
    }
    return PoleSign::undecided;
}

QColor sign_color(const Look& look, PoleSign sign) {
    switch (sign) {
    case PoleSign::rewire:
        return look.rewire;
    case PoleSign::solar:
        return look.solar;
    case PoleSign::parallel:
    case PoleSign::out_of_plan:
        return look.other;
    case PoleSign::undecided:
        return look.ink3;
    case PoleSign::keep:
        break;
    }
    return look.ink;
}

QPainterPath sign_path(PoleSign sign, double r, bool on_bead) {
    QPainterPath path;
    switch (sign) {
    case PoleSign::rewire:
        path.addRect(QRectF(-0.86 * r, -0.86 * r, 1.72 * r, 1.72 * r));
        return path;
    case PoleSign::solar:
        return on_bead ? notched_disc(r, 27, 0.34 * r) : notched_disc(r, 32, 0.95 * r);
    case PoleSign::out_of_plan:
        return cross(r * 0.6);
    case PoleSign::parallel:
        path.addEllipse(QPointF(), 1.7, 1.7);
        return path;
    case PoleSign::keep:
    case PoleSign::undecided:
        break;
    }
    path.addEllipse(QPointF(), r - 1, r - 1);
    return path;
}

void draw_pole_sign(QPainter& painter, const Look& look, PoleSign sign, bool is_done, QPointF at, double r,
                    bool with_halo) {
    const QPainterPath path = sign_path(sign, r);
    const QColor color = sign_color(look, sign);
    painter.save();
    painter.translate(at);
    if (with_halo && sign != PoleSign::parallel) {
        painter.setPen(QPen(look.street, 3.2 + (is_done ? 0 : 1.8)));
        painter.setBrush(look.street);
        painter.drawPath(path);
    }
    if (sign == PoleSign::parallel) {
        painter.setPen(Qt::NoPen), painter.setBrush(color);
    } else if (sign == PoleSign::undecided || sign == PoleSign::out_of_plan) {
        painter.setPen(QPen(color, 1.4)), painter.setBrush(look.street);
    } else if (sign == PoleSign::keep) {
        painter.setPen(QPen(color, 2)), painter.setBrush(look.street);
    } else if (is_done) {
        painter.setPen(Qt::NoPen), painter.setBrush(color);
    } else {
        painter.setPen(QPen(color, 1.6)), painter.setBrush(look.street);
    }
    painter.drawPath(path);
    painter.restore();
}

void draw_transformer(QPainter& painter, const QColor& ink, const QColor& ground, QPointF at, double r) {
    const double offset = 0.62 * r;
    painter.setPen(QPen(ink, 1.4));
    painter.setBrush(ground);
    painter.drawEllipse(at + QPointF(-offset, 0), r, r);
    painter.setBrush(Qt::NoBrush);
    painter.drawEllipse(at + QPointF(offset, 0), r, r);
}

void draw_cutback(QPainter& painter, const QColor& ink, const QColor& ground, QPointF at, double half,
                  bool confirmed) {
    QPainterPath path;
    path.moveTo(at + QPointF(0, -half)), path.lineTo(at + QPointF(half, 0));
    path.lineTo(at + QPointF(0, half)), path.lineTo(at + QPointF(-half, 0));
    path.closeSubpath();
    QPen pen(ink, 1.2);
    if (!confirmed) pen.setDashPattern({1.5, 1.5});
    painter.setPen(pen);
    painter.setBrush(ground);
    painter.drawPath(path);
}

void draw_service(QPainter& painter, const Look& look, ServiceKind kind, QPointF at, double r) {
    QPen pen(look.ink2, 1.3);
    if (kind == ServiceKind::candidate) pen.setDashPattern({1.5, 1.5});
    painter.setPen(pen);
    painter.setBrush(look.street);
    if (kind == ServiceKind::circuit_end) {
        painter.drawLine(at + QPointF(-r, -r), at + QPointF(-r, r));
        painter.drawLine(at + QPointF(-r, 0), at + QPointF(r, 0));
        return;
    }
    QPainterPath path; // a triangle standing on its base: a lead that comes down
    path.moveTo(at + QPointF(0, -r)), path.lineTo(at + QPointF(r, r)), path.lineTo(at + QPointF(-r, r));
    path.closeSubpath();
    painter.drawPath(path);
}

void draw_tag(QPainter& painter, const Look& look, QPointF at, const QString& text, const QColor& border,
              const QRectF& inside, TagSide side) {
    const QFont font = text_font(12.5, Weight::strong);
    const QFontMetricsF metrics(font);
    const QStringList lines = text.split('\n');
    double width = 0;
    for (const QString& line : lines) width = std::max(width, metrics.horizontalAdvance(line));
    QRectF box(at.x() + 14, at.y() - 14 - 16.0 * double(lines.size()) - 10, width + 24,
               16.0 * double(lines.size()) + 12);
    if (side == TagSide::left) box.moveTo(at.x() - box.width() - 12, at.y() - box.height() / 2);
    const bool has_leader = side == TagSide::left && box.left() >= inside.left() + 4;
    if (side == TagSide::left && !has_leader) box.moveTop(at.y() + 24);
    if (box.right() > inside.right() - 4) box.moveRight(std::min(at.x() - 14, inside.right() - 4));
    if (box.left() < inside.left() + 4) box.moveLeft(inside.left() + 4);
    if (box.top() < inside.top() + 4) box.moveTop(at.y() + 20);
    if (box.bottom() > inside.bottom() - 4) box.moveBottom(inside.bottom() - 4);
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    if (has_leader) painter.setPen(QPen(border, 1.4)), painter.drawLine(QPointF(box.right(), at.y()), at);
    painter.setPen(Qt::NoPen);
    painter.setBrush(look.shadow);
    painter.drawRoundedRect(box.translated(0, 3), 4, 4);
    painter.setPen(QPen(border, 1.4));
    painter.setBrush(look.raise);
    painter.drawRoundedRect(box, 4, 4);
    painter.setPen(look.ink);
    painter.setFont(font);
    double y = box.top() + 6;
    for (const QString& line : lines) {
        painter.drawText(QRectF(box.left() + 12, y, width + 4, 16), Qt::AlignLeft | Qt::AlignVCenter, line);
        y += 16;
    }
    painter.restore();
}

} // namespace unstring
