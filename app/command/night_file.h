#pragma once
// The input file of `work-out night`, read into the model's case.

#include <string>

#include "model/fault.h"
#include "model/solar/night.h"

namespace unstring {

/// @fault file_missing, file_broken, value_unreadable (field named)
[[nodiscard]] Expected<NightCase> read_night_file(const std::string& path);

} // namespace unstring
