#include "geo/imports/vector_table.h"

#include <algorithm>
#include <string>

#include "geo/imports/gathered.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

std::string collection(const std::string& features) {
    return R"({"type": "FeatureCollection", "features": [)" + features + "]}";
}

std::string feature(const std::string& geometry, const std::string& properties) {
    return R"({"type": "Feature", "geometry": )" + geometry + R"(, "properties": )" + properties + "}";
}

constexpr const char* kCrs =
    R"("crs": {"type": "name", "properties": {"name": "urn:ogc:def:crs:EPSG::32609"}}, )";

} // namespace

TEST_CASE(
    "vector file: points in degrees become poles in the fitting UTM zone, attributes by the same names") {
    const TempFolder folder;
    GatherFiles files;
    files.poles = folder.write("poles.geojson",
                               collection(feature(R"({"type": "Point", "coordinates": [-130.0, 34.0]})",
                                                  R"({"PoleNum": "A", "LAMP WATTS": 188.5, "order": 1})") +
                                          "," +
                                          feature(R"({"type": "Point", "coordinates": [-130.001, 34.0]})",
                                                  R"({"PoleNum": "B", "LAMP WATTS": null, "order": 2})") +
                                          "," + feature("null", R"({"PoleNum": "C", "order": 3})")));
    const auto city = read_files(files, nullptr, {});
    REQUIRE(city);
    CHECK(city->city.crs == "EPSG:32609");
    CHECK(city->crs_from == "file");
    REQUIRE(city->city.poles.size() == 3);
    CHECK(city->city.poles[0].lamp_w == 188.5);
    CHECK_FALSE(city->city.poles[1].lamp_w);
    CHECK(city->city.poles[1].order == 2);
    CHECK(distance_m(city->city.poles[0].place, city->city.poles[1].place) == Approx(92.4).margin(0.1));
    CHECK_FALSE(city->city.poles[2].has_place);
    CHECK(city->city.poles[2].from.row == 3);
}

TEST_CASE(
    "vector file: the parts of a multi-line are streets of one name; features of another shape are said") {
    const TempFolder folder;
    const std::string text =
        std::string(R"({"type": "FeatureCollection", )") + kCrs + R"("features": [)" +
        feature(
            R"({"type": "MultiLineString", "coordinates": [[[400000, 3760000], [400100, 3760000]], [[400200, 3760000], [400300, 3760000]]]})",
            R"({"name": "Tern Street", "surface": "asphalt", "width_ft": 40})") +
        "," + feature(R"({"type": "Point", "coordinates": [400000, 3760000]})", R"({"name": "Odd"})") + "]}";
    GatherFiles files;
    files.streets = folder.write("streets.geojson", text);
    const auto city = read_files(files, nullptr, {});
    REQUIRE(city);
    REQUIRE(city->city.streets.size() == 2);
    CHECK(city->city.streets[1].name == "Tern Street");
    CHECK(city->city.streets[1].surface == Surface::paved);
    CHECK(*city->city.streets[1].width_m == Approx(12.192));
    CHECK(city->city.streets[1].line[0] == MapPoint{400200, 3760000});
    CHECK(city->rows.at("streets").read == 2);
    CHECK(city->rows.at("streets").kept == 1);
    CHECK(std::any_of(city->findings.begin(), city->findings.end(),
                      [](const Finding& each) { return each.code == "row-broken" && each.row == 2; }));
}

TEST_CASE("vector file: canopy polygons carry height, leaf and protection") {
    const TempFolder folder;
    GatherFiles files;
    files.canopy = folder.write(
        "trees.geojson",
        std::string(R"({"type": "FeatureCollection", )") + kCrs + R"("features": [)" +
            feature(
                R"({"type": "Polygon", "coordinates": [[[400000, 3760000], [400010, 3760000], [400010, 3760010], [400000, 3760000]]]})",
                R"({"height_m": 12.5, "leaf": "evergreen", "protected": "yes"})") +
            "]}");
    const auto city = read_files(files, nullptr, {});
    REQUIRE(city);
    REQUIRE(city->city.canopy.size() == 1);
    CHECK(city->city.canopy[0].height_m == 12.5);
    CHECK(city->city.canopy[0].leaf == Leaf::evergreen);
    CHECK(city->city.canopy[0].is_protected);
    CHECK(city->canopy_raster.empty());
}

TEST_CASE("vector file: kinds that are not listed do not open, whatever they point to") {
    const TempFolder folder;
    std::vector<Finding> findings;
    std::vector<std::string> notes;
    const auto code_of = [&](const std::string& path) {
        return read_vector_table(path, "poles", ShapeKind::point, {}, findings, notes).error().code;
    };
    CHECK(code_of(folder.write("a.vrt", "<OGRVRTDataSource><OGRVRTLayer "
                                        "name=\"poles\"><SrcDataSource>/etc/hostname</SrcDataSource></"
                                        "OGRVRTLayer></OGRVRTDataSource>")) == FaultCode::file_broken);
    CHECK(code_of(folder.write("a.gpkg", "no database")) == FaultCode::file_broken);
    CHECK(code_of(folder.write("b.gpkg", "")) == FaultCode::file_broken);
    CHECK(code_of(folder.write("a.json", R"({"type": "FeatureCollection", "features": [)")) ==
          FaultCode::file_broken);
    CHECK(code_of("PG:dbname=city") == FaultCode::file_missing);
    CHECK(code_of("/vsizip/a.zip/poles.shp") == FaultCode::file_missing);
}
