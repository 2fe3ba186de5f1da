#pragma once
// The blocks of an order's page; each leaves sheet.y below itself and breaks over pages between its rows.

#include "app/paper/sheet.h"
#include "model/orders/work_order.h"

namespace unstring {

[[nodiscard]] inline QString q(const std::string& text) { return QString::fromStdString(text); }

void paint_heading(Sheet& sheet, const QString& words, double least_below);
void paint_key_facts(Sheet& sheet, const WorkOrder& order);
void paint_poles(Sheet& sheet, const WorkOrder& order);
void paint_steps(Sheet& sheet, const WorkOrder& order);
void paint_readings(Sheet& sheet, const WorkOrder& order);
void paint_cautions(Sheet& sheet, const WorkOrder& order);
void paint_stores(Sheet& sheet, const WorkOrder& order);
void paint_return(Sheet& sheet, const WorkOrder& order);

} // namespace unstring
