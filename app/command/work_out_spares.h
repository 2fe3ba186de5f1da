#pragma once
// `unstring work-out spares`.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_spares(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
