// Wiring order as the file gives it: missing, doubled, with gaps. Cut-backs that nobody has confirmed.

#include <algorithm>
#include <map>
#include <utility>
#include <vector>

#include <fmt/format.h>

#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

bool has_number(const Pole& pole) { return pole.order.has_value() && !pole.order_is_inferred; }

void vet_twice(const VetInput& vet, const std::vector<PoleIx>& lamps) {
    std::map<int, const Pole*> by_number;
    for (const PoleIx lamp : lamps) {
        const Pole& pole = vet.city.poles[lamp.place()];
        if (!has_number(pole)) continue;
        const auto [first, is_new] = by_number.try_emplace(*pole.order, &pole);
        if (is_new || first->second->id == pole.id) continue; // the second row of one id is pole-id-twice
        vet.add(
            "order-twice", kPolesTable, pole.from, pole.id,
            fmt::format("order {}, as {} in row {}", *pole.order, first->second->id, first->second->from.row),
            "a number of its own in the string", "trace the loop there, or clear the number");
    }
}

/// One finding for a string without any number, at its first lamp; else one for each lamp.
void vet_missing(const VetInput& vet, const SeriesString& string, const std::vector<PoleIx>& lamps) {
    std::vector<const Pole*> without;
    for (const PoleIx lamp : lamps)
        if (!has_number(vet.city.poles[lamp.place()])) without.push_back(&vet.city.poles[lamp.place()]);
    if (without.size() == lamps.size()) {
        const Pole& first =
            **std::min_element(without.begin(), without.end(),
                               [](const Pole* a, const Pole* b) { return a->from.row < b->from.row; });
        vet.add("order-missing", kPolesTable, first.from, first.id,
                fmt::format("none of the {} lamps of string {} has an order", lamps.size(), string.id),
                "wiring order 1..n from the station out",
                "trace the loop; until then the order is inferred from the map");
        return;
    }
    for (const Pole* pole : without)
        vet.add("order-missing", kPolesTable, pole->from, pole->id, "no order",
                "its number in string " + string.id,
                "trace the loop there; until then its place is inferred from the map");
}

/// Numbers of a string, rows set aside included, by the pole that bears each (the first of equals).
using Numbers = std::map<int, const Pole*>;

std::string run_text(int first, int last) {
    return first == last ? fmt::format("{}", first) : fmt::format("{} to {}", first, last);
}

/// A finding at the pole after each gap; where gaps are the rule (numbers in tens) one for the string.
void vet_gaps(const VetInput& vet, const SeriesString& string, const Numbers& numbers) {
    std::vector<std::pair<int, const Pole*>> gaps; // the first number that is missing, the pole after it
    int expected = 1;
    for (const auto& [number, pole] : numbers) {
        if (number > expected) gaps.emplace_back(expected, pole);
        expected = number + 1;
    }
    const bool is_rule = gaps.size() > 3 && 3 * gaps.size() > numbers.size();
    for (const auto& [first, pole] : gaps) {
        const std::string also =
            is_rule ? fmt::format(", and so on: {} gaps in {} numbers", gaps.size(), numbers.size()) : "";
        vet.add("order-gap", kPolesTable, pole->from, pole->id,
                fmt::format("{} missing before {} in string {}{}", run_text(first, *pole->order - 1),
                            *pole->order, string.id, also),
                "1..n without gaps", "look whether poles are missing from the file");
        if (is_rule) return;
    }
}

} // namespace

void vet_orders(const VetInput& vet) {
    const std::vector<std::vector<PoleIx>> lamps = lamps_by_string(vet.city);
    std::vector<Numbers> numbers(vet.city.strings.size());
    for (const Pole& pole : vet.city.poles)
        if (pole.string.is_valid() && has_number(pole))
            numbers[pole.string.place()].try_emplace(*pole.order, &pole);
    for (std::size_t s = 0; s < vet.city.strings.size(); ++s) {
        const SeriesString& string = vet.city.strings[s];
        if (string.set_aside || string.kind == CircuitKind::parallel || lamps[s].empty()) continue;
        vet_twice(vet, lamps[s]);
        vet_missing(vet, string, lamps[s]);
        vet_gaps(vet, string, numbers[s]);
    }
}

void vet_cutbacks(const VetInput& vet) {
    for (const CutBack& cutback : vet.city.cutbacks) {
        if (cutback.set_aside || cutback.confirmed || !cutback.string.is_valid()) continue;
        vet.add("cutback-unconfirmed", kCutbacksTable, cutback.from, cutback.string_given,
                fmt::format("{} to {}, confirmed blank or no", cutback.pole_a, cutback.pole_b),
                "a splice place that someone has seen", "survey it before work that needs it is handed out");
    }
}

} // namespace unstring
