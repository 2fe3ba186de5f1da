#pragma once
// The sheet: colours by day and by night, type sizes, the year's tones. Measures are px at 100 %.

#include <QColor>
#include <QFont>
#include <QString>

#include <array>

namespace unstring {

struct Look {
    bool is_night = false;
    QColor sheet, raise, ink, ink2, ink3, hair, hair2;
    QColor rewire, solar, hand, trouble, dead, other, band, band_ink, short_bar, sun_path, shadow, year_edge;
    QColor street, block, block_edge, building, park, canopy;
    std::array<QColor, 8> year_tones; ///< first year strongest against the sheet
};

[[nodiscard]] const Look& day_look();
[[nodiscard]] const Look& night_look();

enum class Weight { normal, strong, bold };

/// A font of the program's family, its size in px at 100 %, independent of the screen's dots per inch.
[[nodiscard]] QFont text_font(double size_px, Weight weight = Weight::normal);
/// The family that is used: Lato, else Noto Sans, else DejaVu Sans.
[[nodiscard]] QString text_family();

/// Tone of a year in a plan of `years` years; more than eight are interpolated, fewer taken evenly.
[[nodiscard]] QColor year_tone(const Look& look, int place, int years);
/// The ink of a number on that tone, 4.5:1 or better.
[[nodiscard]] QColor ink_on(const QColor& ground);
/// WCAG 2.2 contrast of two opaque colours, 1 to 21.
[[nodiscard]] double contrast_of(const QColor& a, const QColor& b);

/// The style sheet of the standard widgets (buttons, lists, fields) on this look.
[[nodiscard]] QString style_sheet(const Look& look);

} // namespace unstring
