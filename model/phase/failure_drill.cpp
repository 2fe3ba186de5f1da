#include "model/phase/failure_drill.h"

#include <algorithm>
#include <map>
#include <tuple>

#include "model/series/dates.h"
#include "model/series/spares.h"

namespace unstring {
namespace {

constexpr double kMetresPerMile = 1609.344;
constexpr double kWeeksPerYear = 52;

using ClassKey = std::tuple<double, double, double>; ///< rated kW, output amperes, primary volts

ClassKey class_of(const Transformer& unit) {
    return {unit.rated_kw, unit.output_a.value_or(0), unit.primary_v.value_or(0)};
}

struct ClassSum {
    int idle = 0;
    double demand = 0; ///< failures expected over the lead time
    int idle_that_fit = 0;
    bool in_service = false;
};

double loop_faults_year(const City& city, const PriceBook& prices, StringIx string, double cable_m,
                        double cable_today_m, int year) {
    const auto& own = city.strings[string.place()].faults_year;
    if (own && cable_today_m > 0) return *own * cable_m / cable_today_m;
    return prices.at("loop_faults", year) * cable_m / kMetresPerMile;
}

std::vector<SpareCover> covers_of(const PhaseFacts& facts, std::size_t t) {
    const City& city = facts.city;
    const UnitYears& units = facts.units;
    const int year = facts.year(t);
    std::map<ClassKey, ClassSum> classes;
    for (const TransformerIx unit : units.idle[t]) ++classes[class_of(city.transformers[unit.place()])].idle;
    const double lead_years = facts.prices.at("unit_lead_weeks", year) / kWeeksPerYear;
    std::vector<char> is_counted(city.transformers.size(), 0);
    std::map<ClassKey, std::vector<char>> fitting;
    for (std::size_t s = 0; s < units.strings.size(); ++s) {
        const TransformerIx unit = units.strings[s][t].unit;
        if (!unit.is_valid() || facts.at(s, t).state.lamps == 0) continue;
        const Transformer& row = city.transformers[unit.place()];
        const ClassKey key = class_of(row);
        ClassSum& sum = classes[key];
        sum.in_service = true;
        if (is_counted[unit.place()] == 0) sum.demand += failure_frac(facts.prices, row, year) * lead_years;
        is_counted[unit.place()] = 1;
        std::vector<char>& fits = fitting.try_emplace(key, units.idle[t].size(), char{0}).first->second;
        for (std::size_t i = 0; i < fits.size(); ++i)
            if (fits[i] == 0 && facts.kinds.fit(StringIx(s), units.idle[t][i], facts.at(s, t).state.load_kva))
                fits[i] = 1;
    }
    for (const auto& [key, fits] : fitting)
        classes[key].idle_that_fit = static_cast<int>(std::count(fits.begin(), fits.end(), 1));
    std::vector<SpareCover> covers;
    for (const auto& [key, sum] : classes) {
        const double cover = sum.in_service ? poisson_cover(sum.demand, sum.idle_that_fit) : 1;
        covers.push_back({std::get<0>(key), std::get<1>(key), std::get<2>(key), sum.idle, cover});
    }
    return covers;
}

} // namespace

double failure_frac(const PriceBook& prices, const Transformer& unit, int year) {
    constexpr double kYoungTo = 40, kOldFrom = 60;
    const double young = prices.at("unit_fail_frac", year);
    const double old = prices.at("unit_fail_old_frac", year);
    const auto made = date_of(unit.made);
    if (!made) return young;
    const double share = std::clamp((year - made->year - kYoungTo) / (kOldFrom - kYoungTo), 0.0, 1.0);
    return young + share * (old - young);
}

StringIx control_string(const City& city, StringIx string) {
    const std::string& from = city.strings[string.place()].control_from;
    if (from.empty()) return {};
    StringIx other = find_string(city, from);
    if (!other.is_valid())
        if (const PoleIx pole = find_pole(city, from); pole.is_valid())
            other = city.poles[pole.place()].string;
    return other == string ? StringIx() : other;
}

DrillYear drill_year(const PhaseFacts& facts, std::size_t t) {
    const City& city = facts.city;
    const PriceBook& prices = facts.prices;
    const int year = facts.year(t);
    DrillYear drill;
    std::vector<int> dark_with(facts.loops.size(), 0); // lamps that go dark when this string does
    for (std::size_t s = 0; s < facts.loops.size(); ++s) {
        dark_with[s] += facts.at(s, t).state.lamps;
        if (const StringIx from = control_string(city, StringIx(s));
            from.is_valid() && facts.at(from.place(), t).state.lamps > 0)
            dark_with[from.place()] += facts.at(s, t).state.lamps;
    }
    for (std::size_t s = 0; s < facts.loops.size(); ++s) {
        const StringState& state = facts.at(s, t).state;
        if (state.lamps == 0) continue;
        const double faults =
            loop_faults_year(city, prices, StringIx(s), state.cable_m, facts.at(s, 0).state.cable_m, year);
        drill.dark_cable += faults * prices.at("loop_repair_nights", year) * dark_with[s];
        const TransformerIx unit = facts.units.strings[s][t].unit;
        if (!unit.is_valid()) continue;
        const bool has_spare = facts.kinds.best(StringIx(s), facts.units.idle[t], state.load_kva).has_value();
        const double nights = prices.at(has_spare ? "swap_days" : "emergency_days", year);
        drill.dark_transformers +=
            failure_frac(prices, city.transformers[unit.place()], year) * nights * dark_with[s];
    }
    drill.spares = covers_of(facts, t);
    return drill;
}

} // namespace unstring
