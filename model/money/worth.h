#pragma once
// Present-worth factors: constant money, flows at year ends.
// Source: NIST Handbook 135, ASTM E917. Checked in tests/published/money.cpp

namespace unstring {

/// Single present value, (1 + rate)^-years. @param rate real discount rate, > -1
[[nodiscard]] double spv(double rate, double years);

/// Uniform present value: `years` equal flows at the ends of years 1..years; = years where the rate is 0.
[[nodiscard]] double upv(double rate, double years);

/// Uniform present value of flows that rise by `rise` a year, the first already risen once: (1 + e) / (d - e)
/// [1 - ((1 + e) / (1 + d))^n], and its limit n where d = e. @param rise real, > -1
[[nodiscard]] double upv_rising(double rate, double rise, double years);

/// Capital recovery: the equal yearly flow that a present dollar is worth; 1 / years where the rate is 0.
[[nodiscard]] double crf(double rate, double years);

} // namespace unstring
