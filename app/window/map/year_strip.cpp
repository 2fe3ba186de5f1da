#include "app/window/map/year_strip.h"

#include <QKeyEvent>
#include <QMouseEvent>
#include <QPainterPath>

#include <array>
#include <cmath>

#include "app/window/look/focus.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr int kPlay_ms = 900; // a year

QString colour_word(PoleColour colour) {
    switch (colour) {
    case PoleColour::year:
        return QObject::tr("year");
    case PoleColour::shade:
        return QObject::tr("shade");
    case PoleColour::decision:
        break;
    }
    return QObject::tr("decision");
}

std::array<long, 6> count_signs(const Desk& desk) {
    std::array<long, 6> counts{};
    for (std::size_t i = 0; i < desk.view().city.poles.size(); ++i)
        ++counts[std::size_t(pole_sign(desk.view(), desk.plan(), PoleIx{i}))];
    return counts;
}

} // namespace

YearStrip::YearStrip(Desk& desk, MapView& map, QWidget* parent) : QWidget(parent), desk_(desk), map_(map) {
    setObjectName("year_strip");
    setAccessibleName(tr("Year looked at, and what the signs mean"));
    setFocusPolicy(Qt::StrongFocus);
    setFixedHeight(58);
    setToolTip(tr("Drag, or [ and ], to look at another year. Click a word of the legend to hide or show it; "
                  "click the first word for another colouring."));
    const auto redraw = [this] { update(); };
    connect(&desk_, &Desk::view_changed, this, redraw);
    connect(&desk_, &Desk::year_changed, this, redraw);
    connect(&desk_, &Desk::preview_changed, this, redraw);
    connect(&desk_, &Desk::look_changed, this, redraw);
    play_.setInterval(kPlay_ms);
    connect(&play_, &QTimer::timeout, this, [this] {
        if (desk_.year() >= desk_.plan().last_year())
            play_.stop();
        else
            desk_.set_year(desk_.year() + 1);
        update();
    });
}

QRectF YearStrip::slider() const {
    const double left = std::max(width() * (width() < 900 ? 0.6 : 0.52), 330.0);
    return {left, 5, std::max(120.0, width() - left - 34), 31};
}

QRectF YearStrip::play_box() const { return {slider().left() - 108, 8, 22, 26}; }

QPointF YearStrip::place_of_year(int year) const {
    const QRectF box = slider();
    const int years = std::max(1, desk_.plan().settings.years);
    return {box.left() + box.width() * (year - desk_.plan().settings.first_year + 1) / years, box.bottom()};
}

std::vector<int> YearStrip::lamps_left() const {
    const Plan& plan = desk_.plan();
    std::vector<int> left(std::size_t(plan.settings.years) + 1, 0);
    for (const StringIx string : desk_.scene().series)
        for (const PoleIx lamp : desk_.scene().loops[string.place()].lamps)
            for (std::size_t t = 0; t < left.size(); ++t)
                if (!is_done_by(plan, lamp, plan.settings.first_year - 1 + int(t)) &&
                    is_candidate(desk_.view().city, desk_.view().city.poles[lamp.place()]))
                    ++left[t];
    return left;
}

void YearStrip::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.fillRect(rect(), desk_.look().sheet);
    painter.setPen(desk_.look().hair);
    painter.drawLine(0, 0, width(), 0);
    if (!desk_.is_open()) return;
    paint_legend(painter);
    paint_slider(painter);
    if (!shows_focus_) return;
    painter.setPen(QPen(desk_.look().ink, 2));
    painter.setBrush(Qt::NoBrush);
    painter.drawRoundedRect(QRectF(rect()).adjusted(2, 2, -2, -2), 3, 3);
}

void YearStrip::paint_legend(QPainter& painter) {
    const Look& look = desk_.look();
    words_.clear();
    const QFont font = text_font(12.5), strong = text_font(12.5, Weight::bold);
    const QFontMetricsF metrics(strong);
    double x = 16;
    painter.setFont(font), painter.setPen(look.ink2);
    const QString lead = tr("Poles by ");
    painter.drawText(QPointF(x, 22), lead);
    const double from = x + QFontMetricsF(font).horizontalAdvance(lead);
    const QString colour = colour_word(map_.style().colour);
    painter.setFont(strong), painter.setPen(look.hand);
    painter.drawText(QPointF(from, 22), colour);
    words_.push_back({QRectF(x, 6, from - x + metrics.horizontalAdvance(colour), 22), -1});
    x = words_.back().box.right() + 20;
    const double limit = play_box().left() - 10;
    const std::array<long, 6> counts = count_signs(desk_);
    const std::array<QString, 6> names{tr("not decided"), tr("keep"),        tr("rewire"),
                                       tr("solar"),       tr("on parallel"), tr("not in the plan")};
    std::vector<PoleSign> signs{PoleSign::keep, PoleSign::rewire, PoleSign::solar};
    for (const PoleSign sign : {PoleSign::undecided, PoleSign::parallel, PoleSign::out_of_plan})
        if (counts[std::size_t(sign)] > 0) signs.push_back(sign);
    const auto full_word = [&](PoleSign sign) {
        return QStringLiteral("%1 %2").arg(number_text(double(counts[std::size_t(sign)])),
                                           names[std::size_t(sign)]);
    };
    double full_width = 0;
    for (const PoleSign sign : signs) full_width += 33 + metrics.horizontalAdvance(full_word(sign));
    // Where there is no room the shapes and their numbers speak alone, those outside the plan first.
    const auto is_outside = [](PoleSign sign) {
        return sign == PoleSign::parallel || sign == PoleSign::out_of_plan;
    };
    double plan_width = 0;
    for (const PoleSign sign : signs)
        plan_width +=
            33 + metrics.horizontalAdvance(is_outside(sign) ? number_text(double(counts[std::size_t(sign)]))
                                                            : full_word(sign));
    const bool all_in_words = x + full_width <= limit, is_compact = x + plan_width > limit;
    for (const PoleSign sign : signs) {
        const QString word = all_in_words || (!is_compact && !is_outside(sign))
                                 ? full_word(sign)
                                 : number_text(double(counts[std::size_t(sign)]));
        if (x + 17 + metrics.horizontalAdvance(word) > limit + 8) break;
        const bool is_shown = map_.style().shown[std::size_t(sign)];
        draw_pole_sign(painter, look, sign, true, QPointF(x + 6, 17.5), 6, false);
        painter.setFont(font), painter.setPen(is_shown ? look.ink : look.ink3);
        painter.drawText(QPointF(x + 17, 22), word);
        const QRectF box(x, 6, 17 + QFontMetricsF(font).horizontalAdvance(word), 20);
        if (is_shown)
            painter.setPen(QPen(look.ink, 1.4)), painter.drawLine(box.bottomLeft(), box.bottomRight());
        words_.push_back({box, int(sign)});
        x = box.right() + (is_compact ? 9 : 16);
    }
    painter.setFont(text_font(11)), painter.setPen(look.ink2);
    x = 16;
    const QFontMetricsF small(text_font(11));
    const auto key = [&](double symbol_width, const QString& word, const auto& draw) {
        if (x + symbol_width + small.horizontalAdvance(word) > limit) return;
        draw(QPointF(x, 43));
        painter.setPen(look.ink2);
        painter.drawText(QPointF(x + symbol_width + 5, 47), word);
        x += symbol_width + 5 + small.horizontalAdvance(word) + 14;
    };
    const QString when = desk_.year() < desk_.plan().settings.first_year
                             ? tr("today")
                             : tr("at the end of %1").arg(desk_.year());
    key(9, tr("done"), [&](QPointF at) { painter.fillRect(QRectF(at.x(), at.y() - 4, 8, 8), look.ink2); });
    key(9, tr("to come"), [&](QPointF at) {
        painter.setPen(QPen(look.ink2, 1.4)), painter.setBrush(Qt::NoBrush),
            painter.drawRect(QRectF(at.x() + 0.5, at.y() - 3.5, 7, 7));
    });
    key(20, tr("energised"),
        [&](QPointF at) { painter.setPen(QPen(look.ink, 1.6)), painter.drawLine(at, at + QPointF(20, 0)); });
    key(20, tr("dead %1").arg(when), [&](QPointF at) {
        QPen pen(look.dead, 1.6);
        pen.setDashPattern({2.4, 2.4});
        painter.setPen(pen), painter.drawLine(at, at + QPointF(20, 0));
    });
    key(10, tr("cut-back"),
        [&](QPointF at) { draw_cutback(painter, look.ink2, look.sheet, at + QPointF(5, 0), 4.5, true); });
}

void YearStrip::paint_slider(QPainter& painter) {
    const Look& look = desk_.look();
    const QRectF box = slider();
    const std::vector<int> left = lamps_left();
    const double most = std::max(1, left.front());
    QPainterPath stair, gone;
    const double step = box.width() / std::max(1, int(left.size()) - 1);
    const auto level = [&](int lamps) { return box.bottom() - (box.height() - 4) * lamps / most; };
    stair.moveTo(box.left(), level(left.front()));
    for (std::size_t t = 1; t < left.size(); ++t) {
        stair.lineTo(box.left() + step * double(t), level(left[t - 1]));
        stair.lineTo(box.left() + step * double(t), level(left[t]));
    }
    QPainterPath area = stair;
    area.lineTo(box.bottomRight()), area.lineTo(box.bottomLeft()), area.closeSubpath();
    const double at = place_of_year(desk_.year()).x();
    painter.save();
    painter.setClipRect(QRectF(box.left(), 0, at - box.left(), height()));
    QColor past = year_tone(look, 5, 8);
    past.setAlpha(look.is_night ? 150 : 130);
    painter.fillPath(area, past);
    painter.restore();
    painter.setPen(QPen(look.ink2, 1.2)), painter.setBrush(Qt::NoBrush);
    painter.drawPath(stair);
    painter.drawLine(box.bottomLeft(), box.bottomRight());
    paint_years(painter, box);
    painter.setFont(text_font(11)), painter.setPen(look.ink2);
    painter.drawText(QRectF(box.left() - 84, 6, 78, 30), Qt::AlignRight | Qt::AlignVCenter,
                     tr("%1 lamps\non strings").arg(number_text(left.front())));
    const auto looked = std::size_t(desk_.year() - desk_.plan().settings.first_year + 1);
    painter.setFont(text_font(11, Weight::bold)), painter.setPen(look.band_ink);
    const QString left_word = tr("%1 left").arg(number_text(left[looked]));
    const double wide = QFontMetricsF(painter.font()).horizontalAdvance(left_word);
    painter.drawText(QPointF(at + 6 + wide > width() ? at - wide - 6 : at + 6, 15), left_word);
    painter.setPen(QPen(look.band_ink, 1.4)), painter.drawLine(QPointF(at, 5), QPointF(at, box.bottom()));
    QPainterPath play;
    const QRectF knob = play_box();
    if (play_.isActive()) {
        play.addRect(QRectF(knob.left() + 4, knob.top() + 6, 4, 14)),
            play.addRect(QRectF(knob.left() + 11, knob.top() + 6, 4, 14));
    } else {
        play.moveTo(knob.left() + 5, knob.top() + 6), play.lineTo(knob.left() + 16, knob.top() + 13),
            play.lineTo(knob.left() + 5, knob.top() + 20);
        play.closeSubpath();
    }
    painter.fillPath(play, look.ink);
}

void YearStrip::paint_years(QPainter& painter, const QRectF& box) {
    const Look& look = desk_.look();
    const QFont font = text_font(11), bold = text_font(11.5, Weight::bold);
    const int first = desk_.plan().settings.first_year - 1, last = desk_.plan().last_year();
    const double step = box.width() / std::max(1, last - first);
    const int every = std::max(1, int(std::ceil(40.0 / step)));
    for (int year = first; year <= last; ++year) {
        const QPointF at = place_of_year(year);
        painter.setPen(QPen(look.ink3, 1)), painter.drawLine(at, at + QPointF(0, 4));
        if ((year - first) % every != 0 || std::abs(at.x() - place_of_year(desk_.year()).x()) < 40) continue;
        painter.setFont(font), painter.setPen(look.ink2);
        painter.drawText(QRectF(at.x() - 30, box.bottom() + 4, 60, 16), Qt::AlignCenter,
                         year == first ? tr("today") : QString::number(year));
    }
    const QPointF at = place_of_year(desk_.year());
    const QString word = desk_.year() == first ? tr("today") : QString::number(desk_.year());
    const double wide = QFontMetricsF(bold).horizontalAdvance(word) + 16;
    const QRectF pill(at.x() - wide / 2, box.bottom() + 2, wide, 18);
    painter.setPen(Qt::NoPen), painter.setBrush(look.band_ink);
    painter.drawRoundedRect(pill, 9, 9);
    painter.setPen(look.sheet), painter.setFont(bold);
    painter.drawText(pill, Qt::AlignCenter, word);
}

void YearStrip::go_to(QPointF at) {
    const QRectF box = slider();
    const double part = (at.x() - box.left()) / box.width();
    desk_.set_year(desk_.plan().settings.first_year - 1 +
                   int(std::lround(part * desk_.plan().settings.years)));
}

void YearStrip::toggle_play() {
    if (play_.isActive())
        play_.stop();
    else {
        if (desk_.year() >= desk_.plan().last_year()) desk_.set_year(desk_.plan().settings.first_year - 1);
        play_.start();
    }
    update();
}

void YearStrip::mousePressEvent(QMouseEvent* event) {
    if (!desk_.is_open() || event->button() != Qt::LeftButton) return;
    const QPointF at = event->position();
    if (play_box().adjusted(-4, -4, 4, 4).contains(at)) return toggle_play();
    if (at.x() >= slider().left() - 8) return go_to(at);
    MapStyle style = map_.style();
    for (const Word& word : words_) {
        if (!word.box.adjusted(-3, -3, 3, 3).contains(at)) continue;
        if (word.sign < 0)
            style.colour = PoleColour((int(style.colour) + 1) % 3);
        else
            style.shown[std::size_t(word.sign)] = !style.shown[std::size_t(word.sign)];
        map_.set_style(style);
        update();
        return;
    }
}

void YearStrip::mouseMoveEvent(QMouseEvent* event) {
    if (desk_.is_open() && event->buttons().testFlag(Qt::LeftButton) &&
        event->position().x() >= slider().left() - 8)
        go_to(event->position());
}

void YearStrip::keyPressEvent(QKeyEvent* event) {
    if (!desk_.is_open()) return;
    switch (event->key()) {
    case Qt::Key_Left:
        desk_.set_year(desk_.year() - 1);
        break;
    case Qt::Key_Right:
        desk_.set_year(desk_.year() + 1);
        break;
    case Qt::Key_Home:
        desk_.set_year(desk_.plan().settings.first_year - 1);
        break;
    case Qt::Key_End:
        desk_.set_year(desk_.plan().last_year());
        break;
    case Qt::Key_Space:
        toggle_play();
        break;
    default:
        QWidget::keyPressEvent(event);
    }
}

void YearStrip::focusInEvent(QFocusEvent* event) {
    shows_focus_ = is_by_keys(*event);
    update();
}

void YearStrip::focusOutEvent(QFocusEvent*) {
    shows_focus_ = false;
    update();
}

} // namespace unstring
