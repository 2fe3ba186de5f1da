#pragma once
// One row of the speed table: ours and a reference, timed alternately in the same run, each by its fastest
// round.

#include <algorithm>
#include <chrono>
#include <functional>
#include <string>

#include <fmt/format.h>

namespace unstring::bench {

inline double seconds_of(const std::function<void()>& work) {
    const auto start = std::chrono::steady_clock::now();
    work();
    return std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
}

/// Prints a row; every round does `count` units of `unit` on both sides.
inline void row(const std::string& what, const std::string& reference_name, double count,
                const std::string& unit, const std::function<void()>& ours,
                const std::function<void()>& reference) {
    double best = 1e300, reference_best = 1e300;
    for (int round = 0; round < 5; ++round) {
        best = std::min(best, seconds_of(ours));
        reference_best = std::min(reference_best, seconds_of(reference));
    }
    fmt::print("{:<34} {:>12.3f} us  {:<40} {:>12.3f} us  {:>9.3f}   per {}\n", what, 1e6 * best / count,
               reference_name, 1e6 * reference_best / count, best / reference_best, unit);
    std::fflush(stdout);
}

} // namespace unstring::bench
