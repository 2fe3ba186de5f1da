#pragma once
// `unstring work-out night`: one solar lamp and its battery, hour by hour.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_night(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
