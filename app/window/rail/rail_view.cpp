#include "app/window/rail/rail_view.h"

#include <QHelpEvent>
#include <QScrollBar>
#include <QToolTip>

#include <algorithm>
#include <cmath>

#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr double kRow_px = 54, kLegs_px = 22;
constexpr double kNames_px = 112;  // name and number of lamps at the left
constexpr double kStation_px = 96; // rings and rating at the right of the beads

} // namespace

QPointF RailRow::bead(int position) const {
    return {right - pitch * (fold.depth(position) - 1), fold.on_out(position) ? y_out : y_ret};
}

RailView::RailView(Desk& desk, QWidget* parent) : QAbstractScrollArea(parent), desk_(desk) {
    setObjectName("rail");
    setAccessibleName(tr("Rail: every string as its loop, with the boundaries between years"));
    setFrameShape(QFrame::NoFrame);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setFocusPolicy(Qt::StrongFocus);
    viewport()->setMouseTracking(true);
    viewport()->setObjectName("rail_viewport");
    setMinimumHeight(int(kRow_px));
    const auto redraw = [this] { viewport()->update(); };
    connect(&desk_, &Desk::view_changed, this, &RailView::take_view);
    connect(&desk_, &Desk::year_changed, this, redraw);
    connect(&desk_, &Desk::preview_changed, this, redraw);
    connect(&desk_, &Desk::look_changed, this, redraw);
    connect(&desk_, &Desk::selection_changed, this, &RailView::show_chosen);
    preview_timer_.setSingleShot(true);
    connect(&preview_timer_, &QTimer::timeout, this, [this] {
        if (drag_ && drag_->is_started) desk_.show_preview(drag_->move.plan);
        Q_EMIT drag_changed();
    });
}

void RailView::take_view() {
    hot_.reset();
    if (drag_ && drag_->string.place() >= desk_.view().city.strings.size()) drag_.reset();
    const int all = int(kRow_px * double(desk_.scene().series.size())) + 8;
    verticalScrollBar()->setRange(0, std::max(0, all - viewport()->height()));
    verticalScrollBar()->setPageStep(viewport()->height());
    verticalScrollBar()->setSingleStep(int(kRow_px));
    columns_ = year_columns(width(), desk_.plan().settings); // the scroll bar stands in the right margin
    viewport()->update();
}

void RailView::resizeEvent(QResizeEvent*) {
    if (desk_.is_open()) take_view();
}

void RailView::show_chosen() {
    keyboard_boundary_ = 0;
    if (!desk_.chosen_string().is_valid()) return viewport()->update();
    const RailRow row = row_of(desk_.chosen_string());
    if (row.string.is_valid() && !drag_) {
        if (row.box.top() < 0)
            verticalScrollBar()->setValue(verticalScrollBar()->value() + int(row.box.top()));
        if (row.box.bottom() > viewport()->height())
            verticalScrollBar()->setValue(verticalScrollBar()->value() + int(row.box.bottom()) -
                                          viewport()->height());
    }
    viewport()->update();
}

RailRow RailView::row_at_place(std::size_t place) const {
    RailRow row;
    row.string = desk_.scene().series[place];
    row.fold = fold_of(desk_.scene().loops[row.string.place()]);
    row.box =
        QRectF(0, kRow_px * double(place) - verticalScrollBar()->value() + 4, viewport()->width(), kRow_px);
    row.right = columns_.left - kStation_px - 28;
    const int deepest = std::max({1, row.fold.out, row.fold.ret()});
    row.pitch = std::min(18.0, (row.right - kNames_px - 24) / deepest);
    row.y_out = row.box.center().y() - kLegs_px / 2;
    row.y_ret = row.y_out + kLegs_px;
    return row;
}

RailRow RailView::row_of(StringIx string) const {
    const auto& series = desk_.scene().series;
    const auto found = std::find(series.begin(), series.end(), string);
    return found == series.end() ? RailRow{} : row_at_place(std::size_t(found - series.begin()));
}

QPointF RailView::handle_of(StringIx string, const Boundary& boundary) const {
    const RailRow row = row_of(string);
    return {row.edge(boundary.out_on), row.y_out - 9};
}

std::optional<RailView::Grab> RailView::boundary_at(QPointF at) const {
    for (std::size_t place = 0; place < desk_.scene().series.size(); ++place) {
        const RailRow row = row_at_place(place);
        if (!row.box.contains(at) || at.x() > row.right + row.pitch) continue;
        const StringLoop& loop = desk_.scene().loops[row.string.place()];
        std::vector<Boundary> boundaries = boundaries_of(loop, desk_.plan());
        for (const Boundary& end : end_boundaries(loop, desk_.plan(), desk_.year()))
            boundaries.push_back(end);
        std::optional<Grab> best;
        double best_away = 6;
        for (const Boundary& boundary : boundaries) {
            const double x =
                at.y() < row.box.center().y() ? row.edge(boundary.out_on) : row.edge(boundary.ret_on);
            if (std::abs(x - at.x()) >= best_away) continue;
            best_away = std::abs(x - at.x());
            best = Grab{row.string, boundary};
        }
        return best;
    }
    return std::nullopt;
}

PoleIx RailView::bead_at(QPointF at) const {
    for (std::size_t place = 0; place < desk_.scene().series.size(); ++place) {
        const RailRow row = row_at_place(place);
        if (!row.box.contains(at)) continue;
        for (int position = 1; position <= row.fold.lamps; ++position) {
            const QPointF away = row.bead(position) - at;
            if (std::abs(away.x()) <= row.pitch / 2 && std::abs(away.y()) <= kLegs_px / 2)
                return desk_.scene().loops[row.string.place()].lamps[std::size_t(position - 1)];
        }
    }
    return {};
}

QString RailView::drag_text() const {
    if (!drag_) return {};
    if (drag_->move.moved == 0) {
        if (drag_->move.stayed_locked > 0)
            return tr("%1 stay").arg(
                count_text(drag_->move.stayed_locked, tr("locked lamp"), tr("locked lamps")));
        return tr("%1 | %2")
            .arg(drag_->boundary.year)
            .arg(drag_->boundary.next_year == 0 ? tr("no year") : QString::number(drag_->boundary.next_year));
    }
    QString text = tr("%1 to %2")
                       .arg(count_text(drag_->move.moved, tr("lamp"), tr("lamps")),
                            drag_->move.year == 0 ? tr("no year") : QString::number(drag_->move.year));
    if (drag_->move.stayed_locked > 0) text += tr(", %1 locked stay").arg(drag_->move.stayed_locked);
    const StringYear* state = string_year(desk_.phase(), drag_->string, drag_->boundary.year);
    if (state != nullptr && desk_.has_preview())
        text +=
            '\n' + tr("%1 end of %2: %3, %4")
                       .arg(to_q(desk_.view().city.strings[drag_->string.place()].id))
                       .arg(drag_->boundary.year)
                       .arg(count_text(state->lamps, tr("lamp"), tr("lamps")), verdict_word(state->verdict));
    return text;
}

QString RailView::tip_at(QPointF at) const {
    if (const auto grab = boundary_at(at)) {
        const QString next =
            grab->boundary.next_year == 0 ? tr("no year") : QString::number(grab->boundary.next_year);
        const QString stand =
            grab->boundary.stand == Stand::confirmed ? tr("on a confirmed cut-back")
            : grab->boundary.stand == Stand::candidate
                ? tr("on a cut-back that is to be confirmed on site")
                : tr("no cut-back here: lamps are jumpered at their bases and the cable stays live");
        return tr("Boundary %1 | %2, %3. Drag it; Alt places it off the cut-backs; Esc puts it back.")
            .arg(grab->boundary.year)
            .arg(next, stand);
    }
    if (const PoleIx pole = bead_at(at); pole.is_valid()) {
        const PolePlan& row = desk_.plan().poles[pole.place()];
        const QString year = row.year == 0 ? tr("no year") : QString::number(row.year);
        return tr("Pole %1, %2: %3, %4%5")
            .arg(to_q(desk_.view().city.poles[pole.place()].id), lamp_text(desk_.view(), pole),
                 choice_word(row.choice), year, row.year_locked ? tr(", year locked") : QString());
    }
    const int year = columns_.year_at(at.x());
    for (std::size_t place = 0; place < desk_.scene().series.size(); ++place) {
        const RailRow row = row_at_place(place);
        if (!row.box.contains(at)) continue;
        const StringYear* state = string_year(desk_.phase(), row.string, year);
        if (state != nullptr) return string_sentence(desk_.view(), *state);
    }
    return {};
}

bool RailView::viewportEvent(QEvent* event) {
    if (event->type() == QEvent::ToolTip && desk_.is_open() && !drag_) {
        const auto* help = static_cast<QHelpEvent*>(event);
        const QString tip = tip_at(help->pos());
        if (tip.isEmpty())
            QToolTip::hideText();
        else
            QToolTip::showText(help->globalPos(), tip, viewport());
        return true;
    }
    return QAbstractScrollArea::viewportEvent(event);
}

} // namespace unstring
