#include "sampledata/dice.h"

namespace unstring::sample {
namespace {

// SplitMix64 (Steele, Lea, Flood, "Fast splittable pseudorandom number generators", OOPSLA 2014).
std::uint64_t mixed(std::uint64_t value) {
    value = (value ^ (value >> 30)) * 0xbf58476d1ce4e5b9ULL;
    value = (value ^ (value >> 27)) * 0x94d049bb133111ebULL;
    return value ^ (value >> 31);
}

} // namespace

Dice::Dice(std::uint64_t seed, std::initializer_list<std::uint64_t> key) : state_(mixed(seed)) {
    for (const std::uint64_t part : key) state_ = mixed(state_ + 0x9e3779b97f4a7c15ULL * (part + 1));
}

std::uint64_t Dice::next() { return mixed(state_ += 0x9e3779b97f4a7c15ULL); }

double Dice::unit() { return static_cast<double>(next() >> 11) * 0x1.0p-53; }

int Dice::below(int count) { return static_cast<int>(next() % static_cast<std::uint64_t>(count)); }

} // namespace unstring::sample
