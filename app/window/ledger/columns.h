#pragma once
// One column is one year: the ledger and the rail stand on the same columns.

#include <algorithm>

#include "model/plan/plan.h"

namespace unstring {

struct YearColumns {
    double left = 0, width = 80;
    int first_year = 2027, count = 8;

    [[nodiscard]] double x_of(int year) const { return left + width * (year - first_year); }
    [[nodiscard]] double right() const { return left + width * count; }
    /// The year under an x, 0 = none.
    [[nodiscard]] int year_at(double x) const {
        return x < left || x >= right() ? 0 : first_year + std::min(count - 1, int((x - left) / width));
    }
};

/// At most 46 % of the width goes to the years; columns are 80 wide where that leaves room, else narrower.
[[nodiscard]] inline YearColumns year_columns(double widget_width, const PlanSettings& settings) {
    const int count = std::max(1, settings.years);
    const double width = std::clamp(0.46 * widget_width / count, 30.0, 80.0);
    return {widget_width - 12 - width * count, width, settings.first_year, count};
}

} // namespace unstring
