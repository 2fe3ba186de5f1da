#pragma once
// Precedences between a string's dead cable, a service's lead time and the work of a circuit.

#include "model/finding.h"
#include "model/phase/phase_facts.h"
#include "model/phase/phase_result.h"

namespace unstring {

enum class DuctState {
    free, ///< no duct is reused, or its cable is dead by the end of the year in which the span is built
    dug,  ///< live, and every year that makes it so is the solver's: the span is dug beside it and priced as
          ///< trench
    live, ///< live by a year that a hand has set: an error until someone decides
};

/// One for each span of decide. Live is judged at the end of the year in which the span is built.
[[nodiscard]] std::vector<DuctState> duct_states(const PhaseFacts& facts);

/// duct-live for each span that is live; one notice duct-dug for each string and year in which spans are dug.
[[nodiscard]] std::vector<Finding> duct_findings(const PhaseFacts& facts);

/// The span as trench, in the surface over its duct.
[[nodiscard]] CircuitSpan dug_span(CircuitSpan span);

/// Decide's circuits as phase builds them: spans_dug as trench. For orders and drawings.
[[nodiscard]] DecideResult as_built(DecideResult decide, const PhaseResult& phase);

/// The leg of the string's loop that lies in a span's old conduit (legs are numbered by the position before
/// them); -1 = it cannot be told. The legs between the two poles in wiring order, where others lie between:
/// the first of them.
struct DuctLegs {
    int first = 0, last = -1; ///< empty where first > last
};
[[nodiscard]] DuctLegs duct_legs(const StringLoop& loop, const CircuitSpan& span);
/// Nothing is to be waited for: no conduit is reused, or a spare one lies beside it.
[[nodiscard]] bool is_free_of_duct(const City& city, const CircuitSpan& span);

/// First calendar year in which a service can feed lamps: ordered at the start of the plan, lead time in
/// whole years.
[[nodiscard]] int service_ready_year(const City& city, const PriceBook& prices, const PlanSettings& settings,
                                     ServiceIx service);

} // namespace unstring
