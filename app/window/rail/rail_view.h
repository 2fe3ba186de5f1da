#pragma once
// The rail: every string as its loop pressed flat; beads are lamps in wiring order, bars are year boundaries
// to drag.

#include <QAbstractScrollArea>
#include <QTimer>

#include <optional>

#include "app/window/desk.h"
#include "app/window/ledger/columns.h"
#include "app/window/rail/boundary.h"

namespace unstring {

/// Where the parts of one row stand, in the viewport.
struct RailRow {
    StringIx string;
    QRectF box;
    Fold fold;
    double right = 0; ///< x of the bead next to the station
    double pitch = 18;
    double y_out = 0, y_ret = 0;
    [[nodiscard]] QPointF bead(int position) const;
    /// x of a boundary that leaves `on` lamps deep on.
    [[nodiscard]] double edge(int on) const { return right - pitch * (on - 0.5); }
};

/// What the hand holds.
struct BoundaryDrag {
    StringIx string;
    Boundary boundary;
    double grab_x = 0;
    BoundaryMove move;
    bool is_snapped = false;
    bool is_started = false;
};

class RailView : public QAbstractScrollArea {
    Q_OBJECT
public:
    explicit RailView(Desk& desk, QWidget* parent = nullptr);

    [[nodiscard]] RailRow row_of(StringIx string) const;
    /// Middle of a boundary's bar in the viewport, where it can be grabbed.
    [[nodiscard]] QPointF handle_of(StringIx string, const Boundary& boundary) const;
    [[nodiscard]] const std::optional<BoundaryDrag>& drag() const { return drag_; }
    [[nodiscard]] QString drag_text() const;

Q_SIGNALS:
    void drag_changed();

protected:
    void paintEvent(QPaintEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void mouseReleaseEvent(QMouseEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;
    void focusInEvent(QFocusEvent* event) override;
    void focusOutEvent(QFocusEvent* event) override;
    bool viewportEvent(QEvent* event) override;

private:
    struct Grab {
        StringIx string;
        Boundary boundary;
    };
    [[nodiscard]] RailRow row_at_place(std::size_t place) const;
    [[nodiscard]] std::optional<Grab> boundary_at(QPointF at) const;
    [[nodiscard]] PoleIx bead_at(QPointF at) const;
    [[nodiscard]] QString tip_at(QPointF at) const;
    void take_view();
    void show_chosen();
    void drag_to(QPointF at, Qt::KeyboardModifiers modifiers);
    void end_drag(bool is_kept);
    void nudge(int by);

    void paint_row(QPainter& painter, const RailRow& row);
    void paint_thread(QPainter& painter, const RailRow& row, const StringLoop& loop);
    void paint_beads(QPainter& painter, const RailRow& row, const StringLoop& loop);
    void paint_bead(QPainter& painter, const RailRow& row, const StringLoop& loop, int position);
    void paint_bead_orders(QPainter& painter, const RailRow& row, const StringLoop& loop, int position);
    void paint_boundaries(QPainter& painter, const RailRow& row, const StringLoop& loop);
    void paint_bar(QPainter& painter, const RailRow& row, const Boundary& boundary, bool is_hot,
                   bool is_held);
    void paint_words(QPainter& painter, const RailRow& row);
    void paint_word(QPainter& painter, const StringYear& state, const StringYear* before, double x,
                    double right, double y);
    void paint_window(QPainter& painter, const StringYear& state, double x, double right, double y);

    Desk& desk_;
    YearColumns columns_;
    std::optional<Grab> hot_; ///< boundary under the pointer
    std::optional<BoundaryDrag> drag_;
    QTimer preview_timer_;      ///< one preview for all moves that came since the last one
    int keyboard_boundary_ = 0; ///< place of the boundary that the arrow keys move
    bool shows_focus_ = false;  ///< the frame shows when the keys came here, not the mouse
};

} // namespace unstring
