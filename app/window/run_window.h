#pragma once
// The window, opened on a project or on none.

#include <string>

namespace unstring {

/// @param project_path  empty = a start page that offers to open or gather one
/// @return the exit status
int run_window(int argc, char** argv, const std::string& project_path);

} // namespace unstring
