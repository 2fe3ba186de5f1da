#pragma once
// One work order on its pages: head, sketch, poles, steps with hold points, readings, cautions, stores,
// signatures.

#include "app/paper/sheet.h"
#include "model/orders/work_order.h"

namespace unstring {

/// Paints the order from a new page on; `pages` stands in the furniture as "page n of m".
void paint_order(Sheet& sheet, const WorkOrder& order);

/// Head and foot of each page.
void paint_furniture(Sheet& sheet, const WorkOrder& order, int pages);

} // namespace unstring
