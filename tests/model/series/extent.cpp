#include "model/series/extent.h"

#include <cmath>

#include <catch2/catch.hpp>

#include "tests/model/series/city_for_tests.h"

namespace unstring {

TEST_CASE("extent: a few places far off neither move it nor are believed") {
    City city = for_tests::out_and_back(40, 10);
    for (Pole& pole : city.poles) pole.place = {500000 + pole.place.x_m, 3760000 + pole.place.y_m};
    const Extent before = extent_of(city);
    city.poles[0].place = {0, 0};
    city.poles[1].place = {3760000, 500000};
    const Extent after = extent_of(city);
    CHECK(distance_m(before.centre, after.centre) < 50);
    CHECK_FALSE(is_believed(after, city.poles[0].place));
    CHECK_FALSE(is_swapped(after, city.poles[0].place));
    CHECK(is_swapped(after, city.poles[1].place));
    CHECK(is_believed(after, city.poles[2].place));
}

TEST_CASE("extent: a place that is no number is never believed, three poles are too few to judge by") {
    City city = for_tests::out_and_back(2, 10);
    CHECK(is_believed(extent_of(city), {1e7, 1e7}));
    CHECK_FALSE(is_believed(extent_of(city), {std::nan(""), 0}));
}

TEST_CASE("extent: setting records aside does not move it") {
    City city = for_tests::out_and_back(40, 10);
    const Extent before = extent_of(city);
    for (std::size_t i = 0; i < 15; ++i) city.poles[i].set_aside = true;
    CHECK(extent_of(city).centre == before.centre);
    CHECK(extent_of(city).reach_m == before.reach_m);
}

} // namespace unstring
