#pragma once
// Survey orders: what to look at before any decision is final.

#include "model/orders/work_order.h"

namespace unstring {

/// Poles whose structure is unknown where solar is possible (lighting crew), ducts on spans that the plan
/// reuses and that are not proven (civil), and per string what the line crew reads: wiring order that is
/// inferred, cut-backs unconfirmed, nameplates, tests, oil samples, as-found readings. One order a string and
/// crew, year = the year before the first. Orders of a crew, and poles within an order, by the money that
/// flips: what knowing is worth, see what_knowing_is_worth.
[[nodiscard]] std::vector<WorkOrder> survey_orders(const MoneyInput& input, const DecideResult& decide);

/// Dollars by which the expected cost falls when an unknown is known before choosing between it and another
/// way: min(p bad + (1 - p) good, other) - p min(bad, other) - (1 - p) min(good, other), never below 0.
/// @param bad, good  cost of the way that rests on the unknown, either way it comes out  @param other  of the
/// other way
[[nodiscard]] double what_knowing_is_worth(double bad_frac, double bad, double good, double other);

} // namespace unstring
