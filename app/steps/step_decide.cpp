// decide: keep, rewire or solar for every pole, written into the plan as one edit.

#include <fmt/format.h>

#include "app/steps/project_inside.h"
#include "geo/project/input_hash.h"
#include "model/decide/decide_city.h"
#include "model/decide/services_anywhere.h"

namespace unstring {
namespace {

Fault bad_option(std::string option, std::string found, std::string wanted) {
    return {FaultCode::bad_usage, "", 0, std::move(option), std::move(found), std::move(wanted),
            "Give another value"};
}

Expected<PlanSettings> settings_with(const City& city, PlanSettings settings, const DecideOptions& options) {
    if (options.policy) settings.policy = *options.policy;
    if (options.policy) settings.must_stay = options.must_stay;
    for (const std::string& id : settings.must_stay)
        if (!find_string(city, id).is_valid())
            return tl::make_unexpected(bad_option("--policy must-stay", id, "the id of a string"));
    if (options.rate) settings.rate = *options.rate;
    if (options.nights_goal) settings.nights_goal = *options.nights_goal;
    if (options.services_anywhere) settings.services_anywhere = *options.services_anywhere;
    if (options.decide_year) {
        // The contract's Y is a calendar year; a small number is the plan's own count of years.
        const int year = *options.decide_year < 1000 ? settings.first_year + *options.decide_year - 1
                                                     : *options.decide_year;
        const int last = settings.first_year + settings.horizon_years - 1;
        if (year < settings.first_year || year > last)
            return tl::make_unexpected(bad_option("--decide-year", std::to_string(*options.decide_year),
                                                  fmt::format("{} to {}", settings.first_year, last)));
        settings.decide_year = year;
    }
    return settings;
}

Plan plan_with(Plan plan, const DecideResult& result) {
    for (const PoleDecision& decision : result.poles) {
        PolePlan& row = plan.poles[decision.pole.place()];
        const bool is_same = row.choice == decision.choice && row.head == decision.head;
        row.choice = decision.choice;
        row.head = decision.head;
        if (!is_same && !row.year_locked && row.year_by != YearBy::hand) { // its year was for another choice
            row.year = 0;
            row.year_by = YearBy::none;
        }
        if (decision.choice == Choice::keep && !row.year_locked) {
            row.year = 0;
            row.year_by = YearBy::none;
        }
    }
    return plan;
}

} // namespace

Expected<void> OpenProject::run_decide(const DecideOptions& options, const Progress& progress) {
    Inside& inside = *inside_;
    if (auto may = inside.may_write(); !may) return may;
    auto settings = settings_with(inside.city, inside.plan.settings, options);
    if (!settings) return tl::make_unexpected(settings.error());
    Plan asked = inside.plan;
    asked.settings = *settings;
    if (settings->nights_goal != inside.plan.settings.nights_goal && inside.shade) {
        // Which heads are good enough hangs on the goal: the sky's answers are judged again before deciding.
        if (auto written =
                inside.write_plan(asked, fmt::format("nights-dark goal {} a year", settings->nights_goal));
            !written)
            return tl::make_unexpected(written.error());
        inside.show();
        if (auto shaded = run_shade({}, progress); !shaded) return shaded;
        asked = inside.plan;
    }
    if (auto ready = inside.ready_for(Step::decide); !ready) return ready;
    if (settings->services_anywhere) inside.city = with_services_anywhere(std::move(inside.city));
    auto result = decide_city(inside.money_input(asked), progress);
    if (!result) return tl::make_unexpected(result.error());
    const Plan next = plan_with(asked, *result);
    const std::string label =
        fmt::format("decide: {} keep, {} rewire, {} solar", result->keep, result->rewire, result->solar);
    const std::vector<VetString> none;
    const std::string hash = decide_input_hash(inside.tables, inside.vet ? inside.vet->strings : none, next,
                                               inside.stored_hash(Step::shade));
    auto written = inside.write_plan(
        next, label, [&] { write_decide(*inside.database, inside.city, next.settings.name, *result, hash); });
    if (!written) return tl::make_unexpected(written.error());
    inside.decide = std::move(*result);
    inside.show();
    return {};
}

} // namespace unstring
