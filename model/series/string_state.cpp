#include <stdexcept>

#include "model/series/energised_loop.h"
#include "model/series/string_load.h"
#include "model/series/string_loop.h"

namespace unstring {
namespace {

/// Lamps that burnt and have left, counted below each position. A pole that is down has left nothing: nobody
/// spliced the loop across it.
std::vector<int> count_left_before(const StringLoop& loop, const std::vector<char>& live) {
    std::vector<int> before(live.size() + 2, 0);
    for (std::size_t p = 1; p <= live.size(); ++p)
        before[p + 1] = before[p] + (live[p - 1] == 0 && loop.burns[p - 1] != 0 ? 1 : 0);
    return before;
}

EnergisedLoop loop_of_state(const StringLoop& loop, const std::vector<char>& live,
                            const std::vector<char>& burning) {
    const std::vector<int> left_before = count_left_before(loop, live);
    std::vector<LoopCutBack> usable;
    std::vector<int> place_of;
    for (std::size_t k = 0; k < loop.cutbacks.size(); ++k) {
        const LoopCutBack& cutback = loop.cutbacks[k];
        const int left = left_before[static_cast<std::size_t>(cutback.b)] -
                         left_before[static_cast<std::size_t>(cutback.a) + 1];
        if (left == 0) continue;
        usable.push_back(cutback);
        place_of.push_back(static_cast<int>(k));
    }
    EnergisedLoop energised = energised_loop(loop.legs_m, burning, usable);
    for (int& place : energised.used) place = place_of[static_cast<std::size_t>(place)];
    return energised;
}

} // namespace

StringState string_state(const StringLoop& loop, const std::vector<char>& live, double ageing_frac) {
    if (live.size() != loop.lamps.size()) throw std::logic_error("string_state: one flag per lamp is wanted");
    std::vector<char> burning(live.size(), 0);
    std::vector<double> lamp_w, lamp_pf;
    for (std::size_t i = 0; i < live.size(); ++i) {
        if (live[i] == 0 || loop.burns[i] == 0) continue;
        burning[i] = 1;
        lamp_w.push_back(loop.lamp_w[i]);
        lamp_pf.push_back(loop.lamp_pf[i]);
    }
    StringState state;
    state.lamps = static_cast<int>(lamp_w.size());
    if (state.lamps == 0) return state;

    lamp_w.insert(lamp_w.end(), loop.aside_w.begin(), loop.aside_w.end());
    lamp_pf.insert(lamp_pf.end(), loop.aside_pf.begin(), loop.aside_pf.end());
    EnergisedLoop energised = loop_of_state(loop, live, burning);
    const StringLoad load = string_load(loop.current_a, *loop.cable, energised.cable_m, kStringCableC, lamp_w,
                                        lamp_pf, ageing_frac);
    state.load_kw = load.load_kw;
    state.load_kva = load.load_kva;
    state.volts = load.volts;
    state.pf = load.pf;
    state.cable_w = load.cable_w;
    state.cable_m = energised.cable_m;
    state.new_cable_m = energised.new_cable_m;
    state.used = std::move(energised.used);
    return state;
}

} // namespace unstring
