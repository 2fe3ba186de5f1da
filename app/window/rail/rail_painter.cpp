#include <QPainterPath>

#include <algorithm>
#include <cmath>

#include "app/window/look/signs.h"
#include "app/window/look/words.h"
#include "app/window/map/map_painter.h"
#include "app/window/rail/rail_view.h"

namespace unstring {
namespace {

double bead_radius(const RailRow& row) { return std::clamp(row.pitch * 0.42, 2.4, 7.5); }

QPen thread_pen(const Look& look, bool is_live) {
    QPen pen(is_live ? look.ink : look.dead, is_live ? 1.5 : 1.2);
    if (!is_live) pen.setDashPattern({2.9, 2.9});
    return pen;
}

// The end of the fold, the two beads in it joined round.
QPainterPath fold_arc(const RailRow& row) {
    const double out_x = row.edge(row.fold.out) + row.pitch / 2,
                 ret_x = row.fold.ret() > 0 ? row.edge(row.fold.ret()) + row.pitch / 2 : row.right;
    const double x = std::min(out_x, ret_x) - 14;
    QPainterPath path(QPointF(out_x, row.y_out));
    path.lineTo(x + 8, row.y_out);
    path.cubicTo(x - 4, row.y_out, x - 4, row.y_ret, x + 8, row.y_ret);
    path.lineTo(ret_x, row.y_ret);
    return path;
}

} // namespace

void RailView::paintEvent(QPaintEvent*) {
    QPainter painter(viewport());
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    painter.fillRect(viewport()->rect(), look.sheet);
    if (!desk_.is_open()) return;
    if (desk_.scene().series.empty()) {
        painter.setPen(look.ink2), painter.setFont(text_font(13));
        painter.drawText(
            viewport()->rect(), Qt::AlignCenter,
            tr("No series string with lamps is known yet. Gather poles and circuits, then vet."));
        return;
    }
    if (desk_.year() >= columns_.first_year)
        painter.fillRect(QRectF(columns_.x_of(desk_.year()), 0, columns_.width, viewport()->height()),
                         look.band);
    for (std::size_t place = 0; place < desk_.scene().series.size(); ++place) {
        const RailRow row = row_at_place(place);
        if (row.box.bottom() < 0 || row.box.top() > viewport()->height()) continue;
        paint_row(painter, row);
    }
    if (drag_ && drag_->is_started) {
        const RailRow row = row_of(drag_->string);
        const double fold_x = row.edge(std::max(row.fold.out, row.fold.ret())) - 18;
        draw_tag(painter, look, QPointF(fold_x, row.box.center().y()), drag_text(), look.hand,
                 viewport()->rect(), TagSide::left);
    }
    if (shows_focus_) {
        painter.setPen(QPen(look.ink, 2)), painter.setBrush(Qt::NoBrush);
        painter.drawRoundedRect(QRectF(viewport()->rect()).adjusted(2, 2, -2, -2), 3, 3);
    }
}

void RailView::paint_row(QPainter& painter, const RailRow& row) {
    const Look& look = desk_.look();
    const StringLoop& loop = desk_.scene().loops[row.string.place()];
    const bool is_chosen = row.string == desk_.chosen_string();
    if (is_chosen) {
        QColor wash = look.hair2;
        wash.setAlpha(120);
        painter.fillRect(QRectF(0, row.box.top(), columns_.left - 8, row.box.height()), wash);
        painter.fillRect(QRectF(0, row.box.top() + 6, 3, row.box.height() - 12), look.ink);
    }
    painter.setPen(look.hair2);
    painter.drawLine(row.box.bottomLeft(), row.box.bottomRight());
    const QFont font = text_font(is_chosen ? 14 : 13, is_chosen ? Weight::bold : Weight::strong);
    const QString name = QFontMetricsF(font).elidedText(
        to_q(desk_.view().city.strings[row.string.place()].id), Qt::ElideMiddle,
        row.edge(std::max(row.fold.out, row.fold.ret())) - 56);
    painter.setFont(font), painter.setPen(look.ink);
    painter.drawText(QPointF(16, row.box.center().y() - 1), name);
    painter.setFont(text_font(11)), painter.setPen(look.ink2);
    painter.drawText(QPointF(16, row.box.center().y() + 14),
                     count_text(row.fold.lamps, tr("lamp"), tr("lamps")));
    paint_thread(painter, row, loop);
    paint_boundaries(painter, row, loop);
    paint_beads(painter, row, loop);
    paint_words(painter, row);
}

void RailView::paint_thread(QPainter& painter, const RailRow& row, const StringLoop& loop) {
    const Look& look = desk_.look();
    const LiveLoop live = live_loop(loop, desk_.plan(), desk_.year());
    const double station_x = row.right + 28;
    painter.setBrush(Qt::NoBrush);
    for (int leg = 0; leg <= row.fold.lamps; ++leg) {
        painter.setPen(thread_pen(look, live.legs[std::size_t(leg)] != 0));
        if (leg == 0 || leg == row.fold.lamps) {
            const double y = leg == 0 ? row.y_out : row.y_ret;
            const double from = leg == 0 ? row.bead(1).x() : row.bead(row.fold.lamps).x();
            QPainterPath path(QPointF(from, y));
            path.lineTo(row.right + 10, y);
            path.quadTo(row.right + 24, y, station_x, row.box.center().y());
            painter.drawPath(path);
        } else if (leg == row.fold.out) {
            painter.drawPath(fold_arc(row));
        } else {
            painter.drawLine(row.bead(leg), row.bead(leg + 1));
        }
    }
    draw_transformer(painter, look.ink, look.sheet, QPointF(station_x + 4, row.box.center().y()), 4.6);
    const StringYear* state =
        string_year(desk_.phase(), row.string, std::max(desk_.year(), desk_.plan().settings.first_year - 1));
    TransformerIx unit = state != nullptr ? state->transformer : TransformerIx{};
    if (state == nullptr)
        for (std::size_t t = 0; t < desk_.view().city.transformers.size(); ++t)
            if (std::count(desk_.view().city.transformers[t].strings.begin(),
                           desk_.view().city.transformers[t].strings.end(), row.string) > 0)
                unit = TransformerIx{t};
    painter.setFont(text_font(11.5)), painter.setPen(look.ink2);
    const QString rating =
        state != nullptr && state->lamps == 0 ? tr("ended")
        : unit.is_valid()
            ? tr("%1 kW").arg(number_text(desk_.view().city.transformers[unit.place()].rated_kw,
                                          desk_.view().city.transformers[unit.place()].rated_kw < 10 ? 1 : 0))
            : tr("no unit");
    painter.drawText(QPointF(station_x + 18, row.box.center().y() + 4), rating);
}

void RailView::paint_beads(QPainter& painter, const RailRow& row, const StringLoop& loop) {
    const LiveLoop live = live_loop(loop, desk_.plan(), desk_.year());
    for (int position = 1; position <= row.fold.lamps; ++position) {
        paint_bead(painter, row, loop, position);
        paint_bead_orders(painter, row, loop, position);
        const PoleIx pole = loop.lamps[std::size_t(position - 1)];
        const bool has_live_cable =
            live.legs[std::size_t(position - 1)] != 0 || live.legs[std::size_t(position)] != 0;
        if (live.lamps == 0 || !has_live_cable || !is_done_by(desk_.plan(), pole, desk_.year())) continue;
        const double r = bead_radius(row); // live series cable runs on through the base of a lamp that is off
        painter.setPen(Qt::NoPen), painter.setBrush(desk_.look().ink);
        painter.drawRect(
            QRectF(row.bead(position).x() - row.pitch / 2, row.bead(position).y() + r - 0.5, row.pitch, 2.2));
    }
}

// The sign of the lamp's kind, in the tone of its year, with the year's number.
void RailView::paint_bead(QPainter& painter, const RailRow& row, const StringLoop& loop, int position) {
    const Look& look = desk_.look();
    const PlanSettings& settings = desk_.plan().settings;
    const PolePlan& plan = desk_.plan().poles[loop.lamps[std::size_t(position - 1)].place()];
    const PoleSign sign = sign_of(plan.choice);
    const QPointF at = row.bead(position);
    const bool has_year =
        plan.year >= settings.first_year && (sign == PoleSign::rewire || sign == PoleSign::solar);
    const QColor tone =
        has_year ? year_tone(look, plan.year - settings.first_year, settings.years) : look.sheet;
    QPen edge(has_year                 ? look.year_edge
              : sign == PoleSign::keep ? look.ink
                                       : look.ink3,
              has_year                 ? 1
              : sign == PoleSign::keep ? 2
                                       : 1.3);
    if (sign == PoleSign::undecided) edge.setDashPattern({1.6, 1.6});
    painter.save();
    painter.translate(at);
    painter.setPen(edge);
    painter.setBrush(tone);
    painter.drawPath(sign_path(sign, bead_radius(row), true));
    painter.restore();
    const bool starts_run =
        position == 1 || position == row.fold.out + 1 ||
        desk_.plan().poles[loop.lamps[std::size_t(position - 2)].place()].year != plan.year;
    if (!has_year || (row.pitch < 14 && !(starts_run && row.pitch >= 9))) return;
    painter.setPen(ink_on(tone));
    painter.setFont(text_font(row.pitch >= 14 ? 9.5 : 8.5, Weight::bold));
    painter.drawText(QRectF(at.x() - 10, at.y() - 8 + (sign == PoleSign::solar ? 1 : 0), 20, 16),
                     Qt::AlignCenter, QStringLiteral("%1").arg(plan.year % 100, 2, 10, QLatin1Char('0')));
}

// What people have said of the lamp, and what the records say: mark, lock, critical, down, order inferred,
// chosen.
void RailView::paint_bead_orders(QPainter& painter, const RailRow& row, const StringLoop& loop,
                                 int position) {
    const Look& look = desk_.look();
    const PoleIx pole = loop.lamps[std::size_t(position - 1)];
    const Pole& record = desk_.view().city.poles[pole.place()];
    const PolePlan& plan = desk_.plan().poles[pole.place()];
    const QPointF at = row.bead(position);
    const double r = bead_radius(row);
    if (record.status == PoleStatus::down) {
        painter.setPen(QPen(look.trouble, 1.8));
        painter.drawLine(at + QPointF(-r, -r), at + QPointF(r, r));
        painter.drawLine(at + QPointF(-r, r), at + QPointF(r, -r));
    }
    painter.setPen(Qt::NoPen), painter.setBrush(look.ink);
    if (plan.mark != Choice::undecided) painter.drawEllipse(at + QPointF(0, -r - 2.6), 1.9, 1.9);
    const double half = std::min(5.0, r);
    if (plan.lock != Choice::undecided || plan.year_locked)
        painter.drawRect(QRectF(at.x() - half, at.y() + r + 1, 2 * half, 2));
    if (record.critical) {
        QPainterPath up(at + QPointF(0, -r - 7));
        up.lineTo(at + QPointF(4, -r - 1)), up.lineTo(at + QPointF(-4, -r - 1)), up.closeSubpath();
        painter.fillPath(up, look.trouble);
    }
    painter.setBrush(Qt::NoBrush);
    if (loop.order_from != OrderFrom::given) {
        QPen dotted(look.ink3, 0.9);
        dotted.setDashPattern({1.2, 1.8});
        painter.setPen(dotted);
        painter.drawEllipse(at, r + 2, r + 2);
    }
    if (!desk_.is_selected(pole)) return;
    painter.setPen(QPen(look.ink, 1.8));
    painter.drawEllipse(at, r + 3, r + 3);
}

void RailView::paint_boundaries(QPainter& painter, const RailRow& row, const StringLoop& loop) {
    const bool is_dragged = drag_ && drag_->is_started && drag_->string == row.string;
    const std::vector<Boundary> boundaries = boundaries_of(loop, desk_.plan());
    for (std::size_t i = 0; i < boundaries.size(); ++i) {
        if (is_dragged && boundaries[i].year == drag_->boundary.year) continue;
        const bool is_keyed = hasFocus() && row.string == desk_.chosen_string() &&
                              std::size_t(keyboard_boundary_) % boundaries.size() == i;
        const bool is_hot = hot_ && hot_->string == row.string && hot_->boundary.year == boundaries[i].year;
        paint_bar(painter, row, boundaries[i], is_hot || is_keyed, false);
    }
    const auto ends = end_boundaries(loop, desk_.plan(), desk_.year());
    const bool is_end_hot =
        hot_ && hot_->string == row.string &&
        std::any_of(ends.begin(), ends.end(), [this](const Boundary& end) {
            return end.out_on == hot_->boundary.out_on && end.ret_on == hot_->boundary.ret_on;
        });
    if (is_end_hot && !is_dragged) paint_bar(painter, row, hot_->boundary, true, false);
    if (!is_dragged) return;
    QPen ghost(desk_.look().ink3, 1.4);
    ghost.setDashPattern({2, 2});
    painter.setPen(ghost);
    painter.drawLine(QPointF(row.edge(drag_->boundary.out_on), row.y_out - 12),
                     QPointF(row.edge(drag_->boundary.ret_on), row.y_ret + 12));
    for (const LoopCutBack& cut : loop.cutbacks) {
        const int ret_on = row.fold.lamps + 1 - cut.b;
        if (cut.a > row.fold.out || ret_on > row.fold.ret()) continue;
        const QPointF middle((row.edge(cut.a) + row.edge(ret_on)) / 2, row.box.center().y());
        draw_cutback(painter, desk_.look().hand, desk_.look().sheet, middle, 3.4, cut.confirmed);
    }
    Boundary held = drag_->boundary;
    held.out_on = drag_->move.out_on, held.ret_on = drag_->move.ret_on;
    held.cutback = cutback_at(loop, held.out_on, held.ret_on);
    held.stand = held.cutback < 0                                     ? Stand::jumpered
                 : loop.cutbacks[std::size_t(held.cutback)].confirmed ? Stand::confirmed
                                                                      : Stand::candidate;
    paint_bar(painter, row, held, true, true);
}

void RailView::paint_bar(QPainter& painter, const RailRow& row, const Boundary& boundary, bool is_hot,
                         bool is_held) {
    const Look& look = desk_.look();
    const double out_x = row.edge(boundary.out_on), ret_x = row.edge(boundary.ret_on),
                 middle = row.box.center().y();
    // One bar where both legs are cut at the same depth; else two, and a thin link between them.
    QPainterPath bar(QPointF(out_x, row.y_out - 11));
    const bool is_straight = std::abs(out_x - ret_x) < 0.5;
    bar.lineTo(out_x, is_straight ? row.y_ret + 11 : middle - 1);
    if (!is_straight) bar.moveTo(ret_x, middle + 1), bar.lineTo(ret_x, row.y_ret + 11);
    painter.setBrush(Qt::NoBrush);
    painter.setPen(QPen(look.sheet, is_held ? 10 : 7));
    painter.drawPath(bar);
    QPen pen(is_hot ? look.hand : look.ink,
             is_held  ? 4
             : is_hot ? 3.4
                      : 1.6,
             Qt::SolidLine, is_held ? Qt::RoundCap : Qt::FlatCap);
    if (boundary.stand == Stand::candidate) pen.setDashPattern({2, 1.5});
    painter.setPen(pen);
    painter.drawPath(bar);
    pen.setWidthF(1.2);
    painter.setPen(pen);
    if (!is_straight) painter.drawLine(QPointF(out_x, middle), QPointF(ret_x, middle));
    const QPointF at((out_x + ret_x) / 2, middle);
    if (boundary.stand == Stand::jumpered) {
        painter.setPen(QPen(is_hot ? look.hand : look.ink, 1.3)), painter.setBrush(look.sheet);
        painter.drawEllipse(at, 2.8, 2.8);
    } else {
        draw_cutback(painter, is_hot ? look.hand : look.ink, look.sheet, at, 5,
                     boundary.stand == Stand::confirmed);
    }
}

void RailView::paint_words(QPainter& painter, const RailRow& row) {
    const StringYear* before = string_year(desk_.phase(), row.string, columns_.first_year - 1);
    for (int year = columns_.first_year; year < columns_.first_year + columns_.count; ++year) {
        const StringYear* state = string_year(desk_.phase(), row.string, year);
        const double x = columns_.x_of(year) + 4, right = columns_.x_of(year) + columns_.width - 8,
                     middle = row.box.center().y();
        if (state == nullptr || (state->lamps == 0 && before != nullptr && before->lamps == 0)) {
            painter.setFont(text_font(11.5)), painter.setPen(desk_.look().ink3);
            painter.drawText(QPointF(x, middle), QStringLiteral("\u2013"));
        } else {
            paint_word(painter, *state, before, x, right, middle);
            if (state->lamps > 0 && state->transformer.is_valid())
                paint_window(painter, *state, x, right, middle + 8);
        }
        before = state;
    }
}

// How the string sits on its transformer at a year's end, in a word and a number.
void RailView::paint_word(QPainter& painter, const StringYear& state, const StringYear* before, double x,
                          double right, double y) {
    const Look& look = desk_.look();
    const bool is_over = state.lamps == 0, is_bad = !is_over && is_trouble(state.verdict);
    const bool is_swap = !is_over && !is_bad && before != nullptr && before->transformer.is_valid() &&
                         state.transformer.is_valid() && state.transformer != before->transformer;
    QString word = verdict_word(state.verdict);
    if (is_swap) {
        const double rated_kw = desk_.view().city.transformers[state.transformer.place()].rated_kw;
        word = tr("swap %1").arg(number_text(rated_kw, rated_kw == std::floor(rated_kw) ? 0 : 1));
    }
    const QString share =
        is_over || !state.transformer.is_valid() ? QString() : percent_text(state.loading_frac);
    const QFont word_font = text_font(11.5, is_bad || is_swap ? Weight::bold : Weight::normal);
    const QFont share_font = text_font(11.5, is_bad ? Weight::bold : Weight::normal);
    const double share_width = QFontMetricsF(share_font).horizontalAdvance(share);
    painter.setPen(is_bad ? look.trouble : look.ink);
    painter.setFont(word_font);
    const bool has_room = QFontMetricsF(word_font).horizontalAdvance(word) + share_width + 6 <= right - x;
    if (has_room || share.isEmpty())
        painter.drawText(QPointF(x, y - 1), word); // else the word is in the tooltip
    painter.setFont(share_font);
    painter.setPen(is_bad ? look.trouble : look.ink2);
    painter.drawText(QPointF(right - share_width, y - 1), share);
    if (is_bad) painter.fillRect(QRectF(x, y + 13, 9, 2.6), look.trouble);
}

// The load in its window: from the lowest load that the unit holds to its rating.
void RailView::paint_window(QPainter& painter, const StringYear& state, double x, double right, double y) {
    const Look& look = desk_.look();
    const double min_frac = desk_.view().city.transformers[state.transformer.place()].min_frac.value_or(0.5);
    const auto place = [&](double frac) { return x + (right - x) * std::clamp(frac / 1.1, 0.0, 1.0); };
    painter.setPen(QPen(look.hair, 1.2)), painter.drawLine(QPointF(x, y), QPointF(right, y));
    painter.setPen(QPen(look.ink3, 2.4)),
        painter.drawLine(QPointF(place(min_frac), y), QPointF(place(1.0), y));
    painter.setPen(Qt::NoPen), painter.setBrush(is_trouble(state.verdict) ? look.trouble : look.ink);
    painter.drawEllipse(QPointF(place(state.loading_frac), y), 2.7, 2.7);
}

} // namespace unstring
