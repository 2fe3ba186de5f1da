#pragma once
// The subcommands. Each adds itself and, when it runs, sets the exit status.

#include <CLI/CLI.hpp>

#include "app/command/console.h"
#include "app/command/run.h"

namespace unstring {

struct CommandLine { ///< shared by the subcommands of one call
    bool is_json = false;
    int exit_status = 0;
    int argc = 0;
    char** argv = nullptr;
    const Outside* outside = nullptr;
    [[nodiscard]] Console console() const { return Console(is_json); }
};

void add_gather(CLI::App& app, CommandLine& line);
void add_vet(CLI::App& app, CommandLine& line);
void add_shade(CLI::App& app, CommandLine& line);
void add_decide(CLI::App& app, CommandLine& line);
void add_phase(CLI::App& app, CommandLine& line);
void add_hand_out(CLI::App& app, CommandLine& line);
void add_why(CLI::App& app, CommandLine& line);
void add_work_out(CLI::App& app, CommandLine& line);

} // namespace unstring
