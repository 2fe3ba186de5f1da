#include "model/orders/survey.h"

#include <limits>

#include <catch2/catch.hpp>

#include "tests/model/orders/orders_case.h"

using namespace unstring;

TEST_CASE("survey: what knowing is worth, worked by hand") {
    // Good 80, bad 120, even odds, other 105: blind 100; known: half at 80, half at 105 = 92.5.
    CHECK(what_knowing_is_worth(.5, 120, 80, 105) == Approx(7.5));
    // The other way costs more than the bad outcome: nothing would change.
    CHECK(what_knowing_is_worth(.5, 120, 80, 130) == 0);
    // The other way is cheaper than the good outcome: likewise.
    CHECK(what_knowing_is_worth(.5, 120, 80, 70) == 0);
    CHECK(what_knowing_is_worth(.5, 120, 80, std::numeric_limits<double>::infinity()) == 0);
}

TEST_CASE("survey: unknown poles, ducts that are reused and questions of the string, in the year before the "
          "first") {
    OrdersCase test;
    for (PoleDecision& decision : test.decide.poles) {
        decision.options[1].cost = 9000;
        decision.options[2].cost = 8500;
    }
    const auto orders = survey_orders(test.input(), test.decide);
    REQUIRE(orders.size() == 3);
    for (const WorkOrder& order : orders) CHECK(order.year == 2026);
    CHECK(orders[0].id == "2026-S-04-line");
    std::string questions;
    for (const OrderStep& step : orders[0].steps) questions += step.text + "\n";
    CHECK(questions.find("oil sample of T-01") != std::string::npos);
    CHECK(questions.find("nameplate of T-01: open-circuit volts") != std::string::npos);
    CHECK(questions.find("read amperes and volts") != std::string::npos);
    CHECK(questions.find("trace the loop") == std::string::npos);
    REQUIRE(orders[1].crew == Crew::civil);
    REQUIRE(orders[1].poles.size() == 1);
    CHECK(orders[1].poles[0].task.find("prove the old duct, 40 m, noted as assumed") == 0);
    REQUIRE(orders[2].crew == Crew::lighting);
    REQUIRE(orders[2].poles.size() == 1);
    CHECK(orders[2].poles[0].id == "04-003");
    CHECK(orders[2].hours == Approx(16 / 20.0));
}
