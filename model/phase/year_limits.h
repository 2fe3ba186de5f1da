#pragma once
// A year's money and crew hours, from the rows of the budget.

#include "model/city/city.h"
#include "model/phase/phase_result.h"

namespace unstring {

struct YearLimits {
    std::optional<double> money, line_h, civil_h, lighting_h, electric_h; ///< none = no limit
};

/// Rows of one year (one a fund) add up; a figure that none of them gives is no limit.
[[nodiscard]] YearLimits limits_of(const City& city, int year);

} // namespace unstring
