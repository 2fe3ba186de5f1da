// The sample city and its dirty twin: what gather itself must say of them, by file, line and record.

#include <algorithm>
#include <fstream>
#include <set>
#include <sstream>
#include <string>
#include <vector>

#include "geo/imports/gathered.h"

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

std::string sample(const std::string& name) { return std::string(UNSTRING_SOURCE) + "/sampledata/" + name; }

Gathered must_read(const GatherFiles& files) {
    auto read = read_files(files, nullptr, {});
    INFO((read ? std::string() : fault_text(read.error())));
    REQUIRE(read);
    return std::move(*read);
}

} // namespace

TEST_CASE("sample city: streets, buildings and canopy come in with the system that they carry, the poles by "
          "it too") {
    GatherFiles files;
    files.poles = sample("quillhaven/poles.csv");
    files.circuits = sample("quillhaven/circuits.csv");
    files.streets = sample("quillhaven/streets.gpkg");
    files.obstacles = sample("quillhaven/buildings.gpkg");
    files.canopy = sample("quillhaven/canopy.tif");
    const Gathered city = must_read(files); // no --crs: the tables take that of the layers at the same place
    CHECK(city.city.crs == "EPSG:32609");
    CHECK(city.crs_from == "file");
    CHECK(city.rows.at("streets").kept == 388);
    CHECK(city.city.streets.size() >= 388);
    CHECK(city.rows.at("obstacles").kept == 1477);
    CHECK(std::all_of(city.city.obstacles.begin(), city.city.obstacles.end(),
                      [](const Obstacle& each) { return each.height_m > 0 && each.ring.size() > 3; }));
    CHECK(city.canopy_fingerprint.size() == 32);
    CHECK(city.canopy_raster == sample("quillhaven/canopy.tif"));
    CHECK(city.findings.empty());
}

TEST_CASE("dirty set: every finding that reading can give stands at its file, line and record") {
    GatherFiles files;
    for (auto [path, name] : {std::pair{&files.poles, "poles"},
                              {&files.circuits, "circuits"},
                              {&files.transformers, "transformers"},
                              {&files.cutbacks, "cutbacks"},
                              {&files.services, "services"},
                              {&files.marks, "marks"}})
        *path = sample("dirty/") + name + ".csv";
    files.columns = sample("dirty/map.json");
    files.crs = "EPSG:32609";
    const Gathered city = must_read(files);
    const std::set<std::string> read_codes = {"row-broken",   "number-unreadable", "string-name-variant",
                                              "pole-unknown", "encoding-guessed",  "unit-guessed"};
    std::ifstream expected(sample("dirty/expected.csv"));
    std::string line;
    std::getline(expected, line);
    std::size_t wanted = 0;
    while (std::getline(expected, line)) {
        std::stringstream cells(line);
        std::string code, file, row, record;
        std::getline(cells, code, ',');
        std::getline(cells, file, ',');
        std::getline(cells, row, ',');
        std::getline(cells, record, ',');
        if (!read_codes.contains(code)) continue;
        ++wanted;
        INFO(line);
        CHECK(std::any_of(city.findings.begin(), city.findings.end(), [&](const Finding& finding) {
            return finding.code == code && finding.file == sample("dirty/") + file &&
                   finding.row == std::stol(row) && (record.empty() || finding.record == record);
        }));
    }
    CHECK(wanted == 11);
    for (const Finding& finding : city.findings) {
        INFO(finding.code << " " << finding.file << ":" << finding.row << " " << finding.found);
        CHECK(read_codes.contains(finding.code));
    }
    for (const auto& [table, count] : city.rows) {
        INFO(table);
        CHECK(count.read == count.kept + count.set_aside);
    }
    CHECK(city.rows.at("poles").set_aside == 1);
}
