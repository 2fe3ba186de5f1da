#include "app/steps/project_inside.h"

#include <algorithm>

#include <fmt/format.h>

#include "geo/project/input_hash.h"
#include "geo/project/plan_tables.h"
#include "geo/project/schema.h"
#include "model/decide/services_anywhere.h"
#include "model/phase/phase_plan.h"
#include "model/plan/plan_rows.h"

namespace unstring {
namespace {

std::string plan_of(Step step, const Plan& plan) {
    return step < Step::decide ? std::string() : plan.settings.name;
}

Fault not_ready(const std::string& path, std::string found, std::string remedy) {
    return {FaultCode::not_ready, path, 0, "", std::move(found), "", std::move(remedy)};
}

bool follows_decisions(const Plan& plan, const DecideResult& decide) {
    return std::all_of(decide.poles.begin(), decide.poles.end(), [&](const PoleDecision& decision) {
        const PolePlan& row = plan.poles[decision.pole.place()];
        return row.choice == decision.choice && row.head == decision.head;
    });
}

const ShadeResult& no_shade() {
    static const ShadeResult none;
    return none;
}

} // namespace

int count_of(const std::vector<Finding>& findings, Severity severity) {
    return static_cast<int>(std::count_if(findings.begin(), findings.end(),
                                          [&](const Finding& f) { return f.severity == severity; }));
}

Expected<void> OpenProject::Inside::load(const std::string& plan_name) {
    tables = read_city_tables(*database);
    gather_findings = read_findings(*database, Step::gather, "");
    gather_errors_set_aside = meta_value(*database, "gather_errors_set_aside") == "yes";
    vet = read_vet(*database, tables.city);
    city = vet ? with_wiring(tables.city, vet->strings) : tables.city;
    shade = read_shade(*database, city);
    shade_findings = read_findings(*database, Step::shade, "");
    return load_plan(plan_name);
}

Expected<void> OpenProject::Inside::load_plan(const std::string& plan_name) {
    plan = read_plan(*database, city, plan_name);
    if (plan.settings.services_anywhere) city = with_services_anywhere(std::move(city));
    decide = read_decide(*database, city, plan_name);
    phase_run = read_phase(*database, plan_name);
    if (database->failure()) return tl::make_unexpected(*database->failure());
    return {};
}

MoneyInput OpenProject::Inside::money_input(const Plan& of_plan) const {
    return {city, tables.catalog, tables.prices, of_plan, shade ? *shade : no_shade()};
}

std::string OpenProject::Inside::stored_hash(Step step) const {
    const auto run = step_run(*database, step, plan_of(step, plan));
    return run ? run->input_hash : std::string();
}

std::string OpenProject::Inside::hash_of(Step step, const std::vector<std::string>& heads) const {
    const std::vector<VetString> none;
    const auto& wiring = vet ? vet->strings : none;
    switch (step) {
    case Step::vet:
        return vet_input_hash(tables);
    case Step::shade:
        return shade_input_hash(tables, plan.settings.nights_goal, heads);
    case Step::decide:
        return decide_input_hash(tables, wiring, plan, stored_hash(Step::shade));
    case Step::phase:
        return phase_input_hash(tables, wiring, plan, stored_hash(Step::decide));
    case Step::hand_out:
        return hand_out_input_hash(tables, plan, stored_hash(Step::phase));
    default:
        return {};
    }
}

std::array<StepState, 6> OpenProject::Inside::step_states(const std::optional<PhaseResult>& phase) {
    std::array<StepState, 6> states;
    const auto state = [&](Step step) -> StepState& { return states[static_cast<std::size_t>(step)]; };
    const auto counts = [&](Step step, const std::vector<Finding>& findings) {
        state(step).errors = count_of(findings, Severity::error);
        state(step).warnings = count_of(findings, Severity::warning);
    };
    bool is_upstream_good = true;
    for (Step step : kSteps) {
        const auto run = step_run(*database, step, plan_of(step, plan));
        StepState& each = state(step);
        if (!run) {
            is_upstream_good = false;
            continue;
        }
        each.at = run->at;
        each.standing = is_upstream_good ? StepStanding::up_to_date : StepStanding::stale;
        switch (step) {
        case Step::gather:
            counts(step, gather_findings);
            if (gather_errors_set_aside) each.errors = 0;
            break;
        case Step::vet:
            if (!vet || run->input_hash != hash_of(step)) each.standing = StepStanding::stale;
            if (vet) counts(step, vet->findings);
            each.errors += state(Step::gather).errors;
            break;
        case Step::shade: {
            const std::string heads = meta_value(*database, "shade_heads");
            std::vector<std::string> chosen;
            for (std::size_t from = 0; from < heads.size();) {
                const std::size_t end = std::min(heads.find('\n', from), heads.size());
                chosen.push_back(heads.substr(from, end - from));
                from = end + 1;
            }
            if (!shade || run->input_hash != hash_of(step, chosen)) each.standing = StepStanding::stale;
            counts(step, shade_findings);
            break;
        }
        case Step::decide:
            if (!decide || run->input_hash != hash_of(step) || !follows_decisions(plan, *decide))
                each.standing = StepStanding::stale;
            if (decide) counts(step, decide->findings);
            break;
        case Step::phase:
            if (!phase || run->input_hash != hash_of(step))
                each.standing = StepStanding::stale;
            else if (each.standing == StepStanding::up_to_date &&
                     phase_run->plan_hash != hand_out_input_hash(tables, plan, {}))
                each.standing = StepStanding::by_hand;
            if (phase) counts(step, phase->failures);
            break;
        case Step::hand_out:
            if (run->input_hash != hash_of(step)) each.standing = StepStanding::stale;
            break;
        }
        const bool can_stop = step != Step::gather && step != Step::hand_out;
        if (can_stop && each.errors > 0 && each.standing != StepStanding::stale)
            each.standing = StepStanding::stopped;
        is_upstream_good = is_upstream_good && (each.standing == StepStanding::up_to_date ||
                                                each.standing == StepStanding::by_hand);
    }
    return states;
}

void OpenProject::Inside::show() {
    auto next = std::make_shared<ProjectView>();
    next->path = path;
    next->is_read_only = lock == nullptr;
    next->read_only_reason = read_only_reason;
    next->city = city;
    next->catalog = tables.catalog;
    next->prices = tables.prices;
    next->climate = tables.climate;
    next->canopy_raster = tables.canopy_raster;
    next->plan = plan;
    next->plan_names = plan_names(*database);
    if (next->plan_names.empty()) next->plan_names = {plan.settings.name};
    next->findings = gather_findings;
    next->gather_findings = gather_findings;
    for (const TableCount& count : tables.counts)
        if (count.table == "poles") next->pole_rows_not_kept = count.set_aside;
    if (vet) next->findings.insert(next->findings.end(), vet->findings.begin(), vet->findings.end());
    next->findings.insert(next->findings.end(), shade_findings.begin(), shade_findings.end());
    next->vet = vet;
    next->shade = shade;
    next->decide = decide;
    if (decide) next->findings.insert(next->findings.end(), decide->findings.begin(), decide->findings.end());
    if (decide && phase_run && follows_decisions(plan, *decide)) {
        next->phase = evaluate_phase(money_input(plan), *decide);
        next->phase->bound = phase_run->bound;
        next->phase->seconds = phase_run->seconds;
    }
    next->steps = step_states(next->phase);
    if (next->phase && next->steps[static_cast<std::size_t>(Step::phase)].standing == StepStanding::stale)
        next->phase->bound = 0;
    const UndoLabels labels = undo_labels(*database, plan.settings.name);
    next->undo_label = labels.undo;
    next->redo_label = labels.redo;
    const std::lock_guard guard(view_mutex);
    view = std::move(next);
}

Expected<void> OpenProject::Inside::may_write() const {
    if (lock) return {};
    return tl::make_unexpected(Fault{FaultCode::file_busy, path, 0, "", read_only_reason,
                                     "a project that nobody else writes",
                                     "Close it there, or work on a copy"});
}

Expected<void> OpenProject::Inside::ready_for(Step step) const {
    for (Step earlier : kSteps) {
        if (earlier >= step) break;
        const StepState& each = view->steps[static_cast<std::size_t>(earlier)];
        const std::string word = text_of(earlier);
        if (earlier == Step::gather || (earlier == Step::vet && step == Step::vet)) continue;
        switch (each.standing) {
        case StepStanding::not_yet:
            return tl::make_unexpected(not_ready(path, fmt::format("{} has not been run", word),
                                                 fmt::format("Run first: unstring {} {}", word, path)));
        case StepStanding::stale:
            return tl::make_unexpected(
                not_ready(path, fmt::format("{} is stale: what it rests on has changed since", word),
                          fmt::format("Run again: unstring {} {}", word, path)));
        case StepStanding::stopped:
            return tl::make_unexpected(not_ready(
                path,
                fmt::format("{} is stopped by {} error{}", word, each.errors, each.errors == 1 ? "" : "s"),
                earlier == Step::vet
                    ? fmt::format("Mend the records, or set them aside: unstring vet {} --set-aside", path)
                    : fmt::format("Look at the findings: unstring {} {}", word, path)));
        default:
            break;
        }
    }
    return {};
}

Change OpenProject::Inside::change_to(const Plan& next, const std::string& label) {
    Change change = plan_difference(city, plan, next, label);
    const auto names = plan_names(*database);
    if (change.rows.empty() || std::find(names.begin(), names.end(), plan.settings.name) != names.end())
        return change;
    std::erase_if(change.rows, [](const RowChange& row) { return row.table == kPlansTable; });
    change.rows.insert(change.rows.begin(),
                       RowChange{kPlansTable, plan.settings.name, {}, settings_cells(next.settings)});
    return change;
}

Expected<std::optional<Change>> OpenProject::Inside::take_back(const std::optional<UndoLine>& line) {
    if (auto may = may_write(); !may) return tl::make_unexpected(may.error());
    if (!line) return std::optional<Change>();
    Change change = inverse(line->change);
    change.who.clear(); // who takes it back, not who made it
    if (auto written = database->transaction([&] { write_change(*database, change, line->id); }); !written)
        return tl::make_unexpected(written.error());
    if (auto loaded = load_plan(plan.settings.name); !loaded) return tl::make_unexpected(loaded.error());
    show();
    return std::optional<Change>(change);
}

Expected<Change> OpenProject::Inside::write_plan(const Plan& next, const std::string& label,
                                                 const std::function<void()>& more) {
    if (auto may = may_write(); !may) return tl::make_unexpected(may.error());
    const Change change = change_to(next, label);
    if (change.is_empty() && !more) return change;
    auto written = database->transaction([&] {
        if (!change.is_empty()) write_change(*database, change);
        if (more) more();
    });
    if (!written) return tl::make_unexpected(written.error());
    plan = next;
    return change;
}

} // namespace unstring
