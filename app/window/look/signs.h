#pragma once
// The drawn signs: pole kinds told by shape, transformer rings, cut-backs, boundaries. All are paths, none a
// bitmap.

#include <QPainter>
#include <QPixmap>
#include <QPointF>

#include "app/window/look/look.h"
#include "model/plan/plan.h"

namespace unstring {

enum class PoleSign { undecided, keep, rewire, solar, parallel, out_of_plan };

[[nodiscard]] PoleSign sign_of(Choice choice);
[[nodiscard]] QColor sign_color(const Look& look, PoleSign sign);

/// The outline of a sign round the origin, y down. Keep and undecided: a ring; rewire: a square; solar: a
/// disc with a wedge cut from the top.
[[nodiscard]] QPainterPath sign_path(PoleSign sign, double r, bool on_bead = false);

/// A pole on the map: filled when the work is done by the year looked at, open when it is to come; with its
/// halo.
void draw_pole_sign(QPainter& painter, const Look& look, PoleSign sign, bool is_done, QPointF at, double r,
                    bool with_halo);

/// Two interlocked rings (IEC 60617).
void draw_transformer(QPainter& painter, const QColor& ink, const QColor& ground, QPointF at, double r);
/// An open diamond; dotted while it is not confirmed.
void draw_cutback(QPainter& painter, const QColor& ink, const QColor& ground, QPointF at, double half,
                  bool confirmed);
/// A small square with a lead: a service point, an end of a circuit, or a candidate (dotted).
void draw_service(QPainter& painter, const Look& look, ServiceKind kind, QPointF at, double r);

enum class TagSide { right_above, left };
/// A word in a small raised tag with a border, kept inside `inside`: beside the pointer, or ending left of
/// `at` with a leader.
void draw_tag(QPainter& painter, const Look& look, QPointF at, const QString& text, const QColor& border,
              const QRectF& inside, TagSide side = TagSide::right_above);

} // namespace unstring
