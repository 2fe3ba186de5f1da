#include "app/paper/sheet.h"

#include <cmath>

#include <QFontDatabase>
#include <QTextLayout>

namespace unstring {
namespace {

struct Family {
    QString name;
    double scale = 1;
};

const Family& family() {
    static const Family kFound = [] {
        const QStringList there = QFontDatabase::families();
        for (const char* name : {"Lato", "Noto Sans"})
            if (there.contains(QString::fromLatin1(name))) return Family{QString::fromLatin1(name), 1};
        return Family{QStringLiteral("DejaVu Sans"), 0.88};
    }();
    return kFound;
}

double points_of(Type type) {
    switch (type) {
    case Type::title:
        return 17;
    case Type::heading:
        return 10;
    case Type::tag:
        return 12;
    case Type::body:
    case Type::strong:
        return 8.5;
    case Type::small:
        return 7.5;
    }
    return 8.5;
}

} // namespace

QFont paper_font(Type type) {
    QFont font(family().name);
    font.setPixelSize(static_cast<int>(std::lround(points_of(type) * family().scale * kPoint)));
    font.setBold(type == Type::title || type == Type::heading || type == Type::tag || type == Type::strong);
    font.setLetterSpacing(QFont::AbsoluteSpacing,
                          0.01 * kPoint); // unseen, but no ligatures: Lato's cannot be searched or copied
    return font;
}

Sheet::Sheet(QPdfWriter& writer, QPainter* painter, std::function<void(Sheet&)> furniture)
    : writer_(writer), painter_(painter), furniture_(std::move(furniture)), width_(writer.width()),
      height_(writer.height()) {}

void Sheet::start_page() {
    if (painter_ != nullptr && page_ > 0) writer_.newPage();
    ++page_;
    y = margin_;
    furniture_(*this);
}

bool Sheet::need(double height) {
    if (height <= room()) return false;
    start_page();
    return true;
}

double Sheet::text(double x, double at_y, double column, const QString& words, Type type, Qt::Alignment align,
                   bool draw) const {
    QTextLayout layout(words, paper_font(type), &writer_);
    QTextOption option(align);
    option.setWrapMode(QTextOption::WrapAtWordBoundaryOrAnywhere);
    layout.setTextOption(option);
    double height = 0;
    layout.beginLayout();
    for (QTextLine line = layout.createLine(); line.isValid(); line = layout.createLine()) {
        line.setLineWidth(column);
        line.setPosition(QPointF(0, height));
        height += line.height();
    }
    layout.endLayout();
    if (draw && painter_ != nullptr) {
        painter_->setPen(Qt::black);
        layout.draw(painter_, QPointF(x, at_y));
    }
    return height;
}

void Sheet::rule(double x1, double x2, double at_y, double weight, int grey) const {
    if (painter_ == nullptr) return;
    painter_->setPen(QPen(QColor(grey, grey, grey), weight * kPoint));
    painter_->drawLine(QPointF(x1, at_y), QPointF(x2, at_y));
}

void Sheet::box(double x, double at_y, double w, double h, double weight) const {
    if (painter_ == nullptr) return;
    painter_->setPen(QPen(Qt::black, weight * kPoint));
    painter_->setBrush(Qt::NoBrush);
    painter_->drawRect(QRectF(x, at_y, w, h));
}

void Sheet::fill(double x, double at_y, double w, double h, int grey) const {
    if (painter_ != nullptr) painter_->fillRect(QRectF(x, at_y, w, h), QColor(grey, grey, grey));
}

} // namespace unstring
