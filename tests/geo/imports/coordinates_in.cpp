// Coordinates as cities give them: degrees, feet, state plane, none said, the wrong way round.

#include <algorithm>
#include <string>

#include "geo/ground/crs.h"
#include "geo/imports/gathered.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

const MapPoint kFirst{406510.09, 3763023.41}; // UTM zone 9 north
const MapPoint kSecond{406563.85, 3763028.18};

std::string degrees(MapPoint place, const char* between = ",", const std::string& from = "EPSG:32609",
                    const std::string& to = "EPSG:4326") {
    const auto at = (*CrsTransform::make(from, to))(place.x_m, place.y_m);
    return std::to_string(at->x_m) + between + std::to_string(at->y_m);
}

Expected<Gathered> read_poles_of(const TempFolder& folder, const std::string& table,
                                 const std::string& crs = {}, const std::string& map = {}) {
    GatherFiles files;
    files.poles = folder.write("poles.csv", table);
    files.crs = crs;
    if (!map.empty()) files.columns = folder.write("map.json", map);
    return read_files(files, nullptr, {});
}

bool are_near(const Gathered& city, double within_m) {
    const auto& poles = city.city.poles;
    return poles.size() == 2 && distance_m(poles[0].place, kFirst) < within_m &&
           distance_m(poles[1].place, kSecond) < within_m;
}

long count_of(const Gathered& city, const std::string& code) {
    return std::count_if(city.findings.begin(), city.findings.end(),
                         [&](const Finding& finding) { return finding.code == code; });
}

} // namespace

TEST_CASE("coordinates: lon and lat columns become the fitting UTM zone, called a guess") {
    const TempFolder folder;
    const auto city =
        read_poles_of(folder, "pole_id,lon,lat\nA," + degrees(kFirst) + "\nB," + degrees(kSecond) + "\n");
    REQUIRE(city);
    CHECK(city->city.crs == "EPSG:32609");
    CHECK(city->crs_from == "guess");
    CHECK(are_near(*city, 0.2));
}

TEST_CASE("coordinates: degrees under easting and northing are known by their look") {
    const TempFolder folder;
    const auto city = read_poles_of(folder, "pole_id,easting,northing\nA," + degrees(kFirst) + "\nB," +
                                                degrees(kSecond) + "\n");
    REQUIRE(city);
    CHECK(city->city.crs == "EPSG:32609");
    CHECK(city->crs_from == "guess");
    CHECK(are_near(*city, 0.2));
}

TEST_CASE("coordinates: --crs is believed, in degrees or in metres") {
    const TempFolder folder;
    const std::string in_degrees =
        "pole_id,easting,northing\nA," + degrees(kFirst) + "\nB," + degrees(kSecond) + "\n";
    const auto from_degrees = read_poles_of(folder, in_degrees, "EPSG:4326");
    REQUIRE(from_degrees);
    CHECK(from_degrees->city.crs == "EPSG:32609");
    CHECK(from_degrees->crs_from == "user");
    CHECK(are_near(*from_degrees, 0.2));
    const auto small = read_poles_of(folder, "pole_id,easting,northing\nA,0.5,0.5\nB,30,0\n", "EPSG:32609");
    REQUIRE(small);
    CHECK(small->city.poles[1].place == MapPoint{30, 0});
}

TEST_CASE("coordinates: a projected table that says no system is refused with the remedy") {
    const TempFolder folder;
    const auto city = read_poles_of(folder, "pole_id,easting,northing\nA,406510,3763023\nB,406563,3763028\n");
    REQUIRE_FALSE(city);
    CHECK(city.error().code == FaultCode::crs_unknown);
    CHECK(city.error().remedy == "give --crs EPSG:n");
    const auto local = read_poles_of(folder, "pole_id,easting,northing\nA,0,0\nB,30,0\nC,60,0\n");
    REQUIRE_FALSE(local);
    CHECK(local.error().code == FaultCode::crs_unknown);
}

TEST_CASE("coordinates: a system that is not there is bad usage") {
    const TempFolder folder;
    for (const char* crs : {"EPSG:0", "nonsense", "EPSG:5773"}) {
        const auto city = read_poles_of(folder, "pole_id,easting,northing\nA,406510,3763023\n", crs);
        REQUIRE_FALSE(city);
        CHECK(city.error().code == FaultCode::bad_usage);
        CHECK(city.error().field == "--crs");
    }
}

TEST_CASE("coordinates: feet by the map are metres inside, and a column that names metres keeps them") {
    const TempFolder folder;
    const auto feet = [](double metres) { return std::to_string(metres / 0.3048); };
    const std::string table = "PoleNum,X,Y,Mount Ht,arm_m\nA," + feet(kFirst.x_m) + "," + feet(kFirst.y_m) +
                              ",30,2\nB," + feet(kSecond.x_m) + "," + feet(kSecond.y_m) + ",,\n";
    const auto city = read_poles_of(folder, table, "EPSG:32609",
                                    R"({"poles": {"pole_id": "PoleNum"}, "units": {"length": "ft"}})");
    REQUIRE(city);
    CHECK(are_near(*city, 0.001));
    CHECK(*city->city.poles[0].mount_m == Approx(9.144).epsilon(1e-12));
    CHECK(*city->city.poles[0].arm_m == 2);
    CHECK(count_of(*city, "unit-guessed") == 0);
}

TEST_CASE("coordinates: feet told only by a column's name are said to be guessed") {
    const TempFolder folder;
    const auto feet = [](double metres) { return std::to_string(metres / 0.3048); };
    const std::string table = "PoleNum,X_ft,Y_ft\nA," + feet(kFirst.x_m) + "," + feet(kFirst.y_m) + "\nB," +
                              feet(kSecond.x_m) + "," + feet(kSecond.y_m) + "\n";
    const auto city = read_poles_of(folder, table, "EPSG:32609");
    REQUIRE(city);
    CHECK(are_near(*city, 0.001));
    CHECK(count_of(*city, "unit-guessed") == 2);
}

TEST_CASE(
    "coordinates: a system in survey feet is kept in its form in metres, whatever the columns are called") {
    const TempFolder folder;
    const auto at = (*CrsTransform::make("EPSG:4269", "EPSG:2229"))(-118.2, 34);
    const auto wanted = (*CrsTransform::make("EPSG:4269", "EPSG:26945"))(-118.2, 34);
    for (const char* header : {"pole_id,easting,northing\n", "pole_id,X_ft,Y_ft\n"}) {
        const auto city = read_poles_of(
            folder, header + ("A," + std::to_string(at->x_m) + "," + std::to_string(at->y_m) + "\n"),
            "EPSG:2229");
        REQUIRE(city);
        CHECK(city->city.crs == "EPSG:26945");
        CHECK(distance_m(city->city.poles[0].place, *wanted) < 0.001);
    }
}

TEST_CASE("coordinates: longitude and latitude the wrong way round are an error that says so") {
    const TempFolder folder;
    const auto columns =
        read_poles_of(folder, "pole_id,lat,lon\nA," + degrees(kFirst) + "\nB," + degrees(kSecond) + "\n");
    REQUIRE(columns);
    CHECK(count_of(*columns, "place-swapped") == 1);
    CHECK(columns->rows.at("poles").kept == 2);
    std::string table = "pole_id,lon,lat\n";
    for (int i = 0; i < 9; ++i) table += "P" + std::to_string(i) + "," + degrees(kFirst) + "\n";
    const auto at = (*CrsTransform::make("EPSG:32609", "EPSG:4326"))(kSecond.x_m, kSecond.y_m);
    table += "Q," + std::to_string(at->y_m) + "," + std::to_string(at->x_m) + "\n";
    const auto row = read_poles_of(folder, table);
    REQUIRE(row);
    REQUIRE(count_of(*row, "place-swapped") == 1);
    const auto finding = std::find_if(row->findings.begin(), row->findings.end(),
                                      [](const Finding& each) { return each.code == "place-swapped"; });
    CHECK(finding->record == "Q");
    CHECK(finding->row == 11);
}

TEST_CASE("coordinates: easting and northing under each other's names are told by the area of the system") {
    const TempFolder folder;
    const auto city =
        read_poles_of(folder, "pole_id,northing,easting\nA,406510,3763023\nB,406563,3763028\n", "EPSG:32609");
    REQUIRE(city);
    CHECK(count_of(*city, "place-swapped") == 1);
}

TEST_CASE("coordinates: a point that has no place in the system is said, and the pole is kept without one") {
    const TempFolder folder;
    const auto city =
        read_poles_of(folder, "pole_id,lon,lat\nA,-130.00,34.01\nB,-130.01,34\nC,-130.02,340.5\n");
    REQUIRE(city);
    CHECK(city->rows.at("poles").kept == 3);
    CHECK_FALSE(city->city.poles[2].has_place);
    REQUIRE(count_of(*city, "number-unreadable") == 1);
    CHECK(city->findings[0].record == "C");
}

TEST_CASE("coordinates: a blank place is kept without one, a missing pair of columns is an error") {
    const TempFolder folder;
    const auto blank =
        read_poles_of(folder, "pole_id,easting,northing\nA,406510,\nB,406563,3763028\n", "EPSG:32609");
    REQUIRE(blank);
    CHECK_FALSE(blank->city.poles[0].has_place);
    CHECK(blank->city.poles[1].has_place);
    const auto missing = read_poles_of(folder, "pole_id,string_id\nA,S-1\n", "EPSG:32609");
    REQUIRE(missing);
    CHECK(count_of(*missing, "column-missing") == 1);
    CHECK(missing->rows.at("poles").kept == 1);
}
