#pragma once
// The string's loop drawn where it lies, north up: filled = leaves now, ring = burns on, cross = off before;
// solid line = live when done, dashed = dead.

#include "app/paper/sheet.h"
#include "model/orders/work_order.h"

namespace unstring {

/// Draws into the frame; legible in black and white.
void draw_loop(const Sheet& sheet, const WorkOrder& order, double x, double y, double width, double height);

} // namespace unstring
