// Records that name another which is not there.

#include <algorithm>
#include <unordered_set>

#include <fmt/format.h>

#include "model/vet/natural_id.h"
#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

constexpr const char* kWantString = "a string_id of the circuits file";

void vet_string_of_poles(const VetInput& vet) {
    for (const Pole& pole : vet.city.poles) {
        const bool may_be_blank = pole.status == PoleStatus::proposed || pole.status == PoleStatus::not_ours;
        if (pole.set_aside || pole.string.is_valid() || (pole.string_given.empty() && may_be_blank)) continue;
        vet.add("string-unknown", kPolesTable, pole.from, pole.id,
                pole.string_given.empty() ? "nothing" : pole.string_given, kWantString,
                "mend the id, add the circuit, or set the pole aside");
    }
}

/// "C-12" is meant by "c12" and by "12".
bool is_meant(const std::string& id, const std::string& given) {
    const std::string whole = squeezed_id(id), part = squeezed_id(given);
    return whole == part || whole.ends_with("." + part);
}

/// A given id that none of the unit's strings bears.
std::string unknown_string_of(const City& city, const Transformer& unit) {
    for (const std::string& given : unit.strings_given) {
        const bool is_known = std::any_of(unit.strings.begin(), unit.strings.end(), [&](StringIx string) {
            return string.is_valid() && is_meant(city.strings[string.place()].id, given);
        });
        if (!given.empty() && !is_known) return given;
    }
    return {};
}

void vet_string_of_units(const VetInput& vet) {
    for (const Transformer& unit : vet.city.transformers) {
        if (unit.set_aside) continue;
        if (const std::string given = unknown_string_of(vet.city, unit); !given.empty())
            vet.add("string-unknown", kTransformersTable, unit.from, unit.id, given, kWantString,
                    "mend the id; set aside, the unit is in nobody's pool");
    }
}

/// A pole that is in no file at all is gather's finding.
void vet_ends_of_cutbacks(const VetInput& vet) {
    std::unordered_set<std::string> on_string, in_city;
    for (const Pole& pole : vet.city.poles) {
        in_city.insert(pole.id);
        if (pole.string.is_valid()) on_string.insert(fmt::format("{}|{}", pole.string.place(), pole.id));
    }
    for (const CutBack& cutback : vet.city.cutbacks) {
        if (cutback.set_aside) continue;
        if (!cutback.string.is_valid()) {
            vet.add("string-unknown", kCutbacksTable, cutback.from, cutback.string_given,
                    cutback.string_given, kWantString, "mend the id, or set the cut-back aside");
            continue;
        }
        for (const std::string& end : {cutback.pole_a, cutback.pole_b})
            if (in_city.contains(end) &&
                !on_string.contains(fmt::format("{}|{}", cutback.string.place(), end)))
                vet.add("pole-unknown", kCutbacksTable, cutback.from, cutback.string_given,
                        end + ", which is not on that string", "a pole of that string, \"out\" or \"return\"",
                        "mend the id; until then the cut-back is not used");
    }
}

void vet_controls(const VetInput& vet) {
    for (const SeriesString& string : vet.city.strings) {
        if (string.set_aside || string.control_from.empty()) continue;
        const StringIx by_string = find_string(vet.city, string.control_from);
        const PoleIx by_pole = find_pole(vet.city, string.control_from);
        const bool is_own = string.control_from == string.id;
        if ((by_string.is_valid() || by_pole.is_valid()) && !is_own) continue;
        vet.add("control-unknown", kCircuitsTable, string.from, string.id, string.control_from,
                is_own ? "blank where a string controls itself"
                       : "the string or the pole that switches this one",
                "mend control_from: else nobody sees that retiring another string leaves this one dark");
    }
}

} // namespace

void vet_references(const VetInput& vet) {
    vet_string_of_poles(vet);
    vet_string_of_units(vet);
    vet_ends_of_cutbacks(vet);
    vet_controls(vet);
}

} // namespace unstring
