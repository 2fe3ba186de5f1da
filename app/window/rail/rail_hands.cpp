// What the hand and the keys do on the rail. A drag is a preview until the hand lets go; then it is one edit.

#include <QKeyEvent>
#include <QMouseEvent>

#include <algorithm>
#include <cmath>

#include "app/window/look/focus.h"
#include "app/window/look/words.h"
#include "app/window/rail/rail_view.h"

namespace unstring {
namespace {

constexpr double kDragStarts_px = 3;
constexpr int kSnapReach = 2; // lamps

} // namespace

void RailView::mousePressEvent(QMouseEvent* event) {
    if (!desk_.is_open() || event->button() != Qt::LeftButton) return;
    const QPointF at = event->position();
    if (const auto grab = boundary_at(at)) {
        if (desk_.view().is_read_only || desk_.is_running()) {
            desk_.say(tr("The boundary cannot be moved now: the project is read-only or a step is running."),
                      true);
            return;
        }
        drag_ = BoundaryDrag{};
        drag_->string = grab->string;
        drag_->boundary = grab->boundary;
        drag_->grab_x = at.x();
        drag_->move.out_on = grab->boundary.out_on;
        drag_->move.ret_on = grab->boundary.ret_on;
        desk_.set_year(grab->boundary.year);
        if (desk_.chosen_string() != grab->string) desk_.choose_string(grab->string);
        viewport()->update();
        return;
    }
    if (const PoleIx pole = bead_at(at); pole.is_valid()) {
        if (event->modifiers().testFlag(Qt::ControlModifier)) {
            std::vector<PoleIx> chosen = desk_.selection();
            if (desk_.is_selected(pole))
                std::erase(chosen, pole);
            else
                chosen.push_back(pole);
            desk_.select(std::move(chosen));
        } else {
            desk_.select({pole});
        }
        return;
    }
    if (const int year = columns_.year_at(at.x()); year != 0) desk_.set_year(year);
    for (std::size_t place = 0; place < desk_.scene().series.size(); ++place) {
        const RailRow row = row_at_place(place);
        if (row.box.contains(at)) desk_.choose_string(row.string);
    }
}

void RailView::mouseMoveEvent(QMouseEvent* event) {
    if (!desk_.is_open()) return;
    if (drag_) return drag_to(event->position(), event->modifiers());
    const auto hot = boundary_at(event->position());
    const bool is_same = hot.has_value() == hot_.has_value() &&
                         (!hot || (hot->string == hot_->string && hot->boundary.year == hot_->boundary.year));
    hot_ = hot;
    viewport()->setCursor(hot_ ? Qt::SizeHorCursor : Qt::ArrowCursor);
    if (!is_same) viewport()->update();
}

void RailView::drag_to(QPointF at, Qt::KeyboardModifiers modifiers) {
    if (!drag_->is_started && std::abs(at.x() - drag_->grab_x) < kDragStarts_px) return;
    drag_->is_started = true;
    const RailRow row = row_of(drag_->string);
    const StringLoop& loop = desk_.scene().loops[drag_->string.place()];
    // To the left, away from the station, more lamps stay on.
    const int by = int(std::lround((drag_->grab_x - at.x()) / row.pitch));
    Depths wanted{std::clamp(drag_->boundary.out_on + by, 0, row.fold.out),
                  std::clamp(drag_->boundary.ret_on + by, 0, row.fold.ret()), false};
    if (!modifiers.testFlag(Qt::AltModifier) && by != 0)
        wanted = snap_depths(loop, wanted.out_on, wanted.ret_on, kSnapReach);
    const bool is_same =
        wanted.out_on == drag_->move.out_on && wanted.ret_on == drag_->move.ret_on && desk_.has_preview();
    drag_->is_snapped = wanted.is_snapped;
    if (!is_same) {
        drag_->move = move_boundary(loop, desk_.view().plan, drag_->boundary, wanted.out_on, wanted.ret_on);
        preview_timer_.start(0);
    }
    viewport()->update();
}

void RailView::end_drag(bool is_kept) {
    if (!drag_) return;
    preview_timer_.stop();
    const BoundaryDrag drag = std::move(*drag_);
    drag_.reset();
    if (is_kept && drag.is_started && drag.move.moved > 0) {
        const QString id = to_q(desk_.view().city.strings[drag.string.place()].id);
        const QString year = drag.move.year == 0 ? tr("no year") : QString::number(drag.move.year);
        desk_.show_preview(drag.move.plan);
        desk_.write_preview(tr("boundary of %1: %2 to %3")
                                .arg(id, count_text(drag.move.moved, tr("lamp"), tr("lamps")), year));
    } else {
        desk_.drop_preview();
    }
    Q_EMIT drag_changed();
    viewport()->update();
}

void RailView::mouseReleaseEvent(QMouseEvent* event) {
    if (!drag_ || event->button() != Qt::LeftButton) return;
    drag_to(event->position(), event->modifiers());
    end_drag(true);
}

// One lamp with the keys: Ctrl+Left, Ctrl+Right on the boundary that B chose.
void RailView::nudge(int by) {
    const StringIx string = desk_.chosen_string();
    if (!string.is_valid() || drag_) return;
    const StringLoop& loop = desk_.scene().loops[string.place()];
    const std::vector<Boundary> boundaries = boundaries_of(loop, desk_.plan());
    if (boundaries.empty()) return;
    if (desk_.view().is_read_only || desk_.is_running())
        return desk_.say(tr("The boundary cannot be moved now."), true);
    const Boundary& boundary = boundaries[std::size_t(keyboard_boundary_) % boundaries.size()];
    drag_ = BoundaryDrag{};
    drag_->string = string;
    drag_->boundary = boundary;
    drag_->is_started = true;
    drag_->move =
        move_boundary(loop, desk_.view().plan, boundary, boundary.out_on + by, boundary.ret_on + by);
    end_drag(true);
}

void RailView::keyPressEvent(QKeyEvent* event) {
    if (!desk_.is_open()) return;
    if (event->key() == Qt::Key_Escape && drag_) return end_drag(false);
    const bool with_control = event->modifiers().testFlag(Qt::ControlModifier);
    const auto& series = desk_.scene().series;
    const auto chosen = std::find(series.begin(), series.end(), desk_.chosen_string());
    switch (event->key()) {
    case Qt::Key_Left:
        return with_control ? nudge(1) : desk_.walk(-1);
    case Qt::Key_Right:
        return with_control ? nudge(-1) : desk_.walk(1);
    case Qt::Key_Up:
        if (chosen != series.end() && chosen != series.begin()) desk_.choose_string(*(chosen - 1));
        return;
    case Qt::Key_Down:
        if (chosen == series.end() && !series.empty())
            desk_.choose_string(series.front());
        else if (chosen != series.end() && chosen + 1 != series.end())
            desk_.choose_string(*(chosen + 1));
        return;
    case Qt::Key_B:
        ++keyboard_boundary_, viewport()->update();
        return;
    default:
        QAbstractScrollArea::keyPressEvent(event);
    }
}

void RailView::focusInEvent(QFocusEvent* event) {
    shows_focus_ = is_by_keys(*event);
    viewport()->update();
}

void RailView::focusOutEvent(QFocusEvent*) {
    shows_focus_ = false;
    viewport()->update();
}

} // namespace unstring
