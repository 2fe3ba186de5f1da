#pragma once
// Paper to paint on, page after page. Lengths are tenths of a point (QPdfWriter at 720 dots an inch), so that
// fonts can be sized by whole pixels. A dry sheet only counts its pages.

#include <functional>

#include <QFont>
#include <QPainter>
#include <QPdfWriter>
#include <QString>

namespace unstring {

inline constexpr double kPoint = 10;

enum class Type { title, heading, tag, body, strong, small };

/// Lato, else Noto Sans, else DejaVu Sans made smaller.
[[nodiscard]] QFont paper_font(Type type);

class Sheet {
public:
    /// @param painter  null = dry  @param furniture  called after each page begins (head, foot); may read
    /// page()
    Sheet(QPdfWriter& writer, QPainter* painter, std::function<void(Sheet&)> furniture);

    [[nodiscard]] double left() const { return margin_; }
    [[nodiscard]] double right() const { return width_ - margin_; }
    [[nodiscard]] double width() const { return width_ - 2 * margin_; }
    [[nodiscard]] double bottom() const { return height_ - margin_ - kFoot; }
    [[nodiscard]] double page_bottom() const { return height_ - margin_; }
    [[nodiscard]] double room() const { return bottom() - y; }
    [[nodiscard]] int page() const { return page_; }
    [[nodiscard]] QPainter* painter() const { return painter_; }

    void start_page();
    /// A new page unless so much room is left; true where one was begun.
    bool need(double height);

    /// Text laid in a column, words broken only where one is wider than it: its height, drawn unless dry or
    /// `draw` is false.
    double text(double x, double at_y, double column, const QString& words, Type type,
                Qt::Alignment align = Qt::AlignLeft, bool draw = true) const;
    [[nodiscard]] double text_height(double column, const QString& words, Type type) const {
        return text(0, 0, column, words, type, Qt::AlignLeft, false);
    }
    void rule(double x1, double x2, double at_y, double weight, int grey = 0) const;
    void box(double x, double at_y, double w, double h, double weight) const;
    void fill(double x, double at_y, double w, double h, int grey) const;

    double y = 0; ///< where the next block begins

private:
    static constexpr double kFoot = 18 * kPoint;
    QPdfWriter& writer_;
    QPainter* painter_;
    std::function<void(Sheet&)> furniture_;
    double width_, height_, margin_ = 36 * kPoint;
    int page_ = 0;
};

} // namespace unstring
