#pragma once
// `work-out string`: volts and power of one series string, its transformer's loading and input side.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_string(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
