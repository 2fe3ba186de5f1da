#pragma once
// Cash of the circuits' own parts: a span of the tree, the connection of a service. Phase prices them again
// at the real year.

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"

namespace unstring {

/// Capital lines of one span when it is built in `year`: trench, bore, conduit pull at its expected price,
/// aerial span, wire, pull boxes, design share. Their undiscounted sum at decide_year is CircuitSpan::cost.
[[nodiscard]] std::vector<CashLine> span_lines(const MoneyInput& input, const CircuitSpan& span, int year);

/// Connection in `year` and the customer charge to the horizon.
[[nodiscard]] std::vector<CashLine> connection_lines(const MoneyInput& input, ServiceIx service, int year);

} // namespace unstring
