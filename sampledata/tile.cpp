#include "sampledata/tile.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "sampledata/dice.h"

namespace unstring::sample {
namespace {

constexpr double kCurrent_a = 6.6;
constexpr int kCircuitPoles = 28; // of a parallel circuit, at most

Shape shape_of(int district) {
    switch (district) {
    case 3:
    case 7:
    case 11:
    case 14:
        return Shape::ring;
    default:
        return Shape::out_and_back;
    }
}

MapPoint beside(const Town& town, Corner corner) {
    const MapPoint at = place_of(town, corner);
    return {at.x_m + 13, at.y_m + 13};
}

std::string string_id(int number) { return fmt::format("S-{:02}", number); }

void name_poles(int number, std::vector<PoleRow>& poles) {
    for (std::size_t i = 0; i < poles.size(); ++i) poles[i].id = fmt::format("{:02}-{}", number, 201 + i);
}

void add_readings(Dice& dice, CircuitRow& circuit) {
    if (dice.chance(0.35)) return; // nobody has measured this one lately
    circuit.asfound_a = 6.6 + dice.between(-0.05, 0.05);
    circuit.asfound_v = std::round(circuit.load_kva * 1000 / kCurrent_a * dice.between(0.997, 1.003) / 5) * 5;
    circuit.insulation_mohm = dice.between(0.8, 6);
    circuit.asfound_date =
        fmt::format("202{}-{:02}-{:02}", 4 + dice.below(2), 1 + dice.below(12), 1 + dice.below(28));
}

CircuitRow string_of(const Town& town, int district, int number, Corner station,
                     const std::vector<PoleRow>& poles) {
    Dice dice(town.seed, {8, static_cast<std::uint64_t>(number)});
    CircuitRow circuit;
    circuit.id = string_id(number);
    circuit.station = beside(town, station);
    circuit.cable_awg = district == 5 || district == 12 ? 6 : 8;
    const double length_m = loop_m(circuit.station, poles);
    circuit.load_kva = load_kva(poles, circuit.cable_awg, length_m);
    if (district % 4 != 3) circuit.length_m = length_m; // of some strings nobody has measured the cable
    circuit.is_pulsing = district == 10;
    if (district == 9) circuit.control = "relay", circuit.control_from = string_id(number - 3);
    if (district == 3) circuit.control = "clock";
    circuit.feeder = fmt::format("F-{}", 11 + number % 5);
    if (district % 3 == 0) circuit.faults_year = 0.3 + 0.1 * dice.below(6);
    add_readings(dice, circuit);
    return circuit;
}

void add_cutbacks(const Town& town, int number, const Route& route, const std::vector<Lamp>& lamps,
                  std::size_t kept, const std::vector<PoleRow>& poles, Tables& tables) {
    Dice dice(town.seed, {9, static_cast<std::uint64_t>(number)});
    const std::vector<Pair> pairs = pairs_of(town, route, lamps);
    for (const Pair& pair : pairs) {
        const bool is_confirmed = dice.chance(pair.is_across_block ? 0.5 : 0.8),
                   is_crossing = dice.chance(0.7);
        if (static_cast<std::size_t>(pair.b) >= kept) continue;
        tables.cutbacks.push_back({string_id(number), poles[static_cast<std::size_t>(pair.a)].id,
                                   poles[static_cast<std::size_t>(pair.b)].id,
                                   pair.is_across_block ? "trench"
                                   : is_crossing        ? "crossing"
                                                        : "pullbox",
                                   is_confirmed, pair.cable_m});
    }
    // The first street of an open loop can be left out altogether, up to where the next splice begins.
    if (route.ring.empty() || pairs.empty() || pairs.front().a < 2 ||
        static_cast<std::size_t>(pairs.front().a) >= kept)
        return;
    const PoleRow& first = poles[static_cast<std::size_t>(pairs.front().a)];
    tables.cutbacks.push_back({string_id(number), "out", first.id, "trench", false,
                               distance_m(tables.circuits.back().station, first.place) + 10});
}

void add_string(const Town& town, int tile_x, int tile_y, int district, int number, std::size_t most,
                Tables& tables) {
    const Route route = route_of(town, tile_x, tile_y, district, shape_of(district));
    const std::vector<Lamp> lamps = lamps_along(town, route);
    std::vector<PoleRow> poles = poles_along(town, route, lamps, district);
    poles.resize(std::min(poles.size(), most));
    if (poles.empty()) return;
    name_poles(number, poles);
    apply_oddities(town, number, true, poles);
    for (std::size_t i = 0; i < poles.size(); ++i)
        poles[i].circuit = string_id(number), poles[i].order = static_cast<int>(i) + 1;
    tables.circuits.push_back(string_of(town, district, number, route.station, poles));
    add_cutbacks(town, number, route, lamps, poles.size(), poles, tables);
    tables.poles.insert(tables.poles.end(), poles.begin(), poles.end());
}

// Circuits that were converted in the last years carry LED, the others still sodium.
void fit_parallel(int circuit, PoleRow& pole) {
    pole.spare_duct.clear();
    if (circuit % 5 < 3) {
        pole.fixture = pole.need_lm > 9000 ? "LED100" : pole.need_lm > 5000 ? "LED60" : "LED40";
        pole.lamp_w = pole.need_lm > 9000 ? 104 : pole.need_lm > 5000 ? 62 : 38;
        pole.lamp_pf = 0.95;
    }
    if (pole.duct == "direct-buried" || pole.duct == "bad") pole.duct = "proven";
}

void add_parallel(const Town& town, int tile_x, int tile_y, int district, int number, std::size_t most,
                  int& next_circuit, Tables& tables) {
    const Route route = district == kHarbourRoad
                            ? harbour_road(town, tile_x, tile_y)
                            : route_of(town, tile_x, tile_y, district, Shape::out_and_back);
    const std::vector<Lamp> lamps = lamps_along(town, route);
    std::vector<PoleRow> poles = poles_along(town, route, lamps, district);
    poles.resize(std::min(poles.size(), most));
    name_poles(number, poles);
    apply_oddities(town, number, false, poles);
    const std::size_t circuits = (poles.size() + kCircuitPoles - 1) / kCircuitPoles;
    for (std::size_t i = 0; i < poles.size(); ++i) {
        const std::size_t place = i * circuits / poles.size();
        const int circuit = next_circuit + static_cast<int>(place);
        if (i == 0 || place != (i - 1) * circuits / poles.size()) {
            CircuitRow row;
            row.id = fmt::format("P-{:02}", circuit);
            row.is_series = false;
            row.station = {poles[i].place.x_m + 6, poles[i].place.y_m + 4};
            row.feeder = fmt::format("F-{}", 11 + circuit % 5);
            tables.circuits.push_back(row);
        }
        poles[i].circuit = fmt::format("P-{:02}", circuit);
        fit_parallel(circuit, poles[i]);
    }
    next_circuit += static_cast<int>(circuits);
    tables.poles.insert(tables.poles.end(), poles.begin(), poles.end());
}

} // namespace

double loop_m(MapPoint station, const std::vector<PoleRow>& poles) {
    constexpr double kAlongKerb = 1.06; // cable follows kerbs and goes down into every base
    double metres = 0;
    MapPoint last = station;
    for (const PoleRow& pole : poles) metres += distance_m(last, pole.place), last = pole.place;
    return std::round((metres + distance_m(last, station)) * kAlongKerb);
}

double load_kva(const std::vector<PoleRow>& poles, int cable_awg, double length_m) {
    // NEC ch. 9 tables 8 (75 C, brought to 25 C by its note) and 9 (PVC).
    const double at_25c = 1 + 0.00323 * (25 - 75);
    const double r_ohm = (cable_awg == 6 ? 1.608 : 2.551) * at_25c * length_m / 1000;
    const double x_ohm = (cable_awg == 6 ? 0.167 : 0.171) * length_m / 1000;
    double watts = kCurrent_a * kCurrent_a * r_ohm, vars = kCurrent_a * kCurrent_a * x_ohm;
    for (const PoleRow& pole : poles) {
        if (pole.status != "standing") continue;
        watts += pole.burns_w;
        vars += pole.burns_w * std::tan(std::acos(pole.burns_pf));
    }
    return std::hypot(watts, vars) / 1000;
}

Tables tile_of(const Town& town, int tile_x, int tile_y, long poles_left) {
    const int tile = tile_y * town.tiles_x + tile_x;
    Tables tables;
    int next_circuit = tile * 30 + 1; // a tile has fewer parallel circuits than that
    for (int district = 1; district <= kDistricts; ++district) {
        const long left = poles_left - static_cast<long>(tables.poles.size());
        if (left <= 0) break;
        const auto most = static_cast<std::size_t>(left);
        const int number = tile * kDistricts + district;
        if (district <= kStrings)
            add_string(town, tile_x, tile_y, district, number, most, tables);
        else
            add_parallel(town, tile_x, tile_y, district, number, most, next_circuit, tables);
    }
    add_units(town, tile, tables);
    add_services(town, tile, tables);
    return tables;
}

} // namespace unstring::sample
