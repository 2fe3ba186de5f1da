#include "model/series/spares.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace unstring {
namespace {

void check(double mean) {
    if (!(mean >= 0) || !std::isfinite(mean))
        throw std::logic_error("spares: the mean demand must be 0 or more");
}

double chance_of(double mean, int demand) {
    if (mean == 0) return demand == 0 ? 1 : 0;
    return std::exp(demand * std::log(mean) - mean - std::lgamma(demand + 1.0));
}

} // namespace

double poisson_cover(double mean, int stock) {
    check(mean);
    double cover = 0;
    for (int demand = 0; demand <= stock; ++demand) cover += chance_of(mean, demand);
    return std::min(cover, 1.0);
}

SpareStock poisson_stock(double mean, double target_frac) {
    check(mean);
    if (!(target_frac >= 0) || target_frac >= 1)
        throw std::logic_error("spares: the target must be in [0, 1)");
    // Far beyond the mean the remaining chance is under rounding: a target that near to 1 is met there.
    const int enough = static_cast<int>(std::min(2e9, mean + 12 * std::sqrt(mean) + 60));
    SpareStock answer{0, chance_of(mean, 0)};
    while (answer.cover_frac < target_frac && answer.stock < enough)
        answer.cover_frac += chance_of(mean, ++answer.stock);
    answer.cover_frac = std::min(answer.cover_frac, 1.0);
    return answer;
}

} // namespace unstring
