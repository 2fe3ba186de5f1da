#pragma once
// The program's one entrance: no subcommand opens the window, the others are the steps, `why` and `work-out`.

namespace unstring {

/// @return the exit status of the contract
int run_command_line(int argc, char** argv);

}  // namespace unstring
