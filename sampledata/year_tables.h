#pragma once
// The small tables: climate, prices, budget, marks.

#include <string>
#include <vector>

#include "model/fault.h"
#include "sampledata/records.h"

namespace unstring::sample {

/// @param poles        of the whole city: money and hours grow with it
/// @param first_poles  of the first tile: the staff's marks are on these
[[nodiscard]] Expected<void> write_year_tables(const std::string& folder, long poles,
                                               const std::vector<PoleRow>& first_poles);

} // namespace unstring::sample
