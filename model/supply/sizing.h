#pragma once
// Wire sizes of one lighting circuit: the cheapest along its tree that keeps every limit.

#include <functional>
#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/supply/radial.h"

namespace unstring {

struct SizingSpan {  ///< one span and the load at its far end
    int parent = -1; ///< place nearer to the source, -1 = the source
    double length_m = 0;
    double watts = 0, pf = 0.95;
};

struct SizingLimits {
    double source_v = 240;
    int wires = 2;             ///< three wires: loads leg to leg
    double drop_frac = 0.03;   ///< on the circuit; informational note of NFPA 70 210.19, editable
    double least_v = 0;        ///< the driver's minimum, 0 = none
    std::vector<Cable> cables; ///< sizes that may be pulled, of one metal
    std::function<double(const Cable&)> price_m; ///< dollars per metre of a set of this size
};

struct SizingResult {
    bool possible = false;
    std::string stopped_by; ///< in words with the number; empty when possible
    std::vector<int> awg;   ///< one per span
    int device_a = 0;
    int grounding_awg = 14; ///< upsized with the largest phase wire
    double cost = 0;        ///< dollars of wire
    RadialResult volts;     ///< of the sizes chosen, by the exact sweep
};

/// Dynamic programming over the drop left at each node (steps of 1/2000 of the limit), repeated with the
/// volts that its answer gives and judged by the exact sweep; then single spans are made thinner while that
/// sweep allows it. Every wire may be protected by the circuit's one device at 125 % of the continuous load.
/// Throws std::logic_error where no cable is given or parents run in a circle.
[[nodiscard]] SizingResult size_wires(const std::vector<SizingSpan>& spans, const SizingLimits& limits);

} // namespace unstring
