#include <algorithm>
#include <array>
#include <cmath>
#include <stdexcept>

#include <fmt/format.h>

#include "sampledata/dice.h"
#include "sampledata/tile.h"

namespace unstring::sample {
namespace {

constexpr double kCurrent_a = 6.6;
constexpr double kAged = 1.1;      // sodium arcs climb all life
constexpr double kHeadroom = 0.96; // even then
constexpr std::array<double, 6> kRatings_kw = {5, 7.5, 10, 15, 20, 25};
constexpr int kUnitsPerTile = 17;

struct Seat { // what the station is built for
    double primary_v;
    const char* mount;
};

// By place of the string in its tile, 1..14; the first two share a unit.
constexpr std::array<Seat, 15> kSeats = {{{0, ""},
                                          {2400, "vault"},
                                          {2400, "vault"},
                                          {7200, "pad"},
                                          {2400, "pad"},
                                          {2400, "vault"},
                                          {2400, "vault"},
                                          {2400, "vault"},
                                          {2400, "pad"},
                                          {2400, "pad"},
                                          {2400, "vault"},
                                          {2400, "pad"},
                                          {2400, "pole"},
                                          {7200, "pad"},
                                          {7200, "pad"}}};

double rating_for(double load_kva) {
    for (const double rating : kRatings_kw)
        if (load_kva * kAged <= rating * kHeadroom) return rating;
    throw std::logic_error("the sample city has a string that no transformer carries");
}

std::string unit_id(int tile, int place) { return fmt::format("RO-{:02}", tile * kUnitsPerTile + place); }

UnitRow unit_of(const Town& town, int tile, int place, double rated_kw, double loops, const Seat& seat) {
    Dice dice(town.seed, {10, static_cast<std::uint64_t>(tile), static_cast<std::uint64_t>(place)});
    UnitRow unit;
    unit.id = unit_id(tile, place);
    unit.rated_kw = rated_kw * loops;
    unit.taps = dice.chance(0.7) ? "1;.9;.75;.5" : "1;.75;.5";
    const double open_frac = dice.between(1.25, 1.3);
    if (dice.chance(0.75) || rated_kw > 20)
        unit.open_v = std::round(rated_kw * 1000 / kCurrent_a * open_frac / 10) * 10;
    if (dice.chance(0.3)) unit.min_frac = 0.3;
    unit.primary_v = seat.primary_v;
    unit.mount = seat.mount;
    const int made = 1951 + dice.below(38);
    unit.made = fmt::format("{}-{:02}-01", made, 1 + dice.below(12));
    const double roll = dice.unit();
    unit.oil = std::string(seat.mount) == "pad" && made > 1975 ? "none"
               : made >= 1980                                  ? "mineral"
               : roll < 0.5                                    ? "unknown"
               : roll < 0.9                                    ? "mineral"
                                                               : "pcb";
    if (dice.chance(0.65))
        unit.tested =
            fmt::format("20{}-{:02}-{:02}", 22 + dice.below(4), 1 + dice.below(12), 1 + dice.below(28));
    return unit;
}

void add_in_service(const Town& town, int tile, Tables& tables) {
    std::vector<const CircuitRow*> strings;
    for (const CircuitRow& circuit : tables.circuits)
        if (circuit.is_series) strings.push_back(&circuit);
    for (std::size_t i = 0; i < strings.size(); ++i) {
        const bool shares = i == 0 && strings.size() > 1;
        const double load =
            shares ? std::max(strings[0]->load_kva, strings[1]->load_kva) : strings[i]->load_kva;
        UnitRow unit = unit_of(town, tile, static_cast<int>(i == 0 ? 1 : i), rating_for(load), shares ? 2 : 1,
                               kSeats[i + 1]);
        unit.state = "in-service";
        unit.circuit = strings[i]->id;
        tables.units.push_back(unit);
        if (!shares) continue;
        unit.circuit = strings[++i]->id;
        tables.units.push_back(unit);
    }
}

void add_spares(const Town& town, int tile, Tables& tables) {
    constexpr std::array<std::pair<double, Seat>, 4> kSpares = {
        {{15, {2400, "vault"}}, {15, {2400, "pad"}}, {20, {7200, "pad"}}, {10, {2400, "pole"}}}};
    for (std::size_t i = 0; i < kSpares.size(); ++i) {
        UnitRow unit = unit_of(town, tile, 14 + static_cast<int>(i), kSpares[i].first, 1, kSpares[i].second);
        unit.state = "spare";
        unit.tested = i == 1 ? "" : i == 3 ? "2017-10-12" : unit.tested.empty() ? "2025-04-08" : unit.tested;
        tables.units.push_back(unit);
    }
}

} // namespace

void add_units(const Town& town, int tile, Tables& tables) {
    add_in_service(town, tile, tables);
    add_spares(town, tile, tables);
}

} // namespace unstring::sample
