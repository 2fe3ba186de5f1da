#pragma once
// The decide step: keep, rewire or solar for every pole at once, because a trench is shared.

#include "model/decide/decide_result.h"
#include "model/fault.h"
#include "model/money/pole_option.h"
#include "model/progress.h"

namespace unstring {

/// Poles carry the wiring order that vet settled. Locks and marks of the plan are followed, or refused with
/// the reason. A cancelled run answers Fault cancelled.
[[nodiscard]] Expected<DecideResult> decide_city(const MoneyInput& input, const Progress& progress);

} // namespace unstring
