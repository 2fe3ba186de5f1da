#pragma once
// `unstring work-out horizon`: the horizon of a point in a height raster.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_horizon(CLI::App& work_out, WorkOutAnswer& answer);

} // namespace unstring
