#include "model/vet/vet_result.h"

#include <random>

#include <catch2/catch.hpp>

#include "tests/model/series/city_for_tests.h"
#include "tests/model/vet/findings_for_tests.h"

namespace unstring {
namespace {

using namespace for_tests;

/// Three strings of 30 lamps, each damaged in one of the ways that an inventory is.
City damaged_city(std::mt19937& random) {
    const auto whole = [&](int low, int high) {
        return std::uniform_int_distribution<int>(low, high)(random);
    };
    City city;
    for (int s = 0; s < 3; ++s) {
        City one = out_and_back(30, 10);
        const StringIx string(static_cast<std::size_t>(s));
        const std::string id = "S-" + std::to_string(s + 1);
        city.strings.push_back(string_row(id, {500000, 3760010 + 200.0 * s}));
        city.strings.back().from.row = 2 + s;
        for (Pole pole : one.poles) {
            pole.id = id + "/" + pole.id;
            pole.string = string;
            pole.string_given = id;
            pole.place = {500000 + pole.place.x_m, 3760000 + 200.0 * s + pole.place.y_m};
            pole.from.row += 100L * s;
            city.poles.push_back(pole);
        }
        city.transformers.push_back(unit_row("T-" + std::to_string(s), whole(5, 15), string, id));
        city.transformers.back().from.row = 2 + s;
    }
    for (int k = 0; k < 12; ++k) {
        Pole& pole = city.poles[static_cast<std::size_t>(whole(0, 89))];
        Transformer& unit = city.transformers[static_cast<std::size_t>(whole(0, 2))];
        switch (whole(0, 9)) {
        case 0:
            pole.has_place = false;
            break;
        case 1:
            std::swap(pole.place.x_m, pole.place.y_m);
            break;
        case 2:
            pole.string = {};
            pole.string_given = "S-77";
            break;
        case 3:
            pole.order = whole(1, 30);
            break;
        case 4:
            pole.id = city.poles[static_cast<std::size_t>(whole(0, 89))].id;
            break;
        case 5:
            pole.place.x_m += 50000;
            break;
        case 6:
            unit.output_a = 20;
            break;
        case 7:
            unit.strings.push_back(StringIx(static_cast<std::size_t>(whole(0, 2))));
            break;
        case 8:
            city.strings[static_cast<std::size_t>(whole(0, 2))].cable_kv = 1;
            break;
        case 9:
            pole.fixture = "?";
            pole.order.reset();
            break;
        }
    }
    return city;
}

} // namespace

TEST_CASE(
    "set aside: after the errors' records are set aside a second vet finds no error, on 200 damaged cities") {
    const unsigned seed = 321;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    long with_errors = 0;
    for (int round = 0; round < 200; ++round) {
        const City city = damaged_city(random);
        const VetResult first = vet_city(city, catalog());
        const City kept = set_aside_errors(city, first.findings);
        const VetResult second = vet_city(kept, catalog());
        CAPTURE(round, codes_in(first.findings), codes_in(second.findings));
        REQUIRE(errors_in(second.findings) == 0);
        REQUIRE(kept.poles.size() == city.poles.size());
        with_errors += errors_in(first.findings) > 0 ? 1 : 0;
    }
    CHECK(with_errors > 150);
}

TEST_CASE("set aside: a string set aside takes its poles along, warnings set nothing aside") {
    City city = out_and_back(10, 10);
    const City same =
        set_aside_errors(city, {make_finding("load-low", "circuits.csv", 2, "S-1", "", "", "", "circuits")});
    CHECK_FALSE(same.strings[0].set_aside);
    const City without =
        set_aside_errors(city, {make_finding("load-over", "circuits.csv", 2, "S-1", "", "", "", "circuits")});
    CHECK(without.strings[0].set_aside);
    for (const Pole& pole : without.poles) CHECK(pole.set_aside);
}

TEST_CASE(
    "set aside: a finding without a row names the record by its id, one with a row only what stands there") {
    City city = out_and_back(10, 10);
    const Finding by_id = make_finding("number-unreadable", "poles.csv", 0, "P-3", "", "", "", "poles");
    CHECK(set_aside_errors(city, {by_id}).poles[2].set_aside);
    const City by_row =
        set_aside_errors(city, {make_finding("row-broken", "poles.csv", 99, "P-3", "", "", "", "poles"),
                                make_finding("pole-id-twice", "other.csv", 4, "P-3", "", "", "", "poles"),
                                make_finding("number-unreadable", "poles.csv", 6, "", "", "", "", "poles")});
    CHECK_FALSE(by_row.poles[2].set_aside);
    CHECK(by_row.poles[4].set_aside);
}

TEST_CASE(
    "with wiring: the settled order is written, and what the file did not give stays marked as inferred") {
    City city = out_and_back(10, 10);
    city.poles[4].order.reset();
    const VetResult result = vet_city(city, catalog());
    const City wired = with_wiring(city, result.strings);
    CHECK(wired.poles[4].order == 5);
    CHECK(wired.poles[4].order_is_inferred);
    CHECK_FALSE(wired.poles[3].order_is_inferred);
    CHECK(wired.strings[0].order_confidence_frac == result.strings[0].order_confidence_frac);
    CHECK(string_loops(wired, catalog())[0].order_from == OrderFrom::partial);
    const VetResult again = vet_city(wired, catalog());
    CHECK(again.strings[0].order == OrderFrom::partial);
    CHECK(again.strings[0].wiring == result.strings[0].wiring);
}

} // namespace unstring
