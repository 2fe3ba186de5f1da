#include "model/series/lamp_load.h"

#include <cmath>

namespace unstring {
namespace {

bool is_watts(double w) { return std::isfinite(w) && w >= 0; }
bool is_power_factor(double pf) { return pf > 0 && pf <= 1; }

} // namespace

LampLoad LampBook::load_of(const Pole& pole) {
    const auto [at, is_new] = by_fixture_.try_emplace(pole.fixture, nullptr);
    if (is_new) at->second = find_lamp(catalog_, pole.fixture);

    LampLoad load;
    load.lamp = at->second;
    if (pole.lamp_w && is_watts(*pole.lamp_w)) load.w = pole.lamp_w;
    if (!load.w && load.lamp != nullptr) load.w = load.lamp->system_w;
    if (pole.lamp_pf && is_power_factor(*pole.lamp_pf))
        load.pf = *pole.lamp_pf;
    else if (load.lamp != nullptr && is_power_factor(load.lamp->pf))
        load.pf = load.lamp->pf;
    return load;
}

} // namespace unstring
