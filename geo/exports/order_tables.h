#pragma once
// Work orders as tables. Text that a spreadsheet would take for a formula is written so that it stays text.

#include <string>
#include <vector>

#include "model/fault.h"
#include "model/orders/work_order.h"

namespace unstring {

/// folder/orders.csv (one row a pole and order, with tasks and planned values), folder/order-steps.csv,
/// folder/materials.csv. UTF-8, RFC 4180. @return the files written
[[nodiscard]] Expected<std::vector<std::string>>
write_order_tables(const std::string& folder, const City& city, const std::vector<WorkOrder>& orders);

} // namespace unstring
