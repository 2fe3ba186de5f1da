#pragma once
// `work-out route`: the shortest way over points, open or closed.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_route(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
