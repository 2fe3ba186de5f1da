#include <algorithm>

#include <fmt/format.h>

#include "sampledata/dice.h"
#include "sampledata/tile.h"

namespace unstring::sample {
namespace {

constexpr std::size_t kPolesPerService = 38, kPolesPerCandidate = 75;

class Numbering {
public:
    explicit Numbering(int tile) : next_(tile * 100 + 1) {} // a tile has fewer sources than that
    std::string take() { return fmt::format("SV-{:02}", next_++); }

private:
    int next_;
};

ServiceRow source_near(const PoleRow& pole, Dice& dice, std::string kind, std::string id) {
    ServiceRow row;
    row.id = std::move(id);
    row.kind = std::move(kind);
    row.place = {pole.place.x_m + dice.between(-7, 7), pole.place.y_m + dice.between(-7, 7)};
    return row;
}

void add_along(Dice& dice, const std::vector<const PoleRow*>& poles, Numbering& ids, Tables& tables) {
    const std::size_t services = std::max<std::size_t>(1, poles.size() / kPolesPerService);
    for (std::size_t k = 0; k < services; ++k) {
        ServiceRow row =
            source_near(*poles[(2 * k + 1) * poles.size() / (2 * services)], dice, "service", ids.take());
        row.volts = dice.chance(0.85) ? 240 : 480;
        row.free_kva = 5 + 2.5 * dice.below(9);
        row.lead_weeks = 4 + 2 * dice.below(4);
        tables.services.push_back(row);
    }
    for (std::size_t k = 0; k * kPolesPerCandidate + 20 < poles.size(); ++k) {
        ServiceRow row = source_near(*poles[k * kPolesPerCandidate + 8], dice, "candidate", ids.take());
        row.free_kva = 25;
        row.lead_weeks = 20 + 2 * dice.below(7);
        tables.services.push_back(row);
    }
}

void add_end(Dice& dice, const PoleRow& last, Numbering& ids, Tables& tables) {
    ServiceRow row;
    row.id = ids.take();
    row.kind = "circuit-end";
    row.pole_id = last.id;
    row.free_kva = 1 + 0.5 * dice.below(9);
    row.lead_weeks = 2;
    tables.services.push_back(row);
}

} // namespace

void add_services(const Town& town, int tile, Tables& tables) {
    Dice dice(town.seed, {11, static_cast<std::uint64_t>(tile)});
    Numbering ids(tile);
    for (const CircuitRow& circuit : tables.circuits) {
        std::vector<const PoleRow*> poles;
        for (const PoleRow& pole : tables.poles)
            if (pole.circuit == circuit.id && pole.status == "standing") poles.push_back(&pole);
        if (poles.empty()) continue;
        if (circuit.is_series)
            add_along(dice, poles, ids, tables);
        else
            add_end(dice, *poles.back(), ids, tables);
    }
}

} // namespace unstring::sample
