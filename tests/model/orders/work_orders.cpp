#include "model/orders/work_order.h"

#include <algorithm>
#include <map>
#include <set>

#include <catch2/catch.hpp>

#include "tests/model/orders/orders_case.h"

using namespace unstring;

namespace {

const WorkOrder& find(const std::vector<WorkOrder>& orders, const std::string& id) {
    const auto at =
        std::find_if(orders.begin(), orders.end(), [&](const WorkOrder& order) { return order.id == id; });
    if (at == orders.end()) throw std::runtime_error("no order " + id);
    return *at;
}

std::size_t step_with(const WorkOrder& order, const std::string& words) {
    for (std::size_t i = 0; i < order.steps.size(); ++i)
        if (order.steps[i].text.find(words) != std::string::npos) return i;
    throw std::runtime_error("no step with " + words);
}

std::string fact(const WorkOrder& order, const std::string& label) {
    for (const auto& [name, text] : order.facts)
        if (name == label) return text;
    return "no such fact";
}

double quantity(const WorkOrder& order, const std::string& what) {
    for (const Material& material : order.materials)
        if (material.what == what) return material.quantity;
    return 0;
}

} // namespace

TEST_CASE("orders: every pole is in exactly one line order and one lighting order of its year, rewired ones "
          "in one electric order") {
    const OrdersCase test;
    std::map<std::pair<Crew, std::string>, int> seen;
    for (const WorkOrder& order : test.orders())
        for (const OrderPole& pole : order.poles) {
            ++seen[{order.crew, pole.id}];
            CHECK(order.year == test.plan.poles[pole.pole.place()].year);
        }
    for (std::size_t i = 0; i < test.city.poles.size(); ++i) {
        const std::string& id = test.city.poles[i].id;
        const bool is_rewire = test.plan.poles[i].choice == Choice::rewire;
        CHECK(seen[{Crew::line, id}] == 1);
        CHECK(seen[{Crew::lighting, id}] == 1);
        CHECK(seen[{Crew::electric, id}] == (is_rewire ? 1 : 0));
        CHECK(seen[{Crew::civil, id}] == (is_rewire || i == 2 ? 1 : 0)); // 04-003: its strength is unknown
    }
}

TEST_CASE("orders: the hours of all orders are the hours of the ledger, year by year and crew by crew") {
    const OrdersCase test;
    const PhaseResult phase = test.phase();
    std::map<std::pair<int, Crew>, double> hours;
    for (const WorkOrder& order : test.orders()) hours[{order.year, order.crew}] += order.hours;
    REQUIRE(phase.years.size() == 3);
    for (const PhaseYear& year : phase.years) {
        INFO(year.year);
        CHECK(hours[{year.year, Crew::line}] == Approx(year.hours.line).margin(1e-9));
        CHECK(hours[{year.year, Crew::civil}] == Approx(year.hours.civil).margin(1e-9));
        CHECK(hours[{year.year, Crew::lighting}] == Approx(year.hours.lighting).margin(1e-9));
        CHECK(hours[{year.year, Crew::electric}] == Approx(year.hours.electric).margin(1e-9));
    }
    CHECK(phase.years[0].hours.line > 0);
    CHECK(phase.years[1].hours.civil > 0);
}

TEST_CASE("orders: the line order goes through its steps in the order that keeps people alive, hold points "
          "marked") {
    const auto orders = OrdersCase().orders();
    const WorkOrder& line = find(orders, "2027-S-04-line");
    const char* words[] = {"Identify string S-04",
                           "Job briefing",
                           "Traffic control set",
                           "before the work",
                           "Switching clearance received",
                           "Control off; primary open, locked, tagged",
                           "Test dead",
                           "Ground both conductors",
                           "Identify the cable electrically",
                           "Jumper before cutting, never the reverse",
                           "Cut, cap and tag",
                           "Take off the jumpers",
                           "All clear of the cable",
                           "Transformer leads off the loop",
                           "Release the clearance",
                           "Amperes within 6.40-6.70 A or stop",
                           "Contact voltage",
                           "as built"};
    std::size_t before = 0;
    for (const char* each : words) {
        INFO(each);
        const std::size_t at = step_with(line, each);
        CHECK(at >= before);
        before = at;
    }
    for (const char* each : {"Switching clearance received", "Control off", "Test dead", "Ground both",
                             "Identify the cable electrically", "Transformer leads off", "Amperes within"})
        CHECK(line.steps[step_with(line, each)].hold_point);
}

TEST_CASE("orders: the line order carries the planned change, one lamp's volts, the band and the "
          "open-circuit estimate") {
    const OrdersCase test;
    const PhaseResult phase = test.phase();
    const auto orders = test.orders();
    const WorkOrder& line = find(orders, "2027-S-04-line");
    const auto state = [&](int year) {
        return *std::find_if(phase.string_years.begin(), phase.string_years.end(),
                             [&](const StringYear& each) { return each.year == year; });
    };
    CHECK(line.planned_volts_before == state(2026).volts);
    CHECK(line.planned_volts_after == state(2027).volts);
    CHECK(line.planned_volts_after < line.planned_volts_before);
    CHECK(line.lamp_volts == Approx(188 / (6.6 * .9)));
    CHECK(line.open_circuit_v == Approx(1.4 * 5000 / 6.6));
    CHECK(line.open_circuit_is_estimate);
    CHECK(fact(line, "open-circuit kV") == "1.1 (estimate)");
    CHECK(fact(line, "approach distance, gloves") == "0.63 m, glove class 1");
    CHECK(fact(line, "primary circuit") == "F-2");
    CHECK(fact(line, "cut-backs") == "04-002 to 04-007");
    CHECK(line.unit_id == "T-01");
}

TEST_CASE("orders: behind a cut-back the cable is dead, without one it stays live in the bases and every "
          "order says so") {
    OrdersCase test;
    for (const WorkOrder& order : test.orders(2027))
        for (const OrderPole& pole : order.poles)
            CHECK(pole.warning.find("live series cable") == std::string::npos);
    test.city.cutbacks.clear();
    for (std::size_t i = 0; i < 8; ++i)
        test.city.poles[i].place.y_m *= 10; // legs too far apart for a cut-back found by nearness
    const auto orders = test.orders(2027);
    for (const char* id : {"2027-S-04-line", "2027-S-04-lighting"})
        for (const OrderPole& pole : find(orders, id).poles)
            CHECK(pole.warning.find("live series cable in base: line crew opens") != std::string::npos);
    CHECK(quantity(find(orders, "2027-S-04-line"), "jumper for a pole base") == 4);
}

TEST_CASE("orders: the last lamps end the string: terminals shorted, the unit out, nothing re-energised") {
    const auto orders = OrdersCase().orders(2028);
    const WorkOrder& line = find(orders, "2028-S-04-line");
    CHECK(line.planned_volts_after == 0);
    CHECK(line.steps[step_with(line, "shorted, grounded and tagged")].hold_point);
    CHECK(step_with(line, "Oil of the transformer sampled") < step_with(line, "Take transformer T-01 out"));
    CHECK_THROWS(step_with(line, "re-energise"));
}

TEST_CASE("orders: crews wait for each other: duct for the dead cable, wire for duct and line, lights for "
          "all of them") {
    const auto orders = OrdersCase().orders(2028);
    CHECK(find(orders, "2028-S-04-line").after.empty());
    CHECK(find(orders, "2028-S-04-civil").after == std::vector<std::string>{"2028-S-04-line"});
    CHECK(find(orders, "2028-S-04-electric").after ==
          std::vector<std::string>{"2028-S-04-civil", "2028-S-04-line"});
    CHECK(find(orders, "2028-S-04-lighting").after ==
          std::vector<std::string>{"2028-S-04-civil", "2028-S-04-electric", "2028-S-04-line"});
}

TEST_CASE("orders: no order waits for itself, for one that does not exist, or in a circle") {
    const auto orders = OrdersCase().orders();
    std::set<std::string> done;
    for (std::size_t round = 0; round < orders.size(); ++round)
        for (const WorkOrder& order : orders)
            if (std::all_of(order.after.begin(), order.after.end(),
                            [&](const std::string& id) { return done.count(id) != 0; }))
                done.insert(order.id);
    CHECK(done.size() == orders.size());
}

TEST_CASE("orders: materials are what the work takes") {
    const auto orders = OrdersCase().orders();
    CHECK(quantity(find(orders, "2027-S-04-lighting"), "solar head SOL-M") == 4);
    CHECK(quantity(find(orders, "2028-S-04-lighting"), "LED luminaire LED-9") == 4);
    CHECK(quantity(find(orders, "2028-S-04-civil"), "conduit") == 120);
    CHECK(quantity(find(orders, "2028-S-04-civil"), "pull box") == 4);
    CHECK(quantity(find(orders, "2028-S-04-electric"), "wire, three conductors AWG 8 and ground") == 160);
    CHECK(quantity(find(orders, "2027-S-04-line"), "series cable, AWG 8, 5 kV") == 12);
}

TEST_CASE("orders: lighting-circuit orders carry planned volts and name the pole with the fewest") {
    const auto orders = OrdersCase().orders();
    const WorkOrder& electric = find(orders, "2028-S-04-electric");
    for (const OrderPole& pole : electric.poles)
        CHECK(pole.volts == Approx(240 - .1 * (static_cast<double>(pole.pole.place()) + 1)));
    CHECK(electric.steps[step_with(electric, "last pole (04-008): 239.2 V planned")].hold_point);
}

TEST_CASE("orders: one year and one crew answer that part alone, the same orders as in the whole") {
    const OrdersCase test;
    const Crew crew = Crew::lighting;
    const auto part = test.orders(2027, &crew);
    REQUIRE(part.size() == 1);
    const auto all = test.orders();
    CHECK(part[0].poles.size() == find(all, "2027-S-04-lighting").poles.size());
    CHECK(part[0].after == find(all, "2027-S-04-lighting").after);
    CHECK(part[0].poles[0].task.find("panel facing 190 deg true, tilt 15 deg") != std::string::npos);
}

TEST_CASE("orders: another owner's pole opens each order with the consent as a hold point") {
    OrdersCase test;
    test.city.poles[3].owner = Owner::utility;
    for (const WorkOrder& order : test.orders(2027)) {
        if (order.crew == Crew::civil) continue;
        CHECK(order.steps.front().hold_point);
        CHECK(order.steps.front().text == "Owner's consent in writing; without it no work at 04-004");
    }
    test.city.poles[3].consent = true;
    for (const WorkOrder& order : test.orders(2027))
        CHECK(order.steps.front().text.find("consent") == std::string::npos);
}

TEST_CASE("orders: the sketch's beads are the whole loop in wiring order") {
    const auto orders = OrdersCase().orders(2027);
    const auto& loop = orders.front().loop;
    REQUIRE(loop.size() == 8);
    for (std::size_t i = 0; i < 8; ++i) {
        const bool is_far = i >= 2 && i <= 5;
        CHECK(loop[i].leaves_now == is_far);
        CHECK(loop[i].burns_after == !is_far);
        CHECK(loop[i].cable_live_after == !is_far);
    }
}
