#pragma once
// A small city for the tests of series and vet: one string along a street and back, one unit.

#include <string>

#include "model/catalog/cables.h"
#include "model/catalog/catalog.h"
#include "model/city/city.h"

namespace unstring::for_tests {

inline Catalog catalog() {
    Catalog catalog;
    catalog.cables = default_cables();
    catalog.lamps = {{"HPS150", {"150W S"}, 188, 0.8, LampKind::hps},
                     {"HPS250", {}, 295, 0.9, LampKind::hps},
                     {"LED60", {}, 60, 0.95, LampKind::led}};
    return catalog;
}

inline SeriesString string_row(std::string id, MapPoint station) {
    SeriesString row;
    row.id = std::move(id);
    row.current_a = 6.6;
    row.station = station;
    row.cable_awg = 8;
    row.cable_kv = 5;
    row.from = {"circuits.csv", 2};
    return row;
}

inline Pole pole_row(std::string id, StringIx string, const std::string& string_id, int order,
                     MapPoint place) {
    Pole pole;
    pole.id = std::move(id);
    pole.string = string;
    pole.string_given = string_id;
    pole.order = order;
    pole.place = place;
    pole.has_place = true;
    pole.fixture = "HPS150";
    pole.from = {"poles.csv", order + 1};
    return pole;
}

inline Transformer unit_row(std::string id, double rated_kw, StringIx string, const std::string& string_id) {
    Transformer unit;
    unit.id = std::move(id);
    unit.rated_kw = rated_kw;
    unit.output_a = 6.6;
    unit.taps = {1};
    unit.primary_v = 4160;
    unit.mount = Mount::pole;
    unit.tested = "2026";
    unit.state = string.is_valid() ? UnitState::in_service : UnitState::spare;
    if (string.is_valid()) {
        unit.strings = {string};
        unit.strings_given = {string_id};
    }
    unit.from = {"transformers.csv", 2};
    return unit;
}

/// String S-1: lamps 1..n/2 out along y = 0, n/2+1..n back along y = 20, every 35 m; the station 100 m before
/// the first.
inline City out_and_back(int lamps, double rated_kw) {
    City city;
    city.strings = {string_row("S-1", {0, 10})};
    const int half = lamps / 2;
    for (int i = 1; i <= lamps; ++i) {
        const double along_m = 100 + 35.0 * (i <= half ? i - 1 : lamps - i);
        city.poles.push_back(
            pole_row("P-" + std::to_string(i), StringIx(0), "S-1", i, {along_m, i <= half ? 0.0 : 20.0}));
    }
    city.transformers = {unit_row("T-1", rated_kw, StringIx(0), "S-1")};
    return city;
}

} // namespace unstring::for_tests
