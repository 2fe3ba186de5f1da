#pragma once
// Days of weather made from twelve monthly means: the same for every pole of a project and seed.

#include <array>
#include <cstdint>
#include <vector>

namespace unstring {

inline constexpr double kDayToDay = 0.29; ///< correlation of one day's normal variate with the day before

/// Clearness of each day of so many years of 365 days, first-order autoregressive with the exact distribution
/// of each month. Months are not forced to their means: the spread from year to year is what dark nights come
/// from. The stream is the same on every machine with the same floating-point functions.
/// @param monthly_clearness  kClearnessMeanMin..kClearnessMeanMax each, else std::logic_error
/// Source: V.A. Graham, K.G.T. Hollands, T.E. Unny, Solar Energy 40 (1988) 83-92.
[[nodiscard]] std::vector<double> generate_clearness(const std::array<double, 12>& monthly_clearness,
                                                     int years, std::uint64_t seed,
                                                     double day_to_day = kDayToDay);

} // namespace unstring
