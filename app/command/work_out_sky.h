#pragma once
// `unstring work-out sky`: the share of the sky over a horizon.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_sky(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
