#include "app/window/map/map_view.h"

#include <QKeyEvent>
#include <QMouseEvent>
#include <QPaintEvent>
#include <QtConcurrentRun>

#include <algorithm>
#include <cmath>

#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr double kGroundMargin_px = 220; // how far a pan may go before the ground is painted anew

} // namespace

MapView::MapView(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("map");
    setAccessibleName(tr("Map of the poles and strings"));
    setMouseTracking(true);
    setFocusPolicy(Qt::StrongFocus);
    setMinimumSize(320, 200);
    setAttribute(Qt::WA_OpaquePaintEvent);
    const auto stale = [this] { is_ground_stale_ = true, poles_.forget(), update(); };
    connect(&desk_, &Desk::view_changed, this, &MapView::take_view);
    connect(&desk_, &Desk::look_changed, this, stale);
    connect(&desk_, &Desk::selection_changed, this, [this] { update(); });
    connect(&desk_, &Desk::year_changed, this, [this] { update(); });
    connect(&desk_, &Desk::preview_changed, this, [this] { update(); });
    connect(&desk_, &Desk::show_place, this, &MapView::show_place);
    connect(&reading_, &QFutureWatcherBase::finished, this, [this] {
        tint_ = reading_.result();
        is_ground_stale_ = true;
        update();
    });
}

MapView::~MapView() {
    stop_reading_ = true;
    reading_.waitForFinished();
}

void MapView::take_view() {
    is_ground_stale_ = true;
    if (!is_fitted_) fit();
    read_canopy();
    update();
}

void MapView::read_canopy() {
    const std::string& raster = desk_.view().canopy_raster;
    if (raster == tint_of_ || reading_.isRunning()) return;
    tint_of_ = raster;
    tint_ = {};
    if (raster.empty()) return;
    reading_.setFuture(QtConcurrent::run([raster, bounds = desk_.scene().bounds, this] {
        return read_canopy_tint(raster, bounds, stop_reading_);
    }));
}

void MapView::fit() {
    if (!desk_.is_open()) return;
    camera_.fit(desk_.scene().bounds, 36);
    is_fitted_ = true;
    is_ground_stale_ = true;
    update();
}

void MapView::set_style(const MapStyle& style) {
    style_ = style;
    update();
}

void MapView::zoom_by(double factor) {
    camera_.zoom(factor, QPointF(width() / 2.0, height() / 2.0));
    update();
}

void MapView::show_place(MapPoint place) {
    const QRectF inner =
        QRectF(rect()).adjusted(width() * 0.15, height() * 0.15, -width() * 0.15, -height() * 0.15);
    if (!inner.contains(camera_.to_screen(place))) camera_.centre = place;
    update();
}

PoleIx MapView::pole_at(QPointF at) const {
    if (!desk_.is_open()) return {};
    const auto found = desk_.scene().grid.nearest(camera_.to_map(at), 9 * camera_.m_per_px);
    return found ? PoleIx{*found} : PoleIx{};
}

QPointF MapView::place_of(PoleIx pole) const {
    return camera_.to_screen(desk_.view().city.poles[pole.place()].place);
}

void MapView::resizeEvent(QResizeEvent* event) {
    camera_.size = event->size();
    if (!is_fitted_ || !event->oldSize().isValid()) fit();
    is_ground_stale_ = true;
}

void MapView::paint_ground_cached(QPainter& painter) {
    const double ratio = devicePixelRatioF();
    const double moved_x = (camera_.centre.x_m - ground_camera_.centre.x_m) / camera_.m_per_px;
    const double moved_y = (camera_.centre.y_m - ground_camera_.centre.y_m) / camera_.m_per_px;
    const bool is_near = std::abs(moved_x) <= kGroundMargin_px && std::abs(moved_y) <= kGroundMargin_px;
    if (is_ground_stale_ || ground_.devicePixelRatio() != ratio ||
        ground_camera_.m_per_px != camera_.m_per_px || !is_near) {
        ground_camera_ = camera_;
        ground_camera_.size = camera_.size + QSizeF(2 * kGroundMargin_px, 2 * kGroundMargin_px);
        ground_ = QPixmap((ground_camera_.size * ratio).toSize());
        ground_.setDevicePixelRatio(ratio);
        QPainter ground(&ground_);
        paint_ground(ground, desk_, ground_camera_, tint_);
        is_ground_stale_ = false;
    }
    const QPointF shift = camera_.to_screen(ground_camera_.to_map({0, 0}));
    painter.drawPixmap(shift, ground_);
}

void MapView::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    if (!desk_.is_open()) {
        painter.fillRect(rect(), desk_.look().sheet);
        return;
    }
    paint_ground_cached(painter);
    paint_circuits(painter, desk_, camera_);
    paint_strings(painter, desk_, camera_);
    poles_.paint(painter, desk_, camera_, style_);
    paint_stations(painter, desk_, camera_);
    paint_scale(painter, desk_.look(), camera_);
    paint_overlay(painter);
}

void MapView::paint_overlay(QPainter& painter) {
    const Look& look = desk_.look();
    painter.setRenderHint(QPainter::Antialiasing);
    if (hover_.is_valid() && hand_ == Hand::none) {
        painter.setPen(QPen(look.ink3, 1.2));
        painter.setBrush(Qt::NoBrush);
        painter.drawEllipse(place_of(hover_), 9, 9);
        draw_tag(painter, look, place_of(hover_), hover_text(hover_), look.hair, rect());
    }
    if (hand_ == Hand::outlining) {
        QColor wash = look.hand;
        wash.setAlpha(28);
        painter.setPen(QPen(look.hand, 1.4));
        painter.setBrush(wash);
        painter.drawPolygon(outline_);
    }
    if (desk_.scene().bounds.is_empty) {
        painter.setPen(look.ink2);
        painter.setFont(text_font(15));
        painter.drawText(rect(), Qt::AlignCenter, tr("No pole of this project has a place yet."));
    }
    if (shows_focus_) {
        painter.setPen(QPen(look.ink, 2));
        painter.setBrush(Qt::NoBrush);
        painter.drawRoundedRect(QRectF(rect()).adjusted(2, 2, -2, -2), 3, 3);
    }
}

QString MapView::hover_text(PoleIx pole) const {
    const ProjectView& view = desk_.view();
    const Pole& record = view.city.poles[pole.place()];
    const PolePlan& row = desk_.plan().poles[pole.place()];
    QString text = tr("Pole %1, %2").arg(to_q(record.id), lamp_text(view, pole));
    if (record.status != PoleStatus::standing)
        return text + '\n' + tr("status: %1").arg(to_q(text_of(record.status)));
    if (!is_candidate(view.city, record)) return text;
    text += '\n' + choice_word(row.choice);
    if (row.year != 0) text += tr(" in %1").arg(row.year);
    if (row.mark != Choice::undecided) text += tr(", marked %1").arg(choice_word(row.mark));
    if (row.lock != Choice::undecided) text += tr(", locked %1").arg(choice_word(row.lock));
    return text;
}

} // namespace unstring
