#pragma once
// The hash of what a step is made from: XXH3-128 over its input rows in id order. Notes and origins of rows
// are left out, so that a word written beside a record touches nothing.

#include <string>
#include <vector>

#include "geo/project/city_tables.h"
#include "model/plan/plan.h"
#include "model/vet/vet_result.h"

namespace unstring {

/// Every record.
[[nodiscard]] std::string vet_input_hash(const CityTables& tables);
/// Places, mounts, arms and what else the sky and the head's fit at a pole need; canopy, obstacles, climate,
/// heads.
[[nodiscard]] std::string shade_input_hash(const CityTables& tables, double nights_goal,
                                           const std::vector<std::string>& heads);
/// The shade step's own input, records, streets, services, prices, wiring order, marks, locks, goals and
/// policy.
[[nodiscard]] std::string decide_input_hash(const CityTables& tables, const std::vector<VetString>& wiring,
                                            const Plan& plan, const std::string& shade_hash);
/// Decisions, transformers, budget, year locks and years by hand; prices and settings.
[[nodiscard]] std::string phase_input_hash(const CityTables& tables, const std::vector<VetString>& wiring,
                                           const Plan& plan, const std::string& decide_hash);
/// Everything of the plan: years and units by hand too.
[[nodiscard]] std::string hand_out_input_hash(const CityTables& tables, const Plan& plan,
                                              const std::string& phase_hash);

} // namespace unstring
