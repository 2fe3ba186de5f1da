#include "app/window/start_page.h"

#include <QGridLayout>
#include <QLabel>
#include <QPainter>
#include <QVBoxLayout>

#include <array>

#include "app/window/look/signs.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr double kRead_px = 190; // height of the drawing at the foot

QLabel* text_label(const QString& text, double size, Weight weight, QWidget* parent) {
    auto* label = new QLabel(text, parent);
    label->setFont(text_font(size, weight));
    label->setWordWrap(true);
    return label;
}

} // namespace

StartPage::StartPage(QWidget* parent) : QWidget(parent), look_(&day_look()) {
    setObjectName("start_page");
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(112, 56, 112, int(kRead_px) + 16);
    column->setSpacing(10);
    column->addWidget(text_label(tr("No city is open yet"), 30, Weight::bold, this));
    column->addWidget(text_label(tr("Which pole is rewired, which goes solar, which stays, and in which "
                                    "year, so that every string still works at every year end."),
                                 14, Weight::normal, this));
    column->addSpacing(18);
    column->addWidget(text_label(tr("Files that the six steps ask for"), 16, Weight::bold, this));
    auto* grid = new QGridLayout;
    grid->setHorizontalSpacing(24);
    grid->setVerticalSpacing(9);
    const std::array<std::array<const char*, 3>, 8> rows{
        {{"poles", "place, string, lamp, height of each pole", "needed"},
         {"circuits", "current, station, cable of each string", "needed"},
         {"transformers", "rating and state, in service or spare", "needed"},
         {"services", "where 120/240 V can be had, and how much", "needed for rewire"},
         {"streets", "centre lines, width, surface", "needed for rewire"},
         {"canopy, obstacles", "heights, as raster or outlines", "needed for solar"},
         {"climate", "twelve months, or hours of one year", "needed for solar"},
         {"budget", "money and crew hours of each year", "asked for in phase"}}};
    for (std::size_t i = 0; i < rows.size(); ++i)
        for (std::size_t j = 0; j < 3; ++j) {
            QLabel* cell = text_label(tr(rows[i][j]), 12.5, j == 0 ? Weight::bold : Weight::normal, this);
            cell->setWordWrap(false);
            grid->addWidget(cell, int(i), int(j));
        }
    grid->setColumnStretch(3, 1);
    column->addLayout(grid);
    column->addSpacing(14);
    auto* buttons = new QHBoxLayout;
    auto* open = new QPushButton(tr("Open a project"), this);
    open->setObjectName("start_open");
    auto* gather = new QPushButton(tr("Gather a city's files"), this);
    gather->setObjectName("start_gather");
    buttons->addWidget(gather);
    buttons->addWidget(open);
    buttons->addWidget(text_label(tr("or drop a project file on this window"), 12, Weight::normal, this), 1);
    column->addLayout(buttons);
    column->addStretch(1);
    setFocusProxy(gather);
    connect(open, &QPushButton::clicked, this, &StartPage::open_wanted);
    connect(gather, &QPushButton::clicked, this, &StartPage::gather_wanted);
}

void StartPage::set_look(const Look& look) {
    look_ = &look;
    update();
}

// How a string is read: one row of the rail with its parts named. The beads are a drawing, no data.
void StartPage::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.fillRect(rect(), look_->sheet);
    const double top = height() - kRead_px;
    painter.setPen(look_->hair);
    painter.drawLine(QPointF(0, top), QPointF(width(), top));
    painter.setFont(text_font(14, Weight::bold)), painter.setPen(look_->ink);
    painter.drawText(QPointF(112, top + 28), tr("How a string is read"));
    const double y = top + 92, left = 150, pitch = 30;
    const auto lead = [&](double x, bool above, const QString& words) {
        painter.setPen(QPen(look_->ink3, 1));
        painter.drawLine(QPointF(x, above ? y - 16 : y + 16), QPointF(x, above ? y - 30 : y + 30));
        painter.setFont(text_font(12)), painter.setPen(look_->ink2);
        painter.drawText(QPointF(x, above ? y - 35 : y + 44), words);
    };
    QPen dead(look_->dead, 1.4);
    dead.setDashPattern({3, 3});
    painter.setPen(dead), painter.drawLine(QPointF(left, y), QPointF(left + 4 * pitch, y));
    painter.setPen(QPen(look_->ink, 2)),
        painter.drawLine(QPointF(left + 4.5 * pitch, y), QPointF(left + 13.6 * pitch, y));
    for (int i = 0; i < 13; ++i) {
        const PoleSign sign = i < 2    ? PoleSign::solar
                              : i < 5  ? PoleSign::rewire
                              : i < 6  ? PoleSign::rewire
                              : i < 10 ? PoleSign::solar
                                       : PoleSign::keep;
        const int year = i < 5 ? 0 : 3;
        const QColor tone = sign == PoleSign::keep ? look_->sheet : year_tone(*look_, year, 8);
        painter.save();
        painter.translate(left + i * pitch, y);
        painter.setPen(
            QPen(sign == PoleSign::keep ? look_->ink : look_->year_edge, sign == PoleSign::keep ? 2 : 1)),
            painter.setBrush(tone);
        painter.drawPath(sign_path(sign, 10, true));
        painter.restore();
        if (sign == PoleSign::keep) continue;
        painter.setPen(ink_on(tone)), painter.setFont(text_font(11, Weight::bold));
        painter.drawText(QRectF(left + i * pitch - 12, y - 8, 24, 17), Qt::AlignCenter,
                         year == 0 ? QStringLiteral("27") : QStringLiteral("30"));
    }
    painter.setPen(QPen(look_->hand, 4, Qt::SolidLine, Qt::RoundCap));
    painter.drawLine(QPointF(left + 4.5 * pitch, y - 15), QPointF(left + 4.5 * pitch, y + 15));
    draw_transformer(painter, look_->ink, look_->sheet, QPointF(left + 13.9 * pitch, y), 8);
    lead(left, true, tr("far end, converted first"));
    lead(left + 6 * pitch, true, tr("notched disc: solar, in 2030"));
    lead(left + 12 * pitch, true, tr("ring: kept"));
    lead(left + 2 * pitch, false, tr("square: rewire, in 2027"));
    lead(left + 4.5 * pitch, false, QString());
    painter.drawText(QPointF(left + 4.5 * pitch, y + 60),
                     tr("a boundary between years: drag it, and lamps change year"));
    lead(left + 13.9 * pitch, false,
         tr("its transformer; beside it, in words, whether what is left fits it"));
    painter.setFont(text_font(11)), painter.setPen(look_->ink2);
    painter.drawText(QRectF(112, height() - 26, width() - 224, 18), Qt::AlignRight,
                     tr("Series strings are worked on only by qualified people: isolated, locked, proved "
                        "dead and grounded."));
}

} // namespace unstring
