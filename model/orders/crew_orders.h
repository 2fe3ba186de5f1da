#pragma once
// One job's order for one crew; nothing where that crew has no work in it.

#include <optional>

#include "model/orders/year_jobs.h"

namespace unstring {

[[nodiscard]] std::optional<WorkOrder> line_order(const OrderFacts& facts, const YearJob& job);
[[nodiscard]] std::optional<WorkOrder> civil_order(const OrderFacts& facts, const YearJob& job);
[[nodiscard]] std::optional<WorkOrder> electric_order(const OrderFacts& facts, const YearJob& job);
[[nodiscard]] std::optional<WorkOrder> lighting_order(const OrderFacts& facts, const YearJob& job);

/// Head of an order: id, string, switch-on times, the loop, blanks that every crew fills in, findings in
/// words.
[[nodiscard]] WorkOrder order_head(const OrderFacts& facts, const YearJob& job, Crew crew);
/// A row of the pole table with its standing warnings: live base, pole to be checked, attachments, critical.
[[nodiscard]] OrderPole order_pole(const OrderFacts& facts, const YearJob& job, PoleIx pole,
                                   std::string task);
/// "6.3 (estimate)"
[[nodiscard]] std::string open_kv_text(const WorkOrder& order);
/// Adds to the material of that name, or makes it.
void add_material(WorkOrder& order, const std::string& what, const std::string& unit, double quantity);

} // namespace unstring
