#include <algorithm>
#include <cmath>

#include "sampledata/dice.h"
#include "sampledata/route.h"

namespace unstring::sample {
namespace {

constexpr double kAlternate_m = 33, kOneSide_m = 32, kPair_m = 51, kArterialPair_m = 42;
constexpr double kBehindKerb_m = 0.9;

const char* compass(double angle_deg) {
    constexpr const char* kSides[] = {"N", "E", "S", "W"};
    return kSides[static_cast<int>(std::floor(std::fmod(angle_deg + 45, 360) / 90))];
}

// Distances along the pass at which its lamps stand.
std::vector<double> stops_of(const Pass& pass, RoadClass road_class, double length_m) {
    const auto steps = [&](double step_m) {
        return std::max(1, static_cast<int>(std::lround(length_m / step_m)));
    };
    std::vector<double> stops;
    if (pass.way == Way::once || road_class != RoadClass::local) {
        const double step_m = pass.way == Way::once               ? kOneSide_m
                              : road_class == RoadClass::arterial ? kArterialPair_m
                                                                  : kPair_m;
        for (int i = 0, n = steps(step_m); i < n; ++i) stops.push_back((i + 0.5) * length_m / n);
        return stops;
    }
    const int n = std::max(2, steps(kAlternate_m));
    for (int i = pass.way == Way::out ? 0 : 1; i < n; i += 2) {
        const double from_mouth_m = (i + 0.5) * length_m / n;
        stops.push_back(pass.way == Way::out ? from_mouth_m : length_m - from_mouth_m);
    }
    std::sort(stops.begin(), stops.end());
    return stops;
}

bool is_crossing(const Town& town, Corner corner) {
    int wide = 0;
    for (const Block& block : blocks_from(town, corner))
        wide += road_of(town, block).road_class != RoadClass::local;
    return wide == 2;
}

struct Ends {
    std::vector<int> lamps; // places, in walking order
};

std::vector<Ends> lamps_by_pass(const Route& route, const std::vector<Lamp>& lamps) {
    std::vector<Ends> ends(route.passes.size());
    for (std::size_t i = 0; i < lamps.size(); ++i)
        ends[static_cast<std::size_t>(lamps[i].pass)].lamps.push_back(static_cast<int>(i));
    return ends;
}

void add_mouths(const Route& route, const std::vector<Lamp>& lamps, std::vector<Pair>& pairs) {
    const std::vector<Ends> ends = lamps_by_pass(route, lamps);
    for (std::size_t i = 0; i < route.passes.size(); ++i) {
        if (route.passes[i].way != Way::out) continue;
        const std::vector<int>& out = ends[i].lamps;
        const std::vector<int>& back = ends[static_cast<std::size_t>(route.passes[i].other)].lamps;
        if (out.empty() || back.empty()) continue;
        const Pair pair{out.front(), back.back(),
                        distance_m(lamps[static_cast<std::size_t>(out.front())].place,
                                   lamps[static_cast<std::size_t>(back.back())].place) +
                            6};
        if (pair.b - pair.a > 2) pairs.push_back(pair);
    }
}

// Where column c of a ring joins its north and south sides: the last lamp before the northern corner, and the
// first one after the southern.
void add_across(const Town& town, const Route& route, const std::vector<Lamp>& lamps,
                std::vector<Pair>& pairs) {
    if (route.ring.empty()) return;
    const std::vector<Ends> ends = lamps_by_pass(route, lamps);
    for (std::size_t i = 0; i < route.passes.size(); ++i)
        for (std::size_t j = i + 1; j < route.passes.size(); ++j) {
            const Pass& north = route.passes[i];
            const Pass& south = route.passes[j];
            if (north.way != Way::once || south.way != Way::once || north.to.column != south.from.column)
                continue;
            if (north.from.row != north.to.row || south.from.row != south.to.row ||
                north.to.row <= south.from.row)
                continue;
            if (ends[i].lamps.empty() || ends[j].lamps.empty()) continue;
            Pair pair{ends[i].lamps.back(), ends[j].lamps.front(), 0, true};
            pair.cable_m =
                distance_m(place_of(town, north.to), place_of(town, south.from)) +
                distance_m(lamps[static_cast<std::size_t>(pair.a)].place, place_of(town, north.to)) +
                distance_m(lamps[static_cast<std::size_t>(pair.b)].place, place_of(town, south.from));
            if (pair.b - pair.a > 2) pairs.push_back(pair);
        }
}

} // namespace

std::vector<Lamp> lamps_along(const Town& town, const Route& route) {
    std::vector<Lamp> lamps;
    for (std::size_t i = 0; i < route.passes.size(); ++i) {
        const Pass& pass = route.passes[i];
        const MapPoint from = place_of(town, pass.from), to = place_of(town, pass.to);
        const double length_m = distance_m(from, to), bearing = bearing_deg(from, to);
        const Road road = road_of(town, pass.block);
        const double ux = (to.x_m - from.x_m) / length_m, uy = (to.y_m - from.y_m) / length_m;
        const std::vector<double> stops = stops_of(pass, road.road_class, length_m);
        Dice dice(town.seed,
                  {3, static_cast<std::uint64_t>(pass.from.column), static_cast<std::uint64_t>(pass.from.row),
                   static_cast<std::uint64_t>(pass.to.column), static_cast<std::uint64_t>(pass.to.row)});
        for (std::size_t k = 0; k < stops.size(); ++k) {
            const double along_m = stops[k] + dice.between(-1.5, 1.5),
                         right_m = road.width_m / 2 + kBehindKerb_m;
            Lamp lamp;
            lamp.place = {from.x_m + ux * along_m + uy * right_m, from.y_m + uy * along_m - ux * right_m};
            lamp.block = pass.block;
            lamp.pass = static_cast<int>(i);
            lamp.arm_deg = std::fmod(bearing + 270, 360);
            lamp.side = compass(std::fmod(bearing + 90, 360));
            lamp.is_at_corner = (k == 0 && is_crossing(town, pass.from)) ||
                                (k + 1 == stops.size() && is_crossing(town, pass.to));
            lamps.push_back(lamp);
        }
    }
    return lamps;
}

std::vector<Pair> pairs_of(const Town& town, const Route& route, const std::vector<Lamp>& lamps) {
    std::vector<Pair> pairs;
    add_mouths(route, lamps, pairs);
    add_across(town, route, lamps, pairs);
    std::sort(pairs.begin(), pairs.end(),
              [](const Pair& x, const Pair& y) { return std::pair(x.a, -x.b) < std::pair(y.a, -y.b); });
    return pairs;
}

} // namespace unstring::sample
