#pragma once
// What the steps found, as it lies in the project file: findings, runs with the hash of their inputs,
// results.

#include <optional>
#include <string>
#include <vector>

#include "geo/project/database.h"
#include "model/decide/decide_result.h"
#include "model/finding.h"
#include "model/plan/staleness.h"
#include "model/solar/shade.h"
#include "model/vet/vet_result.h"

namespace unstring {

struct StepRun {
    std::string input_hash;
    std::string at;
};

struct PhaseRun { ///< what evaluating the plan again does not give
    double bound = 0, seconds = 0;
    std::string plan_hash; ///< of the plan that the run wrote: another one was edited by hand since
};

/// Steps up to shade are of no plan: pass an empty name.
[[nodiscard]] std::optional<StepRun> step_run(Database& database, Step step, const std::string& plan);
void forget_results(Database& database);

/// Each inside the caller's transaction, together with its step_runs row.
void write_vet(Database& database, const City& city, const VetResult& result, const std::string& hash);
void write_shade(Database& database, const City& city, const ShadeResult& result,
                 const std::vector<Finding>& findings, const std::string& hash);
void write_decide(Database& database, const City& city, const std::string& plan, const DecideResult& result,
                  const std::string& hash);
void write_phase(Database& database, const std::string& plan, const PhaseRun& run, const std::string& hash);
void write_findings(Database& database, Step step, const std::string& plan,
                    const std::vector<Finding>& findings);
void write_step_run(Database& database, Step step, const std::string& plan, const std::string& hash,
                    const std::string& result_json);

/// Nothing where the step has not run, or where its result is of another set of records than the city's.
[[nodiscard]] std::optional<VetResult> read_vet(Database& database, const City& city);
[[nodiscard]] std::optional<ShadeResult> read_shade(Database& database, const City& city);
[[nodiscard]] std::optional<DecideResult> read_decide(Database& database, const City& city,
                                                      const std::string& plan);
[[nodiscard]] std::optional<PhaseRun> read_phase(Database& database, const std::string& plan);
[[nodiscard]] std::vector<Finding> read_findings(Database& database, Step step, const std::string& plan);

} // namespace unstring
