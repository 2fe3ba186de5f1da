#pragma once
// The map: pan by drag, zoom by wheel at the pointer, choose by click, by shift-drag with an outline.

#include <QFutureWatcher>
#include <QPixmap>
#include <QWidget>

#include <atomic>

#include "app/window/desk.h"
#include "app/window/map/map_painter.h"

namespace unstring {

class MapView : public QWidget {
    Q_OBJECT
public:
    explicit MapView(Desk& desk, QWidget* parent = nullptr);
    ~MapView() override;

    [[nodiscard]] const Camera& camera() const { return camera_; }
    [[nodiscard]] const MapStyle& style() const { return style_; }
    void set_style(const MapStyle& style);
    void fit();
    void zoom_by(double factor);
    /// Brings a place into the middle when it is not well inside the map.
    void show_place(MapPoint place);
    /// The pole under a point of the widget, within 9 px; the tests click where this finds one.
    [[nodiscard]] PoleIx pole_at(QPointF at) const;
    [[nodiscard]] QPointF place_of(PoleIx pole) const;
    [[nodiscard]] bool is_canopy_read() const { return !tint_.is_empty(); }

protected:
    void paintEvent(QPaintEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void wheelEvent(QWheelEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void mouseReleaseEvent(QMouseEvent* event) override;
    void mouseDoubleClickEvent(QMouseEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void focusOutEvent(QFocusEvent* event) override;
    void leaveEvent(QEvent* event) override;
    bool event(QEvent* event) override;

private:
    enum class Hand { none, pressed, panning, outlining };

    void take_view();
    void read_canopy();
    void paint_ground_cached(QPainter& painter);
    void paint_overlay(QPainter& painter);
    void select_outline();
    void click(QPointF at, Qt::KeyboardModifiers modifiers);
    [[nodiscard]] QString hover_text(PoleIx pole) const;

    Desk& desk_;
    Camera camera_;
    MapStyle style_;
    PolePainter poles_;
    bool is_fitted_ = false;

    QPixmap ground_; ///< the ground over a wider rectangle than the widget, at ground_camera_
    Camera ground_camera_;
    bool is_ground_stale_ = true;

    CanopyTint tint_;
    std::string tint_of_; ///< raster that tint_ was read from
    std::atomic<bool> stop_reading_ = false;
    QFutureWatcher<CanopyTint> reading_;

    Hand hand_ = Hand::none;
    QPointF press_, last_;
    QPolygonF outline_;
    PoleIx hover_;
    QPointF pointer_;
    bool shows_focus_ = false; ///< the frame shows when the keys came here, not the mouse
};

} // namespace unstring
