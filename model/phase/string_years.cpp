#include "model/phase/string_years.h"

#include <algorithm>

namespace unstring {
namespace {

/// A cut-back with cable of its own is spliced at both ends, one inside a pull box once.
int splices_of(const LoopCutBack& cutback) { return cutback.new_cable_m > 0 ? 2 : 1; }

bool is_skipped(const StringLoop& loop, const StringState& state, int position) {
    return std::any_of(state.used.begin(), state.used.end(), [&](int place) {
        const LoopCutBack& cutback = loop.cutbacks[static_cast<std::size_t>(place)];
        return cutback.a < position && position < cutback.b;
    });
}

StringAtYear at_year(const StringLoop& loop, const std::vector<char>& live, double ageing_frac) {
    StringAtYear at;
    at.state = string_state(loop, live);
    at.aged_kva = at.state.lamps == 0 ? 0 : string_state(loop, live, ageing_frac).load_kva;
    at.leg_is_live = live_legs(loop, at.state);
    return at;
}

} // namespace

std::vector<char> live_legs(const StringLoop& loop, const StringState& state) {
    std::vector<char> live(loop.legs_m.size(), state.lamps > 0 ? 1 : 0);
    for (const int place : state.used) {
        const LoopCutBack& cutback = loop.cutbacks[static_cast<std::size_t>(place)];
        std::fill(live.begin() + cutback.a, live.begin() + cutback.b, 0);
    }
    return live;
}

LineWork line_work(const StringLoop& loop, std::span<const PoleIx> leaving, const StringState& before,
                   const StringState& after) {
    LineWork work;
    if (after.lamps == 0) return work;
    for (const PoleIx pole : leaving) {
        const auto at = std::find(loop.lamps.begin(), loop.lamps.end(), pole);
        const auto i = static_cast<std::size_t>(at - loop.lamps.begin());
        if (at != loop.lamps.end() && loop.burns[i] != 0 && !is_skipped(loop, after, static_cast<int>(i) + 1))
            ++work.jumpers;
    }
    for (const int place : after.used) {
        if (std::find(before.used.begin(), before.used.end(), place) != before.used.end()) continue;
        work.splices += splices_of(loop.cutbacks[static_cast<std::size_t>(place)]);
        work.new_cable_m += loop.cutbacks[static_cast<std::size_t>(place)].new_cable_m;
    }
    return work;
}

std::vector<StringAtYear> string_years(const StringLoop& loop, std::span<const int> lamp_year, int first_year,
                                       int years, double ageing_frac) {
    std::vector<StringAtYear> all;
    std::vector<char> live(loop.lamps.size(), 0);
    for (std::size_t i = 0; i < live.size(); ++i) live[i] = loop.burns[i];
    all.push_back(at_year(loop, live, ageing_frac));
    for (int year = first_year; year < first_year + years; ++year) {
        bool changes = false;
        for (std::size_t i = 0; i < live.size(); ++i) {
            if (lamp_year[i] != year) continue;
            changes = changes || live[i] != 0;
            live[i] = 0;
        }
        StringAtYear at = all.back();
        if (changes) at = at_year(loop, live, ageing_frac);
        std::vector<PoleIx> leaving;
        for (std::size_t i = 0; i < lamp_year.size(); ++i)
            if (lamp_year[i] == year) leaving.push_back(loop.lamps[i]);
        at.left = static_cast<int>(leaving.size());
        const LineWork work = line_work(loop, leaving, all.back().state, at.state);
        at.jumpers = work.jumpers;
        at.splices = work.splices;
        at.new_cable_m = work.new_cable_m;
        all.push_back(std::move(at));
    }
    return all;
}

double ageing_of(const City& city, const Catalog& catalog, const StringLoop& loop) {
    constexpr double kSodium = 0.10, kFilament = 0.04;
    const auto is_filament = [&](PoleIx lamp) {
        const Lamp* known = find_lamp(catalog, city.poles[lamp.place()].fixture);
        return known != nullptr && known->kind == LampKind::filament;
    };
    return !loop.lamps.empty() && std::all_of(loop.lamps.begin(), loop.lamps.end(), is_filament) ? kFilament
                                                                                                 : kSodium;
}

} // namespace unstring
