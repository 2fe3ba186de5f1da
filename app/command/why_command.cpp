#include <memory>

#include "app/command/answer_json.h"
#include "app/command/answer_text.h"
#include "app/command/commands.h"
#include "app/steps/open_project.h"

namespace unstring {
namespace {

struct WhyCall {
    std::string project, pole_id, plan = "first";
};

int run_why_command(const WhyCall& call, const Console& console) {
    auto project = OpenProject::open(call.project, call.plan, true);
    if (!project) return console.fail(project.error());
    const auto view = (*project)->view();
    const PoleIx pole = find_pole(view->city, call.pole_id);
    if (!pole.is_valid())
        return console.fail({FaultCode::bad_usage, call.project, 0, "POLE_ID", call.pole_id,
                             "the id of a pole of this project",
                             "Look it up on the map or in the pole file"});
    console.say(why_text(*view, pole));
    console.answer(why_json(*view, pole));
    return 0;
}

} // namespace

void add_why(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<WhyCall>();
    CLI::App* why = app.add_subcommand("why", "Every number behind one pole's decision");
    why->add_option("project", call->project, "The project file")->required();
    why->add_option("pole_id", call->pole_id, "Id of the pole")->required();
    why->add_option("--plan", call->plan, "Name of the plan")->capture_default_str();
    why->footer("Example: unstring why city.gpkg 04-218");
    why->callback([call, &line] { line.exit_status = run_why_command(*call, line.console()); });
}

} // namespace unstring
