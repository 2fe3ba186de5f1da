#include "model/vet/natural_id.h"

#include <catch2/catch.hpp>

namespace unstring {

TEST_CASE("natural id: case, signs and leading zeros do not tell ids apart, places of digits do") {
    CHECK(squeezed_id("P-017") == squeezed_id("p17"));
    CHECK(squeezed_id("P 17") == squeezed_id("P17"));
    CHECK(squeezed_id("1-12") != squeezed_id("11-2"));
    CHECK(squeezed_id("0") == "0");
    CHECK(squeezed_id("P-0") != squeezed_id("P-"));
    CHECK(squeezed_id("A7b") == "a.7.b");
}

TEST_CASE("natural id: numbers sort as numbers") {
    CHECK(is_before_by_number("P-2", "P-10"));
    CHECK_FALSE(is_before_by_number("P-10", "P-2"));
    CHECK(is_before_by_number("P-10", "P-10a"));
    CHECK(is_before_by_number("A9", "B1"));
    CHECK_FALSE(is_before_by_number("P-2", "P-2"));
}

} // namespace unstring
