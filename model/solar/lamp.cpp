#include "model/solar/lamp.h"

namespace unstring {
namespace {

double dimmed_frac(std::span<const DimStep> dimming, double lit_h) {
    for (const DimStep& step : dimming)
        if (lit_h >= step.from_h && lit_h < step.to_h) return step.frac;
    return 1;
}

} // namespace

std::vector<double> lamp_load_wh(const SunYear& sun, double led_w, std::span<const DimStep> dimming,
                                 double switch_deg) {
    std::vector<double> load(kHours, 0.0);
    constexpr double kStep_h = 1.0 / kLampSteps;
    // The first hours of the year belong to a night that began on its last afternoon: start at that noon.
    double lit_since_h = -1; // of the night that runs
    const std::size_t start = sun.noon[kDays - 1];
    for (std::size_t n = 0; n < kHours; ++n) {
        const std::size_t hour = (start + n) % kHours;
        if (hour == sun.noon[hour / 24]) lit_since_h = -1;
        for (std::size_t k = 0; k < kLampSteps; ++k) {
            if (static_cast<double>(sun.lamp_step_deg[hour * kLampSteps + k]) >= switch_deg) continue;
            const double begin_h = static_cast<double>(n) + static_cast<double>(k) * kStep_h;
            if (lit_since_h < 0) lit_since_h = begin_h;
            load[hour] += led_w * kStep_h * dimmed_frac(dimming, begin_h + 0.5 * kStep_h - lit_since_h);
        }
    }
    return load;
}

} // namespace unstring
