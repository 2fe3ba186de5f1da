#include "model/series/street_index.h"

#include <catch2/catch.hpp>

namespace unstring {
namespace {

std::vector<Street> streets(std::vector<std::vector<MapPoint>> lines) {
    std::vector<Street> out(lines.size());
    for (std::size_t i = 0; i < lines.size(); ++i) out[i].line = std::move(lines[i]);
    return out;
}

} // namespace

TEST_CASE("street index: counts the centre lines between two places, wherever the cells of its grid lie") {
    for (const double shift_m : {0.0, 50.0, 99.9, -3000.0, 500000.0}) {
        const StreetIndex index(streets(
            {{{shift_m - 400, 10}, {shift_m + 400, 10}}, {{shift_m - 400, 30}, {shift_m + 400, 30}}}));
        CAPTURE(shift_m);
        CHECK(index.crossings({shift_m, 0}, {shift_m, 20}) == 1);
        CHECK(index.crossings({shift_m, 0}, {shift_m + 250, 40}) == 2);
        CHECK(index.crossings({shift_m, 0}, {shift_m + 300, 5}) == 0);
        CHECK(index.crossings({shift_m + 500, 0}, {shift_m + 500, 20}) == 0);
    }
}

TEST_CASE("street index: a bend of one street between two places on its one side is not crossed") {
    const StreetIndex index(streets({{{0, 0}, {100, 0}, {100, 100}}}));
    CHECK(index.crossings({50, 10}, {90, 50}) == 0);
    CHECK(index.crossings({50, 10}, {110, 50}) == 1);
}

} // namespace unstring
