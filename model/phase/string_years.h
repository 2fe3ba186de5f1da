#pragma once
// One string through the years of a plan: what burns, what cable is live, what the line crew does to it.

#include <span>
#include <vector>

#include "model/series/string_loop.h"

namespace unstring {

struct StringAtYear {
    StringState state;        ///< planned reading at the year's end
    double aged_kva = 0;      ///< with the lamps' ageing: what a newly chosen transformer must carry
    std::vector<char> leg_is_live;  ///< n + 1
    int left = 0;             ///< lamps of the string that leave in the year
    int jumpers = 0;          ///< of these, lamps whose cable stays live
    int splices = 0;          ///< at the ends of cut-backs that come into use in the year
    double new_cable_m = 0;
};

/// Place 0 is today, place t the end of the plan's year t.
/// @param lamp_year  calendar year in which each lamp leaves, 0 = it stays
[[nodiscard]] std::vector<StringAtYear> string_years(const StringLoop& loop, std::span<const int> lamp_year, int first_year, int years,
                                                     double ageing_frac);

/// How much the lamps' load climbs over their life, 10 % for sodium (from memory), 4 % where every lamp is a filament
/// lamp (IES Lighting Handbook 1947, p. 6-14).
[[nodiscard]] double ageing_of(const City& city, const Catalog& catalog, const StringLoop& loop);

}  // namespace unstring
