// Both sets through gather: the clean one comes in whole, the dirty one gives the findings that it was made
// for.
#include <map>
#include <set>

#include <catch2/catch.hpp>

#include "geo/imports/gathered.h"
#include "model/vet/vet_result.h"
#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;
using unstring::Finding;
using unstring::GatherFiles;
using unstring::Progress;
using unstring::read_files;

namespace {

GatherFiles files_in(const std::string& folder) {
    const std::string path = std::string(UNSTRING_SOURCE) + "/sampledata/" + folder + "/";
    GatherFiles files;
    files.poles = path + "poles.csv", files.circuits = path + "circuits.csv",
    files.transformers = path + "transformers.csv";
    files.services = path + "services.csv", files.cutbacks = path + "cutbacks.csv",
    files.marks = path + "marks.csv";
    files.crs = "EPSG:32609";
    return files;
}

bool is_there(const std::vector<Finding>& findings, const Row& row) {
    for (const Finding& finding : findings) {
        const bool in_file = finding.file.size() >= row.at("file").size() &&
                             finding.file.compare(finding.file.size() - row.at("file").size(),
                                                  std::string::npos, row.at("file")) == 0;
        if (finding.code == row.at("code") && in_file &&
            (row.at("record").empty() || finding.record == row.at("record")))
            return true;
    }
    return false;
}

} // namespace

TEST_CASE("Quillhaven: gather takes every row and has nothing to say") {
    GatherFiles files = files_in("quillhaven");
    const std::string path = std::string(UNSTRING_SOURCE) + "/sampledata/quillhaven/";
    files.streets = path + "streets.gpkg", files.obstacles = path + "buildings.gpkg",
    files.canopy = path + "canopy.tif";
    files.climate = path + "climate.csv", files.prices = path + "prices.csv",
    files.budget = path + "budget.csv";
    const auto gathered = read_files(files, nullptr, Progress{});
    REQUIRE(gathered);
    for (const Finding& finding : gathered->findings)
        UNSCOPED_INFO(finding.code << " " << finding.file << " " << finding.row << " " << finding.found);
    CHECK(gathered->findings.empty());
    for (const auto& [table, count] : gathered->rows) {
        INFO(table);
        CHECK(count.read == count.kept);
        CHECK(count.read > 0);
    }
    CHECK(gathered->city.poles.size() == 1400);
    CHECK(gathered->city.streets.size() > 300);
    CHECK(gathered->city.obstacles.size() > 800);
    CHECK(gathered->city.centre.lat_deg == Approx(34).margin(0.02));
    CHECK(gathered->city.centre.lon_deg == Approx(-130).margin(0.02));
}

TEST_CASE("Quillhaven: vet has no error, and warns only of what every city has") {
    const auto gathered = read_files(files_in("quillhaven"), nullptr, Progress{});
    REQUIRE(gathered);
    const auto vetted = unstring::vet_city(gathered->city, gathered->catalog);
    const std::set<std::string> usual = {"attachments", "owner-consent", "untested-spare",
                                         "cutback-unconfirmed", "length-missing"};
    for (const Finding& finding : vetted.findings) {
        INFO(finding.code << " " << finding.file << " " << finding.row << " " << finding.record << ": "
                          << finding.found);
        CHECK(finding.severity != unstring::Severity::error);
        CHECK(usual.count(finding.code) == 1);
    }
    CHECK(vetted.strings.size() == 14);
    for (const auto& string : vetted.strings) {
        INFO(gathered->city.strings[string.string.place()].id << " at " << string.loading_frac);
        CHECK(string.loading_frac * string.tap >= 0.55); // of the rating, whatever the tap
        CHECK(string.loading_frac * string.tap <= 0.95);
        CHECK(string.loading_frac <= 1);
    }
}

TEST_CASE("dirty set: gather gives each finding that its rows were made for") {
    GatherFiles files = files_in("dirty");
    files.columns = std::string(UNSTRING_SOURCE) + "/sampledata/dirty/map.json";
    const auto gathered = read_files(files, nullptr, Progress{});
    REQUIRE(gathered);
    const std::set<std::string> at_gather = {"row-broken",   "number-unreadable", "string-name-variant",
                                             "pole-unknown", "unit-guessed",      "encoding-guessed"};
    for (const Row& row : read_csv(std::string(UNSTRING_SOURCE) + "/sampledata/dirty/expected.csv")) {
        if (at_gather.count(row.at("code")) == 0) continue;
        INFO(row.at("code") << " " << row.at("file") << " " << row.at("record"));
        CHECK(is_there(gathered->findings, row));
    }
}

TEST_CASE("dirty set: a pole file without places is said at gather") {
    GatherFiles files;
    files.poles = std::string(UNSTRING_SOURCE) + "/sampledata/dirty/no-place.csv";
    files.crs = "EPSG:32609";
    const auto gathered = read_files(files, nullptr, Progress{});
    REQUIRE(gathered);
    CHECK(std::any_of(gathered->findings.begin(), gathered->findings.end(),
                      [](const Finding& finding) { return finding.code == "column-missing"; }));
}
