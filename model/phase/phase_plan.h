#pragma once
// The phase step: a year for every pole, a transformer for every string and year, inside money and crew
// hours.

#include "model/decide/decide_result.h"
#include "model/fault.h"
#include "model/money/pole_option.h"
#include "model/phase/phase_result.h"
#include "model/progress.h"

namespace unstring {

struct PhaseOutcome {
    Plan plan;          ///< the input's plan with years, year_by and units set
    PhaseResult result; ///< evaluate_phase of that plan, and the solver's bound
};

struct PhaseChoices {
    bool free_hand_years = false; ///< years set by hand may be moved (locked years never)
    bool settle_rest = false;     ///< years set by hand stay, the others are solved around them
};

/// Solves the years of input.plan's choices; decide gives the circuits' spans and services.
/// @fault cancelled
[[nodiscard]] Expected<PhaseOutcome> phase_plan(const MoneyInput& input, const DecideResult& decide,
                                                const PhaseChoices& choices, const Progress& progress);

/// Everything that follows from a plan as it stands (hand edits included): string states year by year, the
/// unit on each string, the ledger, the checks. Units: those of the plan where they are legal, else assigned
/// by the swap rule. Not the solver's code. Fast: it runs while a boundary is dragged. `bound` is 0.
[[nodiscard]] PhaseResult evaluate_phase(const MoneyInput& input, const DecideResult& decide);

} // namespace unstring
