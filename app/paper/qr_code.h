#pragma once
// A QR code as black squares.

#include <QPainter>
#include <QString>

namespace unstring {

/// Draws the code into a square of that side; text too long for a code draws nothing. UTF-8, error correction
/// M.
void draw_qr(QPainter& painter, double x, double y, double side, const QString& text);

} // namespace unstring
