#include <catch2/catch.hpp>

#include "tests/model/money/money_case.h"

using namespace unstring;

namespace {

StringYearCash running(int year) {
    StringYearCash each;
    each.year = year;
    each.cable_kw = 0.4;
    each.unit_rated_kw = 15;
    return each;
}

} // namespace

TEST_CASE("string lines: losses and upkeep run until the year before the last lamp leaves") {
    const MoneyCase test;
    std::vector<StringYearCash> years = {running(2027), running(2028), running(2029)};
    years[2].retires = true;
    years[2].has_work = true;
    const auto lines = string_lines(test.input(), StringIx(0), years);
    CHECK(sum_of(lines, "transformer loss, kWh") == Approx(2 * .04 * 15 * 4100 * .15));
    CHECK(sum_of(lines, "loop cable loss, kWh") == Approx(2 * .4 * 4100 * .15));
    CHECK(sum_of(lines, "station upkeep") == 600);
    CHECK(sum_of(lines, "transformer removal") == 3500);
    CHECK(sum_of(lines, "mobilisation") == 5000);
    CHECK(sum_of(lines, "design and supervision") == Approx(.18 * 3500));
}

TEST_CASE(
    "string lines: works of a year stand in that year as capital, a suspect unit at the dearer removal") {
    const MoneyCase test;
    StringYearCash year = running(2028);
    year.has_work = year.swaps_unit = true;
    year.jumpers = 3;
    year.splices = 4;
    year.new_cable_m = 30.48;
    StringYearCash last = running(2030);
    last.retires = last.oil_suspect = true;
    const auto lines = string_lines(test.input(), StringIx(0), {year, last});
    CHECK(sum_of(lines, "jumper at a pole base") == 1050);
    CHECK(sum_of(lines, "series cable splice") == 1800);
    CHECK(sum_of(lines, "series cable, m") == Approx(900));
    CHECK(sum_of(lines, "transformer swap") == 4000);
    CHECK(sum_of(lines, "transformer removal") == 8000);
    for (const CashLine& line : lines)
        if (line.purse == Purse::capital) CHECK((line.year == 2028 || line.year == 2030));
}

TEST_CASE("string lines: nothing outside the horizon is counted, and no unit means no station") {
    const MoneyCase test;
    CHECK(string_lines(test.input(), StringIx(0), {running(2026), running(2047)}).empty());
    StringYearCash none;
    none.year = 2027;
    CHECK(string_lines(test.input(), StringIx(0), {none}).empty());
}
