#pragma once
// One string through the years of a plan: what burns, what cable is live, what the line crew does to it.

#include <span>
#include <vector>

#include "model/series/string_loop.h"

namespace unstring {

struct LineWork {
    int jumpers = 0; ///< lamps that leave while their cable stays live
    int splices = 0; ///< at the ends of cut-backs that come into use
    double new_cable_m = 0;
};

struct StringAtYear {
    StringState state;             ///< planned reading at the year's end
    double aged_kva = 0;           ///< with the lamps' ageing: what a newly chosen transformer must carry
    std::vector<char> leg_is_live; ///< n + 1
    int left = 0;                  ///< lamps of the string that leave in the year
    int jumpers = 0, splices = 0;  ///< line work of the year, as LineWork
    double new_cable_m = 0;
};

/// Place 0 is today, place t the end of the plan's year t.
/// @param lamp_year  calendar year in which each lamp leaves, 0 = it stays
[[nodiscard]] std::vector<StringAtYear> string_years(const StringLoop& loop, std::span<const int> lamp_year,
                                                     int first_year, int years, double ageing_frac);

/// Legs of the loop that are live in a state: all but those that a cut-back in use skips.
[[nodiscard]] std::vector<char> live_legs(const StringLoop& loop, const StringState& state);

/// What the line crew does where `leaving` lamps take a string from one state to another.
[[nodiscard]] LineWork line_work(const StringLoop& loop, std::span<const PoleIx> leaving,
                                 const StringState& before, const StringState& after);

/// How much the lamps' load climbs over their life, 10 % for sodium (from memory), 4 % where every lamp is a
/// filament lamp (IES Lighting Handbook 1947, p. 6-14).
[[nodiscard]] double ageing_of(const City& city, const Catalog& catalog, const StringLoop& loop);

} // namespace unstring
