#include <memory>

#include "app/command/commands.h"
#include "app/command/work_out.h"
#include "app/command/work_out_drop.h"
#include "app/command/work_out_horizon.h"
#include "app/command/work_out_loop.h"
#include "app/command/work_out_night.h"
#include "app/command/work_out_route.h"
#include "app/command/work_out_sky.h"
#include "app/command/work_out_spares.h"
#include "app/command/work_out_string.h"
#include "app/command/work_out_sun.h"
#include "app/command/work_out_trench.h"
#include "app/command/work_out_worth.h"
#include "app/command/work_out_years.h"

namespace unstring {

void add_work_out(CLI::App& app, CommandLine& line) {
    auto answer = std::make_shared<WorkOutAnswer>();
    CLI::App* work_out =
        app.add_subcommand("work-out", "One calculation by itself, its inputs and steps shown");
    work_out->require_subcommand(1);
    work_out->footer("Example: unstring work-out worth --rate 0.03 --years 20");
    for (const auto add : {add_work_out_sun, add_work_out_sky, add_work_out_night, add_work_out_horizon,
                           add_work_out_string, add_work_out_loop, add_work_out_route, add_work_out_drop,
                           add_work_out_worth, add_work_out_spares, add_work_out_trench, add_work_out_years})
        add(*work_out, *answer);
    work_out->callback([answer, &line] {
        const Console console = line.console();
        if (answer->fault) {
            line.exit_status = console.fail(*answer->fault);
            return;
        }
        console.say(answer->steps_text);
        console.answer(answer->json);
    });
}

} // namespace unstring
