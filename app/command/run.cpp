#include "app/command/run.h"

#include <exception>
#include <string_view>

#include "app/command/commands.h"

namespace unstring {
namespace {

// A wrong option may stop the reading of the line before --json is seen.
bool wants_json(int argc, char** argv) {
    for (int i = 1; i < argc; ++i)
        if (std::string_view(argv[i]) == "--json") return true;
    return false;
}

// The flag may stand before or after the subcommand.
void add_json_flag(CLI::App& app, bool& is_json) {
    app.add_flag("--json", is_json, "One JSON object on standard output, text on standard error");
    for (CLI::App* sub : app.get_subcommands({})) add_json_flag(*sub, is_json);
}

int run_or_throw(int argc, char** argv, const Outside& outside) {
    CLI::App app{"Unstring plans a city's way off series street lighting: gather, vet, shade, decide, phase, "
                 "hand out.\n"
                 "Without a subcommand it opens the window.",
                 "unstring"};
    app.set_version_flag("--version", UNSTRING_VERSION);
    app.footer("Example: unstring gather city.gpkg --poles poles.csv --circuits circuits.csv && unstring vet "
               "city.gpkg\n"
               "Its answers are for planning. Work on live strings, at height and in traffic follows local "
               "codes and licensed practice.");
    CommandLine line;
    line.argc = argc;
    line.argv = argv;
    line.outside = &outside;
    std::string project;
    app.add_option("project", project, "Opens the window on this project");
    add_gather(app, line);
    add_vet(app, line);
    add_shade(app, line);
    add_decide(app, line);
    add_phase(app, line);
    add_hand_out(app, line);
    add_why(app, line);
    add_work_out(app, line);
    add_json_flag(app, line.is_json);
    app.require_subcommand(0, 1);
    try {
        app.parse(argc, argv);
    } catch (const CLI::ParseError& error) {
        if (error.get_exit_code() == static_cast<int>(CLI::ExitCodes::Success))
            return app.exit(error); // --help, --version
        return Console(wants_json(argc, argv))
            .fail({FaultCode::bad_usage, "", 0, "", error.what(), "",
                   "See: unstring --help, or --help after a subcommand"});
    }
    if (!app.get_subcommands().empty()) return line.exit_status;
    return outside.open_window(argc, argv, project);
}

} // namespace

int run_command_line(int argc, char** argv, const Outside& outside) {
    try {
        return run_or_throw(argc, argv, outside);
    } catch (const std::exception& error) {
        std::fprintf(
            stderr,
            "unstring: a fault of the program itself: %s\nThe project is as it was before this step.\n",
            error.what());
        return 70;
    }
}

} // namespace unstring
