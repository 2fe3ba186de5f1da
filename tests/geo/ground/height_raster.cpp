#include "geo/ground/height_raster.h"

#include <cmath>
#include <string>

#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

// Four columns, three rows, cells of 2 m; south-west corner at 400000, 3760000. Heights 1..12 from the
// north-west, one of them nodata.
std::string grid(const TempFolder& folder) {
    return folder.write("canopy.asc", "ncols 4\nnrows 3\nxllcorner 400000\nyllcorner 3760000\ncellsize "
                                      "2\nNODATA_value -9999\n1 2 3 4\n5 -9999 7 8\n9 10 11 12\n");
}

} // namespace

TEST_CASE("height raster: a window holds the cells whose centres lie within reach, north row first") {
    const TempFolder folder;
    auto raster = open_height_raster(grid(folder));
    REQUIRE(raster);
    CHECK((*raster)->cell_m() == 2);
    // Centre of the cell in column 1, row 1 is 400003, 3760003.
    const auto window = (*raster)->window({400003, 3760003}, 2);
    REQUIRE(window);
    REQUIRE(window->columns == 3);
    REQUIRE(window->rows == 3);
    CHECK(window->west_m == 400000);
    CHECK(window->north_m == 3760006);
    CHECK(window->height_m[0] == 1);
    CHECK(std::isnan(window->height_m[4]));
    CHECK(window->height_m[8] == 11);
}

TEST_CASE("height raster: cells beyond the edge are not a number, far away ones too") {
    const TempFolder folder;
    auto raster = open_height_raster(grid(folder));
    REQUIRE(raster);
    const auto corner = (*raster)->window({400000, 3760006}, 2);
    REQUIRE(corner);
    REQUIRE(corner->columns == 2);
    CHECK(corner->west_m == 399998);
    CHECK(std::isnan(corner->height_m[0]));
    CHECK(corner->height_m[3] == 1);
    const auto far = (*raster)->window({500000, 3760006}, 4);
    REQUIRE(far);
    CHECK(far->columns == 4);
    for (const float height : far->height_m) CHECK(std::isnan(height));
}

TEST_CASE("height raster: files that are none, and windows without bound, are refused") {
    const TempFolder folder;
    CHECK(open_height_raster(folder.path("none.tif")).error().code == FaultCode::file_missing);
    CHECK(open_height_raster("/vsicurl/http://example.invalid/a.tif").error().code ==
          FaultCode::file_missing);
    CHECK(open_height_raster(folder.write("text.tif", "not a raster")).error().code ==
          FaultCode::file_broken);
    CHECK(open_height_raster(folder.path("")).error().code == FaultCode::file_missing);
    auto raster = open_height_raster(grid(folder));
    CHECK((*raster)->window({400000, 3760006}, 1e7).error().code == FaultCode::bad_usage);
    CHECK_FALSE((*raster)->window({NAN, 3760006}, 4));
}
