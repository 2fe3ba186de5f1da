#pragma once
// The plan as layers for any program that reads GeoPackage.

#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/decide/decide_result.h"
#include "model/fault.h"
#include "model/phase/phase_result.h"
#include "model/plan/plan.h"

namespace unstring {

/// Writes folder/plan.gpkg (poles with choice, head and year; circuit spans with year; strings with last
/// year), whole or not at all. @return the files written
[[nodiscard]] Expected<std::vector<std::string>> export_layers(const std::string& folder, const City& city,
                                                               const Plan& plan, const DecideResult& decide,
                                                               const PhaseResult& phase);

} // namespace unstring
