#include "app/window/ledger/ledger_view.h"

#include <QHelpEvent>
#include <QMouseEvent>
#include <QPainter>
#include <QToolTip>

#include <algorithm>

#include "app/window/look/signs.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr double kHead_px = 26, kRow_px = 16.5;

} // namespace

LedgerView::LedgerView(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("ledger");
    setAccessibleName(tr("Ledger of the years"));
    setFixedHeight(int(kHead_px + 9 * kRow_px + 12));
    setMouseTracking(true);
    const auto redraw = [this] { update(); };
    connect(&desk_, &Desk::view_changed, this, redraw);
    connect(&desk_, &Desk::year_changed, this, redraw);
    connect(&desk_, &Desk::preview_changed, this, redraw);
    connect(&desk_, &Desk::selection_changed, this, redraw);
    connect(&desk_, &Desk::look_changed, this, redraw);
}

void LedgerView::set_heading(const QString& heading) {
    heading_ = heading;
    update();
}

double LedgerView::label_width() const {
    return QFontMetricsF(text_font(11.5)).horizontalAdvance(tr("lamps left on strings")) + 12;
}

void LedgerView::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    painter.fillRect(rect(), look.sheet);
    painter.setPen(look.hair);
    painter.drawLine(0, 0, width(), 0);
    painter.drawLine(0, height() - 1, width(), height() - 1);
    if (!desk_.is_open()) return;
    columns_ = year_columns(width(), desk_.plan().settings);
    paint_columns(painter);
    paint_reading(painter, QRectF(16, 6, columns_.left - label_width() - 36, height() - 12));
}

void LedgerView::paint_columns(QPainter& painter) {
    const Look& look = desk_.look();
    if (desk_.year() >= columns_.first_year)
        painter.fillRect(QRectF(columns_.x_of(desk_.year()), 1, columns_.width, height() - 2), look.band);
    for (int year = columns_.first_year; year < columns_.first_year + columns_.count; ++year) {
        const double x = columns_.x_of(year) + 4;
        const bool is_looked_at = year == desk_.year();
        painter.setPen(QPen(look.year_edge, 1)),
            painter.setBrush(year_tone(look, year - columns_.first_year, columns_.count));
        if (columns_.width >= 56) painter.drawRect(QRectF(x, 8, 11, 11));
        painter.setFont(
            text_font(columns_.width >= 56 ? 14 : 12, is_looked_at ? Weight::bold : Weight::strong));
        painter.setPen(is_looked_at ? look.band_ink : look.ink);
        painter.drawText(QPointF(columns_.width >= 56 ? x + 16 : x, 18.5), QString::number(year));
    }
    const PhaseResult* phase = desk_.phase();
    const std::vector<LedgerRow> rows = ledger_rows(desk_.view(), phase, columns_);
    double y = kHead_px;
    for (const LedgerRow& row : rows) {
        painter.setFont(text_font(11.5)), painter.setPen(look.ink2);
        painter.drawText(QRectF(columns_.left - label_width() - 8, y, label_width(), kRow_px),
                         Qt::AlignRight | Qt::AlignVCenter, row.label);
        for (int place = 0; place < columns_.count; ++place)
            paint_cell(painter, row.cells[std::size_t(place)], columns_.x_of(columns_.first_year + place) + 4,
                       y);
        y += kRow_px;
    }
    if (phase == nullptr) return;
    const double done_y = kHead_px + 6 * kRow_px + kRow_px / 2;
    for (const PhaseYear& year : phase->years) {
        if (year.year < columns_.first_year || year.year >= columns_.first_year + columns_.count) continue;
        const double x = columns_.x_of(year.year) + 4;
        painter.setFont(text_font(11.5));
        double at = x + 5;
        for (const auto& [sign, count] :
             {std::pair(PoleSign::rewire, year.rewire), std::pair(PoleSign::solar, year.solar)}) {
            Look plain = look;
            plain.rewire = plain.solar = look.ink2;
            if (columns_.width >= 56)
                draw_pole_sign(painter, plain, sign, true, QPointF(at, done_y), 5, false);
            painter.setPen(look.ink);
            const QString number = QString::number(count);
            painter.drawText(QPointF(columns_.width >= 56 ? at + 8 : at - 4, done_y + 4), number);
            at += (columns_.width >= 56 ? 20 : 6) + QFontMetricsF(painter.font()).horizontalAdvance(number);
        }
    }
}

void LedgerView::paint_cell(QPainter& painter, const LedgerCell& cell, double x, double y) {
    const Look& look = desk_.look();
    const double room = columns_.width - 8;
    const QFont font = text_font(11.5, cell.is_over ? Weight::bold : Weight::normal);
    const QFontMetricsF metrics(font);
    QString number = cell.number, of = cell.of;
    if (metrics.horizontalAdvance(number + of) > room) of.clear();
    if (metrics.horizontalAdvance(number) > room)
        number = number.section(' ', 0, 0); // the word stays in the tooltip
    painter.setFont(font);
    painter.setPen(cell.is_over ? look.trouble : look.ink);
    painter.drawText(QPointF(x, y + 11), number);
    painter.setPen(look.ink2);
    painter.drawText(QPointF(x + metrics.horizontalAdvance(number), y + 11), of);
    if (cell.used_frac < 0) return;
    const double limit_x = x + room - 8;
    const double full = limit_x - x;
    painter.fillRect(QRectF(x, y + 13.2, full, 2.4), look.hair2);
    painter.fillRect(QRectF(x, y + 13.2, full * std::clamp(cell.used_frac, 0.0, 1.0), 2.4), look.ink3);
    if (cell.is_over)
        painter.fillRect(QRectF(limit_x, y + 11.8, std::min(8.0, full * (cell.used_frac - 1)) + 2, 5),
                         look.trouble);
    painter.fillRect(QRectF(limit_x, y + 11.5, 1.2, 5.5), look.ink2);
}

void LedgerView::paint_reading(QPainter& painter, const QRectF& box) {
    if (box.width() < 120) return;
    const QRectF inner = box.adjusted(12, 0, 0, 0);
    if (desk_.has_preview() && desk_.view().phase) {
        painter.fillRect(QRectF(box.left(), box.top() + 3, 3, 16), desk_.look().hand);
        return paint_held(painter, inner);
    }
    paint_string(painter, inner);
}

void LedgerView::paint_held(QPainter& painter, const QRectF& box) {
    const Look& look = desk_.look();
    painter.setFont(text_font(16, Weight::bold)), painter.setPen(look.ink);
    painter.drawText(QRectF(box.left(), box.top(), box.width(), 22), Qt::AlignLeft | Qt::AlignVCenter,
                     heading_);
    const std::vector<ReadingRow> rows =
        reading_rows(desk_.view(), *desk_.view().phase, *desk_.phase(), desk_.chosen_string());
    const double was = box.left() + box.width() * 0.26, now = box.left() + box.width() * 0.48,
                 so = box.left() + box.width() * 0.78;
    double y = box.top() + 26;
    painter.setFont(text_font(11)), painter.setPen(look.ink2);
    painter.drawText(QPointF(was, y + 10), tr("was")), painter.drawText(QPointF(now, y + 10), tr("now")),
        painter.drawText(QPointF(so, y + 10), tr("so"));
    y += 16;
    if (rows.empty()) {
        painter.setFont(text_font(12.5)), painter.setPen(look.ink);
        painter.drawText(QPointF(box.left(), y + 14), tr("No number of the ledger changes."));
    }
    const auto fits = std::size_t(std::max(1.0, (box.bottom() - y) / 18.0));
    for (std::size_t i = 0; i < rows.size() && i < fits; ++i, y += 18) {
        const ReadingRow& row = rows[i];
        const bool is_last = i + 1 == fits && rows.size() > fits;
        painter.setPen(look.hair2), painter.drawLine(QPointF(box.left(), y), QPointF(box.right(), y));
        painter.setFont(text_font(12.5)), painter.setPen(look.ink2);
        if (is_last) {
            painter.drawText(
                QPointF(box.left(), y + 13),
                tr("and %1 more").arg(count_text(long(rows.size() - i), tr("change"), tr("changes"))));
            break;
        }
        painter.drawText(QPointF(box.left(), y + 13), row.what);
        painter.drawText(QPointF(was, y + 13), row.was);
        painter.setFont(text_font(12.5, row.is_trouble ? Weight::bold : Weight::normal)),
            painter.setPen(row.is_trouble ? look.trouble : look.ink);
        painter.drawText(QPointF(now, y + 13), row.now);
        painter.setFont(text_font(12.5, Weight::bold));
        if (row.is_trouble) painter.fillRect(QRectF(so, y + 8, 9, 2.6), look.trouble);
        painter.drawText(QPointF(row.is_trouble ? so + 13 : so, y + 13), row.so);
    }
}

void LedgerView::paint_string(QPainter& painter, const QRectF& box) {
    const Look& look = desk_.look();
    const PhaseResult* phase = desk_.phase();
    double y = box.top();
    const auto paragraph = [&](const QString& text, double size, Weight weight, const QColor& color) {
        if (y > box.bottom() - 14) return;
        painter.setFont(text_font(size, weight)), painter.setPen(color);
        const QRectF needed = painter.boundingRect(QRectF(box.left(), y, box.width(), box.bottom() - y),
                                                   Qt::AlignLeft | Qt::TextWordWrap, text);
        painter.drawText(QRectF(box.left(), y, box.width(), box.bottom() - y),
                         Qt::AlignLeft | Qt::TextWordWrap, text);
        y += needed.height() + 6;
    };
    if (phase == nullptr) {
        paragraph(tr("No years yet"), 16, Weight::bold, look.ink);
        paragraph(tr("Run the steps up to phase: it gives every pole its year and fills these columns."),
                  12.5, Weight::normal, look.ink2);
        return;
    }
    const StringIx string = desk_.chosen_string();
    const StringYear* state = string.is_valid() ? string_year(phase, string, desk_.year()) : nullptr;
    if (state != nullptr) {
        paragraph(string_sentence(desk_.view(), *state), 14, Weight::strong,
                  is_trouble(state->verdict) && state->lamps > 0 ? look.trouble : look.ink);
    } else {
        const QString gap = phase->bound > 0 ? tr(", at most %1 above the best there can be")
                                                   .arg(QStringLiteral("%1 %").arg(number_text(
                                                       100 * (phase->cost - phase->bound) / phase->cost, 1)))
                                             : QString();
        paragraph(tr("The plan costs %1 in present value%2.").arg(money_text(phase->cost), gap), 14,
                  Weight::strong, look.ink);
        paragraph(tr("Choose a string to read how it stands in the year looked at."), 12.5, Weight::normal,
                  look.ink2);
    }
    if (phase->not_reached > 0)
        paragraph(tr("%1 not reached by %2.")
                      .arg(count_text(phase->not_reached, tr("pole is"), tr("poles are")))
                      .arg(desk_.plan().last_year()),
                  12.5, Weight::bold, look.trouble);
    std::size_t shown = 0;
    const std::string id = string.is_valid() ? desk_.view().city.strings[string.place()].id : std::string();
    for (const Finding& failure : phase->failures) {
        if (failure.severity == Severity::notice ||
            (!id.empty() && failure.record.find(id) == std::string::npos &&
             !failure.record.starts_with("year")))
            continue;
        if (++shown > 4 || y > box.bottom() - 30) break;
        paragraph(QStringLiteral("%1: %2").arg(to_q(failure.record), to_q(failure.found)), 12, Weight::normal,
                  failure.severity == Severity::error ? look.trouble : look.ink);
    }
}

void LedgerView::mousePressEvent(QMouseEvent* event) {
    if (!desk_.is_open()) return;
    if (const int year = columns_.year_at(event->position().x()); year != 0) desk_.set_year(year);
}

bool LedgerView::event(QEvent* event) {
    if (event->type() != QEvent::ToolTip || !desk_.is_open()) return QWidget::event(event);
    const auto* help = static_cast<QHelpEvent*>(event);
    const int year = columns_.year_at(help->pos().x());
    const int row = int((help->pos().y() - kHead_px) / kRow_px);
    const std::vector<LedgerRow> rows = ledger_rows(desk_.view(), desk_.phase(), columns_);
    if (year == 0 || row < 0 || row >= int(rows.size())) {
        QToolTip::hideText();
        return true;
    }
    const LedgerCell& cell = rows[std::size_t(row)].cells[std::size_t(year - columns_.first_year)];
    const QString text = cell.tip.isEmpty() ? cell.number + cell.of : cell.tip;
    QToolTip::showText(help->globalPos(),
                       QStringLiteral("%1, %2\n%3").arg(year).arg(rows[std::size_t(row)].label, text), this);
    return true;
}

} // namespace unstring
