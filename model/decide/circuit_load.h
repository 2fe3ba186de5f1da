#pragma once
// One lighting circuit as the electrics see it: spans with their lamps, its volts by AWG 8 or by larger
// sizes.

#include <string>
#include <vector>

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"
#include "model/supply/sizing.h"

namespace unstring {

struct CircuitLoad {
    double source_v = 240;
    std::vector<SizingSpan> spans; ///< watts at the far end of each
    double kva = 0;
};

/// Watts and power factor of the luminaire that a rewire puts at the pole.
struct LampLoad {
    double watts = 0, pf = 0.95;
};
[[nodiscard]] LampLoad lamp_load(const Catalog& catalog, const Pole& pole);

struct CircuitAnswer {
    bool possible = false;
    std::string stopped_by;
    std::vector<int> awg; ///< one per span
    int device_a = 0;
    RadialResult volts;
};

/// AWG 8 where it keeps drop and device, else the cheapest larger sizes; spans without a lamp that follow
/// each other get one size. @param drop_frac  limit of the drop
[[nodiscard]] CircuitAnswer work_circuit(const MoneyInput& input, const CircuitLoad& load, double drop_frac);

/// What no wire size could cure: empty where the thickest wire keeps drop and device. Quick: no sizes are
/// chosen.
[[nodiscard]] std::string beyond_any_wire(const MoneyInput& input, const CircuitLoad& load, double drop_frac);

} // namespace unstring
