#include "model/sun/horizon_polygons.h"

#include <cmath>
#include <vector>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

const std::vector<MapPoint> kNorthBlock = {{-10, 20}, {10, 20}, {10, 30}, {-10, 30}};

} // namespace

TEST_CASE("outlines: a block is seen where its near face stands, and nowhere else") {
    std::vector<float> heights(360, 0.0F);
    raise_by_block(kNorthBlock, 12, {0, 0}, heights);
    for (int direction = -26; direction <= 26; ++direction) {
        const double expected = std::atan(12 * std::cos(direction * kRadPerDeg) / 20) / kRadPerDeg;
        CHECK(static_cast<double>(heights[static_cast<std::size_t>((direction + 360) % 360)]) ==
              Approx(expected).margin(1e-4));
    }
    CHECK(heights[27] == 0);
    CHECK(heights[180] == 0);
}

TEST_CASE("outlines: the order of the corners makes no difference") {
    std::vector<float> one(72, 0.0F), other(72, 0.0F);
    raise_by_block(kNorthBlock, 9, {3, 4}, one);
    raise_by_block(std::vector<MapPoint>(kNorthBlock.rbegin(), kNorthBlock.rend()), 9, {3, 4}, other);
    for (std::size_t i = 0; i < one.size(); ++i) CHECK(one[i] == Approx(other[i]).margin(1e-5));
}

TEST_CASE("outlines: under a crown every direction is covered; a lower crown hides nothing") {
    std::vector<float> heights(72, 0.0F);
    raise_by_block(kNorthBlock, 3, {0, 25}, heights);
    for (const float height : heights)
        CHECK(static_cast<double>(height) == Approx(std::atan(3 / kNearStart_m) / kRadPerDeg));
    std::vector<float> low(72, 0.0F);
    raise_by_block(kNorthBlock, 0, {0, 0}, low);
    CHECK(low == std::vector<float>(72, 0.0F));
    CHECK(is_inside(kNorthBlock, {0, 25}));
    CHECK_FALSE(is_inside(kNorthBlock, {0, 19}));
}
