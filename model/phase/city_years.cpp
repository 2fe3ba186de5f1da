#include <algorithm>
#include <map>
#include <tuple>

#include <tbb/parallel_for.h>

#include "model/money/hours.h"
#include "model/phase/city_packages.h"
#include "model/phase/duct_live.h"
#include "model/phase/phase_facts.h"
#include "model/phase/phase_ledger.h"

namespace unstring {
namespace {

bool is_fixed(const PolePlan& row, const PhaseChoices& choices) {
    return row.year != 0 && (row.year_locked || (row.year_by == YearBy::hand && !choices.free_hand_years));
}

bool is_converted(const CityYears& city, PoleIx pole) {
    const Choice choice = city.input.plan.poles[pole.place()].choice;
    return (choice == Choice::rewire || choice == Choice::solar) &&
           is_candidate(city.input.city, city.input.city.poles[pole.place()]);
}

int earliest_t(const CityYears& city, PoleIx ix, const std::vector<ServiceIx>& service_of) {
    const int first = city.input.plan.settings.first_year;
    const Pole& pole = city.input.city.poles[ix.place()];
    int year = std::max(first, pole.earliest_year.value_or(first));
    const ServiceIx service = service_of[ix.place()];
    if (city.input.plan.poles[ix.place()].choice == Choice::rewire && service.is_valid())
        year = std::max(
            year, service_ready_year(city.input.city, city.input.prices, city.input.plan.settings, service));
    return year - first;
}

struct Place { ///< where a pole stands in the case
    int string = -1, section = -1;
    int fixed_year = 0;
};

void add_strings(CityYears& city, const PhaseChoices& choices, std::vector<Place>& places) {
    std::vector<ServiceIx> service_of(city.input.city.poles.size());
    for (const Circuit& circuit : city.decide.circuits)
        for (const PoleIx pole : circuit.poles) service_of[pole.place()] = circuit.service;
    std::map<StringIx, std::size_t> place_of;
    for (const StringLoop& loop : city.loops) {
        if (std::count(loop.burns.begin(), loop.burns.end(), 1) == 0) continue;
        place_of[loop.string] = city.strings.size();
        CityString string{loop.string, {}, std::vector<int>(loop.lamps.size(), 0)};
        for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
            const PolePlan& row = city.input.plan.poles[loop.lamps[i].place()];
            if (!is_converted(city, loop.lamps[i]) || !is_fixed(row, choices)) continue;
            const int year = work_year(city.input.city, city.input.plan, loop.lamps[i]);
            string.fixed_year[i] = year;
            places[loop.lamps[i].place()] = {static_cast<int>(city.strings.size()), -1,
                                             year == 0 ? -1 : year};
        }
        city.strings.push_back(std::move(string));
    }
    for (std::size_t k = 0; k < city.sections.size(); ++k) {
        const auto at = place_of.find(city.sections[k].string);
        if (at == place_of.end()) continue;
        CityString& string = city.strings[at->second];
        CitySection section{static_cast<int>(k), {}, 0};
        for (const PoleIx pole : city.sections[k].poles) {
            if (!is_converted(city, pole) || places[pole.place()].fixed_year != 0) continue;
            section.poles.push_back(pole);
            section.earliest_t = std::max(section.earliest_t, earliest_t(city, pole, service_of));
            places[pole.place()] = {static_cast<int>(at->second), static_cast<int>(string.sections.size()),
                                    0};
        }
        if (!section.poles.empty()) string.sections.push_back(std::move(section));
    }
}

Use use_of(const YearCash& cash, const CrewHours& hours) {
    return {to_dollars(cash.capital_sum()), hours.line, hours.civil, hours.lighting, hours.electric};
}

SharedItem item_of(const CityYears& city, const std::vector<PoleIx>& beyond,
                   const std::vector<Place>& places) {
    SharedItem item;
    std::map<int, int> first;
    for (const PoleIx pole : beyond) {
        const Place& place = places[pole.place()];
        if (city.input.plan.poles[pole.place()].choice != Choice::rewire) continue;
        if (place.fixed_year > 0) {
            const int t = place.fixed_year - city.input.plan.settings.first_year;
            item.fixed_t = item.fixed_t < 0 ? t : std::min(item.fixed_t, t);
        } else if (place.section >= 0) {
            const auto [at, is_new] = first.try_emplace(place.string, place.section);
            at->second = std::min(at->second, place.section);
        }
    }
    for (const auto& [string, section] : first)
        item.firsts.emplace_back(static_cast<std::size_t>(string), section);
    return item;
}

void add_items(CityYears& city, const std::vector<Place>& places) {
    const City& records = city.input.city;
    const auto years = static_cast<std::size_t>(city.years());
    for (std::size_t i = 0; i < city.decide.spans.size(); ++i) {
        SharedItem item = item_of(city, city.decide.spans[i].poles_beyond, places);
        if (item.firsts.empty() && item.fixed_t < 0) continue;
        item.span = static_cast<int>(i);
        for (std::size_t t = 0; t < years; ++t) {
            const CircuitSpan& span = city.decide.spans[i];
            const double cost = city.book.span(i, city.year(t), false).cost;
            item.cost.push_back(cost);
            item.use.push_back(use_of(city.book.span(i, city.year(t), false),
                                      span_crew_hours(records, city.input.prices, span, city.year(t))));
            if (is_free_of_duct(records, span)) continue;
            Use more = use_of(city.book.span(i, city.year(t), true),
                              span_crew_hours(records, city.input.prices, dug_span(span), city.year(t)));
            for (std::size_t l = 0; l < kLimits; ++l) more[l] -= item.use.back()[l];
            item.dig_cost.push_back(city.book.span(i, city.year(t), true).cost - cost);
            item.dig_use.push_back(more);
        }
        city.items.push_back(std::move(item));
    }
    for (const Circuit& circuit : city.decide.circuits) {
        SharedItem item = item_of(city, circuit.poles, places);
        if (!circuit.service.is_valid() || (item.firsts.empty() && item.fixed_t < 0)) continue;
        for (std::size_t t = 0; t < years; ++t) {
            const YearCash& cash = city.book.connection(circuit.service, city.year(t));
            item.cost.push_back(cash.cost);
            item.use.push_back(use_of(
                cash, connection_crew_hours(records, city.input.prices, circuit.service, city.year(t))));
        }
        city.items.push_back(std::move(item));
    }
}

/// State and live legs with the first n sections done at the end of year t, hand years up to then done too.
void fill_states(CityYears& city, std::size_t s) {
    const CityString& string = city.strings[s];
    const StringLoop& loop = city.loops[string.string.place()];
    const auto years = static_cast<std::size_t>(city.years());
    const bool has_fixed =
        std::any_of(string.fixed_year.begin(), string.fixed_year.end(), [](int year) { return year != 0; });
    city.states[s].resize(years);
    city.legs[s].resize(years);
    for (std::size_t t = 0; t < years; ++t) {
        if (t > 0 && !has_fixed) {
            city.states[s][t] = city.states[s][0];
            city.legs[s][t] = city.legs[s][0];
            continue;
        }
        std::vector<char> live = loop.burns;
        for (std::size_t i = 0; i < live.size(); ++i)
            if (string.fixed_year[i] != 0 && string.fixed_year[i] <= city.year(t)) live[i] = 0;
        for (std::size_t n = 0; n <= string.sections.size(); ++n) {
            if (n > 0)
                for (const PoleIx pole : string.sections[n - 1].poles)
                    live[static_cast<std::size_t>(std::find(loop.lamps.begin(), loop.lamps.end(), pole) -
                                                  loop.lamps.begin())] = 0;
            city.states[s][t].push_back(string_state(loop, live));
            city.legs[s][t].push_back(live_legs(loop, city.states[s][t].back()));
        }
    }
}

/// Units alike in all that the pool asks are one class; a two-loop unit is a class of its own, for its two
/// strings.
void add_classes(CityYears& city) {
    const std::vector<Transformer>& units = city.input.city.transformers;
    std::map<std::tuple<double, double, int, double, int, double, int>, std::size_t> known;
    std::vector<int> class_of(units.size(), kNoClass);
    for (std::size_t u = 0; u < units.size(); ++u) {
        const Transformer& unit = units[u];
        if (unit.set_aside || unit.state == UnitState::scrapped) continue;
        const int own = unit.strings.size() >= 2 ? static_cast<int>(u) : -1;
        const auto key = std::tuple(unit.output_a.value_or(0), unit.primary_v.value_or(0),
                                    unit.mount ? static_cast<int>(*unit.mount) : -1, loop_rating_kw(unit),
                                    static_cast<int>(unit.build), min_frac_of(unit), own);
        const auto [at, is_new] = known.try_emplace(key, city.classes.size());
        if (is_new) city.classes.emplace_back();
        city.classes[at->second].push_back(TransformerIx(u));
        class_of[u] = static_cast<int>(at->second);
    }
    for (const CityString& string : city.strings) {
        const TransformerIx today = unit_today(city.input.city, string.string);
        const int today_class = today.is_valid() ? class_of[today.place()] : kNoClass;
        std::vector<int> local;
        for (std::size_t c = 0; c < city.classes.size(); ++c) {
            const Transformer& first = units[city.classes[c].front().place()];
            const bool is_own =
                first.strings.size() < 2 ||
                std::find(first.strings.begin(), first.strings.end(), string.string) != first.strings.end();
            const bool fits = is_own && city.kinds->is_kind(string.string, city.classes[c].front());
            if (fits || static_cast<int>(c) == today_class) local.push_back(static_cast<int>(c));
        }
        local.push_back(kNoClass);
        city.start_class.push_back(
            static_cast<int>(std::find(local.begin(), local.end(), today_class) - local.begin()));
        city.local_classes.push_back(std::move(local));
    }
}

std::vector<PoleAsk> asks_of(const CityYears& city) {
    std::vector<PoleAsk> asks;
    for (std::size_t i = 0; i < city.input.city.poles.size(); ++i) {
        if (!is_candidate(city.input.city, city.input.city.poles[i])) continue;
        asks.push_back({PoleIx(i), Choice::keep, 0, {}});
        if (!is_converted(city, PoleIx(i))) continue;
        const PolePlan& row = city.input.plan.poles[i];
        const std::string head = row.choice == Choice::solar ? row.head : std::string();
        for (std::size_t t = 0; t < static_cast<std::size_t>(city.years()); ++t)
            asks.push_back({PoleIx(i), row.choice, city.year(t), head});
    }
    return asks;
}

} // namespace

Expected<std::unique_ptr<CityYears>> city_years(const MoneyInput& input, const DecideResult& decide,
                                                const PhaseChoices& choices, CashBook& book,
                                                const Progress& progress) {
    const auto stopped = [] {
        return tl::unexpected(
            Fault{FaultCode::cancelled, {}, 0, {}, "stopped by the user", {}, "run phase again"});
    };
    auto city = std::unique_ptr<CityYears>(
        new CityYears{input, decide, book, {}, {}, {}, {}, {}, {}, {}, {}, {}, {}});
    city->loops = string_loops(input.city, input.catalog);
    city->sections = sections_of(city->loops);
    city->kinds = std::make_unique<UnitKinds>(input.city, city->loops);
    std::vector<Place> places(input.city.poles.size());
    add_strings(*city, choices, places);
    if (progress.is_cancelled()) return stopped();
    book.warm(asks_of(*city));
    if (progress.is_cancelled()) return stopped();
    add_items(*city, places);
    city->states.resize(city->strings.size());
    city->legs.resize(city->strings.size());
    tbb::parallel_for(std::size_t{0}, city->strings.size(), [&](std::size_t s) { fill_states(*city, s); });
    add_classes(*city);
    if (progress.is_cancelled()) return stopped();
    return city;
}

} // namespace unstring
