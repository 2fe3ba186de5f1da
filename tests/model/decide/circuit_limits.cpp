#include "model/decide/circuit_limits.h"

#include <catch2/catch.hpp>

#include <algorithm>
#include <random>

#include "model/decide/circuit_load.h"
#include "tests/model/decide/street_case.h"

using namespace unstring;

namespace {

int count_of(const DecideResult& result, const std::string& code) {
    return static_cast<int>(std::count_if(result.findings.begin(), result.findings.end(),
                                          [&](const Finding& each) { return each.code == code; }));
}

/// Every circuit is within its limits, or a finding says that it is not.
void check_limits(const StreetCase& street, const DecideResult& result) {
    int over = 0;
    for (const Circuit& circuit : result.circuits) {
        double kva = 0;
        for (const PoleIx pole : circuit.poles) {
            const LampLoad lamp = lamp_load(street.catalog, street.city.poles[pole.place()]);
            kva += lamp.watts / lamp.pf / 1000;
        }
        CHECK(circuit.load_kva == Approx(kva));
        const double free = circuit.service.is_valid()
                                ? street.city.services[circuit.service.place()].free_kva.value_or(1e9)
                                : 1e9;
        if (kva > free + 1e-9 || circuit.worst_drop_frac > kDropLimitFrac) ++over;
        for (const PoleIx pole : circuit.poles) {
            const PoleDecision& each = *result.find(pole);
            CHECK(each.drop_frac <= circuit.worst_drop_frac + 1e-12);
            CHECK(each.volts == Approx(source_volts(street.city, circuit.service) * (1 - each.drop_frac)));
        }
        CHECK(circuit.device_a >= 1.25 * circuit.source_a);
    }
    CHECK(over == count_of(result, "circuit-over"));
    CHECK(result.cost == Approx(recomputed_cost(street.input(), result)).margin(0.005));
    CHECK(result.bound <= result.cost + 1e-9);
}

} // namespace

TEST_CASE("limits: a service that is full sends the least valuable lamps to solar") {
    StreetCase street = one_street(8);
    const ServiceIx service = street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.set_price("solar_head_m", 15000);
    const DecideResult free = street.decide();
    check_limits(street, free);
    CHECK(free.rewire == 8);
    CHECK(free.limits_price == Approx(0).margin(0.005));

    street.city.services[service.place()].free_kva = 0.3; // four lamps of 60 W at .95
    const DecideResult full = street.decide();
    check_limits(street, full);
    CHECK(full.rewire == 4);
    CHECK(full.solar == 4);
    // The far end goes: nobody else hangs on it.
    for (std::size_t i = 0; i < 8; ++i)
        CHECK(full.poles[i].choice == (i < 4 ? Choice::rewire : Choice::solar));
    CHECK(full.limits_price > 0);
    CHECK(full.bound == free.bound);
}

TEST_CASE("limits: lamps that cannot be solar move to another source, or the service is named as full") {
    StreetCase street = one_street(8);
    street.city.services.clear();
    const ServiceIx near = street.add_service({0, 5.5}, ServiceKind::circuit_end);
    for (PoleShade& shade : street.shade.poles)
        shade.heads[0] = {.head = "M", .eligible = false, .why = "41 nights dark a year"};
    street.city.services[near.place()].free_kva = 0.3;
    const DecideResult alone = street.decide();
    check_limits(street, alone);
    CHECK(alone.rewire == 8);
    CHECK(count_of(alone, "circuit-over") == 1);

    street.add_service({35.0 * 7, 6.5}, ServiceKind::candidate);
    const DecideResult two = street.decide();
    check_limits(street, two);
    CHECK(two.rewire == 8);
    CHECK(two.circuits.size() == 2);
    CHECK(two.services_new == 1);
    CHECK(count_of(two, "circuit-over") == 0);
}

TEST_CASE("limits: a long street gets larger wire near its source, and no larger than it needs") {
    StreetCase street = one_street(20);
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.set_price("solar_head_m", 30000);
    const DecideResult result = street.decide();
    check_limits(street, result);
    CHECK(result.rewire == 20);
    CHECK(count_of(result, "circuit-over") == 0);
    REQUIRE(result.circuits.size() == 1);
    CHECK(result.circuits[0].worst_drop_frac <= 0.03);
    CHECK(result.circuits[0].worst_drop_frac > 0.02);
    int larger = 0;
    for (const CircuitSpan& span : result.spans) {
        larger += span.awg < 8 ? 1 : 0;
    }
    CHECK(larger > 0);
    CHECK(larger < static_cast<int>(result.spans.size()));
    for (const CircuitSpan& span : result.spans)
        if (span.poles_beyond.size() <= 2) CHECK(span.awg == 8);
    CHECK(result.limits_price > 0);
}

TEST_CASE("limits: on random towns with small services every circuit keeps them or is named") {
    const unsigned seed = 99;
    std::mt19937 random(seed);
    const auto below = [&](unsigned n) { return static_cast<int>(random() % n); };
    for (int town = 0; town < 15; ++town) {
        StreetCase street;
        for (int i = 0; i < 4; ++i) {
            street.add_street("A" + std::to_string(i), {-30, 120.0 * i}, {400, 120.0 * i});
            street.add_street("B" + std::to_string(i), {120.0 * i, -30}, {120.0 * i, 400});
        }
        for (int s = 0; s < 4; ++s) {
            const StringIx string = street.add_string();
            for (int i = 0; i < 11; ++i)
                street.add_pole(string, {35.0 * i, 120.0 * s + (below(4) == 0 ? -6.0 : 6.0)},
                                "A" + std::to_string(s), below(3) != 0);
        }
        for (int i = 0; i < 7; ++i) {
            const ServiceIx service =
                street.add_service({below(380) * 1.0, below(380) * 1.0}, static_cast<ServiceKind>(below(3)));
            street.city.services[service.place()].free_kva = 0.2 + 0.1 * below(6);
        }
        INFO("seed " << seed << " town " << town);
        check_limits(street, street.decide());
    }
}
