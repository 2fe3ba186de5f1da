#pragma once
// The program's one entrance: no subcommand opens the window, the others are the steps, `why` and `work-out`.

#include <functional>
#include <memory>
#include <string>

#include "app/steps/printer.h"

namespace unstring {

struct Outside { ///< what the command line does not link: screen and paper
    std::function<int(int argc, char** argv, const std::string& project_path)> open_window;
    std::function<std::unique_ptr<Printer>(int& argc, char** argv)> make_printer;
};

/// @return the exit status of the contract
int run_command_line(int argc, char** argv, const Outside& outside);

} // namespace unstring
