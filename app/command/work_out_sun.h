#pragma once
// `unstring work-out sun`: where the sun stands.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_sun(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
