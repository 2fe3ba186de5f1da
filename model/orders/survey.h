#pragma once
// Survey orders: what to look at before any decision is final.

#include "model/orders/work_order.h"

namespace unstring {

/// Poles whose structure is unknown, ducts assumed or unknown on spans that the plan reuses, strings whose wiring order is
/// inferred or whose cut-backs are unconfirmed, transformers without a test or an oil sample. Year = the year before the first.
/// First form: in the order of the records, not yet by the money that flips.
[[nodiscard]] std::vector<WorkOrder> survey_orders(const MoneyInput& input, const DecideResult& decide);

}  // namespace unstring
