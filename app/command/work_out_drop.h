#pragma once
// `unstring work-out drop`.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_drop(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
