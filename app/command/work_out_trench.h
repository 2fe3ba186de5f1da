#pragma once
// `unstring work-out trench`: the solver behind the shared trench, on a Steiner problem in STP format.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_trench(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
