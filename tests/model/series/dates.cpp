#include "model/series/dates.h"

#include <catch2/catch.hpp>

namespace unstring {

TEST_CASE("dates: a year, a month or a day that the calendar has") {
    CHECK(date_of("1962") == Date{1962, 0, 0});
    CHECK(date_of("1962-05") == Date{1962, 5, 0});
    CHECK(date_of("2024-02-29") == Date{2024, 2, 29});
    CHECK(*date_of("1962") < *date_of("1962-05"));
}

TEST_CASE("dates: anything else is none") {
    for (const char* text : {"", "62", "2023-02-29", "2024-13", "2024-00", "2024-01-00", "2024/01/01",
                             "01-01-2024", "20x4", "-962"})
        CHECK_FALSE(date_of(text).has_value());
}

} // namespace unstring
