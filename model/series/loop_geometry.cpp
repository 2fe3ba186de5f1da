#include "model/series/loop_geometry.h"

#include <algorithm>
#include <set>
#include <string>
#include <unordered_map>
#include <utility>

namespace unstring {
namespace {

double between_m(const std::optional<MapPoint>& a, const std::optional<MapPoint>& b) {
    return a && b ? distance_m(*a, *b) : 0;
}

} // namespace

LoopPlaces loop_places(const City& city, const Extent& extent, StringIx string,
                       const std::vector<PoleIx>& lamps) {
    const auto believed = [&](const std::optional<MapPoint>& place) {
        return place && is_believed(extent, *place) ? place : std::nullopt;
    };
    LoopPlaces places{believed(city.strings[string.place()].station)};
    for (const PoleIx lamp : lamps) {
        const Pole& pole = city.poles[lamp.place()];
        places.push_back(pole.has_place ? believed(pole.place) : std::nullopt);
    }
    places.push_back(places.front());
    return places;
}

std::vector<double> straight_legs_m(const LoopPlaces& places) {
    std::vector<double> legs_m;
    std::optional<MapPoint> here = places.front(), first;
    for (std::size_t p = 1; p < places.size(); ++p) {
        legs_m.push_back(between_m(here, places[p]));
        if (!first) first = places[p];
        if (places[p]) here = places[p];
    }
    if (!places.front()) legs_m.front() = legs_m.back() = between_m(here, first) / 2;
    return legs_m;
}

int far_position_of(const std::vector<double>& legs_m) {
    double whole_m = 0;
    for (const double leg_m : legs_m) whole_m += leg_m;
    int far = 0;
    double out_m = 0, farthest_m = -1;
    for (std::size_t p = 1; p < legs_m.size(); ++p) {
        out_m += legs_m[p - 1];
        const double nearer_m = std::min(out_m, whole_m - out_m);
        if (nearer_m <= farthest_m + 1e-9) continue;
        farthest_m = nearer_m;
        far = static_cast<int>(p);
    }
    return far;
}

std::vector<LoopCutBack> cutbacks_of_file(const City& city, StringIx string, const std::vector<PoleIx>& lamps,
                                          const LoopPlaces& places) {
    const int last = static_cast<int>(lamps.size()) + 1;
    std::unordered_map<std::string, int> position_of{{"out", 0}, {"return", last}};
    for (std::size_t i = 0; i < lamps.size(); ++i)
        position_of.try_emplace(city.poles[lamps[i].place()].id, static_cast<int>(i) + 1);

    std::vector<LoopCutBack> found;
    for (std::size_t k = 0; k < city.cutbacks.size(); ++k) {
        const CutBack& row = city.cutbacks[k];
        if (row.set_aside || row.string != string) continue;
        const auto a = position_of.find(row.pole_a);
        const auto b = position_of.find(row.pole_b);
        if (a == position_of.end() || b == position_of.end() || a->second == b->second) continue;
        const auto [low, high] = std::minmax(a->second, b->second);
        if (low == 0 && high == last) continue;
        const double straight_m =
            between_m(places[static_cast<std::size_t>(low)], places[static_cast<std::size_t>(high)]);
        found.push_back(
            {low, high, row.new_cable_m.value_or(straight_m), static_cast<int>(k), row.confirmed, row.kind});
    }
    return found;
}

std::vector<LoopCutBack> cutback_candidates(const StringLoop& loop, const LoopPlaces& places,
                                            const StreetIndex& streets) {
    constexpr int kFewestBetween = 2;
    std::vector<double> out_m{0};
    for (const double leg_m : loop.legs_m) out_m.push_back(out_m.back() + leg_m);
    std::set<std::pair<int, int>> is_known;
    for (const LoopCutBack& cutback : loop.cutbacks) is_known.emplace(cutback.a, cutback.b);

    std::vector<LoopCutBack> found;
    for (std::size_t i = 0; i < places.size(); ++i)
        for (std::size_t j = i + kFewestBetween + 1; j < places.size(); ++j) {
            if (!places[i] || !places[j] || (i == 0 && j + 1 == places.size())) continue;
            const double across_m = distance_m(*places[i], *places[j]);
            if (across_m > kCutBackReach_m || across_m >= out_m[j] - out_m[i]) continue;
            const auto pair = std::pair(static_cast<int>(i), static_cast<int>(j));
            if (is_known.contains(pair)) continue;
            const bool crosses = streets.crossings(*places[i], *places[j]) > 0;
            found.push_back({pair.first, pair.second, across_m, -1, false,
                             crosses ? CutBackKind::crossing : CutBackKind::trench});
        }
    return found;
}

} // namespace unstring
