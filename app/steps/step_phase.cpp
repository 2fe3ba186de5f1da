// phase: a year for every pole and a transformer for every string and year, written into the plan as one
// edit.

#include <algorithm>

#include <fmt/format.h>

#include "app/steps/project_inside.h"
#include "geo/project/input_hash.h"
#include "model/phase/phase_plan.h"

namespace unstring {
namespace {

Expected<Plan> plan_for(const Plan& plan, const PhaseOptions& options) {
    Plan asked = plan;
    if (!options.years || *options.years == plan.settings.years) return asked;
    if (*options.years < 1 || *options.years > plan.settings.horizon_years)
        return tl::make_unexpected(Fault{FaultCode::bad_usage, "", 0, "--years",
                                         std::to_string(*options.years),
                                         fmt::format("1 to {} (the horizon)", plan.settings.horizon_years),
                                         "Give another number of years"});
    asked.settings.decide_year = plan.decide_year(); // the decisions stand at the year they were priced at
    asked.settings.years = *options.years;
    for (PolePlan& pole : asked.poles)
        if (pole.year > asked.last_year() && !pole.year_locked) {
            pole.year = 0;
            pole.year_by = YearBy::none;
        }
    return asked;
}

int poles_with_year(const Plan& plan) {
    return static_cast<int>(std::count_if(plan.poles.begin(), plan.poles.end(),
                                          [](const PolePlan& pole) { return pole.year != 0; }));
}

} // namespace

Expected<void> OpenProject::run_phase(const PhaseOptions& options, const Progress& progress) {
    Inside& inside = *inside_;
    if (auto may = inside.may_write(); !may) return may;
    if (auto ready = inside.ready_for(Step::phase); !ready) return ready;
    auto asked = plan_for(inside.plan, options);
    if (!asked) return tl::make_unexpected(asked.error());
    auto outcome = phase_plan(inside.money_input(*asked), *inside.decide,
                              {options.free_hand_years, options.settle_rest}, progress);
    if (!outcome) return tl::make_unexpected(outcome.error());
    const Plan& next = outcome->plan;
    const std::string label =
        fmt::format("phase: {} poles in {} years", poles_with_year(next), next.settings.years);
    const std::vector<VetString> none;
    const std::string hash = phase_input_hash(inside.tables, inside.vet ? inside.vet->strings : none, next,
                                              inside.stored_hash(Step::decide));
    const PhaseRun run{outcome->result.bound, outcome->result.seconds,
                       hand_out_input_hash(inside.tables, next, {})};
    auto written =
        inside.write_plan(next, label, [&] { write_phase(*inside.database, next.settings.name, run, hash); });
    if (!written) return tl::make_unexpected(written.error());
    inside.phase_run = run;
    inside.show();
    return {};
}

} // namespace unstring
