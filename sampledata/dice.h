#pragma once
// Seeded chance that is the same on every machine: the standard distributions are not.

#include <cstdint>
#include <initializer_list>

namespace unstring::sample {

class Dice {
public:
    /// One independent stream a key: (seed, what it is for, which one).
    Dice(std::uint64_t seed, std::initializer_list<std::uint64_t> key);

    [[nodiscard]] std::uint64_t next();
    [[nodiscard]] double unit(); ///< [0, 1)
    [[nodiscard]] double between(double low, double high) { return low + (high - low) * unit(); }
    [[nodiscard]] int below(int count); ///< 0 .. count - 1
    [[nodiscard]] bool chance(double part) { return unit() < part; }

private:
    std::uint64_t state_ = 0;
};

} // namespace unstring::sample
