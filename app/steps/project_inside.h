#pragma once
// What an open project holds besides the view it shows: the file, the writer's lock, and the parts that views
// are made of.

#include <memory>
#include <mutex>
#include <optional>
#include <string>
#include <vector>

#include "app/steps/open_project.h"
#include "geo/project/city_tables.h"
#include "geo/project/database.h"
#include "geo/project/lock.h"
#include "geo/project/plan_tables.h"
#include "geo/project/result_tables.h"
#include "model/money/pole_option.h"
#include "model/phase/phase_desk.h"

namespace unstring {

struct OpenProject::Inside {
    std::string path, read_only_reason;
    std::unique_ptr<WriterLock> lock; ///< null = read-only
    std::unique_ptr<Database> database;

    CityTables tables; ///< as gathered
    City city;         ///< the same, in the wiring order that vet settled
    Plan plan;
    std::vector<Finding> gather_findings;
    bool gather_errors_set_aside = false;
    std::optional<VetResult> vet;
    std::optional<ShadeResult> shade;
    std::vector<Finding> shade_findings;
    std::optional<DecideResult> decide;
    std::optional<PhaseRun> phase_run;

    mutable std::mutex view_mutex;
    std::shared_ptr<const ProjectView> view;

    mutable std::mutex desk_mutex; ///< of what preview keeps from one plan to the next
    mutable std::shared_ptr<const ProjectView> desk_view;
    mutable std::unique_ptr<PhaseDesk> desk;

    /// Reads everything from the file.
    Expected<void> load(const std::string& plan_name);
    /// Reads only what belongs to the plan.
    Expected<void> load_plan(const std::string& plan_name);
    /// Makes the view from the parts and shows it.
    void show();
    [[nodiscard]] std::array<StepState, 6> step_states(const std::optional<PhaseResult>& phase);
    [[nodiscard]] MoneyInput money_input(const Plan& of_plan) const;
    [[nodiscard]] std::string hash_of(Step step, const std::vector<std::string>& heads = {}) const;
    [[nodiscard]] std::string stored_hash(Step step) const;

    /// Refuses where the file is read-only. @fault file_busy
    [[nodiscard]] Expected<void> may_write() const;
    /// Refuses where an earlier step is missing, stale or stopped. @fault not_ready
    [[nodiscard]] Expected<void> ready_for(Step step) const;
    /// The change from this plan to the next, with the plan's own row where it is not there yet.
    [[nodiscard]] Change change_to(const Plan& next, const std::string& label);
    /// Undo and redo: the inverse of an edit, written as a line of its own.
    Expected<std::optional<Change>> take_back(const std::optional<UndoLine>& line);
    /// Rows, line in edits and what else `more` writes, in one transaction; then the plan is `next`.
    Expected<Change> write_plan(const Plan& next, const std::string& label,
                                const std::function<void()>& more = {});
};

/// An error that still stops the next step: gather's until its rows are mended or set aside, vet's as they
/// are found.
[[nodiscard]] int count_of(const std::vector<Finding>& findings, Severity severity);

} // namespace unstring
