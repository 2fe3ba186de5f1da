#include "app/window/card/month_chart.h"

#include <QLocale>
#include <QPainter>

#include <algorithm>
#include <cmath>

#include "app/window/look/words.h"

namespace unstring {
namespace {

const char* const kMonths = "JFMAMJJASOND";

double round_step(double most) {
    const double power = std::pow(10.0, std::floor(std::log10(std::max(most, 1e-6) / 3)));
    for (const double factor : {1.0, 2.0, 5.0})
        if (most / (factor * power) <= 4) return factor * power;
    return 10 * power;
}

} // namespace

MonthChart::MonthChart(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("month_chart");
    setFixedHeight(164);
}

void MonthChart::set_answer(const HeadAnswer* answer) {
    has_answer_ = answer != nullptr;
    if (answer != nullptr)
        head_ = to_q(answer->head), supply_ = answer->supply_kwh, demand_ = answer->demand_kwh;
    setAccessibleName(tr("Energy of %1 by month, against what the lamp needs").arg(head_));
    update();
}

void MonthChart::paintEvent(QPaintEvent*) {
    if (!has_answer_) return;
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    painter.setFont(text_font(12.5, Weight::bold)), painter.setPen(look.ink);
    painter.drawText(QPointF(0, 12), QFontMetricsF(painter.font())
                                         .elidedText(tr("%1: kWh in, against kWh needed").arg(head_),
                                                     Qt::ElideMiddle, width()));
    const double most = std::max(*std::max_element(supply_.begin(), supply_.end()),
                                 *std::max_element(demand_.begin(), demand_.end()));
    if (most <= 0) return;
    const QRectF box(30, 24, width() - 34, 104);
    const double step = round_step(most), column = box.width() / 12;
    const auto level = [&](double kwh) { return box.bottom() - box.height() * kwh / (most * 1.05); };
    painter.setFont(text_font(10.5));
    for (double kwh = step; kwh <= most; kwh += step) {
        painter.setPen(QPen(look.hair2, 1)),
            painter.drawLine(QPointF(box.left(), level(kwh)), QPointF(box.right(), level(kwh)));
        painter.setPen(look.ink2),
            painter.drawText(QRectF(0, level(kwh) - 8, 25, 16), Qt::AlignRight | Qt::AlignVCenter,
                             number_text(kwh, step < 1 ? 1 : 0));
    }
    int short_months = 0;
    std::size_t worst = 0;
    QPolygonF need;
    for (std::size_t m = 0; m < 12; ++m) {
        const double x = box.left() + column * double(m);
        const bool is_short = supply_[m] < demand_[m];
        short_months += is_short ? 1 : 0;
        if (supply_[m] - demand_[m] < supply_[worst] - demand_[worst]) worst = m;
        const QRectF bar(x + column * 0.16, level(supply_[m]), column * 0.68,
                         box.bottom() - level(supply_[m]));
        painter.fillRect(bar, is_short ? look.short_bar : look.solar);
        if (is_short) {
            QPen broken(look.trouble, 1);
            broken.setDashPattern({2, 2});
            painter.setPen(broken), painter.setBrush(Qt::NoBrush);
            painter.drawRect(
                QRectF(bar.left(), level(demand_[m]), bar.width(), bar.top() - level(demand_[m])));
        }
        need << QPointF(x, level(demand_[m])) << QPointF(x + column, level(demand_[m]));
        painter.setFont(text_font(10.5, is_short ? Weight::bold : Weight::normal)),
            painter.setPen(is_short ? look.trouble : look.ink2);
        painter.drawText(QRectF(x, box.bottom() + 2, column, 14), Qt::AlignCenter,
                         QString(QLatin1Char(kMonths[m])));
    }
    painter.setPen(QPen(look.ink2, 1)), painter.drawLine(box.bottomLeft(), box.bottomRight());
    painter.setPen(QPen(look.ink, 1.6)), painter.drawPolyline(need);
    painter.drawLine(QPointF(0, 157), QPointF(14, 157));
    painter.setFont(text_font(11)), painter.setPen(look.ink2),
        painter.drawText(QPointF(18, 161), tr("needed"));
    painter.setFont(text_font(11, Weight::bold)), painter.setPen(short_months > 0 ? look.trouble : look.ink);
    const QString words =
        short_months > 0 ? tr("%1 short, worst %2: %3 of %4 kWh")
                               .arg(count_text(short_months, tr("month"), tr("months")),
                                    QLocale(QLocale::English).monthName(int(worst) + 1, QLocale::ShortFormat),
                                    number_text(supply_[worst], 1), number_text(demand_[worst], 1))
                         : tr("enough in every month of a mean year");
    painter.drawText(QRectF(70, 149, width() - 72, 15), Qt::AlignRight | Qt::AlignVCenter, words);
}

} // namespace unstring
