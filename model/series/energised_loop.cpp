#include "model/series/energised_loop.h"

#include <algorithm>
#include <stdexcept>

namespace unstring {
namespace {

/// Below this a saving is rounding, not cable.
constexpr double kStrictly_m = 1e-9;

void check(std::span<const double> legs_m, std::span<const char> live,
           std::span<const LoopCutBack> cutbacks) {
    if (legs_m.size() != live.size() + 1)
        throw std::logic_error("energised_loop: one leg more than lamps is wanted");
    const int last = static_cast<int>(legs_m.size());
    for (const LoopCutBack& cutback : cutbacks)
        if (cutback.a < 0 || cutback.a >= cutback.b || cutback.b > last)
            throw std::logic_error("energised_loop: a cut-back outside the loop");
}

/// live_before[p]: live lamps at positions below p.
std::vector<int> count_live_before(std::span<const char> live) {
    std::vector<int> before(live.size() + 2, 0);
    for (std::size_t p = 1; p <= live.size(); ++p) before[p + 1] = before[p] + (live[p - 1] != 0 ? 1 : 0);
    return before;
}

/// Cut-backs that may be used, by the position where they end.
std::vector<std::vector<int>> usable_by_end(std::span<const LoopCutBack> cutbacks,
                                            const std::vector<int>& live_before) {
    std::vector<std::vector<int>> by_end(live_before.size());
    for (std::size_t k = 0; k < cutbacks.size(); ++k) {
        const auto a = static_cast<std::size_t>(cutbacks[k].a);
        const auto b = static_cast<std::size_t>(cutbacks[k].b);
        if (live_before[b] == live_before[a + 1]) by_end[b].push_back(static_cast<int>(k));
    }
    return by_end;
}

} // namespace

EnergisedLoop energised_loop(std::span<const double> legs_m, std::span<const char> live,
                             std::span<const LoopCutBack> cutbacks) {
    check(legs_m, live, cutbacks);
    const std::vector<int> live_before = count_live_before(live);
    if (live_before.back() == 0) return {};
    const auto by_end = usable_by_end(cutbacks, live_before);

    std::vector<double> shortest_m(legs_m.size() + 1, 0);
    std::vector<int> arrived_by(shortest_m.size(), -1); // -1: along the leg
    for (std::size_t p = 1; p < shortest_m.size(); ++p) {
        shortest_m[p] = shortest_m[p - 1] + legs_m[p - 1];
        for (const int k : by_end[p]) {
            const LoopCutBack& cutback = cutbacks[static_cast<std::size_t>(k)];
            const double by_cutback_m = shortest_m[static_cast<std::size_t>(cutback.a)] + cutback.new_cable_m;
            if (by_cutback_m >= shortest_m[p] - kStrictly_m) continue;
            shortest_m[p] = by_cutback_m;
            arrived_by[p] = k;
        }
    }

    EnergisedLoop loop;
    loop.cable_m = shortest_m.back();
    for (std::size_t p = shortest_m.size() - 1; p > 0;) {
        if (arrived_by[p] < 0) {
            --p;
            continue;
        }
        const LoopCutBack& cutback = cutbacks[static_cast<std::size_t>(arrived_by[p])];
        loop.used.push_back(arrived_by[p]);
        loop.new_cable_m += cutback.new_cable_m;
        p = static_cast<std::size_t>(cutback.a);
    }
    std::reverse(loop.used.begin(), loop.used.end());
    return loop;
}

} // namespace unstring
