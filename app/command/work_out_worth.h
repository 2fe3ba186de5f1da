#pragma once
// `unstring work-out worth`.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_worth(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
