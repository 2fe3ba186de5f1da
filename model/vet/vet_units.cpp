// RO transformers against the strings that they feed; spares that nobody has tested.

#include <algorithm>
#include <cmath>
#include <map>

#include <fmt/format.h>

#include "model/series/units.h"
#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

constexpr double kSameCurrent_a = 0.05;

bool is_series(const City& city, StringIx string) {
    return string.is_valid() && city.strings[string.place()].kind == CircuitKind::series &&
           !city.strings[string.place()].set_aside;
}

/// Each string's current against its unit's output, or against that of the other string of a two-loop unit.
void vet_current(const VetInput& vet, const Transformer& unit) {
    std::optional<double> current = unit.output_a;
    std::string whose = "unit " + unit.id;
    for (const StringIx ix : unit.strings) {
        if (!is_series(vet.city, ix)) continue;
        const SeriesString& string = vet.city.strings[ix.place()];
        if (!string.current_a) continue;
        if (current && std::abs(*current - *string.current_a) > kSameCurrent_a)
            vet.add("current-mixed", kCircuitsTable, string.from, string.id,
                    fmt::format("{:g} A, {} {:g} A", *string.current_a, whose, *current),
                    "one current in unit and string",
                    "read the nameplate; mend current_a, output_a or string_id");
        if (!current) {
            current = string.current_a;
            whose = "string " + string.id;
        }
    }
}

void vet_state(const VetInput& vet, const Transformer& unit) {
    const bool feeds = std::any_of(unit.strings.begin(), unit.strings.end(),
                                   [](StringIx string) { return string.is_valid(); });
    if (unit.state == UnitState::in_service && !feeds)
        vet.add("unit-state", kTransformersTable, unit.from, unit.id, "in service without a string",
                "the string it feeds, or state spare", "give string_id or mend the state");
    if (unit.state != UnitState::in_service && feeds)
        vet.add("unit-state", kTransformersTable, unit.from, unit.id,
                fmt::format("{} with string {}", text_of(unit.state),
                            unit.strings_given.empty() ? "" : unit.strings_given.front()),
                "state in-service for a unit that feeds a string", "mend the state or clear string_id");
    if (unit.state == UnitState::spare && is_untested(unit, vet.year))
        vet.add("untested-spare", kTransformersTable, unit.from, unit.id,
                unit.tested.empty() ? "never tested" : "tested " + unit.tested,
                "a test in the last five years", "test it before the plan leans on it");
}

} // namespace

void vet_units(const VetInput& vet) {
    std::map<StringIx, const Transformer*> feeder_of;
    for (const Transformer& unit : vet.city.transformers) {
        if (unit.set_aside) continue;
        vet_state(vet, unit);
        if (unit.state != UnitState::in_service) continue;
        vet_current(vet, unit);
        for (const StringIx string : unit.strings) {
            if (!is_series(vet.city, string)) continue;
            const auto [first, is_new] = feeder_of.try_emplace(string, &unit);
            if (is_new || first->second->id == unit.id) continue;
            vet.add("transformer-twice", kTransformersTable, unit.from, unit.id,
                    fmt::format("feeds string {}, as does {} in row {}", vet.city.strings[string.place()].id,
                                first->second->id, first->second->from.row),
                    "one unit for each string", "mend string_id or the state of one of them");
        }
    }
}

} // namespace unstring
