#pragma once
// Small invented cities for the tests of phase: strings that run out along one side of a street and back
// along the other, with cut-backs across it, one service a string, conduit between neighbours.

#include <random>
#include <string>

#include "model/decide/decide_result.h"
#include "model/phase/phase_plan.h"
#include "tests/support/default_prices.h"

namespace unstring {

struct SmallCity {
    City city;
    Catalog catalog;
    PriceBook prices = default_prices();
    Plan plan;
    ShadeResult shade;
    DecideResult decide;

    [[nodiscard]] MoneyInput input() const { return {city, catalog, prices, plan, shade}; }
    [[nodiscard]] std::size_t lamps() const { return city.poles.size(); }

    void add_unit(const std::string& id, double rated_kw, std::vector<StringIx> strings,
                  double primary_v = 2400) {
        Transformer unit;
        unit.id = id;
        unit.rated_kw = rated_kw;
        unit.output_a = 6.6;
        unit.taps = {1, .75, .5};
        unit.primary_v = primary_v;
        unit.mount = Mount::pad;
        unit.oil = Oil::mineral;
        unit.made = "1970";
        unit.state = strings.empty() ? UnitState::spare : UnitState::in_service;
        unit.strings = std::move(strings);
        city.transformers.push_back(unit);
    }

    /// A string of `pairs` lamps on each side of its street; one service at its near end.
    StringIx add_string(int pairs, bool with_cutbacks) {
        const StringIx ix(city.strings.size());
        const double north = 200.0 * static_cast<double>(ix.place());
        SeriesString string;
        string.id = "S-" + std::to_string(ix.place() + 1);
        string.current_a = 6.6;
        string.station = MapPoint{0, north};
        string.cable_awg = 8;
        string.cable_kv = 5;
        city.strings.push_back(string);
        for (int i = 0; i < 2 * pairs; ++i) {
            Pole pole;
            pole.id = string.id + "-" + std::to_string(i + 1);
            pole.string = ix;
            pole.string_given = string.id;
            pole.order = i + 1;
            pole.has_place = true;
            const int along = i < pairs ? i : 2 * pairs - 1 - i;
            pole.place = {40.0 * (along + 1), north + (i < pairs ? 0 : 12)};
            pole.fixture = "HPS150";
            pole.epa_allow_m2 = 1;
            pole.duct = Duct::proven;
            pole.street = "street " + std::to_string(ix.place() + 1);
            pole.ward = ix.place() % 2 == 0 ? "N" : "S";
            city.poles.push_back(pole);
        }
        if (with_cutbacks)
            for (int k = 4; k < pairs; k += 4) {
                CutBack cutback;
                cutback.string = ix;
                cutback.string_given = string.id;
                cutback.pole_a = string.id + "-" + std::to_string(k);
                cutback.pole_b = string.id + "-" + std::to_string(2 * pairs - k + 1);
                cutback.confirmed = true;
                cutback.new_cable_m = 14;
                city.cutbacks.push_back(cutback);
            }
        ServicePoint service;
        service.id = "V-" + std::to_string(ix.place() + 1);
        service.place = {0, north + 6};
        service.has_place = true;
        service.free_kva = 25;
        city.services.push_back(service);
        return ix;
    }

    void add_budget(double money, double hours) {
        for (int t = 0; t < plan.settings.years; ++t) {
            YearBudget row;
            row.year = plan.settings.first_year + t;
            row.money = money;
            row.line_h = row.civil_h = row.lighting_h = row.electric_h = hours;
            city.budget.push_back(row);
        }
    }

    /// Rewires every pole of the string from its near end out, each side a chain of spans; solar where
    /// `is_solar` says so.
    template <class IsSolar>
    void choose(IsSolar is_solar, SpanKind kind) {
        plan.poles.resize(city.poles.size());
        for (std::size_t s = 0; s < city.strings.size(); ++s) {
            Circuit circuit;
            circuit.service = ServiceIx(s);
            std::vector<std::size_t> rewired;
            for (std::size_t i = 0; i < city.poles.size(); ++i) {
                if (city.poles[i].string != StringIx(s)) continue;
                PolePlan& row = plan.poles[i];
                row.choice = is_solar(i) ? Choice::solar : Choice::rewire;
                row.head = row.choice == Choice::solar ? "M" : "";
                if (row.choice == Choice::rewire) {
                    rewired.push_back(i);
                    circuit.poles.push_back(PoleIx(i));
                }
            }
            if (rewired.empty()) continue;
            for (std::size_t k = 0; k < rewired.size(); ++k) {
                CircuitSpan span;
                span.id = static_cast<int>(decide.spans.size());
                span.parent = k == 0 ? -1 : span.id - 1;
                span.pole = PoleIx(rewired[k]);
                span.service = ServiceIx(s);
                span.length_m = 40;
                span.kind = k == 0 ? SpanKind::trench_verge : kind;
                if (span.kind == SpanKind::conduit) {
                    span.duct_string = StringIx(s);
                    span.duct_from = PoleIx(rewired[k - 1]);
                    span.duct_to = PoleIx(rewired[k]);
                }
                for (std::size_t j = k; j < rewired.size(); ++j)
                    span.poles_beyond.push_back(PoleIx(rewired[j]));
                decide.spans.push_back(span);
            }
            decide.circuits.push_back(circuit);
        }
    }

    void add_catalog() {
        catalog.lamps = {{"HPS150", {}, 188, 0.9, LampKind::hps}};
        catalog.luminaires = {{"L60", 60, .95, 8400, "led_head", ""}};
        Head head;
        head.head = "M";
        head.lumens = 6000;
        head.epa_m2 = 0.5;
        head.price_item = "solar_head_m";
        head.battery_item = "battery";
        catalog.heads.push_back(head);
        for (std::size_t i = 0; i < city.poles.size(); ++i) {
            PoleShade at;
            at.pole = PoleIx(i);
            at.best = 0;
            HeadAnswer answer;
            answer.head = "M";
            answer.eligible = true;
            answer.battery_years = 8;
            at.heads.push_back(answer);
            shade.poles.push_back(at);
        }
    }
};

/// A city of 2..5 strings with a pool that is sometimes short; years, money and hours sometimes too little.
inline SmallCity random_city(unsigned seed) {
    std::mt19937 dice(seed);
    const auto upto = [&](unsigned n) { return static_cast<int>(dice() % n); };
    SmallCity out;
    out.plan.settings.first_year = 2027;
    out.plan.settings.years = 3 + upto(4);
    out.plan.settings.horizon_years = 20;
    const int strings = 2 + upto(4);
    for (int s = 0; s < strings; ++s) out.add_string(4 + upto(14), upto(4) != 0);
    for (int s = 0; s < strings; ++s)
        if (upto(8) != 0)
            out.add_unit("T-" + std::to_string(s + 1), upto(6) == 0 ? 4 : 10,
                         {StringIx(static_cast<std::size_t>(s))}, upto(5) == 0 ? 4160 : 2400);
    for (int k = 0; k < upto(4); ++k) out.add_unit("R-" + std::to_string(k + 1), 5, {});
    if (upto(3) == 0) out.city.strings[1].control_from = out.city.strings[0].id;
    if (upto(2) == 0) out.city.poles[static_cast<std::size_t>(upto(8))].critical = true;
    out.add_budget(40000.0 * (1 + upto(12)), 300.0 * (1 + upto(8)));
    out.add_catalog();
    out.choose([&](std::size_t) { return upto(3) == 0; },
               upto(2) == 0 ? SpanKind::conduit : SpanKind::trench_verge);
    return out;
}

} // namespace unstring
