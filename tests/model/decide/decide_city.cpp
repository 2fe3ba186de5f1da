#include "model/decide/decide_city.h"

#include <catch2/catch.hpp>

#include <algorithm>
#include <atomic>
#include <random>
#include <set>

#include "tests/model/decide/street_case.h"

using namespace unstring;

namespace {

const OptionCost& option(const PoleDecision& each, Choice choice) {
    return each.options[static_cast<std::size_t>(choice) - 1];
}

/// Everything that has to hold for any answer.
void check_result(const StreetCase& street, const DecideResult& result) {
    const MoneyInput input = street.input();
    CHECK(result.cost == Approx(recomputed_cost(input, result)).margin(0.005));
    CHECK(result.bound <= result.cost + 1e-9);
    CHECK(result.keep + result.rewire + result.solar <= static_cast<int>(result.poles.size()));
    std::set<PoleIx> fed;
    for (const Circuit& circuit : result.circuits)
        for (const PoleIx pole : circuit.poles) CHECK(fed.insert(pole).second);
    for (const PoleDecision& each : result.poles) {
        CHECK(fed.count(each.pole) == (each.choice == Choice::rewire ? 1 : 0));
        for (const OptionCost& each_option : each.options)
            CHECK(to_cents(each_option.cost) == to_cents(present_value(each_option.lines)));
        CHECK_FALSE(each.reason.empty());
    }
    for (const CircuitSpan& span : result.spans) {
        CHECK(span.parent < span.id);
        CHECK_FALSE(span.poles_beyond.empty());
        Cents sum = 0;
        for (const CashLine& line : span_lines(input, span, street.plan.decide_year())) sum += line.amount;
        CHECK(sum == span.cost);
        if (span.parent >= 0) {
            const CircuitSpan& parent = result.spans[static_cast<std::size_t>(span.parent)];
            for (const PoleIx pole : span.poles_beyond)
                CHECK(std::count(parent.poles_beyond.begin(), parent.poles_beyond.end(), pole) == 1);
        }
    }
}

} // namespace

TEST_CASE("decide: a lone pole beside a circuit end takes what is cheaper, its trench counted by hand") {
    StreetCase street;
    const StringIx string = street.add_string();
    street.add_street("Elm", {0, 0}, {200, 0});
    street.add_pole(string, {50, 5}, "Elm");
    street.add_service({80, 5}, ServiceKind::circuit_end);
    street.set_price("tap", 0);
    const DecideResult result = street.decide();
    check_result(street, result);
    REQUIRE(result.poles.size() == 1);

    // 30 m of verge at (45 + 2.2) a foot, one box at the pole, 800 for the circuit end; 18 % design; paid at
    // the end of year 4 of 8.
    const int year = street.plan.decide_year();
    const double trench = (30 / .3048 * (45 + 2.2) + 1200) * 1.18, end = 800 * 1.18;
    const double own = pole_option(street.input(), PoleIx(0), Choice::rewire, year).cost;
    const double solar = pole_option(street.input(), PoleIx(0), Choice::solar, year).cost;
    const double rewire = own + (trench + end) * street.plan.factor(year);
    CHECK(result.cost == Approx(std::min(rewire, solar)).margin(1));
    CHECK(result.poles[0].choice == (rewire < solar ? Choice::rewire : Choice::solar));
    CHECK(option(result.poles[0], Choice::rewire).cost == Approx(rewire).margin(1));
    CHECK(option(result.poles[0], Choice::solar).cost == solar);
    CHECK(result.bound == result.cost);
}

TEST_CASE("decide: poles too shaded for solar are rewired together, and those on the way come along only "
          "where it pays") {
    StreetCase street = one_street(30);
    street.add_service({35.0 * 14, 5.5}, ServiceKind::service);
    street.add_service({35.0 * 23, 6.5}, ServiceKind::candidate);
    for (const std::size_t i : {21U, 22U, 23U, 24U})
        street.shade.poles[i].heads[0] = {.head = "M", .eligible = false, .why = "41 nights dark a year"};
    const DecideResult result = street.decide();
    check_result(street, result);
    for (const std::size_t i : {21U, 22U, 23U, 24U}) {
        CHECK(result.poles[i].choice == Choice::rewire);
        CHECK_FALSE(option(result.poles[i], Choice::solar).possible);
    }
    CHECK(result.feasible);
    CHECK(result.solar > 0);
    CHECK(result.cost <= result.all_rewire_cost + 0.005);
    CHECK(result.cost <= result.all_solar_cost + 0.005);
    CHECK(result.cost <= result.greedy_cost + 0.005);
    CHECK(result.all_solar_not_possible == 4);
    CHECK(result.all_rewire_not_possible == 0);
}

TEST_CASE("decide: sound old conduit is pulled, its string and poles named, and its price is the "
          "chance-weighted one") {
    StreetCase street = one_street(6);
    for (Pole& pole : street.city.poles) pole.duct = Duct::proven;
    street.city.poles[3].spare_duct = true;
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.set_price("solar_head_m", 20000);
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.rewire == 6);
    int conduits = 0;
    for (const CircuitSpan& span : result.spans) {
        if (span.kind != SpanKind::conduit) continue;
        ++conduits;
        CHECK(span.duct_to.place() == span.duct_from.place() + 1);
        CHECK(span.duct_string.is_valid() == (span.duct_to != PoleIx(3)));
        // .95 x 8 + .05 x (45 + 2.2) a foot, one box, 18 % design.
        CHECK(to_dollars(span.cost) ==
              Approx(((.95 * 8 + .05 * 47.2) * 35 / .3048 + 1200) * 1.18).margin(0.03));
    }
    CHECK(conduits == 5);
    CHECK(result.trench_m < 2);
}

TEST_CASE("decide: wood poles with overhead feed take aerial spans, a tap feeds where the secondary is") {
    StreetCase street = one_street(4);
    for (Pole& pole : street.city.poles) {
        pole.pole_kind = "Wood";
        pole.feed = Feed::overhead;
    }
    street.city.poles[1].secondary_here = true;
    street.set_price("solar_head_m", 20000);
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.rewire == 4);
    CHECK(result.trench_m == 0);
    REQUIRE(result.spans.size() == 4);
    CHECK(result.spans[0].kind == SpanKind::tap);
    CHECK(result.spans[0].pole == PoleIx(1));
    for (std::size_t i = 1; i < 4; ++i) CHECK(result.spans[i].kind == SpanKind::aerial);
    REQUIRE(result.circuits.size() == 1);
    CHECK_FALSE(result.circuits[0].service.is_valid());
    CHECK(result.services_new == 0);
}

TEST_CASE("decide: a pole across the carriageway pays the crossing") {
    StreetCase street;
    const StringIx string = street.add_string();
    street.add_street("Elm", {-50, 0}, {50, 0});
    street.add_pole(string, {0, 5.5}, "Elm", false);
    street.add_pole(string, {0, -5.5}, "Elm", false);
    street.add_service({10, 5.5}, ServiceKind::circuit_end);
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.rewire == 2);
    // 10 m: bored 65 a foot + 1 800 is dearer than 110 a foot of pavement.
    const auto crossings =
        std::count_if(result.spans.begin(), result.spans.end(),
                      [](const CircuitSpan& span) { return span.kind == SpanKind::trench_paved; });
    CHECK(crossings == 1);
    street.set_price("bore_setup", 100);
    const DecideResult bored = street.decide();
    CHECK(std::count_if(bored.spans.begin(), bored.spans.end(),
                        [](const CircuitSpan& span) { return span.kind == SpanKind::bore; }) == 1);
}

TEST_CASE("decide: a corner is walked without crossing, streets that only touch are joined") {
    StreetCase street;
    const StringIx string = street.add_string();
    street.add_street("Elm", {0, 0}, {100, 0});
    street.add_street("Oak", {50, 0}, {50, 100}); // ends on Elm between its points
    street.add_pole(string, {20, 5.5}, "Elm", false);
    street.add_pole(string, {44.5, 60}, "Oak", false);
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.rewire == 2);
    for (const CircuitSpan& span : result.spans) CHECK(span.kind == SpanKind::trench_verge);
    // Along Elm to the corner at (45, 5), then up Oak.
    CHECK(result.trench_m == Approx(45 + 55 + 0.5 + 0.5 + 0.5).margin(0.6));
}

TEST_CASE("decide: marks are followed or refused with the reason, locks are followed and named where they "
          "break a check") {
    StreetCase street = one_street(8);
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.shade.poles[5].heads[0].eligible = false;
    street.shade.poles[5].heads[0].why = "41 nights dark a year";
    street.plan.poles[1].mark = Choice::solar;
    street.plan.poles[2].mark = Choice::keep;
    street.plan.poles[5].mark = Choice::solar;
    street.plan.poles[7].mark = Choice::rewire;
    street.plan.poles[6].lock = Choice::keep;
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.marks_followed == 2);
    REQUIRE(result.marks_refused.size() == 2);
    CHECK(result.marks_refused[0].pole == PoleIx(2));
    CHECK(result.marks_refused[0].reason.find("policy-end") != std::string::npos);
    CHECK(result.marks_refused[1].reason.find("41 nights") != std::string::npos);
    CHECK(result.poles[1].choice == Choice::solar);
    CHECK(result.poles[5].choice == Choice::rewire);
    CHECK(result.poles[6].choice == Choice::keep);
    CHECK(result.poles[7].choice == Choice::rewire);
    CHECK(result.keep == 1);
    CHECK(std::count_if(result.findings.begin(), result.findings.end(),
                        [](const Finding& each) { return each.code == "policy-end"; }) == 1);

    street.plan.poles[5].mark = Choice::undecided;
    street.plan.poles[5].lock = Choice::solar;
    const DecideResult locked = street.decide();
    CHECK(locked.poles[5].choice == Choice::solar);
    CHECK(std::count_if(locked.findings.begin(), locked.findings.end(),
                        [](const Finding& each) { return each.code == "lock-breaks-check"; }) == 1);
}

TEST_CASE("decide: a pole with no possible option is an error, the others are decided all the same") {
    StreetCase street = one_street(3);
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.city.poles[1].solar_ok = false;
    street.city.poles[1].place = {40000, 40000}; // nothing leads there
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK_FALSE(result.feasible);
    CHECK(result.poles[1].choice == Choice::undecided);
    REQUIRE(std::count_if(result.findings.begin(), result.findings.end(),
                          [](const Finding& each) { return each.severity == Severity::error; }) == 1);
    for (const Finding& each : result.findings)
        if (each.severity == Severity::error) CHECK((each.code == "no-way" && each.record == "01-002"));
    CHECK(result.poles[0].choice != Choice::undecided);
    CHECK(result.poles[2].choice != Choice::undecided);
}

TEST_CASE("decide: without a service nothing can be rewired, and that is said of each pole") {
    StreetCase street = one_street(3);
    street.shade.poles[2].heads[0] = {.head = "M", .eligible = false, .why = "41 nights dark a year"};
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.solar == 2);
    CHECK_FALSE(result.feasible);
    CHECK(std::count_if(result.findings.begin(), result.findings.end(),
                        [](const Finding& each) { return each.code == "pole-unreached"; }) == 3);
    CHECK(std::count_if(result.findings.begin(), result.findings.end(),
                        [](const Finding& each) { return each.code == "no-way"; }) == 1);
}

TEST_CASE("decide: strings that must stay are kept, the others end") {
    StreetCase street = one_street(4);
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    const StringIx second = street.add_string();
    street.add_pole(second, {20, -5.5}, "Elm");
    street.plan.settings.policy = Policy::must_stay;
    street.plan.settings.must_stay = {"S-02"};
    const DecideResult result = street.decide();
    check_result(street, result);
    CHECK(result.keep == 1);
    CHECK(result.poles[4].choice == Choice::keep);
}

TEST_CASE("decide: an empty city is decided at no cost, and a cancelled run is a fault") {
    const StreetCase nothing;
    const DecideResult result = nothing.decide();
    CHECK(result.cost == 0);
    CHECK(result.bound == 0);
    CHECK(result.poles.empty());

    const std::atomic<bool> cancel{true};
    Progress progress;
    progress.cancel = &cancel;
    const StreetCase street = one_street(5);
    const auto stopped = decide_city(street.input(), progress);
    REQUIRE_FALSE(stopped);
    CHECK(stopped.error().code == FaultCode::cancelled);
}

TEST_CASE("decide: on random towns the plan is never dearer than all rewire, all solar or each pole for "
          "itself, nor under its bound") {
    const unsigned seed = 4711;
    std::mt19937 random(seed);
    const auto below = [&](unsigned n) { return static_cast<int>(random() % n); };
    for (int town = 0; town < 12; ++town) {
        StreetCase street;
        for (int i = 0; i < 4; ++i) {
            street.add_street("A" + std::to_string(i), {-30, 120.0 * i}, {400, 120.0 * i},
                              i % 2 ? Surface::paved : Surface::verge);
            street.add_street("B" + std::to_string(i), {120.0 * i, -30}, {120.0 * i, 400});
        }
        for (int s = 0; s < 4; ++s) {
            const StringIx string = street.add_string();
            for (int i = 0; i < 11; ++i) {
                const PoleIx pole =
                    street.add_pole(string, {35.0 * i, 120.0 * s + (below(4) == 0 ? -6.0 : 6.0)},
                                    "A" + std::to_string(s), below(4) != 0);
                street.city.poles[pole.place()].duct = static_cast<Duct>(below(6));
            }
        }
        for (int i = 0; i < 5; ++i)
            street.add_service({below(380) * 1.0, below(380) * 1.0}, static_cast<ServiceKind>(below(3)));
        const DecideResult result = street.decide();
        INFO("seed " << seed << " town " << town);
        check_result(street, result);
        CHECK(result.cost <= result.all_rewire_cost + 0.005);
        CHECK(result.cost <= result.all_solar_cost + 0.005);
        CHECK(result.cost <= result.greedy_cost + 0.005);
        const DecideResult again = street.decide();
        CHECK(again.cost == result.cost);
        CHECK(again.spans.size() == result.spans.size());
        for (std::size_t i = 0; i < result.poles.size(); ++i)
            CHECK(again.poles[i].choice == result.poles[i].choice);
    }
}
