#pragma once
// Under the map: the legend, which is a filter too, and the staircase of lamps left, which is the year
// slider.

#include <QTimer>
#include <QWidget>

#include "app/window/desk.h"
#include "app/window/map/map_view.h"

namespace unstring {

class YearStrip : public QWidget {
    Q_OBJECT
public:
    YearStrip(Desk& desk, MapView& map, QWidget* parent = nullptr);
    [[nodiscard]] QSize sizeHint() const override { return {600, 58}; }
    /// Where a year stands on the slider.
    [[nodiscard]] QPointF place_of_year(int year) const;

protected:
    void paintEvent(QPaintEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void focusOutEvent(QFocusEvent* event) override;

private:
    struct Word {
        QRectF box;
        int sign = -1; ///< -1: the word that changes the colouring
    };
    [[nodiscard]] QRectF slider() const;
    [[nodiscard]] QRectF play_box() const;
    void paint_legend(QPainter& painter);
    void paint_slider(QPainter& painter);
    void paint_years(QPainter& painter, const QRectF& box);
    [[nodiscard]] std::vector<int> lamps_left() const;
    void go_to(QPointF at);
    void toggle_play();

    Desk& desk_;
    MapView& map_;
    std::vector<Word> words_;
    QTimer play_;
    bool shows_focus_ = false; ///< the frame shows when the keys came here, not the mouse
};

} // namespace unstring
