// Ids that stand twice, and records that look like two of one pole.

#include <cmath>
#include <map>
#include <string>
#include <unordered_map>

#include <fmt/format.h>

#include "model/vet/natural_id.h"
#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

constexpr double kTwin_m = 1;

void vet_pole_ids(const VetInput& vet) {
    std::unordered_map<std::string, const Pole*> by_id, by_squeezed;
    for (const Pole& pole : vet.city.poles) {
        if (pole.set_aside) continue;
        const auto [first, is_new] = by_id.try_emplace(pole.id, &pole);
        if (!is_new) {
            vet.add("pole-id-twice", kPolesTable, pole.from, pole.id,
                    fmt::format("also in row {}", first->second->from.row), "one row for each pole",
                    "give one of the two its own id, or delete the second row");
            continue;
        }
        const auto [alike, is_first] = by_squeezed.try_emplace(squeezed_id(pole.id), &pole);
        if (!is_first)
            vet.add("pole-near-twin", kPolesTable, pole.from, pole.id,
                    fmt::format("reads like {} in row {}", alike->second->id, alike->second->from.row),
                    "ids that cannot be mistaken for each other", "if it is the same pole, delete one row");
    }
}

using Cell = std::pair<long, long>;

Cell cell_of(MapPoint place) {
    return {std::lround(std::floor(place.x_m / kTwin_m)), std::lround(std::floor(place.y_m / kTwin_m))};
}

const Pole* twin_in(const std::map<Cell, std::vector<const Pole*>>& by_cell, const Pole& pole) {
    const Cell here = cell_of(pole.place);
    for (long x = here.first - 1; x <= here.first + 1; ++x)
        for (long y = here.second - 1; y <= here.second + 1; ++y) {
            const auto at = by_cell.find({x, y});
            if (at == by_cell.end()) continue;
            for (const Pole* other : at->second)
                if (other->id != pole.id && distance_m(other->place, pole.place) < kTwin_m) return other;
        }
    return nullptr;
}

void vet_twin_places(const VetInput& vet) {
    std::map<Cell, std::vector<const Pole*>> by_cell;
    for (const Pole& pole : vet.city.poles) {
        const bool stands = pole.status == PoleStatus::standing || pole.status == PoleStatus::not_ours;
        if (pole.set_aside || !stands || !pole.has_place || !is_believed(vet.extent, pole.place)) continue;
        if (const Pole* twin = twin_in(by_cell, pole); twin != nullptr)
            vet.add("pole-near-twin", kPolesTable, pole.from, pole.id,
                    fmt::format("{:.1f} m from {} in row {}", distance_m(twin->place, pole.place), twin->id,
                                twin->from.row),
                    "one row for each pole", "if it is the same pole, delete one row");
        by_cell[cell_of(pole.place)].push_back(&pole);
    }
}

void vet_unit_ids(const VetInput& vet) {
    std::unordered_map<std::string, const Transformer*> by_id;
    for (const Transformer& unit : vet.city.transformers) {
        if (unit.set_aside) continue;
        if (const auto [first, is_new] = by_id.try_emplace(unit.id, &unit); !is_new)
            vet.add("transformer-twice", kTransformersTable, unit.from, unit.id,
                    fmt::format("also in row {}", first->second->from.row),
                    "one row for each unit, or two that differ in the string alone",
                    "give one of the two its own id");
        else if (unit.strings.size() > 2)
            vet.add("transformer-twice", kTransformersTable, unit.from, unit.id,
                    fmt::format("feeds {} strings", unit.strings.size()),
                    "one string, or two of a two-loop unit", "mend the string_id of its rows");
        else if (unit.strings.size() == 2 && unit.strings[0] == unit.strings[1])
            vet.add("transformer-twice", kTransformersTable, unit.from, unit.id, "two rows with one string",
                    "one row, or two strings of a two-loop unit", "delete one row");
    }
}

} // namespace

void vet_ids(const VetInput& vet) {
    vet_pole_ids(vet);
    vet_twin_places(vet);
    vet_unit_ids(vet);
}

} // namespace unstring
