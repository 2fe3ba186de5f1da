#pragma once
// `work-out years FILE.json`: sections into years, in the form of the phasing benchmarks.

#include "app/command/work_out.h"

namespace unstring {

void add_work_out_years(CLI::App& work_out, WorkOutAnswer& answer);

/// The answer for one file. @return with fault where a field is missing, of the wrong type or out of range
[[nodiscard]] WorkOutAnswer work_out_years(const std::string& path);

} // namespace unstring
