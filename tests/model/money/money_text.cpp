#include "model/money/money_text.h"

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE(
    "money text: thousands are grouped, the sign stands before the currency, nothing is minus nothing") {
    CHECK(dollars_text(0) == "$0");
    CHECK(dollars_text(999.5) == "$1,000");
    CHECK(dollars_text(13541.2) == "$13,541");
    CHECK(dollars_text(-1234567.891, true) == "-$1,234,567.89");
    CHECK(dollars_text(-0.2) == "$0");
    CHECK(amount_text(10548000.51, true) == "10,548,000.51");
    CHECK(amount_text(1000) == "1,000");
}
