#include "app/window/look/look.h"

#include <QFontDatabase>
#include <QGuiApplication>
#include <QScreen>

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

QColor with_alpha(const char* name, int alpha) {
    QColor color(name);
    color.setAlpha(alpha);
    return color;
}

Look make_day() {
    Look look;
    look.sheet = "#FBFAF7", look.raise = "#FFFFFF", look.ink = "#1C2125", look.ink2 = "#4B5258",
    look.ink3 = "#666C72";
    look.hair = "#D8D4CB", look.hair2 = "#E8E5DD", look.rewire = "#0072B2", look.solar = "#D55E00";
    look.hand = "#007A5A", look.trouble = "#A3123A", look.dead = "#7C8288", look.other = "#87837A";
    look.band = "#F4EAF1", look.band_ink = "#5E2C57", look.short_bar = "#E8B88F", look.sun_path = "#8A5A00";
    look.shadow = QColor(40, 34, 20, 41), look.year_edge = "#77426F", look.street = "#FFFFFF";
    look.block = "#F1EEE7", look.block_edge = "#E2DDD2", look.building = "#E4DFD5", look.park = "#E4EADA";
    look.canopy = with_alpha("#8FB07C", 87);
    look.year_tones = {"#45193F", "#5E2C57", "#77426F", "#905A87",
                       "#B07FA8", "#C99EC1", "#DFBFD8", "#F1DFED"};
    return look;
}

Look make_night() {
    Look look;
    look.is_night = true;
    look.sheet = "#14181B", look.raise = "#1D2327", look.ink = "#ECEAE4", look.ink2 = "#B6BABC",
    look.ink3 = "#959A9E";
    look.hair = "#2D3439", look.hair2 = "#22282C", look.rewire = "#56B4E9", look.solar = "#E69F00";
    look.hand = "#2FC39A", look.trouble = "#FF938C", look.dead = "#7F868B", look.other = "#7A8186";
    look.band = "#271D26", look.band_ink = "#E6BFDE", look.short_bar = "#8A6A2A", look.sun_path = "#E8B64C";
    look.shadow = QColor(0, 0, 0, 140), look.year_edge = "#BD86B4", look.street = "#252C31";
    look.block = "#181D21", look.block_edge = "#2A3136", look.building = "#21282D", look.park = "#19251F";
    look.canopy = with_alpha("#5C9070", 51);
    look.year_tones = {"#F5DBEF", "#E6BFDE", "#D4A2CA", "#BD86B4",
                       "#9C6594", "#835080", "#6B3F68", "#543050"};
    return look;
}

double linear(double channel) {
    return channel <= 0.04045 ? channel / 12.92 : std::pow((channel + 0.055) / 1.055, 2.4);
}

double luminance(const QColor& color) {
    return 0.2126 * linear(color.redF()) + 0.7152 * linear(color.greenF()) + 0.0722 * linear(color.blueF());
}

double family_scale() { return text_family() == "DejaVu Sans" ? 0.88 : 1.0; }

} // namespace

const Look& day_look() {
    static const Look look = make_day();
    return look;
}

const Look& night_look() {
    static const Look look = make_night();
    return look;
}

QString text_family() {
    static const QString family = [] {
        const QStringList present = QFontDatabase::families();
        for (const char* wanted : {"Lato", "Noto Sans"})
            if (present.contains(QLatin1String(wanted))) return QString::fromLatin1(wanted);
        return QStringLiteral("DejaVu Sans");
    }();
    return family;
}

QFont text_font(double size_px, Weight weight) {
    QFont font(text_family());
    const QScreen* screen = QGuiApplication::primaryScreen();
    const double dots_per_inch = screen != nullptr ? screen->logicalDotsPerInchY() : 96.0;
    font.setPointSizeF(size_px * family_scale() * 72.0 / dots_per_inch);
    font.setWeight(weight == Weight::normal   ? QFont::Normal
                   : weight == Weight::strong ? QFont::DemiBold
                                              : QFont::Bold);
    return font;
}

QColor year_tone(const Look& look, int place, int years) {
    if (years <= 1) return look.year_tones[1];
    const double at = std::clamp(double(place) / (years - 1), 0.0, 1.0) * 7.0;
    const auto low = static_cast<std::size_t>(std::floor(at));
    const std::size_t high = std::min<std::size_t>(low + 1, 7);
    const double part = at - double(low);
    const QColor a = look.year_tones[low], b = look.year_tones[high];
    const auto mixed = [part](double from, double to) { return float(from + (to - from) * part); };
    return QColor::fromRgbF(mixed(a.redF(), b.redF()), mixed(a.greenF(), b.greenF()),
                            mixed(a.blueF(), b.blueF()));
}

double contrast_of(const QColor& a, const QColor& b) {
    const double one = luminance(a), two = luminance(b);
    return (std::max(one, two) + 0.05) / (std::min(one, two) + 0.05);
}

QColor ink_on(const QColor& ground) {
    // Of pure black and white one always reaches 4.58; the softer black is taken where it reaches 4.5.
    if (contrast_of(ground, Qt::white) >= 4.5) return Qt::white;
    const QColor soft("#14181B");
    return contrast_of(ground, soft) >= 4.5
               ? soft
               : QColor(contrast_of(ground, Qt::black) > contrast_of(ground, Qt::white) ? Qt::black
                                                                                        : Qt::white);
}

QString style_sheet(const Look& look) {
    const auto name = [](const QColor& color) { return color.name(); };
    return QStringLiteral(
               "QWidget{background:%1;color:%2;}QLabel,QCheckBox{background:transparent;}"
               "QToolTip{background:%3;color:%2;border:1px solid %4;padding:4px;}"
               "QPushButton{border:1px solid %5;border-radius:4px;padding:5px 12px;background:%1;}"
               "QPushButton:hover{border-color:%6;color:%6;}"
               "QPushButton:focus{border:2px solid %2;padding:4px 11px;}"
               "QPushButton:disabled{color:%7;border-color:%4;}"
               "QPushButton[flat=\"true\"]{border:1px solid transparent;padding:2px "
               "4px;color:%6;text-decoration:underline;}"
               "QPushButton[flat=\"true\"]:disabled{color:%7;text-decoration:none;}QPushButton[flat=\"true\"]"
               ":focus{border:1px solid %2;}"
               "QPushButton[key=\"true\"]{border-radius:3px;padding:3px 8px;font-weight:bold;}"
               "QPushButton[key=\"true\"]:checked{background:%2;color:%1;border-color:%2;}"
               "QLineEdit,QComboBox,QSpinBox{border:1px solid "
               "%5;border-radius:3px;padding:4px;background:%3;}"
               "QComboBox::drop-down{border:none;width:18px;}QComboBox "
               "QAbstractItemView{background:%3;color:%2;selection-background-color:%8;selection-color:%2;}"
               "QListWidget,QTreeWidget,QTableWidget{border:none;background:%1;outline:0;gridline-color:%9;}"
               "QTreeWidget::item,QListWidget::item{padding:3px 2px;}"
               "QTreeWidget::item:selected,QListWidget::item:selected,QTableWidget::item:selected{background:"
               "%8;color:%2;}"
               "QHeaderView::section{background:%1;color:%7;border:none;border-bottom:1px solid "
               "%4;padding:3px;}"
               "QScrollBar:vertical{width:10px;background:%1;}QScrollBar:horizontal{height:10px;background:%"
               "1;}"
               "QScrollBar::handle{background:%4;border-radius:3px;min-height:24px;min-width:24px;}"
               "QScrollBar::handle:hover{background:%5;}"
               "QScrollBar::add-line,QScrollBar::sub-line{width:0;height:0;}"
               "QSplitter::handle{background:%4;}QScrollArea{border:none;}")
        .arg(name(look.sheet), name(look.ink), name(look.raise), name(look.hair), name(look.ink3),
             name(look.hand), name(look.ink3), name(look.band), name(look.hair2));
}

} // namespace unstring
