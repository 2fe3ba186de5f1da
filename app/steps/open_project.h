#pragma once
// A project that is open: what the command line and the window both hold. Reading gives one value,
// `ProjectView`, that never changes; every edit and every step writes the file first and then makes a new
// view.

#include <array>
#include <map>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/catalog/prices.h"
#include "model/city/city.h"
#include "model/decide/decide_result.h"
#include "model/fault.h"
#include "model/finding.h"
#include "model/phase/phase_result.h"
#include "model/plan/plan.h"
#include "model/plan/staleness.h"
#include "model/progress.h"
#include "model/solar/shade.h"
#include "model/sun/climate.h"
#include "model/vet/vet_result.h"

namespace unstring {

struct ProjectView {
    std::string path;
    bool is_read_only = false;
    std::string read_only_reason; ///< "written by anna on desk-3 since 10:41"
    City city;
    Catalog catalog;
    PriceBook prices;
    std::optional<Climate> climate;
    std::string canopy_raster; ///< path of the height raster, empty when there is none
    Plan plan;
    std::vector<std::string> plan_names;
    std::vector<Finding> findings; ///< of gather, vet, shade and decide, as each last ran
    std::vector<Finding> gather_findings;
    long pole_rows_not_kept = 0;      ///< rows of the pole file that could not be read
    std::optional<VetResult> vet;     ///< findings left out: they are in `findings`
    std::optional<ShadeResult> shade; ///< results of the last run, stale or not
    std::optional<DecideResult> decide;
    std::optional<PhaseResult> phase;   ///< of the plan as it is now, hand edits included
    std::array<StepState, 6> steps;     ///< in the order of kSteps
    std::string undo_label, redo_label; ///< empty: nothing to undo, to redo
};

struct EditLine { ///< one line of the project's history
    std::int64_t id = 0;
    std::string at, who, plan, label;
    std::int64_t undoes = 0;
};

struct DecideOptions { ///< what the command line may change of the plan's settings
    std::optional<Policy> policy;
    std::vector<std::string> must_stay;
    std::optional<double> rate, nights_goal;
    std::optional<int> decide_year;
    std::optional<bool> services_anywhere;
};

struct PhaseOptions {
    std::optional<int> years;
    bool free_hand_years = false; ///< --free: years set by hand may be moved
    bool settle_rest = false;     ///< --settle-rest: hand years stay, the others are solved around them
};

struct HandOutOptions {
    std::string to; ///< folder
    bool survey = false;
    std::optional<int> year;
    std::string crew; ///< empty = all
    std::string paper = "a4";
};

struct OrderLine { ///< one work order that was handed out
    std::string order_id, crew;
    int year = 0, poles = 0;
    double hours = 0;
};

struct HandOutReport {
    std::vector<std::string> files;
    std::vector<OrderLine> orders;
};

class Printer; // app/steps/printer.h: paper is handed in behind it

class OpenProject {
public:
    /// Opens for writing where nobody else writes, else read-only with the reason in the view.
    /// @fault file_missing, file_broken, file_newer
    static Expected<std::unique_ptr<OpenProject>>
    open(const std::string& path, const std::string& plan_name = "first", bool read_only = false);
    ~OpenProject();
    OpenProject(const OpenProject&) = delete;
    OpenProject& operator=(const OpenProject&) = delete;

    /// The project as it stands; the pointer stays good while anyone holds it. Safe to read from any thread.
    [[nodiscard]] std::shared_ptr<const ProjectView> view() const;

    /// Writes the difference between the plan and `next` as one edit, then shows it. Nothing to write is no
    /// fault.
    Expected<Change> edit(const Plan& next, const std::string& label);
    Expected<std::optional<Change>> undo();
    Expected<std::optional<Change>> redo();
    /// The last edits that touched a pole (empty id: all), newest first.
    Expected<std::vector<EditLine>> history(const std::string& pole_id, int at_most) const;

    /// What phase would say of a plan that is not written (a boundary under the hand): ledger, string states,
    /// checks. Pure; safe to call while the view is read elsewhere.
    [[nodiscard]] PhaseResult preview(const Plan& next) const;

    /// One step, run over the file and stored. While one runs no other call but view() and preview() may be
    /// made.
    /// @fault not_ready (an earlier step is missing or stopped), cancelled (the file is as it was),
    /// write_failed
    Expected<void> run_vet(bool set_aside, const Progress& progress);
    Expected<void> run_shade(const std::vector<std::string>& heads, const Progress& progress);
    Expected<void> run_decide(const DecideOptions& options, const Progress& progress);
    Expected<void> run_phase(const PhaseOptions& options, const Progress& progress);
    /// Work orders as CSV and, with a printer, PDF; layers of the plan. @fault bad_usage (no folder, no such
    /// year)
    Expected<HandOutReport> run_hand_out(const HandOutOptions& options, Printer* printer,
                                         const Progress& progress);

private:
    OpenProject();
    struct Inside;
    std::unique_ptr<Inside> inside_;
};

} // namespace unstring
