#include "geo/imports/numbers.h"

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

DecimalEvidence evidence_of(std::initializer_list<const char*> cells) {
    DecimalEvidence evidence;
    for (const char* cell : cells) evidence.add(cell);
    return evidence;
}

} // namespace

TEST_CASE("numbers: points and commas are told apart by the column that they stand in") {
    CHECK(judge_mark(evidence_of({"1,5", "2,25"}), {}, ',') == DecimalMark::comma);
    CHECK(judge_mark(evidence_of({"1.5", "1,234"}), {}, ';') == DecimalMark::point);
    CHECK(judge_mark(evidence_of({"1.234,5"}), {}, ',') == DecimalMark::comma);
    CHECK(judge_mark(evidence_of({"1,234.5"}), {}, ';') == DecimalMark::point);
    CHECK(judge_mark(evidence_of({"1.234.567"}), {}, ',') == DecimalMark::comma);
    CHECK(judge_mark(evidence_of({"0,125"}), {}, ',') == DecimalMark::comma);
}

TEST_CASE("numbers: a column that could be read both ways follows the file, then the delimiter") {
    const DecimalEvidence either = evidence_of({"1,234", "2,500"});
    CHECK(judge_mark(either, evidence_of({"1,5"}), ',') == DecimalMark::comma);
    CHECK(judge_mark(either, evidence_of({"1.5"}), ';') == DecimalMark::point);
    CHECK(judge_mark(either, either, ';') == DecimalMark::comma);
    CHECK(judge_mark(either, either, ',') == DecimalMark::point);
}

TEST_CASE("numbers: thousands may be set off by the other mark, blanks or apostrophes, in groups of three") {
    CHECK(read_number("1,234,567.5", DecimalMark::point) == 1234567.5);
    CHECK(read_number("1.234.567,5", DecimalMark::comma) == 1234567.5);
    CHECK(read_number("1 234,5", DecimalMark::comma) == 1234.5);
    CHECK(read_number("1'234.5", DecimalMark::point) == 1234.5);
    CHECK(read_number("1\xC2\xA0"
                      "234",
                      DecimalMark::point) == 1234);
    CHECK(read_number("-12,345", DecimalMark::point) == -12345);
    CHECK_FALSE(read_number("12,34", DecimalMark::point));
    CHECK_FALSE(read_number("1,2345", DecimalMark::point));
    CHECK_FALSE(read_number("1234,567", DecimalMark::point));
    CHECK_FALSE(read_number(",123", DecimalMark::point));
}

TEST_CASE("numbers: what is no number is nothing, never zero") {
    for (const char* cell : {"", "abc", "1.2.3", "12ft", "nan", "inf", "1e999", "--1", "0x10", "1,", "1 2",
                             ".", "+", "1e", "1-2"}) {
        INFO(cell);
        CHECK_FALSE(read_number(cell, DecimalMark::point));
    }
    CHECK(read_number("+.5", DecimalMark::point) == 0.5);
    CHECK(read_number("1e3", DecimalMark::point) == 1000);
}

TEST_CASE("numbers: words for nothing are blank cells") {
    for (const char* cell : {"", "-", "n/a", "NULL", "<Null>", "NA"}) CHECK(is_blank_cell(cell));
    for (const char* cell : {"0", "none", "nullable", "unknown"}) CHECK_FALSE(is_blank_cell(cell));
}
