#include "model/series/string_loop.h"

#include <numeric>

#include <catch2/catch.hpp>

#include "tests/model/series/city_for_tests.h"

namespace unstring {
namespace {

using for_tests::out_and_back;

StringLoop loop_of(const City& city) {
    static const Catalog kCatalog = for_tests::catalog();
    return string_loops(city, kCatalog)[0];
}

double sum(const std::vector<double>& values) { return std::accumulate(values.begin(), values.end(), 0.0); }

std::vector<char> all_live_but(const StringLoop& loop, int first, int last) {
    std::vector<char> live(loop.lamps.size(), 1);
    for (int p = first; p <= last; ++p) live[static_cast<std::size_t>(p - 1)] = 0;
    return live;
}

CutBack cutback_row(std::string a, std::string b) {
    CutBack row;
    row.string = StringIx(0);
    row.pole_a = std::move(a);
    row.pole_b = std::move(b);
    row.confirmed = true;
    row.new_cable_m = 3;
    return row;
}

} // namespace

TEST_CASE("string loop: legs run straight from lamp to lamp, scaled to the length that the file gives") {
    City city = out_and_back(10, 10);
    const StringLoop straight = loop_of(city);
    REQUIRE(straight.legs_m.size() == 11);
    CHECK(straight.legs_m[1] == Approx(35));
    CHECK(straight.legs_m[5] == Approx(20));
    city.strings[0].length_m = 2 * sum(straight.legs_m);
    CHECK(loop_of(city).legs_m[1] == Approx(70));
    CHECK(sum(loop_of(city).legs_m) == Approx(*city.strings[0].length_m));
}

TEST_CASE("string loop: without a station the closing run is halved between the home legs") {
    City city = out_and_back(10, 10);
    city.strings[0].station.reset();
    const StringLoop loop = loop_of(city);
    CHECK(loop.legs_m.front() == Approx(10));
    CHECK(loop.legs_m.back() == Approx(10));
}

TEST_CASE("string loop: the far end is the lamp with the longest way back on its nearer side") {
    CHECK(loop_of(out_and_back(10, 10)).far_position == 5);
    City city = out_and_back(10, 10);
    city.poles[1].place.x_m = 700; // lamp 2 now hangs on a long spur
    CHECK(loop_of(city).far_position == 2);
}

TEST_CASE("string loop: lamps on both sides of a street can be spliced across, a crossing where the centre "
          "line runs between") {
    City city = out_and_back(10, 10);
    const StringLoop loop = loop_of(city);
    REQUIRE(loop.cutbacks.size() == 4);
    for (const LoopCutBack& cutback : loop.cutbacks) {
        CHECK(cutback.a + cutback.b == 11);
        CHECK(cutback.new_cable_m == Approx(20));
        CHECK(cutback.place == -1);
        CHECK(cutback.kind == CutBackKind::trench);
    }
    Street street;
    street.line = {{0, 10}, {400, 10}};
    city.streets = {street};
    CHECK(loop_of(city).cutbacks[0].kind == CutBackKind::crossing);
}

TEST_CASE("string loop: a cut-back of the file is a fact with its own metres, its ends in either order, "
          "terminals by name") {
    City city = out_and_back(10, 10);
    city.cutbacks = {cutback_row("P-7", "P-4"), cutback_row("out", "P-3"), cutback_row("P-9", "return"),
                     cutback_row("P-1", "nowhere"), cutback_row("out", "return")};
    const StringLoop loop = loop_of(city);
    REQUIRE(loop.cutbacks.size() == 6); // three of the file, three candidates
    CHECK(loop.cutbacks[0].a == 4);
    CHECK(loop.cutbacks[0].b == 7);
    CHECK(loop.cutbacks[0].confirmed);
    CHECK(loop.cutbacks[0].new_cable_m == 3);
    CHECK(loop.cutbacks[1].a == 0);
    CHECK(loop.cutbacks[1].place == 1);
    CHECK(loop.cutbacks[2].b == 11);
}

TEST_CASE("string state: lamps that leave between a cut-back take their cable along, lamps jumpered alone "
          "leave it live") {
    const StringLoop loop = loop_of(out_and_back(20, 10));
    const StringState whole = string_state(loop, all_live_but(loop, 1, 0));
    CHECK(whole.lamps == 20);
    CHECK(whole.used.empty());
    CHECK(whole.cable_m == Approx(sum(loop.legs_m)));
    const StringState cut = string_state(loop, all_live_but(loop, 9, 12));
    CHECK(cut.lamps == 16);
    // legs 8-9, 9-10, 11-12, 12-13 of 35 m and 10-11 of 20 m are dead, 20 m new from 8 to 13
    CHECK(cut.cable_m == Approx(whole.cable_m - (4 * 35 + 20) + 20));
    REQUIRE(cut.used.size() == 1);
    CHECK(cut.new_cable_m == Approx(20));
    const StringState jumpered = string_state(loop, all_live_but(loop, 3, 3));
    CHECK(jumpered.cable_m == Approx(whole.cable_m));
    CHECK(whole.load_kw - jumpered.load_kw == Approx(0.188));
}

TEST_CASE(
    "string state: a pole that is down is jumpered, draws nothing, and does not by itself make a cut-back") {
    City city = out_and_back(10, 10);
    for (const std::size_t down : {3U, 4U, 5U, 6U}) city.poles[down].status = PoleStatus::down;
    const StringLoop loop = loop_of(city);
    REQUIRE(loop.lamps.size() == 10);
    const StringState today = string_state(loop, std::vector<char>(10, 1));
    CHECK(today.lamps == 6);
    CHECK(today.load_kw == Approx((6 * 188 + today.cable_w) / 1000));
    CHECK(today.cable_m == Approx(sum(loop.legs_m)));
    const StringState without_down = string_state(loop, {1, 1, 1, 0, 0, 0, 0, 1, 1, 1});
    CHECK(without_down.cable_m == today.cable_m);
    std::vector<char> only_down(10, 0);
    only_down[3] = 1;
    CHECK(string_state(loop, only_down).cable_m == 0);
}

TEST_CASE("string state: a lamp whose record is set aside still burns, but has no place in the loop") {
    City city = out_and_back(10, 10);
    const StringState before = string_state(loop_of(city), std::vector<char>(10, 1));
    city.poles[4].set_aside = true;
    const StringLoop loop = loop_of(city);
    REQUIRE(loop.lamps.size() == 9);
    REQUIRE(loop.aside.size() == 1);
    const StringState after = string_state(loop, std::vector<char>(9, 1));
    CHECK(after.lamps == 9);
    CHECK(after.load_kw - after.cable_w / 1000 == Approx(before.load_kw - before.cable_w / 1000));
    CHECK(string_state(loop, std::vector<char>(9, 0)).load_kw == 0);
}

TEST_CASE("string loop: a second record of one lamp that is set aside is not counted twice") {
    City city = out_and_back(10, 10);
    city.poles.push_back(city.poles[4]);
    city.poles.back().set_aside = true;
    CHECK(loop_of(city).aside.empty());
    city.poles.back().place.x_m += 500; // the same id elsewhere is another lamp with a wrong id
    CHECK(loop_of(city).aside.size() == 1);
}

TEST_CASE("string loop: free text gives the watts, a lamp that nobody knows takes the median of its string") {
    City city = out_and_back(4, 10);
    city.poles[0].fixture = "150w s";
    city.poles[1].fixture = "?";
    city.poles[2].lamp_w = 200;
    city.poles[2].lamp_pf = 0.7;
    const StringLoop loop = loop_of(city);
    CHECK(loop.lamp_w == std::vector<double>{188, 188, 200, 188});
    CHECK(loop.lamp_pf == std::vector<double>{0.8, 0.9, 0.7, 0.8});
}

TEST_CASE("string loop: parallel circuits and strings set aside have empty loops") {
    City city = out_and_back(4, 10);
    city.strings[0].set_aside = true;
    CHECK(loop_of(city).lamps.empty());
    CHECK(string_state(loop_of(city), {}).lamps == 0);
    city.strings[0].set_aside = false;
    city.strings[0].kind = CircuitKind::parallel;
    CHECK(loop_of(city).lamps.empty());
}

TEST_CASE("string loop: an order that vet wrote still counts as inferred") {
    City city = out_and_back(4, 10);
    CHECK(loop_of(city).order_from == OrderFrom::given);
    city.poles[1].order_is_inferred = true;
    CHECK(loop_of(city).order_from == OrderFrom::partial);
    for (Pole& pole : city.poles) pole.order_is_inferred = true;
    CHECK(loop_of(city).order_from == OrderFrom::inferred);
}

TEST_CASE("string loop: a cable size that the catalogue lacks is replaced, never null") {
    City city = out_and_back(4, 10);
    city.strings[0].cable_awg = 99;
    REQUIRE(loop_of(city).cable != nullptr);
    CHECK(loop_of(city).cable->awg == 8);
    city.strings[0].cable_awg = 6;
    CHECK(loop_of(city).cable->awg == 6);
}

} // namespace unstring
