#include "app/window/stepline/step_knot.h"

#include <QPainter>

#include <algorithm>
#include <cmath>

#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr double kKnot_x = 14, kWord_x = 28;

QString remedy_of(Step step) {
    switch (step) {
    case Step::gather:
        return QObject::tr("reads the city's files into the project");
    case Step::vet:
        return QObject::tr("checks the records and settles the wiring order");
    case Step::shade:
        return QObject::tr("works out the sky over each pole and the nights dark of each solar head");
    case Step::decide:
        return QObject::tr("chooses keep, rewire or solar for all poles together");
    case Step::phase:
        return QObject::tr("gives every pole its year, within money and crew hours");
    case Step::hand_out:
        break;
    }
    return QObject::tr("writes the work orders of each crew");
}

} // namespace

StepKnot::StepKnot(Desk& desk, Step step, QWidget* parent)
    : QAbstractButton(parent), desk_(desk), step_(step) {
    setObjectName(QStringLiteral("step_") + QString::fromLatin1(text_of(step)).replace('-', '_'));
    setText(step_word(step));
    setFocusPolicy(Qt::StrongFocus);
    setCursor(Qt::PointingHandCursor);
    setAttribute(Qt::WA_Hover);
    refresh();
}

StepStanding StepKnot::standing() const {
    if (!desk_.is_open()) return StepStanding::not_yet;
    return desk_.view().steps[std::size_t(step_)].standing;
}

QString StepKnot::state_text() const {
    if (desk_.running_step() == step_) {
        const double done = desk_.running_frac(), seconds = desk_.running_seconds();
        if (done < 0.02 || seconds < 1) return tr("%1 done").arg(percent_text(done));
        return tr("%1, %2 s left")
            .arg(percent_text(done), number_text(std::ceil(seconds * (1 - done) / done)));
    }
    if (!desk_.is_open()) return step_ == Step::gather ? tr("start here") : tr("not yet");
    return standing_text(step_, desk_.view().steps[std::size_t(step_)]);
}

QSize StepKnot::sizeHint() const {
    const double word = QFontMetricsF(text_font(15, Weight::bold)).horizontalAdvance(text());
    const double state = QFontMetricsF(text_font(11, Weight::bold)).horizontalAdvance(state_text());
    return {int(kWord_x + std::max(word + 34, state + 10)) + 4, 48};
}

void StepKnot::refresh() {
    setAccessibleName(tr("Step %1: %2").arg(text(), state_text()));
    setToolTip(tr("%1 %2. State: %3. Click: run it, or open what it found; right click: choose.")
                   .arg(text(), remedy_of(step_), state_text()));
    updateGeometry();
    update();
}

void StepKnot::paint_knot(QPainter& painter, QPointF at) {
    const Look& look = desk_.look();
    if (desk_.running_step() == step_) {
        painter.setPen(QPen(look.hand, 1.6)), painter.setBrush(Qt::NoBrush),
            painter.drawEllipse(at, 8.4, 8.4);
        painter.setPen(Qt::NoPen), painter.setBrush(look.hand), painter.drawEllipse(at, 5, 5);
        return;
    }
    switch (standing()) {
    case StepStanding::stopped:
        painter.fillRect(QRectF(at.x() - 4.5, at.y() - 1.3, 9, 2.6), look.trouble);
        return;
    case StepStanding::up_to_date:
        painter.setPen(Qt::NoPen), painter.setBrush(look.ink), painter.drawEllipse(at, 4.2, 4.2);
        return;
    case StepStanding::by_hand:
        painter.setPen(Qt::NoPen), painter.setBrush(look.hand), painter.drawEllipse(at, 5, 5);
        return;
    case StepStanding::stale:
        painter.setPen(QPen(look.ink, 1.4)), painter.setBrush(Qt::NoBrush), painter.drawEllipse(at, 4, 4);
        painter.setPen(Qt::NoPen), painter.setBrush(look.ink),
            painter.drawPie(QRectF(at.x() - 4, at.y() - 4, 8, 8), 90 * 16, 180 * 16);
        return;
    case StepStanding::not_yet:
        painter.setPen(QPen(look.ink3, 1.4)), painter.setBrush(look.sheet), painter.drawEllipse(at, 4, 4);
        return;
    }
}

// The thread to the next knot: whole while up to date, broken from a step that is not, filling green while it
// runs.
void StepKnot::paint_thread(QPainter& painter, double from) {
    if (step_ == Step::hand_out || from >= width() - 2) return;
    const Look& look = desk_.look();
    const double y = 18, to = width() - 2;
    const bool is_whole = standing() == StepStanding::up_to_date || standing() == StepStanding::by_hand;
    QPen pen(is_whole ? look.ink : look.dead, 1.5);
    if (!is_whole) pen.setDashPattern({2.4, 2.4});
    painter.setPen(pen);
    painter.drawLine(QPointF(from, y), QPointF(to, y));
    if (desk_.running_step() != step_) return;
    painter.setPen(QPen(look.hand, 3));
    painter.drawLine(QPointF(from, y), QPointF(from + (to - from) * desk_.running_frac(), y));
}

void StepKnot::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    const bool is_running = desk_.running_step() == step_, is_bad = standing() == StepStanding::stopped;
    paint_knot(painter, QPointF(kKnot_x, 18));
    const QFont font = text_font(15, is_running || underMouse() ? Weight::bold : Weight::normal);
    painter.setFont(font), painter.setPen(look.ink);
    painter.drawText(QPointF(kWord_x, 23), text());
    paint_thread(painter, kWord_x + QFontMetricsF(text_font(15, Weight::bold)).horizontalAdvance(text()) + 8);
    const bool has_warnings =
        desk_.is_open() &&
        desk_.view().steps[std::size_t(step_)].warnings + desk_.view().steps[std::size_t(step_)].errors > 0;
    painter.setFont(text_font(11, is_bad || is_running || has_warnings ? Weight::bold : Weight::normal));
    const bool is_green =
        is_running || standing() == StepStanding::by_hand || (!desk_.is_open() && step_ == Step::gather);
    painter.setPen(is_bad ? look.trouble : is_green ? look.hand : look.ink2);
    painter.drawText(QPointF(kWord_x, 39), state_text());
    if (!hasFocus()) return;
    painter.setPen(QPen(look.ink, 2)), painter.setBrush(Qt::NoBrush);
    painter.drawRoundedRect(QRectF(rect()).adjusted(2, 2, -2, -2), 3, 3);
}

} // namespace unstring
