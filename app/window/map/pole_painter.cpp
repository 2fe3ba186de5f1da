#include <algorithm>
#include <cmath>

#include "app/window/look/words.h"
#include "app/window/map/map_painter.h"

namespace unstring {
namespace {

double sign_radius(double m_per_px) {
    return m_per_px > 8 ? 1.6 : m_per_px > 4 ? 2.2 : m_per_px > 2 ? 3.4 : m_per_px > 0.6 ? 4.6 : 7;
}

// Shade score 0 (open) to 1 (dark) in five steps of the leaf's hue; nothing known stays grey.
QColor shade_tone(const Look& look, double score) {
    const double step = std::clamp(std::floor(score * 5.0), 0.0, 4.0) / 4.0;
    const QColor open = look.is_night ? QColor("#2E4A3A") : QColor("#D5E6CB"),
                 dark = look.is_night ? QColor("#BFE8C9") : QColor("#1F4D2B");
    const auto mixed = [step](int a, int b) { return int(std::lround(a + (b - a) * step)); };
    return {mixed(open.red(), dark.red()), mixed(open.green(), dark.green()),
            mixed(open.blue(), dark.blue())};
}

QColor pole_tone(const Desk& desk, PoleIx pole, PoleColour colour) {
    const PlanSettings& settings = desk.plan().settings;
    const int year = desk.plan().poles[pole.place()].year;
    if (colour == PoleColour::year && year >= settings.first_year)
        return year_tone(desk.look(), year - settings.first_year, settings.years);
    if (colour == PoleColour::shade && desk.view().shade) {
        const PoleShade* shade = desk.view().shade->find(pole);
        if (shade != nullptr && shade->best >= 0)
            return shade_tone(desk.look(), shade->heads[std::size_t(shade->best)].shade_score);
    }
    return {};
}

void paint_selected(QPainter& painter, const Look& look, QPointF at, double r) {
    painter.setBrush(Qt::NoBrush);
    painter.setPen(QPen(look.street, 5));
    painter.drawEllipse(at, r + 5.9, r + 5.9);
    painter.setPen(QPen(look.ink, 1.8));
    painter.drawEllipse(at, r + 5.9, r + 5.9);
}

void paint_orders(QPainter& painter, const Look& look, const PolePlan& row, QPointF at, double r) {
    painter.setPen(Qt::NoPen);
    painter.setBrush(look.ink);
    if (row.lock != Choice::undecided) painter.drawRect(QRectF(at.x() - 5, at.y() + r + 2.5, 10, 2));
    if (row.mark != Choice::undecided) painter.drawEllipse(at + QPointF(0, -r - 3.5), 1.9, 1.9);
}

} // namespace

PoleSign pole_sign(const ProjectView& view, const Plan& plan, PoleIx pole) {
    const Pole& record = view.city.poles[pole.place()];
    if (is_candidate(view.city, record)) return sign_of(plan.poles[pole.place()].choice);
    if (is_parallel(view.city, record) && record.status == PoleStatus::standing) return PoleSign::parallel;
    return PoleSign::out_of_plan;
}

bool is_done_by(const Plan& plan, PoleIx pole, int year) {
    const PolePlan& row = plan.poles[pole.place()];
    return row.year != 0 && row.year <= year && (row.choice == Choice::rewire || row.choice == Choice::solar);
}

const QPixmap& PolePainter::stamp(const Look& look, PoleSign sign, bool is_done, double r, bool with_halo,
                                  QColor tone, double ratio) {
    const std::string key = std::to_string(int(sign)) + (is_done ? "d" : "t") + (with_halo ? "h" : "n") +
                            (look.is_night ? "n" : "d") + std::to_string(int(r * 10)) + "_" +
                            std::to_string(int(ratio * 100)) + "_" +
                            (tone.isValid() ? tone.name().toStdString() : std::string());
    const auto found = stamps_.find(key);
    if (found != stamps_.end()) return found->second;
    const int side = 2 * int(std::ceil(r + 5));
    QPixmap picture(QSize(side, side) * ratio);
    picture.setDevicePixelRatio(ratio);
    picture.fill(Qt::transparent);
    QPainter painter(&picture);
    painter.setRenderHint(QPainter::Antialiasing);
    Look toned = look;
    if (tone.isValid()) toned.rewire = toned.solar = toned.ink = toned.ink3 = tone;
    draw_pole_sign(painter, toned, sign, is_done || tone.isValid(), QPointF(side / 2.0, side / 2.0), r,
                   with_halo);
    if (tone.isValid() && sign != PoleSign::parallel) { // pale tones need an edge
        painter.translate(side / 2.0, side / 2.0);
        painter.setPen(QPen(look.ink2, 0.9));
        painter.setBrush(Qt::NoBrush);
        painter.drawPath(sign_path(sign, r));
    }
    painter.end();
    return stamps_.emplace(key, std::move(picture)).first->second;
}

void PolePainter::paint(QPainter& painter, const Desk& desk, const Camera& camera, const MapStyle& style) {
    const ProjectView& view = desk.view();
    const Plan& plan = desk.plan();
    const double margin_m = 20 * camera.m_per_px;
    const MapPoint low = camera.low(), high = camera.high();
    const double usual_r = sign_radius(camera.m_per_px), ratio = painter.device()->devicePixelRatioF();
    const bool with_text = camera.m_per_px < 0.6;
    std::vector<PoleIx> orders;
    desk.scene().grid.in_rectangle(
        {low.x_m - margin_m, low.y_m - margin_m}, {high.x_m + margin_m, high.y_m + margin_m},
        [&](const PickGrid::Place& place) {
            const PoleIx pole{place.record};
            const PoleSign sign = pole_sign(view, plan, pole);
            const bool is_shown = style.shown[std::size_t(sign)];
            const bool on_chosen = desk.chosen_string().is_valid() &&
                                   view.city.poles[pole.place()].string == desk.chosen_string();
            const double r = on_chosen && camera.m_per_px <= 2 ? usual_r * 1.26 : usual_r;
            const QColor tone =
                style.colour == PoleColour::decision ? QColor() : pole_tone(desk, pole, style.colour);
            const QPixmap& picture = stamp(desk.look(), sign, is_done_by(plan, pole, desk.year()), r,
                                           camera.m_per_px <= 4, tone, ratio);
            const double half = picture.width() / ratio / 2;
            if (!is_shown) painter.setOpacity(0.2);
            painter.drawPixmap(camera.to_screen(place.at) - QPointF(half, half), picture);
            if (!is_shown) painter.setOpacity(1);
            const PolePlan& row = plan.poles[pole.place()];
            if (is_shown && (with_text || row.lock != Choice::undecided || row.mark != Choice::undecided ||
                             desk.is_selected(pole)))
                orders.push_back(pole);
        });
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setFont(text_font(10));
    for (const PoleIx pole : orders) {
        const QPointF at = camera.to_screen(view.city.poles[pole.place()].place);
        if (camera.m_per_px <= 4) paint_orders(painter, desk.look(), plan.poles[pole.place()], at, usual_r);
        if (desk.is_selected(pole)) paint_selected(painter, desk.look(), at, usual_r);
        if (!with_text) continue;
        const int year = plan.poles[pole.place()].year;
        painter.setPen(desk.look().ink2);
        painter.drawText(at + QPointF(usual_r + 6, 4),
                         to_q(view.city.poles[pole.place()].id) +
                             (year != 0 ? QStringLiteral("  %1").arg(year) : QString()));
    }
}

} // namespace unstring
