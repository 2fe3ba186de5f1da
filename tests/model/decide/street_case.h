#pragma once
// An invented city of straight streets with poles on one string each, priced with the default book.

#include <memory>
#include <string>

#include <fmt/format.h>

#include "model/decide/decide_city.h"
#include "model/decide/span_cost.h"
#include "tests/support/default_prices.h"

namespace unstring {

struct StreetCase {
    City city;
    Catalog catalog;
    PriceBook prices = default_prices();
    Plan plan;
    ShadeResult shade;

    StreetCase() {
        city.crs = "EPSG:32610";
        catalog.lamps = {{"HPS150", {}, 188, 0.9, LampKind::hps}};
        catalog.luminaires = {{"L60", 60, .95, 8400, "led_head", ""}};
        Head head;
        head.head = "M";
        head.lumens = 6000;
        head.epa_m2 = 0.5;
        head.price_item = "solar_head_m";
        head.battery_item = "battery";
        catalog.heads.push_back(head);
        plan.settings.first_year = 2027;
    }

    [[nodiscard]] MoneyInput input() const { return {city, catalog, prices, plan, shade}; }
    [[nodiscard]] DecideResult decide() const { return *decide_city(input(), {}); }

    StringIx add_string() {
        SeriesString string;
        string.id = fmt::format("S-{:02}", city.strings.size() + 1);
        string.station = MapPoint{-50, -50};
        city.strings.push_back(string);
        return StringIx(city.strings.size() - 1);
    }
    PoleIx add_pole(StringIx string, MapPoint place, const std::string& street, bool solar_fits = true) {
        Pole pole;
        pole.string = string;
        int order = 1;
        for (const Pole& other : city.poles) order += other.string == string ? 1 : 0;
        pole.order = order;
        pole.id = fmt::format("{}-{:03}", city.strings[string.place()].id.substr(2), order);
        pole.place = place;
        pole.has_place = true;
        pole.fixture = "HPS150";
        pole.epa_allow_m2 = 1.0;
        pole.duct = Duct::bad;
        pole.street = street;
        city.poles.push_back(pole);
        plan.poles.emplace_back();
        PoleShade at;
        at.pole = PoleIx(city.poles.size() - 1);
        at.best = 0;
        HeadAnswer answer;
        answer.head = "M";
        answer.eligible = solar_fits;
        if (!solar_fits) answer.why = "41 nights dark a year, 3 are allowed";
        answer.battery_years = 8;
        at.heads.push_back(answer);
        shade.poles.push_back(at);
        return at.pole;
    }
    void add_street(const std::string& name, MapPoint from, MapPoint to, Surface surface = Surface::verge) {
        Street street;
        street.name = name;
        street.surface = surface;
        street.width_m = 10;
        street.line = {from, to};
        city.streets.push_back(street);
    }
    ServiceIx add_service(MapPoint place, ServiceKind kind) {
        ServicePoint service;
        service.id = fmt::format("V-{}", city.services.size() + 1);
        service.kind = kind;
        service.place = place;
        service.has_place = true;
        service.free_kva = 25;
        city.services.push_back(service);
        return ServiceIx(city.services.size() - 1);
    }
    void set_price(const std::string& item, double base) {
        std::vector<PriceRow> rows = prices.rows();
        for (PriceRow& row : rows)
            if (row.item == item) row.base = base;
        prices = PriceBook(rows);
    }
};

/// One street of `poles` poles at 35 m on its verge, 5.5 m from the middle of a carriageway of 10 m.
inline StreetCase one_street(int poles) {
    StreetCase out;
    const StringIx string = out.add_string();
    out.add_street("Elm", {-20, 0}, {35.0 * poles + 20, 0});
    for (int i = 0; i < poles; ++i) out.add_pole(string, {35.0 * i, 5.5}, "Elm");
    return out;
}

/// Cost of a result from nothing but its choices, spans and circuits.
inline double recomputed_cost(const MoneyInput& input, const DecideResult& result) {
    Cents sum = 0;
    const int year = input.plan.decide_year();
    for (const PoleDecision& each : result.poles)
        if (each.choice != Choice::undecided)
            sum += to_cents(present_value(pole_option(input, each.pole, each.choice, year).lines));
    for (const CircuitSpan& span : result.spans)
        sum += to_cents(present_value(span_lines(input, span, year)));
    for (const Circuit& circuit : result.circuits)
        sum += to_cents(present_value(connection_lines(input, circuit.service, year)));
    return to_dollars(sum);
}

} // namespace unstring
