#include <algorithm>
#include <atomic>
#include <fstream>
#include <string>

#include "geo/imports/gathered.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

const std::string kQuillhaven = std::string(UNSTRING_SOURCE) + "/sampledata/quillhaven/";

long rows_of_file(const std::string& path) {
    std::ifstream stream(path);
    long lines = 0;
    for (std::string line; std::getline(stream, line);) lines += line.empty() ? 0 : 1;
    return lines - 1;
}

Gathered must_read(const GatherFiles& files, const Gathered* earlier = nullptr) {
    auto read = read_files(files, earlier, {});
    INFO((read ? std::string() : fault_text(read.error())));
    REQUIRE(read);
    return std::move(*read);
}

Fault must_fail(const GatherFiles& files) {
    auto read = read_files(files, nullptr, {});
    REQUIRE_FALSE(read);
    return read.error();
}

long count_of(const Gathered& city, const std::string& code) {
    return std::count_if(city.findings.begin(), city.findings.end(),
                         [&](const Finding& finding) { return finding.code == code; });
}

const Finding& the_finding(const Gathered& city, const std::string& code) {
    const auto at = std::find_if(city.findings.begin(), city.findings.end(),
                                 [&](const Finding& finding) { return finding.code == code; });
    REQUIRE(at != city.findings.end());
    return *at;
}

GatherFiles poles_only(std::string path, std::string crs = "EPSG:32609") {
    GatherFiles files;
    files.poles = std::move(path);
    files.crs = std::move(crs);
    return files;
}

} // namespace

TEST_CASE("gather: every line of Quillhaven's tables is read and kept, and nothing in them is doubtful") {
    GatherFiles files;
    for (auto [path, name] : {std::pair{&files.poles, "poles"},
                              {&files.circuits, "circuits"},
                              {&files.transformers, "transformers"},
                              {&files.cutbacks, "cutbacks"},
                              {&files.services, "services"},
                              {&files.climate, "climate"},
                              {&files.prices, "prices"},
                              {&files.budget, "budget"},
                              {&files.marks, "marks"}})
        *path = kQuillhaven + name + ".csv";
    files.crs = "EPSG:32609";
    const Gathered city = must_read(files);
    for (const auto& [table, count] : city.rows) {
        INFO(table);
        CHECK(count.read == rows_of_file(kQuillhaven + table + ".csv"));
        CHECK(count.kept == count.read);
        CHECK(count.set_aside == 0);
    }
    for (const Finding& finding : city.findings)
        UNSCOPED_INFO(finding.code << " " << finding.file << ":" << finding.row << " " << finding.found);
    CHECK(city.findings.empty());
    CHECK(city.crs_from == "user");
    CHECK(city.city.crs == "EPSG:32609");
    CHECK(city.city.centre.lat_deg == Approx(34).margin(0.1));
    CHECK(city.city.centre.lon_deg == Approx(-130).margin(0.1));
    CHECK(std::all_of(city.city.poles.begin(), city.city.poles.end(),
                      [](const Pole& pole) { return pole.string.is_valid() && pole.has_place; }));
    CHECK(city.climate.has_value());
}

TEST_CASE("gather: a quoted cell with a line break, a comma and doubled quotes comes back as written") {
    const TempFolder folder;
    const auto path = folder.write("poles.csv", "\xEF\xBB\xBFpole_id,easting,northing,note\r\nP1,400000,"
                                                "3760000,\"a \"\"b\"\", c\r\nd\"\r\nP2,400030,3760000,\r\n");
    const Gathered city = must_read(poles_only(path));
    REQUIRE(city.city.poles.size() == 2);
    CHECK(city.city.poles[0].note == "a \"b\", c\r\nd");
    CHECK(city.city.poles[0].from.row == 2);
    CHECK(city.city.poles[1].from.row == 4);
    CHECK(city.findings.empty());
}

TEST_CASE("gather: a row with too few cells is counted, found and left out") {
    const TempFolder folder;
    const auto path = folder.write(
        "poles.csv", "pole_id,easting,northing\nP1,400000,3760000\nP2,400030\nP3,400060,3760000\n");
    const Gathered city = must_read(poles_only(path));
    CHECK(city.rows.at("poles").read == 3);
    CHECK(city.rows.at("poles").kept == 2);
    CHECK(city.rows.at("poles").set_aside == 1);
    const Finding& finding = the_finding(city, "row-broken");
    CHECK(finding.row == 3);
    CHECK(finding.severity == Severity::error);
    CHECK(finding.found == "2 cells");
}

TEST_CASE("gather: semicolons and decimal commas are read as they are meant") {
    const TempFolder folder;
    const auto path = folder.write("poles.csv", "pole_id;easting;northing;mount_m;lamp_w\nP1;400000,50;"
                                                "3760000,25;8,5;188\nP2;400030,00;3760000,75;9;1.888\n");
    const Gathered city = must_read(poles_only(path));
    CHECK(city.city.poles[0].place.x_m == 400000.5);
    CHECK(city.city.poles[0].place.y_m == 3760000.25);
    CHECK(city.city.poles[0].mount_m == 8.5);
    CHECK(city.city.poles[1].lamp_w == 1888);
}

TEST_CASE("gather: a number that is none is a finding with row and column, and the field stays empty") {
    const TempFolder folder;
    const auto path = folder.write("poles.csv", "pole_id,easting,northing,lamp_w\nP1,400000,3760000,150 "
                                                "W\nP2,400030,3760000,-3\nP3,400060,3760000,188\n");
    const Gathered city = must_read(poles_only(path));
    CHECK(count_of(city, "number-unreadable") == 2);
    const Finding& finding = the_finding(city, "number-unreadable");
    CHECK(finding.row == 2);
    CHECK(finding.record == "P1");
    CHECK(finding.table == "poles");
    CHECK(finding.found == "lamp_w \"150 W\"");
    CHECK_FALSE(city.city.poles[0].lamp_w);
    CHECK_FALSE(city.city.poles[1].lamp_w);
    CHECK(city.city.poles[2].lamp_w == 188);
}

TEST_CASE("gather: an empty file, a folder, a missing file and a path into an archive are refused") {
    const TempFolder folder;
    CHECK(must_fail(poles_only(folder.write("empty.csv", ""))).code == FaultCode::file_broken);
    CHECK(must_fail(poles_only(folder.path(""))).code == FaultCode::file_missing);
    CHECK(must_fail(poles_only(folder.path("none.csv"))).code == FaultCode::file_missing);
    CHECK(must_fail(poles_only("/vsicurl/http://example.invalid/poles.csv")).code == FaultCode::file_missing);
    CHECK(must_fail(poles_only("http://example.invalid/poles.gpkg")).code == FaultCode::file_missing);
    GatherFiles odd = poles_only(folder.write("poles.csv", "pole_id,easting,northing\n"));
    odd.encoding = "no-such-set";
    CHECK(must_fail(odd).code == FaultCode::bad_usage);
}

TEST_CASE("gather: a table without its id column is refused and the columns that there are are named") {
    const TempFolder folder;
    const Fault fault =
        must_fail(poles_only(folder.write("poles.csv", "number,easting,northing\nP1,400000,3760000\n")));
    CHECK(fault.code == FaultCode::column_missing);
    CHECK(fault.field == "pole_id");
    CHECK(fault.found == "columns number, easting, northing");
}

TEST_CASE("gather: a row without an id is counted and said, a header without rows is a table of none") {
    const TempFolder folder;
    const Gathered city = must_read(poles_only(
        folder.write("poles.csv", "pole_id,easting,northing\n,400000,3760000\nP2,400030,3760000\n")));
    CHECK(city.rows.at("poles").set_aside == 1);
    CHECK(the_finding(city, "row-broken").row == 2);
    const Gathered none = must_read(poles_only(folder.write("none.csv", "pole_id,easting,northing\n")));
    CHECK(none.city.poles.empty());
    CHECK(none.rows.at("poles").read == 0);
    CHECK(none.city.crs == "EPSG:32609");
}

TEST_CASE("gather: a stop by the user ends it") {
    const std::atomic<bool> stop{true};
    Progress progress;
    progress.cancel = &stop;
    const auto read = read_files(poles_only(kQuillhaven + "poles.csv"), nullptr, progress);
    REQUIRE_FALSE(read);
    CHECK(read.error().code == FaultCode::cancelled);
}
