// What the hand does on the map.

#include <QHelpEvent>
#include <QKeyEvent>
#include <QMouseEvent>
#include <QToolTip>

#include <algorithm>
#include <cmath>

#include "app/window/look/focus.h"
#include "app/window/look/words.h"
#include "app/window/map/map_view.h"

namespace unstring {
namespace {

constexpr double kDragStarts_px = 4;

// A shift-drag straight across encloses nothing; then its corners are meant as a box.
QPolygonF meant_outline(const QPolygonF& drawn) {
    double twice_area = 0;
    for (int i = 0; i < drawn.size(); ++i) {
        const QPointF a = drawn[i], b = drawn[(i + 1) % drawn.size()];
        twice_area += a.x() * b.y() - b.x() * a.y();
    }
    const QRectF box = drawn.boundingRect();
    const bool is_line = std::abs(twice_area) / 2 < 0.12 * box.width() * box.height();
    return is_line ? QPolygonF(box) : drawn;
}

} // namespace

void MapView::wheelEvent(QWheelEvent* event) {
    if (!desk_.is_open()) return;
    camera_.zoom(std::pow(1.2, event->angleDelta().y() / 120.0), event->position());
    hover_ = {};
    update();
    event->accept();
}

void MapView::mousePressEvent(QMouseEvent* event) {
    if (!desk_.is_open() || event->button() != Qt::LeftButton) return;
    setFocus(Qt::MouseFocusReason);
    press_ = last_ = event->position();
    hand_ = event->modifiers().testFlag(Qt::ShiftModifier) ? Hand::outlining : Hand::pressed;
    if (hand_ == Hand::outlining) outline_ = QPolygonF() << press_;
}

void MapView::mouseMoveEvent(QMouseEvent* event) {
    if (!desk_.is_open()) return;
    pointer_ = event->position();
    if (hand_ == Hand::pressed &&
        std::hypot(pointer_.x() - press_.x(), pointer_.y() - press_.y()) >= kDragStarts_px) {
        hand_ = Hand::panning;
        setCursor(Qt::ClosedHandCursor);
    }
    if (hand_ == Hand::panning) camera_.pan(pointer_ - last_);
    if (hand_ == Hand::outlining) outline_ << pointer_;
    if (hand_ == Hand::none) hover_ = pole_at(pointer_);
    last_ = pointer_;
    update();
}

void MapView::mouseReleaseEvent(QMouseEvent* event) {
    if (!desk_.is_open() || event->button() != Qt::LeftButton) return;
    const Hand was = hand_;
    hand_ = Hand::none;
    unsetCursor();
    if (was == Hand::pressed) click(event->position(), event->modifiers());
    if (was == Hand::outlining) {
        outline_ << event->position();
        const QRectF box = outline_.boundingRect();
        if (std::max(box.width(), box.height()) < kDragStarts_px)
            click(event->position(), event->modifiers());
        else
            select_outline();
        outline_.clear();
    }
    update();
}

void MapView::click(QPointF at, Qt::KeyboardModifiers modifiers) {
    const PoleIx pole = pole_at(at);
    if (!pole.is_valid()) {
        if (!modifiers.testFlag(Qt::ShiftModifier) && !modifiers.testFlag(Qt::ControlModifier))
            desk_.select({});
        return;
    }
    if (!modifiers.testFlag(Qt::ShiftModifier) && !modifiers.testFlag(Qt::ControlModifier)) {
        desk_.select({pole});
        return;
    }
    std::vector<PoleIx> chosen = desk_.selection();
    if (desk_.is_selected(pole))
        std::erase(chosen, pole);
    else
        chosen.push_back(pole);
    desk_.select(std::move(chosen));
}

void MapView::select_outline() {
    const QPolygonF outline = meant_outline(outline_);
    const QRectF box = outline.boundingRect();
    const MapPoint low = camera_.to_map(box.bottomLeft()), high = camera_.to_map(box.topRight());
    std::vector<PoleIx> chosen;
    desk_.scene().grid.in_rectangle(low, high, [&](const PickGrid::Place& place) {
        if (outline.containsPoint(camera_.to_screen(place.at), Qt::OddEvenFill))
            chosen.emplace_back(place.record);
    });
    std::sort(chosen.begin(), chosen.end());
    const auto count = long(chosen.size());
    desk_.select(std::move(chosen));
    desk_.say(tr("%1 chosen.").arg(count_text(count, tr("pole"), tr("poles"))));
}

void MapView::mouseDoubleClickEvent(QMouseEvent* event) {
    if (!desk_.is_open() || event->button() != Qt::LeftButton) return;
    camera_.zoom(2, event->position());
    update();
}

void MapView::keyPressEvent(QKeyEvent* event) {
    switch (event->key()) {
    case Qt::Key_Left:
        desk_.walk(-1);
        break;
    case Qt::Key_Right:
        desk_.walk(1);
        break;
    case Qt::Key_Plus:
    case Qt::Key_Equal:
        zoom_by(1.3);
        break;
    case Qt::Key_Minus:
        zoom_by(1 / 1.3);
        break;
    case Qt::Key_Home:
    case Qt::Key_0:
        fit();
        break;
    case Qt::Key_Escape:
        desk_.select({});
        break;
    default:
        QWidget::keyPressEvent(event);
    }
}

void MapView::leaveEvent(QEvent*) {
    hover_ = {};
    update();
}

bool MapView::event(QEvent* event) {
    if (event->type() != QEvent::ToolTip || !desk_.is_open()) return QWidget::event(event);
    // Poles have their own tag; a service point says itself here.
    const auto* help = static_cast<QHelpEvent*>(event);
    for (const ServicePoint& service : desk_.view().city.services) {
        if (!service.has_place) continue;
        const QPointF away = camera_.to_screen(service.place) - QPointF(help->pos());
        if (std::hypot(away.x(), away.y()) > 8) continue;
        const QString free = service.free_kva ? tr("%1 kVA free").arg(number_text(*service.free_kva, 1))
                                              : tr("free kVA not known");
        QToolTip::showText(
            help->globalPos(),
            tr("%1 %2: %3 V, %4")
                .arg(service_word(service.kind), to_q(service.id), number_text(service.volts), free),
            this);
        return true;
    }
    QToolTip::hideText();
    return true;
}

void MapView::focusInEvent(QFocusEvent* event) {
    shows_focus_ = is_by_keys(*event);
    update();
}

void MapView::focusOutEvent(QFocusEvent*) {
    shows_focus_ = false;
    update();
}

} // namespace unstring
