#pragma once
// Funds tied to wards, kinds of work and a spend-by year: what would be lost.

#include "model/finding.h"
#include "model/phase/phase_cash.h"
#include "model/phase/phase_facts.h"

namespace unstring {

/// fund-lapse for each budget row with a fund, money and a spend-by year whose wards and kinds see less
/// capital than the row's money from the row's year to that one. Poles' own capital is counted; shared trench
/// is not.
[[nodiscard]] std::vector<Finding> fund_findings(const PhaseFacts& facts, CashBook& book);

} // namespace unstring
