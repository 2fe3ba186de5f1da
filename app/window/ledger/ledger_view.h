#pragma once
// The ledger of years, on the columns of the rail, and at its left the reading: what the chosen string is
// doing, or what the boundary under the hand changes.

#include <QWidget>

#include <vector>

#include "app/window/desk.h"
#include "app/window/ledger/columns.h"

namespace unstring {

/// One cell: what it says, how far its bar goes, whether it is over its limit.
struct LedgerCell {
    QString number, of;    ///< "241", " of 265"
    double used_frac = -1; ///< of the limit; < 0 = no limit, no bar
    bool is_over = false;  ///< then `number` is in words: "12 h over"
    QString tip;
};
struct LedgerRow {
    QString label;
    std::vector<LedgerCell> cells; ///< one per year
};
/// The rows of the ledger for phase's answer; empty cells where it has no such year.
[[nodiscard]] std::vector<LedgerRow> ledger_rows(const ProjectView& view, const PhaseResult* phase,
                                                 const YearColumns& columns);

/// One line of the reading while a boundary is held.
struct ReadingRow {
    QString what, was, now, so;
    bool is_trouble = false;
};
/// What differs between two answers of phase: money and hours by year, the string's state; trouble first.
[[nodiscard]] std::vector<ReadingRow> reading_rows(const ProjectView& view, const PhaseResult& was,
                                                   const PhaseResult& now, StringIx string);

class LedgerView : public QWidget {
    Q_OBJECT
public:
    explicit LedgerView(Desk& desk, QWidget* parent = nullptr);
    void set_heading(const QString& heading);
    [[nodiscard]] QSize sizeHint() const override { return {900, 182}; }

protected:
    void paintEvent(QPaintEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    bool event(QEvent* event) override;

private:
    void paint_columns(QPainter& painter);
    void paint_cell(QPainter& painter, const LedgerCell& cell, double x, double y);
    void paint_reading(QPainter& painter, const QRectF& box);
    void paint_held(QPainter& painter, const QRectF& box);
    void paint_string(QPainter& painter, const QRectF& box);
    [[nodiscard]] double label_width() const;

    Desk& desk_;
    YearColumns columns_;
    QString heading_; ///< of the drag
};

} // namespace unstring
