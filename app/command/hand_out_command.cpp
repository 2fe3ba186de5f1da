#include <memory>

#include "app/command/answer_json.h"
#include "app/command/answer_text.h"
#include "app/command/commands.h"
#include "app/steps/open_project.h"

namespace unstring {
namespace {

struct HandOutCall {
    std::string project, plan = "first";
    HandOutOptions options;
};

int run_hand_out_command(const HandOutCall& call, CommandLine& line) {
    const Console console = line.console();
    auto project = OpenProject::open(call.project, call.plan);
    if (!project) return console.fail(project.error());
    if (const auto view = (*project)->view(); view->is_read_only)
        return console.fail({FaultCode::file_busy, call.project, 0, "", view->read_only_reason,
                             "a project that nobody else writes", "Close it there first"});
    std::unique_ptr<Printer> printer;
    if (line.outside->make_printer) printer = line.outside->make_printer(line.argc, line.argv);
    auto report = (*project)->run_hand_out(call.options, printer.get(), console.progress("hand-out"));
    if (!report) return console.fail(report.error());
    console.say(hand_out_text(*report) + "\n" + summary_text(*(*project)->view()));
    console.answer(hand_out_json(*report));
    return 0;
}

} // namespace

void add_hand_out(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<HandOutCall>();
    CLI::App* hand_out = app.add_subcommand("hand-out", "Writes the work orders and the plan's layers");
    hand_out->add_option("project", call->project, "The project file")->required();
    hand_out->add_option("--to", call->options.to, "Folder for the files; made when it is not there")
        ->required();
    hand_out->add_flag("--survey", call->options.survey,
                       "Survey orders instead: what to look at before any decision is final");
    hand_out->add_option("--year", call->options.year, "Only the orders of this year");
    hand_out->add_option("--crew", call->options.crew, "Only the orders of this crew")
        ->check(CLI::IsMember({"line", "civil", "lighting", "electric"}));
    hand_out->add_option("--paper", call->options.paper, "Sheet size")
        ->check(CLI::IsMember({"a4", "letter"}))
        ->capture_default_str();
    hand_out->add_option("--plan", call->plan, "Name of the plan")->capture_default_str();
    hand_out->footer("Example: unstring hand-out city.gpkg --to orders --year 2027 --crew line");
    hand_out->callback([call, &line] { line.exit_status = run_hand_out_command(*call, line); });
}

} // namespace unstring
