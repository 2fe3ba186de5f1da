// What the program says when it is asked for what cannot be.

#include <fstream>

#include <catch2/catch.hpp>
#include <sys/file.h>

#include "tests/support/program.h"

using namespace unstring::tests;

namespace {

void check_fault(const Ran& ran, int status, const std::string& code) {
    CHECK(ran.status == status);
    INFO(ran.out << ran.err);
    const auto fault = ran.json().at("fault");
    for (const char* key : {"code", "file", "row", "field", "found", "wanted", "remedy"})
        CHECK(fault.contains(key));
    CHECK(fault["code"] == code);
    CHECK_FALSE(ran.err.empty());
}

} // namespace

TEST_CASE("command line: bad usage is status 2, a bad file is 3, each with a fault that says what to do") {
    const TempFolder folder;
    check_fault(run_program({"gather", folder.file("p.gpkg"), "--json"}), 2, "bad-usage");
    check_fault(run_program({"gather", "--nonsense", "--json"}), 2, "bad-usage");
    check_fault(run_program({"shade", folder.file("none.gpkg"), "--json"}), 3, "file-missing");
    check_fault(run_program({"gather", folder.file("p.gpkg"), "--poles", folder.file("none.csv"), "--json"}),
                3, "file-missing");
    std::ofstream(folder.file("text.gpkg")) << "no database";
    check_fault(run_program({"vet", folder.file("text.gpkg"), "--json"}), 3, "file-broken");
    check_fault(run_program({"work-out", "worth", "--rate", "x", "--years", "3", "--json"}), 2, "bad-usage");
    CHECK_FALSE(std::filesystem::exists(folder.file("p.gpkg")));
}

TEST_CASE("command line: every subcommand answers --help with an example") {
    for (const char* name : {"gather", "vet", "shade", "decide", "phase", "hand-out", "why", "work-out"}) {
        const Ran ran = run_program({name, "--help"});
        INFO(name);
        CHECK(ran.status == 0);
        CHECK(ran.out.find("Example: unstring") != std::string::npos);
    }
    for (const char* topic : {"sun", "sky", "night", "string", "horizon", "loop", "drop", "trench", "years",
                              "worth", "spares", "route"}) {
        const Ran ran = run_program({"work-out", topic, "--help"});
        INFO(topic);
        CHECK(ran.status == 0);
        CHECK(ran.out.find("Example") != std::string::npos);
    }
}

TEST_CASE("command line: a step whose forerunner has not run stops with status 1 and says what to run") {
    const TempFolder folder;
    const std::string project = folder.file("p.gpkg"), poles = folder.file("poles.csv"),
                      circuits = folder.file("circuits.csv");
    std::ofstream(poles)
        << "pole_id,string_id,order,easting,northing\nA1,S1,1,400000,3762000\nA2,S1,2,400030,3762000\n";
    std::ofstream(circuits) << "string_id,kind,current_a\nS1,series,6.6\n";
    REQUIRE(run_program({"gather", project, "--poles", poles, "--circuits", circuits, "--crs", "EPSG:32609"})
                .status == 0);
    const Ran shade = run_program({"shade", project, "--json"});
    CHECK(shade.status == 1);
    CHECK(shade.json()["fault"]["code"] == "not-ready");
    CHECK(shade.json()["fault"]["remedy"].get<std::string>().find("unstring vet") != std::string::npos);
    CHECK(run_program({"why", project, "A9", "--json"}).status == 2);
    CHECK(run_program({"why", project, "A1", "--json"}).status == 0);
}

TEST_CASE(
    "command line: while one process writes, another is told so with status 4, and looking still works") {
    const TempFolder folder;
    const std::string project = folder.file("p.gpkg"), poles = folder.file("poles.csv");
    std::ofstream(poles) << "pole_id,easting,northing\nA1,400000,3762000\n";
    REQUIRE(run_program({"gather", project, "--poles", poles, "--crs", "EPSG:32609"}).status == 0);
    const int lock = open((project + ".lock").c_str(), O_RDWR | O_CREAT, 0600);
    REQUIRE(flock(lock, LOCK_EX | LOCK_NB) == 0);
    check_fault(run_program({"vet", project, "--json"}), 4, "file-busy");
    check_fault(run_program({"gather", project, "--poles", poles, "--json"}), 4, "file-busy");
    CHECK(run_program({"why", project, "A1", "--json"}).status == 0);
    CHECK(run_program({"vet", project, "--look", "--json"}).status <= 1);
    close(lock);
    CHECK(run_program({"vet", project, "--json"}).status <= 1);
}
