#include "model/vet/wiring_order.h"

#include <algorithm>
#include <numeric>
#include <random>

#include <catch2/catch.hpp>

#include "model/series/loop_geometry.h"
#include "tests/model/series/city_for_tests.h"

namespace unstring {
namespace {

using namespace for_tests;

SettledOrder settle(const City& city) {
    return settle_order(city, extent_of(city), StreetIndex(city.streets), StringIx(0),
                        lamps_by_string(city)[0]);
}

double loop_m(const City& city, const std::vector<PoleIx>& wiring) {
    const auto places = loop_places(city, extent_of(city), StringIx(0), wiring);
    const std::vector<double> legs_m = straight_legs_m(places);
    return std::accumulate(legs_m.begin(), legs_m.end(), 0.0);
}

/// Share of neighbour pairs of the true order 1..n that the settled order has.
double pairs_kept(const std::vector<PoleIx>& wiring) {
    int kept = 0;
    for (std::size_t i = 1; i < wiring.size(); ++i) {
        const long apart = static_cast<long>(wiring[i].place()) - static_cast<long>(wiring[i - 1].place());
        kept += apart == 1 || apart == -1 ? 1 : 0;
    }
    return kept / static_cast<double>(wiring.size() - 1);
}

void rename_at_random(City& city, std::mt19937& random) {
    std::vector<int> names(city.poles.size());
    std::iota(names.begin(), names.end(), 1);
    std::shuffle(names.begin(), names.end(), random);
    for (std::size_t i = 0; i < names.size(); ++i) city.poles[i].id = "X" + std::to_string(names[i]);
}

} // namespace

TEST_CASE("wiring order: an out-and-back string without numbers is found again by its geometry") {
    std::mt19937 random(7);
    City city = out_and_back(40, 10);
    rename_at_random(city, random);
    for (Pole& pole : city.poles) pole.order.reset();
    const SettledOrder settled = settle(city);
    CHECK(settled.from == OrderFrom::inferred);
    CHECK(settled.wiring.size() == 40);
    CHECK(pairs_kept(settled.wiring) == 1);
    CHECK(settled.confidence_frac > 0.8);
}

TEST_CASE("wiring order: pole numbers are followed where their way is as short as the shortest found") {
    City city = out_and_back(40, 10);
    for (Pole& pole : city.poles) pole.order.reset();
    const SettledOrder settled = settle(city);
    for (std::size_t i = 0; i < 40; ++i) CHECK(settled.wiring[i] == PoleIx(i));
}

TEST_CASE(
    "wiring order: on 60 random rings without numbers the loop is at most 2 % longer than the true one") {
    const unsigned seed = 77;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> jitter(-12, 12);
    for (int round = 0; round < 60; ++round) {
        City city = out_and_back(std::uniform_int_distribution<int>(4, 60)(random) * 2, 10);
        for (Pole& pole : city.poles)
            pole.place = {pole.place.x_m + jitter(random), pole.place.y_m * 5 + jitter(random)};
        std::vector<PoleIx> as_built(city.poles.size());
        for (std::size_t i = 0; i < as_built.size(); ++i) as_built[i] = PoleIx(i);
        rename_at_random(city, random);
        for (Pole& pole : city.poles) pole.order.reset();
        const SettledOrder settled = settle(city);
        CAPTURE(round, city.poles.size());
        REQUIRE(settled.wiring.size() == city.poles.size());
        CHECK(loop_m(city, settled.wiring) <= 1.02 * loop_m(city, as_built));
        CHECK(settled.confidence_frac > 0);
        CHECK(settled.confidence_frac <= 1);
    }
}

TEST_CASE(
    "wiring order: given numbers keep their sequence, and lamps without one fill the gaps in the numbering") {
    const unsigned seed = 5;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    for (int round = 0; round < 40; ++round) {
        City city = out_and_back(30, 10);
        std::vector<std::optional<int>> as_given;
        for (Pole& pole : city.poles) {
            if (std::uniform_int_distribution<int>(0, 3)(random) == 0) pole.order.reset();
            as_given.push_back(pole.order);
        }
        const SettledOrder settled = settle(city);
        REQUIRE(settled.wiring.size() == 30);
        for (std::size_t i = 0; i < 30; ++i)
            if (as_given[settled.wiring[i].place()])
                REQUIRE(*as_given[settled.wiring[i].place()] == static_cast<int>(i) + 1);
        CHECK(loop_m(city, settled.wiring) <=
              1.0001 * loop_m(city, lamps_by_string(out_and_back(30, 10))[0]));
    }
}

TEST_CASE("wiring order: with numbers in tens the others go where they lengthen the loop least") {
    City city = out_and_back(20, 10);
    for (Pole& pole : city.poles) pole.order = *pole.order * 10;
    city.poles[7].order.reset();
    city.poles[12].order.reset();
    const SettledOrder settled = settle(city);
    CHECK(settled.from == OrderFrom::partial);
    for (std::size_t i = 0; i < 20; ++i) CHECK(settled.wiring[i] == PoleIx(i));
    CHECK(settled.confidence_frac > 0.9);
}

TEST_CASE("wiring order: lamps without a place come last, a string of one lamp is settled") {
    City city = out_and_back(10, 10);
    for (Pole& pole : city.poles) pole.order.reset();
    city.poles[3].has_place = false;
    CHECK(settle(city).wiring.back() == PoleIx(3));
    City single = out_and_back(2, 10);
    single.poles.pop_back();
    single.poles[0].order.reset();
    CHECK(settle(single).wiring == std::vector<PoleIx>{PoleIx(0)});
    single.poles[0].has_place = false;
    CHECK(settle(single).wiring == std::vector<PoleIx>{PoleIx(0)});
}

TEST_CASE("wiring order: without a station the order is still found") {
    std::mt19937 random(3);
    City city = out_and_back(40, 10);
    rename_at_random(city, random);
    for (Pole& pole : city.poles) pole.order.reset();
    city.strings[0].station.reset();
    CHECK(pairs_kept(settle(city).wiring) > 0.9);
}

TEST_CASE("wiring order: a carriageway between makes the neighbour on the same side the nearer one") {
    City city;
    city.strings = {string_row("S-1", {-10, 0})};
    // two rows of lamps 20 m apart, lamps every 25 m: without the street the zigzag is shorter
    for (int i = 0; i < 12; ++i)
        city.poles.push_back(pole_row("X" + std::to_string(i * 5 % 12), StringIx(0), "S-1", i + 1,
                                      {25.0 * (i / 2), i % 2 == 0 ? 0.0 : 20.0}));
    for (Pole& pole : city.poles) pole.order.reset();
    Street street;
    street.line = {{-50, 10}, {300, 10}};
    city.streets = {street};
    int crossings = 0;
    const std::vector<PoleIx> wiring = settle(city).wiring;
    for (std::size_t i = 1; i < wiring.size(); ++i)
        crossings +=
            city.poles[wiring[i].place()].place.y_m != city.poles[wiring[i - 1].place()].place.y_m ? 1 : 0;
    CHECK(crossings == 1);
}

} // namespace unstring
