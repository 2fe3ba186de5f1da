// Wiring order as the file gives it: missing, doubled, with gaps. Cut-backs that nobody has confirmed.

#include <algorithm>
#include <map>
#include <set>

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
        if (is_new || first->second->id == pole.id) continue;  // the second row of one id is pole-id-twice
        vet.add("order-twice", kPolesTable, pole.from, pole.id,
                fmt::format("order {}, as {} in row {}", *pole.order, first->second->id, first->second->from.row),
                "a number of its own in the string", "trace the loop there, or clear the number");
    }
}

void vet_missing(const VetInput& vet, const SeriesString& string, const std::vector<PoleIx>& lamps) {
    std::vector<const Pole*> without;
    for (const PoleIx lamp : lamps)
        if (!has_number(vet.city.poles[lamp.place()])) without.push_back(&vet.city.poles[lamp.place()]);
    if (without.size() == lamps.size())
        vet.add("order-missing", kCircuitsTable, string.from, string.id, fmt::format("none of {} lamps has an order", lamps.size()),
                "wiring order 1..n from the station out", "trace the loop; until then the order is inferred from the map");
    else
        for (const Pole* pole : without)
            vet.add("order-missing", kPolesTable, pole->from, pole->id, "no order", "its number in string " + string.id,
                    "trace the loop there; until then its place is inferred from the map");
}

/// Numbers from 1 to the highest that no row of the string bears, rows set aside included.
void vet_gaps(const VetInput& vet, const SeriesString& string, const std::set<int>& numbers) {
    if (numbers.empty()) return;
    constexpr int kShown = 8;
    std::string list;
    long missing = *numbers.rbegin() - static_cast<long>(numbers.size());
    const long odd = std::count_if(numbers.begin(), numbers.end(), [](int number) { return number < 1; });
    missing += odd;
    if (missing <= 0) return;
    int shown = 0;
    for (int number = 1; number < *numbers.rbegin() && shown < kShown; ++number) {
        if (numbers.contains(number)) continue;
        list += (list.empty() ? "" : ", ") + std::to_string(number);
        ++shown;
    }
    vet.add("order-gap", kCircuitsTable, string.from, string.id,
            fmt::format("no lamp {}{}", list, missing > kShown ? fmt::format(" and {} more", missing - kShown) : ""), "1..n without gaps",
            "look whether poles are missing from the file");
}

}  // namespace

void vet_orders(const VetInput& vet) {
    const std::vector<std::vector<PoleIx>> lamps = lamps_by_string(vet.city);
    std::vector<std::set<int>> numbers(vet.city.strings.size());
    for (const Pole& pole : vet.city.poles)
        if (pole.string.is_valid() && has_number(pole)) numbers[pole.string.place()].insert(*pole.order);
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
        vet.add("cutback-unconfirmed", kCutbacksTable, cutback.from,
                fmt::format("{} {} {}", cutback.string_given, cutback.pole_a, cutback.pole_b), "confirmed blank or no",
                "a splice place that someone has seen", "survey it before work that needs it is handed out");
    }
}

}  // namespace unstring
