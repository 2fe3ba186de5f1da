#include "model/sun/clearness.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace unstring {
namespace {

constexpr double kFlat = 1e-5; // below this the distribution is uniform to the digits of a double

/// Mean of a density exp(shape * u) on 0..1.
double mean_of_shape(double shape) {
    if (std::abs(shape) < 1e-3) return 0.5 + shape / 12.0;
    if (shape < 0) return 1.0 - mean_of_shape(-shape);
    return 1.0 / -std::expm1(-shape) - 1.0 / shape;
}

double shape_for_mean(double mean) {
    double low = -800, high = 800; // means of 0.00125 and 0.99875
    for (int i = 0; i < 80; ++i) {
        const double middle = 0.5 * (low + high);
        (mean_of_shape(middle) < mean ? low : high) = middle;
    }
    return 0.5 * (low + high);
}

} // namespace

ClearnessDistribution::ClearnessDistribution(double mean) {
    if (!(mean >= kClearnessMeanMin && mean <= kClearnessMeanMax))
        throw std::logic_error("clearness: a monthly mean outside its range");
    width_ = 0.6313 + 0.267 * mean - 11.9 * std::pow(mean - 0.75, 8) - floor_;
    shape_ = shape_for_mean((mean - floor_) / width_);
}

double ClearnessDistribution::share_below(double clearness) const {
    const double u = std::clamp((clearness - floor_) / width_, 0.0, 1.0);
    if (std::abs(shape_) < kFlat) return u;
    if (shape_ < 0) return std::expm1(shape_ * u) / std::expm1(shape_);
    return (std::exp(shape_ * (u - 1)) - std::exp(-shape_)) / -std::expm1(-shape_);
}

double ClearnessDistribution::at_share(double share) const {
    double u = share;
    if (shape_ <= -kFlat) u = std::log1p(share * std::expm1(shape_)) / shape_;
    if (shape_ >= kFlat) u = 1.0 + std::log(share + (1.0 - share) * std::exp(-shape_)) / shape_;
    return floor_ + width_ * std::clamp(u, 0.0, 1.0);
}

} // namespace unstring
