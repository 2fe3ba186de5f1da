// Both sets through gather and vet: the dirty one gives each finding at the record that it was made for, and
// after its errors are set aside none is left; the clean one has strings that a unit carries.
#include <algorithm>
#include <set>

#include <catch2/catch.hpp>

#include "geo/imports/gathered.h"
#include "model/vet/vet_result.h"
#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;
using unstring::Finding;
using unstring::Severity;

namespace {

const std::string kFolder = std::string(UNSTRING_SOURCE) + "/sampledata/";

unstring::Gathered gathered(const std::string& folder) {
    const std::string path = kFolder + folder + "/";
    unstring::GatherFiles files;
    files.poles = path + "poles.csv", files.circuits = path + "circuits.csv",
    files.transformers = path + "transformers.csv";
    files.services = path + "services.csv", files.cutbacks = path + "cutbacks.csv";
    files.crs = "EPSG:32609";
    if (folder == "dirty") files.columns = path + "map.json";
    if (folder == "quillhaven") files.streets = path + "streets.gpkg";
    auto read = unstring::read_files(files, nullptr, unstring::Progress{});
    REQUIRE(read);
    return *read;
}

long errors_in(const std::vector<Finding>& findings) {
    return std::count_if(findings.begin(), findings.end(),
                         [](const Finding& each) { return each.severity == Severity::error; });
}

bool is_there(const std::vector<Finding>& findings, const Row& row) {
    return std::any_of(findings.begin(), findings.end(), [&](const Finding& each) {
        return each.code == row.at("code") && each.file.ends_with(row.at("file")) &&
               (row.at("record").empty() || each.record == row.at("record"));
    });
}

} // namespace

TEST_CASE("dirty set: vet gives each finding that its rows were made for, and set aside no error is left") {
    const unstring::Gathered read = gathered("dirty");
    const unstring::VetResult result = unstring::vet_city(read.city, read.catalog);
    const std::set<std::string> at_gather = {"row-broken",      "number-unreadable", "string-name-variant",
                                             "column-missing",  "pole-unknown",      "unit-guessed",
                                             "encoding-guessed"};
    for (const Row& row : read_csv(kFolder + "dirty/expected.csv")) {
        if (at_gather.contains(row.at("code"))) continue;
        INFO(row.at("code") << " " << row.at("file") << " " << row.at("record") << " line "
                            << row.at("line"));
        CHECK(is_there(result.findings, row));
    }
    const unstring::City kept = unstring::set_aside_errors(read.city, result.findings);
    const unstring::VetResult again = unstring::vet_city(kept, read.catalog);
    for (const Finding& each : again.findings)
        if (each.severity == Severity::error)
            UNSCOPED_INFO(each.code << " " << each.record << " " << each.found);
    CHECK(errors_in(again.findings) == 0);
}

TEST_CASE("Quillhaven: vet finds no error") {
    const unstring::Gathered read = gathered("quillhaven");
    const unstring::VetResult result = unstring::vet_city(read.city, read.catalog);
    for (const Finding& each : result.findings)
        if (each.severity == Severity::error)
            UNSCOPED_INFO(each.code << " " << each.record << " " << each.found);
    CHECK(errors_in(result.findings) == 0);
    CHECK(result.strings.size() == 14);
    for (const unstring::VetString& string : result.strings) {
        INFO(read.city.strings[string.string.place()].id);
        CHECK(string.lamps >= 30);
        CHECK((string.verdict == unstring::Verdict::good || string.verdict == unstring::Verdict::tight));
        CHECK(string.volts > 500);
        CHECK(string.volts < 5000);
    }
}
