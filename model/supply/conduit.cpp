#include "model/supply/conduit.h"

#include <array>
#include <numeric>

namespace unstring {
namespace {

struct Size {
    double trade_in, area_40_in2, area_80_in2;
};

// Schedule 80 under 1 in from memory.
constexpr std::array<Size, 6> kSizes = {{{.5, .285, .217},
                                         {.75, .508, .409},
                                         {1, .832, .688},
                                         {1.25, 1.453, 1.237},
                                         {1.5, 1.986, 1.711},
                                         {2, 3.291, 2.874}}};
constexpr double kMm2PerIn2 = 25.4 * 25.4;

} // namespace

double fill_frac(int wires) { return wires <= 1 ? .53 : wires == 2 ? .31 : .40; }

std::optional<double> inner_area_mm2(Schedule schedule, double trade_in) {
    for (const Size& size : kSizes)
        if (size.trade_in == trade_in)
            return (schedule == Schedule::pvc_40 ? size.area_40_in2 : size.area_80_in2) * kMm2PerIn2;
    return std::nullopt;
}

std::optional<double> conduit_for(Schedule schedule, std::span<const double> area_mm2) {
    const double filled = std::accumulate(area_mm2.begin(), area_mm2.end(), 0.0);
    for (const Size& size : kSizes)
        if (filled <= fill_frac(static_cast<int>(area_mm2.size())) * *inner_area_mm2(schedule, size.trade_in))
            return size.trade_in;
    return std::nullopt;
}

} // namespace unstring
