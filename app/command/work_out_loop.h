#pragma once
// `work-out loop`: which cable of a string stays energised for the lamps that are live.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_loop(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
