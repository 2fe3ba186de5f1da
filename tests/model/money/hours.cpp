#include "model/money/hours.h"

#include <catch2/catch.hpp>

#include "tests/support/default_prices.h"

using namespace unstring;

TEST_CASE("hours: a pole's hours are its share of a crew-day times people times 8") {
    const PriceBook prices = default_prices();
    Pole pole;
    pole.epa_allow_m2 = 1;
    const TaskHours rewire = pole_hours(prices, pole, Choice::rewire, 2027);
    CHECK(rewire.lighting == Approx(2 * 8 / 14.0));
    CHECK(rewire.electric == Approx(2 * 8 / 8.0));
    CHECK(rewire.civil == 0);
    CHECK(pole_hours(prices, pole, Choice::solar, 2027).lighting == Approx(2 * 8 / 6.0));
    CHECK(pole_hours(prices, pole, Choice::keep, 2027).lighting == 0);
    pole.epa_allow_m2.reset();
    CHECK(pole_hours(prices, pole, Choice::solar, 2027).lighting == Approx(16 / 6.0 + 16 / 20.0));
    CHECK(pole_hours(prices, pole, Choice::solar, 2027).civil == Approx(.3 / 2.5 * 4 * 8));
}

TEST_CASE("hours: spans go by their length and ground, taps and services by the piece") {
    const PriceBook prices = default_prices();
    const double m = 0.3048;
    const TaskHours verge = span_hours(prices, SpanWork::trench_verge, 150 * m, 2027);
    CHECK(verge.civil == Approx(32));
    CHECK(verge.electric == Approx(150 / 400.0 * 16));
    CHECK(span_hours(prices, SpanWork::trench_paved, 70 * m, 2027).civil == Approx(32));
    CHECK(span_hours(prices, SpanWork::bore, 250 * m, 2027).civil == Approx(32));
    CHECK(span_hours(prices, SpanWork::conduit, 1200 * m, 2027, 1).civil == Approx(32));
    CHECK(span_hours(prices, SpanWork::conduit, 150 * m, 2027, .5).civil == Approx(150 / 1200.0 * 32 + 16));
    CHECK(span_hours(prices, SpanWork::tap, 0, 2027).electric == Approx(16 / 6.0));
    CHECK(span_hours(prices, SpanWork::service, 0, 2027).electric == Approx(32));
    CHECK(span_hours(prices, SpanWork::aerial, 600 * m, 2027).civil == 0);
}

TEST_CASE("hours: the line crew waits for one clearance on each day begun") {
    const PriceBook prices = default_prices();
    CHECK(string_hours(prices, 0, 0, 0, 2027).line == 0);
    CHECK(string_hours(prices, 8, 0, 0, 2027).line == Approx(24 + 6));
    CHECK(string_hours(prices, 8, 4, 0, 2027).line == Approx(48 + 12));
    CHECK(string_hours(prices, 9, 0, 1, 2027).line == Approx(9 / 8.0 * 24 + 24 + 18));
}
