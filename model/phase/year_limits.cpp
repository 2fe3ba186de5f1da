#include "model/phase/year_limits.h"

namespace unstring {
namespace {

void add(std::optional<double>& sum, const std::optional<double>& more) {
    if (more) sum = sum.value_or(0) + *more;
}

} // namespace

YearLimits limits_of(const City& city, int year) {
    YearLimits limits;
    for (const YearBudget& row : city.budget) {
        if (row.year != year) continue;
        add(limits.money, row.money);
        add(limits.line_h, row.line_h);
        add(limits.civil_h, row.civil_h);
        add(limits.lighting_h, row.lighting_h);
        add(limits.electric_h, row.electric_h);
    }
    return limits;
}

} // namespace unstring
