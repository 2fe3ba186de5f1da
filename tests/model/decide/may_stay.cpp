#include "model/decide/may_stay.h"

#include <catch2/catch.hpp>

#include <algorithm>

#include "model/decide/services_anywhere.h"
#include "tests/model/decide/street_case.h"

using namespace unstring;

namespace {

/// Two strings on one street: the second one's conversion is dear or not, by the price of its solar heads.
StreetCase two_strings() {
    StreetCase street = one_street(6);
    const StringIx second = street.add_string();
    street.add_street("Oak", {0, 400}, {300, 400}, Surface::paved);
    for (int i = 0; i < 6; ++i) street.add_pole(second, {35.0 * i, 405.5}, "Oak");
    street.add_service({0, 5.5}, ServiceKind::circuit_end);
    street.plan.settings.policy = Policy::may_stay;
    return street;
}

double with_strings(const StreetCase& street, const DecideResult& result) {
    std::vector<PoleCase> cases;
    for (const PoleDecision& each : result.poles) {
        cases.emplace_back();
        cases.back().pole = each.pole;
        if (each.choice == Choice::keep) cases.back().mode = Mode::keep;
    }
    return recomputed_cost(street.input(), result) + to_dollars(sum_of(string_costs(street.input(), cases)));
}

} // namespace

TEST_CASE("may stay: where conversion is dear the strings stay, where keeping is dear they end; the cost "
          "holds their own cash") {
    StreetCase street = two_strings();
    street.set_price("solar_head_m", 60000);
    street.set_price("trench_soft", 600);
    street.set_price("trench_paved", 900);
    street.set_price("emergency_factor", 0.01);
    street.set_price("upkeep_series", 1);
    street.set_price("pull_box", 20000);
    // The conversion owed at the horizon is the larger part of keeping; a low rate of failure leaves it as it
    // is.
    const DecideResult stays = street.decide();
    CHECK(stays.cost == Approx(with_strings(street, stays)).margin(0.005));
    CHECK(stays.bound <= stays.cost + 1e-9);
    CHECK(stays.keep > 0);

    StreetCase dear = two_strings();
    dear.set_price("upkeep_series", 4000);
    const DecideResult ends = dear.decide();
    CHECK(ends.keep == 0);
    CHECK(ends.cost == Approx(with_strings(dear, ends)).margin(0.005));
    CHECK(ends.bound <= ends.cost + 1e-9);
}

TEST_CASE("may stay: whole strings stay, a mark to rewire on one of them is followed all the same") {
    StreetCase street = two_strings();
    street.set_price("solar_head_m", 60000);
    street.set_price("trench_soft", 600);
    street.set_price("trench_paved", 900);
    street.set_price("pull_box", 20000);
    street.plan.poles[0].mark = Choice::rewire;
    const DecideResult result = street.decide();
    CHECK(result.poles[0].choice == Choice::rewire);
    CHECK(result.marks_followed == 1);
    for (const std::size_t first : {1U, 6U})
        for (std::size_t i = first; i < (first == 1 ? 6U : 12U); ++i)
            if (result.poles[first].choice == Choice::keep) CHECK(result.poles[i].choice == Choice::keep);
    CHECK(result.bound <= result.cost + 1e-9);
}

TEST_CASE("may stay: a keep mark is followed, and a pole without another option stays") {
    StreetCase street = two_strings();
    street.plan.poles[7].mark = Choice::keep;
    street.city.poles[3].owner = Owner::utility;
    street.city.poles[3].consent = false;
    const DecideResult result = street.decide();
    CHECK(result.poles[7].choice == Choice::keep);
    CHECK(result.poles[3].choice == Choice::keep);
    CHECK(result.feasible);
    CHECK(result.marks_refused.empty());
    CHECK(result.bound <= result.cost + 1e-9);
}

TEST_CASE(
    "services anywhere: candidates at poles, none nearer than 150 m to another, the same city twice over") {
    const StreetCase street = one_street(30);
    const City once = with_services_anywhere(street.city), twice = with_services_anywhere(once);
    CHECK(once.services.size() >= 6);
    CHECK(twice.services.size() == once.services.size());
    for (std::size_t i = 0; i < once.services.size(); ++i) {
        CHECK(once.services[i].kind == ServiceKind::candidate);
        CHECK(once.services[i].id == "anywhere-" + once.services[i].pole_given);
        for (std::size_t j = 0; j < i; ++j)
            CHECK(distance_m(once.services[i].place, once.services[j].place) >= 150);
    }
    StreetCase dear = street;
    dear.city = once;
    dear.set_price("solar_head_m", 20000);
    const DecideResult result = dear.decide();
    CHECK(result.rewire == 30);
    CHECK(result.services_new == static_cast<int>(result.circuits.size()));
    CHECK(result.cost == Approx(recomputed_cost(dear.input(), result)).margin(0.005));
}
