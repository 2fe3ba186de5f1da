#include <catch2/catch.hpp>

#include "tests/model/orders/orders_case.h"

using namespace unstring;

TEST_CASE("orders: pieces of one span on the way to a pole are one line of its work") {
    OrdersCase test;
    // The trench to 04-001 in two pieces, with a bare street point between.
    CircuitSpan first = test.decide.spans[0];
    first.id = 4;
    first.pole = PoleIx();
    first.length_m = 25;
    first.boxes = 0;
    test.decide.spans.push_back(first);
    test.decide.spans[0].parent = 4;
    test.decide.spans[0].length_m = 15;
    for (const WorkOrder& order : test.orders(2028))
        for (const OrderPole& pole : order.poles) {
            if (pole.id != "04-001") continue;
            if (order.crew == Crew::civil)
                CHECK(pole.task == "trench in verge 40 m from service SVC-1, 1 pull box");
            if (order.crew == Crew::electric)
                CHECK(pole.task == "base: splice, fuse, bond; wire AWG 8, 40 m from service SVC-1");
        }
}
