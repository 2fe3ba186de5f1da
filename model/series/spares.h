#pragma once
// How many spare RO transformers are enough: failures over the lead time of a new unit are Poisson.

namespace unstring {

struct SpareStock {
    int stock = 0;         ///< smallest number of spares that meets the target
    double cover_frac = 1; ///< chance that the demand does not exceed it
};

/// P(D <= stock) for Poisson demand; 1 for no demand, 0 for a stock under 0. Summed in logarithms, good to
/// means of 1e6.
/// @param mean  expected failures over the lead time, >= 0 (std::logic_error otherwise)
/// Checked against Poisson tables in tests/published/string.cpp
[[nodiscard]] double poisson_cover(double mean, int stock);

/// The smallest stock whose cover reaches the target. @param target_frac  0 <= target < 1
[[nodiscard]] SpareStock poisson_stock(double mean, double target_frac);

} // namespace unstring
