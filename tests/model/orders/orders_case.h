#pragma once
// A string of eight lamps, out and back along one street, its far half made solar in the first year and the
// rest rewired in the second from one service; phase evaluates it.

#include "model/catalog/cables.h"
#include "model/orders/work_order.h"
#include "model/phase/phase_plan.h"
#include "tests/support/default_prices.h"

namespace unstring {

struct OrdersCase {
    City city;
    Catalog catalog;
    PriceBook prices = default_prices();
    Plan plan;
    ShadeResult shade;
    DecideResult decide;

    OrdersCase() {
        catalog.cables = default_cables();
        catalog.lamps = {{"HPS150", {}, 188, 0.9, LampKind::hps}};
        catalog.luminaires = {{"LED-9", 60, .95, 8700, "led_head", ""}};
        Head head;
        head.head = "SOL-M";
        head.lumens = 6000;
        head.price_item = "solar_head_m";
        head.battery_item = "battery";
        head.tilt_deg = 15;
        catalog.heads.push_back(head);
        city.centre = {-130, 34};
        add_string();
        for (int i = 1; i <= 8; ++i) add_pole(i);
        add_units();
        ServicePoint service;
        service.id = "SVC-1";
        service.place = {0, -5};
        service.has_place = true;
        city.services.push_back(service);
        plan = new_plan(city, "first");
        plan.settings.first_year = 2027;
        plan.settings.years = 3;
        plan.poles.resize(8);
        for (std::size_t i = 0; i < 8; ++i) {
            const bool is_far = i >= 2 && i <= 5;
            plan.poles[i].choice = is_far ? Choice::solar : Choice::rewire;
            plan.poles[i].head = is_far ? "SOL-M" : "";
            plan.poles[i].year = is_far ? 2027 : 2028;
            plan.poles[i].year_by = YearBy::solver;
        }
        add_spans();
    }

    [[nodiscard]] MoneyInput input() const { return {city, catalog, prices, plan, shade}; }
    [[nodiscard]] PhaseResult phase() const { return evaluate_phase(input(), decide); }
    [[nodiscard]] std::vector<WorkOrder> orders(int year = 0, const Crew* crew = nullptr) const {
        return work_orders(input(), decide, phase(), year, crew);
    }

private:
    void add_string() {
        SeriesString string;
        string.id = "S-04";
        string.current_a = 6.6;
        string.station = MapPoint{0, 0};
        string.cable_awg = 8;
        string.cable_kv = 5;
        string.primary_feeder = "F-2";
        city.strings.push_back(string);
    }
    // Out on the north side: 1..4, back on the south side: 5..8; 4 and 5 are the far end.
    void add_pole(int i) {
        Pole pole;
        pole.id = "04-00" + std::to_string(i);
        pole.string_given = "S-04";
        pole.string = StringIx(0);
        pole.order = i;
        pole.has_place = true;
        pole.place = i <= 4 ? MapPoint{40.0 * i, 6} : MapPoint{40.0 * (9 - i), -6};
        pole.fixture = "HPS150";
        pole.street = "Tide Lane";
        pole.duct = Duct::assumed;
        pole.epa_allow_m2 = i == 3 ? std::optional<double>() : 1.0;
        city.poles.push_back(pole);
        PoleShade at;
        at.pole = PoleIx(static_cast<std::size_t>(i - 1));
        at.best = 0;
        at.bearing_deg = 190;
        HeadAnswer answer;
        answer.head = "SOL-M";
        answer.eligible = true;
        answer.battery_years = 8;
        at.heads.push_back(answer);
        shade.poles.push_back(at);
    }
    void add_units() {
        Transformer unit;
        unit.id = "T-01";
        unit.rated_kw = 5;
        unit.output_a = 6.6;
        unit.taps = {1};
        unit.primary_v = 2400;
        unit.mount = Mount::pad;
        unit.oil = Oil::unknown;
        unit.state = UnitState::in_service;
        unit.strings = {StringIx(0)};
        unit.strings_given = {"S-04"};
        city.transformers.push_back(unit);
        CutBack cutback;
        cutback.string = StringIx(0);
        cutback.string_given = "S-04";
        cutback.pole_a = "04-002";
        cutback.pole_b = "04-007";
        cutback.confirmed = true;
        cutback.new_cable_m = 12;
        city.cutbacks.push_back(cutback);
    }
    void add_spans() {
        const std::size_t order[] = {0, 1, 7,
                                     6}; // 1 from the service, 2 from 1, 8 from the service, 7 from 8
        for (int i = 0; i < 4; ++i) {
            CircuitSpan span;
            span.id = i;
            span.parent = i % 2 == 0 ? -1 : i - 1;
            span.pole = PoleIx(order[i]);
            span.service = ServiceIx(0);
            span.kind = i == 1 ? SpanKind::conduit : SpanKind::trench_verge;
            span.length_m = 40;
            span.boxes = 1;
            if (i == 1) {
                span.duct_string = StringIx(0);
                span.duct_from = PoleIx(0);
                span.duct_to = PoleIx(1);
            }
            span.poles_beyond = i % 2 == 0 ? std::vector<PoleIx>{PoleIx(order[i]), PoleIx(order[i + 1])}
                                           : std::vector<PoleIx>{PoleIx(order[i])};
            decide.spans.push_back(span);
        }
        Circuit circuit;
        circuit.service = ServiceIx(0);
        for (const std::size_t place : order) circuit.poles.push_back(PoleIx(place));
        circuit.device_a = 15;
        decide.circuits.push_back(circuit);
        for (std::size_t i = 0; i < 8; ++i) {
            PoleDecision decision;
            decision.pole = PoleIx(i);
            decision.choice = plan.poles[i].choice;
            decision.volts = 240 - 0.1 * static_cast<double>(i + 1);
            decide.poles.push_back(decision);
        }
    }
};

} // namespace unstring
