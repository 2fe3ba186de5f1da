#include <memory>

#include <fmt/format.h>

#include "app/command/answer_json.h"
#include "app/command/answer_text.h"
#include "app/command/commands.h"
#include "app/steps/open_project.h"

namespace unstring {
namespace {

struct StepCall {
    std::string project, plan = "first";
    bool set_aside = false, look = false, per_pole = false;
    std::vector<std::string> heads;
    std::string policy;
    DecideOptions decide;
    bool services_anywhere = false;
    PhaseOptions phase;
};

CLI::App* add_step(CLI::App& app, const char* name, const char* what, StepCall& call, bool has_plan) {
    CLI::App* step = app.add_subcommand(name, what);
    step->add_option("project", call.project, "The project file")->required();
    if (has_plan) step->add_option("--plan", call.plan, "Name of the plan")->capture_default_str();
    return step;
}

/// Opens for writing, or says why not. Null: the status is set.
std::unique_ptr<OpenProject> open_for(const StepCall& call, bool is_look, const Console& console,
                                      int& status) {
    auto project = OpenProject::open(call.project, call.plan, is_look);
    if (!project) {
        status = console.fail(project.error());
        return nullptr;
    }
    const auto view = (*project)->view();
    if (!is_look && view->is_read_only) {
        status = console.fail({FaultCode::file_busy, call.project, 0, "", view->read_only_reason,
                               "a project that nobody else writes",
                               "Close it there, or look meanwhile: unstring why, unstring vet --look"});
        return nullptr;
    }
    return std::move(*project);
}

int run_vet_command(const StepCall& call, const Console& console) {
    int status = 0;
    auto project = open_for(call, call.look, console, status);
    if (!project) return status;
    if (call.look && call.set_aside)
        return console.fail({FaultCode::bad_usage, "", 0, "--look", "--look with --set-aside",
                             "one of the two", "--look only reads; --set-aside writes"});
    if (!call.look)
        if (auto done = project->run_vet(call.set_aside, console.progress("vet")); !done)
            return console.fail(done.error());
    auto view = *project->view();
    if (!view.vet) view.vet = vet_city(view.city, view.catalog);
    console.say(vet_text(view));
    console.answer(vet_json(view));
    return count_errors(vetted_findings(view)) > 0 ? 1 : 0;
}

int run_shade_command(const StepCall& call, const Console& console) {
    int status = 0;
    auto project = open_for(call, false, console, status);
    if (!project) return status;
    if (auto done = project->run_shade(call.heads, console.progress("shade")); !done)
        return console.fail(done.error());
    const auto view = project->view();
    console.say(shade_text(*view));
    console.answer(shade_json(*view, call.per_pole));
    return 0;
}

Expected<DecideOptions> decide_options(const StepCall& call) {
    DecideOptions options = call.decide;
    options.services_anywhere = call.services_anywhere; // a flag that is not given is off
    constexpr std::string_view kMustStay = "must-stay=";
    if (call.policy.empty()) return options;
    if (call.policy == "end")
        options.policy = Policy::end;
    else if (call.policy == "may-stay")
        options.policy = Policy::may_stay;
    else if (call.policy.starts_with(kMustStay))
        options.policy = Policy::must_stay;
    if (options.policy == Policy::must_stay) {
        std::string ids = call.policy.substr(kMustStay.size());
        for (std::size_t from = 0; from <= ids.size();) {
            const std::size_t end = std::min(ids.find(',', from), ids.size());
            if (end > from) options.must_stay.push_back(ids.substr(from, end - from));
            from = end + 1;
        }
    }
    if (!options.policy || (options.policy == Policy::must_stay && options.must_stay.empty()))
        return tl::make_unexpected(Fault{FaultCode::bad_usage, "", 0, "--policy", call.policy,
                                         "end, may-stay or must-stay=ID,ID",
                                         "For example --policy must-stay=S-04,S-07"});
    return options;
}

int run_decide_command(const StepCall& call, const Console& console) {
    const auto options = decide_options(call);
    if (!options) return console.fail(options.error());
    int status = 0;
    auto project = open_for(call, false, console, status);
    if (!project) return status;
    if (auto done = project->run_decide(*options, console.progress("decide")); !done)
        return console.fail(done.error());
    const auto view = project->view();
    console.say(decide_text(*view));
    console.answer(decide_json(*view));
    return count_errors(view->decide->findings) > 0 ? 1 : 0;
}

int run_phase_command(const StepCall& call, const Console& console) {
    int status = 0;
    auto project = open_for(call, false, console, status);
    if (!project) return status;
    if (auto done = project->run_phase(call.phase, console.progress("phase")); !done)
        return console.fail(done.error());
    const auto view = project->view();
    console.say(phase_text(*view));
    console.answer(phase_json(*view));
    return count_errors(view->phase->failures) > 0 ? 1 : 0;
}

} // namespace

void add_vet(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<StepCall>();
    CLI::App* vet = add_step(app, "vet", "Says what is wrong with the records, and settles the wiring order",
                             *call, false);
    vet->add_flag("--set-aside", call->set_aside,
                  "Leaves records with errors out of planning; they stay counted, drawn and printed");
    vet->add_flag("--look", call->look, "Only reads: shows what the last run found");
    vet->footer("Example: unstring vet city.gpkg --set-aside");
    vet->callback([call, &line] { line.exit_status = run_vet_command(*call, line.console()); });
}

void add_shade(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<StepCall>();
    CLI::App* shade = add_step(app, "shade", "Works out where a solar head would stay lit", *call, true);
    shade->add_option("--head", call->heads, "Only this head of the catalogue; may be given again");
    shade->add_flag("--per-pole", call->per_pole, "Adds every pole to the answer");
    shade->footer("Example: unstring shade city.gpkg --per-pole --json");
    shade->callback([call, &line] { line.exit_status = run_shade_command(*call, line.console()); });
}

void add_decide(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<StepCall>();
    CLI::App* decide = add_step(app, "decide", "Chooses keep, rewire or solar for every pole", *call, true);
    decide->add_option("--policy", call->policy, "end | may-stay | must-stay=IDS");
    decide->add_option("--rate", call->decide.rate, "Real discount rate, for example 0.03")
        ->check(CLI::Range(0.0, 0.5));
    decide
        ->add_option("--nights", call->decide.nights_goal,
                     "Nights dark a year that are borne at the end of battery life")
        ->check(CLI::Range(0.0, 365.0));
    decide->add_option("--decide-year", call->decide.decide_year, "Year that prices are taken at");
    decide->add_flag("--services-anywhere", call->services_anywhere,
                     "New services may also stand where no row of the file proposes one");
    decide->footer("Example: unstring decide city.gpkg --policy may-stay --rate 0.03");
    decide->callback([call, &line] { line.exit_status = run_decide_command(*call, line.console()); });
}

void add_phase(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<StepCall>();
    CLI::App* phase =
        add_step(app, "phase", "Gives every pole its year, inside money and crew hours", *call, true);
    phase->add_option("--years", call->phase.years, "Years in which work may fall")->check(CLI::Range(1, 60));
    phase->add_flag("--free", call->phase.free_hand_years,
                    "Years set by hand may be moved; locked ones never are");
    phase->add_flag("--settle-rest", call->phase.settle_rest,
                    "Years set by hand stay, the others are solved around them");
    phase->footer("Example: unstring phase city.gpkg --years 8");
    phase->callback([call, &line] { line.exit_status = run_phase_command(*call, line.console()); });
}

} // namespace unstring
