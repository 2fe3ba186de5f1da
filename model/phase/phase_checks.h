#pragma once
// The checks of a plan, however it was made: electrical states, units, ducts, controls, money, hours, spares.
// No solver code here.

#include "model/phase/phase_cash.h"
#include "model/phase/phase_facts.h"
#include "model/phase/phase_result.h"

namespace unstring {

/// Appends findings to result.failures and sets result.feasible; result's years, units and ledger are filled
/// already. feasible: no error, no over-run of money or hours.
void check_phase(const PhaseFacts& facts, CashBook& book, PhaseResult& result);

} // namespace unstring
