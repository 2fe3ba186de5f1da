#include "geo/project/geometry_blob.h"

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("geometry blob: points come back as they went in, for a point, a line and a ring") {
    const std::vector<MapPoint> line = {{1.5, 2.25}, {-3, 4}, {1e6, 5e6}};
    CHECK(points_of_blob(point_blob(line[0], 32609)) == std::vector<MapPoint>{line[0]});
    CHECK(points_of_blob(line_blob(line, 32609)) == line);
    auto closed = line;
    closed.push_back(line[0]);
    CHECK(points_of_blob(polygon_blob(line, 32609)) == closed);
    CHECK(points_of_blob(polygon_blob(closed, 32609)) == closed);
}

TEST_CASE("geometry blob: the bytes of a point are those of the standard's layout") {
    // OGC 12-128r18 clause 2.1.3: magic GP, version 0, flags 0x03 (little endian, xy envelope), srs_id,
    // envelope minx maxx miny maxy, WKB.
    const auto blob = point_blob({1, 2}, 4326);
    REQUIRE(blob.size() == 8 + 32 + 21);
    CHECK(blob[0] == 'G');
    CHECK(blob[1] == 'P');
    CHECK(blob[2] == 0);
    CHECK(blob[3] == 0x03);
    CHECK((blob[4] | blob[5] << 8) == 4326);
    CHECK(blob[40] == 1); // little-endian WKB
    CHECK(blob[41] == 1); // point
}

TEST_CASE("geometry blob: broken bytes are no geometry") {
    auto blob = line_blob(std::vector<MapPoint>{{0, 0}, {1, 1}}, 1);
    for (std::size_t size = 0; size < blob.size(); ++size)
        CHECK_FALSE(points_of_blob(std::span(blob).first(size)));
    blob[45] = 0xff; // a count far beyond the bytes
    blob[46] = 0xff;
    blob[47] = 0xff;
    CHECK_FALSE(points_of_blob(blob));
    CHECK(line_blob(std::vector<MapPoint>{{0, 0}}, 1).empty());
}
