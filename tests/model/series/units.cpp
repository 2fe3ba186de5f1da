#include "model/series/units.h"

#include <catch2/catch.hpp>

#include "tests/model/series/city_for_tests.h"

namespace unstring {
namespace {

using for_tests::unit_row;

const UnitNeed kNeed{6.6, 8, 5, 4160.0, Mount::pole};

std::string refused(const Transformer& unit, const UnitNeed& need = kNeed) {
    return why_unit_refused(unit, need);
}

} // namespace

TEST_CASE(
    "units: one that agrees in current, primary volts and mounting and carries the load is not refused") {
    CHECK(refused(unit_row("T", 10, {}, "")).empty());
}

TEST_CASE("units: a refusal names what differs with both numbers") {
    Transformer unit = unit_row("T", 10, {}, "");
    unit.primary_v = 2400;
    CHECK(refused(unit) == "primary 2400 V, need 4160 V");
    unit = unit_row("T", 10, {}, "");
    unit.output_a = 20;
    CHECK(refused(unit) == "output 20 A, need 6.6 A");
    unit = unit_row("T", 10, {}, "");
    unit.mount = Mount::vault;
    CHECK(refused(unit) == "mounted on vault, need pole");
    CHECK(refused(unit_row("T", 7.5, {}, "")) == "load 8.00 kVA over its rating of 7.5 kW");
}

TEST_CASE("units: a figure that the string asks for and the row lacks refuses the unit") {
    Transformer unit = unit_row("T", 10, {}, "");
    unit.primary_v.reset();
    CHECK(refused(unit) == "primary volts not known, need 4160 V");
    UnitNeed need = kNeed;
    need.primary_v.reset();
    CHECK(refused(unit, need).empty());
}

TEST_CASE("units: nameplate open-circuit volts above the cable's class refuse, an estimate does not") {
    Transformer unit = unit_row("T", 25, {}, "");
    CHECK(open_volts(unit, 6.6).is_estimate);
    CHECK(open_volts(unit, 6.6).volts == Approx(1.4 * 25000 / 6.6));
    CHECK(refused(unit).empty());
    unit.open_v = 5200;
    CHECK_FALSE(open_volts(unit, 6.6).is_estimate);
    CHECK(refused(unit) == "open-circuit 5200 V (nameplate) over the cable's 5 kV class");
}

TEST_CASE("units: running volts above the cable's class refuse") {
    UnitNeed need = kNeed;
    need.cable_kv = 1;
    CHECK(refused(unit_row("T", 10, {}, ""), need) == "1212 V on cable of 1 kV class");
}

TEST_CASE("units: a static unit is refused under its lower end, a moving-coil one is not") {
    Transformer unit = unit_row("T", 50, {}, "");
    CHECK(refused(unit).empty());
    unit.build = Build::static_unit;
    CHECK(refused(unit) == "load 16 % of rating, a static unit holds its current from 25 %");
    unit.min_frac = 0.1;
    CHECK(refused(unit).empty());
}

TEST_CASE("units: a two-loop unit carries half its rating on each loop") {
    Transformer unit = unit_row("T", 15, StringIx(0), "S-1");
    CHECK(refused(unit).empty());
    unit.strings.push_back(StringIx(1));
    CHECK(loop_rating_kw(unit) == 7.5);
    CHECK(refused(unit) == "load 8.00 kVA over its rating of 7.5 kW");
}

TEST_CASE("units: the smallest that fits comes first, and a tap counts as a rating") {
    City city;
    city.transformers = {unit_row("big", 20, {}, ""), unit_row("right", 10, {}, ""),
                         unit_row("small", 5, {}, ""), unit_row("tapped", 30, {}, ""),
                         unit_row("gone", 9, {}, "")};
    city.transformers[3].taps = {1, 0.75, 0.5, 0.3};
    city.transformers[4].state = UnitState::scrapped;
    std::vector<TransformerIx> pool;
    for (std::size_t i = 0; i < city.transformers.size(); ++i) pool.emplace_back(i);
    const std::vector<UnitFit> fits = units_that_fit(city, pool, kNeed);
    REQUIRE(fits.size() == 3);
    CHECK(fits[0].unit == TransformerIx(3));
    CHECK(fits[0].tap == 0.3);
    CHECK(fits[0].loading_frac == Approx(8 / 9.0));
    CHECK(fits[1].unit == TransformerIx(1));
    CHECK(fits[1].loading_frac == Approx(0.8));
    CHECK(fits[2].unit == TransformerIx(0));
}

TEST_CASE("units: what a string asks for is what feeds it today") {
    City city = for_tests::out_and_back(10, 5);
    city.transformers.push_back(unit_row("spare", 5, {}, ""));
    CHECK(unit_today(city, StringIx(0)) == TransformerIx(0));
    const UnitNeed need = unit_need(city, string_loops(city, for_tests::catalog())[0], 3);
    CHECK(need.primary_v == 4160.0);
    CHECK(need.mount == Mount::pole);
    city.transformers[0].set_aside = true;
    CHECK_FALSE(unit_today(city, StringIx(0)).is_valid());
}

TEST_CASE("units: a spare counts as untested without a date or more than five years after its test") {
    Transformer unit = unit_row("T", 10, {}, "");
    unit.tested = "2022-03";
    CHECK_FALSE(is_untested(unit, 2027));
    CHECK(is_untested(unit, 2028));
    CHECK_FALSE(is_untested(unit, 0));
    unit.tested.clear();
    CHECK(is_untested(unit, 0));
}

} // namespace unstring
