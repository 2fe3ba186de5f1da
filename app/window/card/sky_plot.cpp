#include "app/window/card/sky_plot.h"

#include <QPainter>
#include <QPainterPath>

#include <algorithm>
#include <array>
#include <cmath>

#include "app/window/look/words.h"

namespace unstring {

std::vector<SkyPoint> sun_path(double lat_deg, double declination_deg) {
    std::vector<SkyPoint> path;
    const double lat = lat_deg * kRadPerDeg, declination = declination_deg * kRadPerDeg;
    for (int minute = -12 * 60; minute <= 12 * 60; minute += 10) {
        const double hour_angle = minute / 4.0 * kRadPerDeg;
        const double up = std::sin(lat) * std::sin(declination) +
                          std::cos(lat) * std::cos(declination) * std::cos(hour_angle);
        if (up <= 0) continue;
        const double east = -std::cos(declination) * std::sin(hour_angle);
        const double north = std::cos(lat) * std::sin(declination) -
                             std::sin(lat) * std::cos(declination) * std::cos(hour_angle);
        double bearing = std::atan2(east, north) / kRadPerDeg;
        if (bearing < 0) bearing += 360;
        path.push_back({bearing, std::asin(std::min(1.0, up)) / kRadPerDeg});
    }
    return path;
}

double skyline_at(const std::vector<float>& heights_deg, double bearing_deg) {
    if (heights_deg.empty()) return 0;
    const auto count = double(heights_deg.size());
    double at = std::fmod(bearing_deg, 360.0) / 360.0 * count;
    if (at < 0) at += count;
    const auto low = std::size_t(at) % heights_deg.size(), high = (low + 1) % heights_deg.size();
    const double part = at - std::floor(at);
    return double(heights_deg[low]) * (1 - part) + double(heights_deg[high]) * part;
}

SkyPlot::SkyPlot(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("sky_plot");
    setMinimumHeight(236);
}

void SkyPlot::set_pole(PoleIx pole) {
    pole_ = pole;
    setAccessibleName(
        tr("Sky above the pole: canopy and buildings round the compass, the sun's way on three dates"));
    update();
}

QPointF SkyPlot::on_plot(double grid_bearing_deg, double elevation_deg) const {
    const double r = radius_ * (90 - std::clamp(elevation_deg, 0.0, 90.0)) / 90,
                 angle = grid_bearing_deg * kRadPerDeg;
    return centre_ + QPointF(r * std::sin(angle), -r * std::cos(angle));
}

void SkyPlot::paint_skyline(QPainter& painter, const std::vector<float>& heights_deg, const QBrush& brush,
                            const QColor& edge) {
    if (heights_deg.empty()) return;
    QPainterPath area;
    area.setFillRule(Qt::OddEvenFill);
    area.addEllipse(centre_, radius_, radius_);
    QPolygonF line;
    for (std::size_t i = 0; i < heights_deg.size(); ++i)
        line << on_plot(360.0 * double(i) / double(heights_deg.size()), heights_deg[i]);
    area.addPolygon(line), area.closeSubpath();
    painter.fillPath(area, brush);
    painter.setPen(QPen(edge, 1)), painter.setBrush(Qt::NoBrush);
    painter.drawPolygon(line);
}

void SkyPlot::paint_sun(QPainter& painter, const PoleShade& shade) {
    const Look& look = desk_.look();
    const double lat = desk_.view().city.centre.lat_deg, convergence = desk_.view().city.convergence_deg;
    const std::array<std::pair<double, QString>, 3> dates{
        {{23.44, tr("Jun 21")}, {0, tr("Mar 20")}, {-23.44, tr("Dec 21")}}};
    for (const auto& [declination, name] : dates) {
        const std::vector<SkyPoint> path = sun_path(lat, declination);
        const SkyPoint* highest = nullptr;
        for (std::size_t i = 0; i < path.size(); ++i) {
            const double grid = path[i].bearing_deg - convergence;
            if (highest == nullptr || path[i].elevation_deg > highest->elevation_deg) highest = &path[i];
            if (i == 0) continue;
            const double blocked =
                std::max(skyline_at(shade.canopy_deg, grid), skyline_at(shade.solid_deg, grid));
            QPen pen(look.sun_path, path[i].elevation_deg > blocked ? 2.4 : 1.3);
            if (path[i].elevation_deg <= blocked) pen.setDashPattern({2, 2});
            painter.setPen(pen);
            painter.drawLine(on_plot(path[i - 1].bearing_deg - convergence, path[i - 1].elevation_deg),
                             on_plot(grid, path[i].elevation_deg));
        }
        if (highest == nullptr) continue;
        const QPointF at = on_plot(highest->bearing_deg - convergence, highest->elevation_deg);
        QPainterPath text;
        text.addText(at + QPointF(-18, -4), text_font(10.5), name);
        painter.strokePath(text, QPen(look.sheet, 3));
        painter.fillPath(text, look.ink);
    }
}

void SkyPlot::paint_key(QPainter& painter, const PoleShade& shade) {
    const Look& look = desk_.look();
    double y = 34;
    const double x = centre_.x() + radius_ + 42;
    painter.setFont(text_font(11.5));
    const auto line = [&](const QString& word, const auto& draw) {
        draw(QPointF(x, y));
        painter.setPen(look.ink);
        painter.drawText(QPointF(x + 24, y + 4), word);
        y += 19;
    };
    line(tr("crowns, leaf on"), [&](QPointF at) {
        painter.fillRect(QRectF(at.x(), at.y() - 5, 16, 10), look.canopy), painter.setPen(look.ink3),
            painter.setBrush(Qt::NoBrush), painter.drawRect(QRectF(at.x(), at.y() - 5, 16, 10));
    });
    line(tr("buildings"), [&](QPointF at) {
        painter.fillRect(QRectF(at.x(), at.y() - 5, 16, 10), QBrush(look.other, Qt::BDiagPattern)),
            painter.setPen(look.ink3), painter.drawRect(QRectF(at.x(), at.y() - 5, 16, 10));
    });
    line(tr("sun seen"), [&](QPointF at) {
        painter.setPen(QPen(look.sun_path, 2.4)), painter.drawLine(at, at + QPointF(16, 0));
    });
    line(tr("sun hidden"), [&](QPointF at) {
        QPen pen(look.sun_path, 1.3);
        pen.setDashPattern({2, 2});
        painter.setPen(pen), painter.drawLine(at, at + QPointF(16, 0));
    });
    static const std::array<const char*, 8> kWinds{"N", "NE", "E", "SE", "S", "SW", "W", "NW"};
    const auto wind = std::size_t(std::lround(shade.bearing_deg / 45.0)) % 8;
    line(tr("panel looks %1 (%2)").arg(QLatin1String(kWinds[wind]), to_q(shade.bearing_from)),
         [&](QPointF at) {
             QPainterPath arrow(at + QPointF(8, -5));
             arrow.lineTo(at + QPointF(14, 5)), arrow.lineTo(at + QPointF(2, 5)), arrow.closeSubpath();
             painter.fillPath(arrow, look.solar);
         });
    if (std::any_of(shade.unknown_deg.begin(), shade.unknown_deg.end(),
                    [](float height) { return height > 0; }))
        line(tr("part of the sky unknown"),
             [&](QPointF at) { painter.fillRect(QRectF(at.x(), at.y() - 1.3, 9, 2.6), look.trouble); });
}

void SkyPlot::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    const PoleShade* shade =
        desk_.is_open() && desk_.view().shade && pole_.is_valid() ? desk_.view().shade->find(pole_) : nullptr;
    if (shade == nullptr) return;
    painter.setPen(look.ink), painter.setFont(text_font(12.5, Weight::bold));
    painter.drawText(QPointF(0, 12), tr("Sky above it, at %1 m").arg(number_text(shade->panel_height_m, 1)));
    painter.setPen(Qt::NoPen), painter.setBrush(look.raise), painter.drawEllipse(centre_, radius_, radius_);
    paint_skyline(painter, shade->canopy_deg, look.canopy,
                  look.is_night ? QColor("#5C9070") : QColor("#6F9060"));
    paint_skyline(painter, shade->solid_deg, QBrush(look.other, Qt::BDiagPattern), look.other);
    painter.setPen(QPen(look.hair, 1)), painter.setBrush(Qt::NoBrush);
    painter.drawEllipse(centre_, radius_ / 3, radius_ / 3),
        painter.drawEllipse(centre_, radius_ * 2 / 3, radius_ * 2 / 3);
    paint_sun(painter, *shade);
    painter.setPen(QPen(look.ink2, 1.6)), painter.setBrush(Qt::NoBrush),
        painter.drawEllipse(centre_, radius_, radius_);
    painter.setFont(text_font(11)), painter.setPen(look.ink2);
    const std::array<std::pair<const char*, double>, 4> winds{{{"N", 0}, {"E", 90}, {"S", 180}, {"W", 270}}};
    for (const auto& [name, bearing] : winds) {
        const double angle = (bearing - desk_.view().city.convergence_deg) * kRadPerDeg;
        const QPointF at = centre_ + QPointF(std::sin(angle), -std::cos(angle)) * (radius_ + 10);
        painter.drawText(QRectF(at.x() - 12, at.y() - 8, 24, 16), Qt::AlignCenter, QLatin1String(name));
    }
    painter.save();
    painter.translate(centre_ + QPointF(std::sin(shade->bearing_deg * kRadPerDeg),
                                        -std::cos(shade->bearing_deg * kRadPerDeg)) *
                                    (radius_ + 4));
    painter.rotate(shade->bearing_deg);
    QPainterPath arrow(QPointF(0, -7));
    arrow.lineTo(5, 3), arrow.lineTo(-5, 3), arrow.closeSubpath();
    painter.fillPath(arrow, look.solar);
    painter.restore();
    paint_key(painter, *shade);
}

} // namespace unstring
