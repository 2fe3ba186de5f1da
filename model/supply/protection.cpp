#include "model/supply/protection.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace unstring {
namespace {

constexpr std::array<int, 21> kSteps = {15, 20,  25,  30,  35,  40,  45,  50,  60,  70, 80,
                                        90, 100, 110, 125, 150, 175, 200, 225, 250, 300};

/// Bare area of a conductor in circular mils: ASTM B258.
double circular_mils(int awg) {
    const double inches = 0.005 * std::pow(92.0, (36.0 - awg) / 39.0);
    return inches * inches * 1e6;
}

int small_conductor_cap(const Cable& cable) {
    if (cable.metal == Metal::copper)
        return cable.awg == 14 ? 15 : cable.awg == 12 ? 20 : cable.awg == 10 ? 30 : 0;
    return cable.awg == 12 ? 15 : cable.awg == 10 ? 25 : 0;
}

} // namespace

std::span<const int> device_steps() { return kSteps; }

int device_for(double continuous_a) {
    const double wanted = 1.25 * continuous_a;
    for (const int step : kSteps)
        if (step >= wanted) return step;
    return 0;
}

int largest_device(const Cable& cable) {
    if (cable.ampacity_a <= 0) return 0;
    int allowed = 0;
    for (const int step : kSteps) {
        allowed = step;
        if (step >= cable.ampacity_a) break;
    }
    const int cap = small_conductor_cap(cable);
    return cap > 0 ? std::min(cap, allowed) : allowed;
}

int grounding_awg(int device_a) {
    if (device_a <= 15) return 14;
    if (device_a <= 20) return 12;
    if (device_a <= 60) return 10;
    if (device_a <= 100) return 8;
    return device_a <= 200 ? 6 : 4;
}

int grounding_awg_upsized(int device_a, const Cable& needed, const Cable& chosen) {
    const int plain = grounding_awg(device_a);
    const double grown = std::max(1.0, circular_mils(chosen.awg) / circular_mils(needed.awg));
    constexpr std::array<int, 13> kSizes = {14, 12, 10, 8, 6, 4, 3, 2, 1, 0, -1, -2, -3};
    for (const int awg : kSizes)
        if (awg <= plain && circular_mils(awg) >= grown * circular_mils(plain) * (1 - 1e-9)) return awg;
    return kSizes.back();
}

} // namespace unstring
