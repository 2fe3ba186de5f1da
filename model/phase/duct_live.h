#pragma once
// Precedences between a string's dead cable, a service's lead time and the work of a circuit.

#include "model/finding.h"
#include "model/phase/phase_facts.h"

namespace unstring {

/// Spans that reuse old conduit while the series cable in it is still live at the end of the year in which they are
/// built; none where the duct has a spare one beside it. One finding a span.
[[nodiscard]] std::vector<Finding> live_duct_findings(const PhaseFacts& facts);

/// The leg of the string's loop that lies in a span's old conduit (legs are numbered by the position before them); -1 =
/// it cannot be told. The legs between the two poles in wiring order, where others lie between: the first of them.
struct DuctLegs {
    int first = 0, last = -1;  ///< empty where first > last
};
[[nodiscard]] DuctLegs duct_legs(const StringLoop& loop, const CircuitSpan& span);
/// Nothing is to be waited for: no conduit is reused, or a spare one lies beside it.
[[nodiscard]] bool is_free_of_duct(const City& city, const CircuitSpan& span);

/// First calendar year in which a service can feed lamps: ordered at the start of the plan, lead time in whole years.
[[nodiscard]] int service_ready_year(const City& city, const PriceBook& prices, const PlanSettings& settings, ServiceIx service);

}  // namespace unstring
