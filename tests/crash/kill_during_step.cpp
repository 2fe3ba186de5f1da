// kill -9 during each step leaves a file that opens as it was before or after the step.

#include <catch2/catch.hpp>

#include "tests/support/program.h"
#include "tests/support/project_content.h"

using namespace unstring::tests;
using namespace std::chrono;

namespace {

void copy_project(const std::string& from, const std::string& to) {
    for (const char* suffix : {"", "-wal", "-shm", "-journal", ".lock", ".new"})
        std::filesystem::remove(to + suffix);
    std::filesystem::copy_file(from, to);
}

// Kills the step at moments spread over the time that it takes, with more of them near the end, where the
// writing is.
void check_step(const std::string& before_path, const std::vector<std::string>& step,
                const TempFolder& folder) {
    const std::string work = folder.file("work.gpkg");
    std::vector<std::string> arguments = step;
    arguments.insert(arguments.begin() + 1, work);
    copy_project(before_path, work);
    const std::string before = project_content(work);
    const auto start = steady_clock::now();
    const Ran whole = run_program(arguments);
    const auto took = duration_cast<microseconds>(steady_clock::now() - start);
    INFO(whole.err);
    REQUIRE(whole.status == 0);
    const std::string after = project_content(work);
    REQUIRE(before != after);
    int untouched = 0, done = 0;
    for (double part : {.05, .3, .5, .6, .7, .8, .85, .9, .94, .97, .99}) {
        copy_project(before_path, work);
        (void)run_program(arguments, duration_cast<microseconds>(took * part));
        const std::string found = project_content(work);
        INFO(step[0] << " killed at " << part << " of " << took.count() << " us");
        const bool is_before = found == before, is_after = found == after;
        CHECK((is_before || is_after));
        untouched += is_before ? 1 : 0;
        done += is_after ? 1 : 0;
    }
    CHECK(untouched > 0); // else no kill came in time
    copy_project(before_path, work);
    REQUIRE(run_program(arguments).status == 0); // the lock of a dead process does not stand in the way
}

} // namespace

TEST_CASE("crash: a step that is killed leaves the project as it was before or after it") {
    const TempFolder folder;
    REQUIRE(
        run_file(UNSTRING_CITY_MAKER, {"--size", "150", "--seed", "5", "--to", folder.file("city")}).status ==
        0);
    const std::string project = folder.file("p.gpkg");
    std::filesystem::remove(folder.file("city") +
                            "/marks.csv"); // a lock may break a check, which would stop hand-out
    const Ran gathered = run_program(gather_arguments(project, folder.file("city")));
    INFO(gathered.err);
    REQUIRE(gathered.status == 0);
    const std::vector<std::vector<std::string>> steps = {
        {"vet"}, {"shade"}, {"decide"}, {"phase"}, {"hand-out", "--to", folder.file("orders")}};
    for (const auto& step : steps) {
        check_step(project, step, folder);
        std::vector<std::string> arguments = step;
        arguments.insert(arguments.begin() + 1, project);
        const Ran ran = run_program(arguments);
        INFO(ran.err);
        REQUIRE(ran.status == 0);
    }
}

TEST_CASE("crash: gather that is killed leaves no project, or a whole one") {
    const TempFolder folder;
    REQUIRE(
        run_file(UNSTRING_CITY_MAKER, {"--size", "150", "--seed", "5", "--to", folder.file("city")}).status ==
        0);
    const std::string project = folder.file("p.gpkg");
    const auto arguments = gather_arguments(project, folder.file("city"));
    const auto start = steady_clock::now();
    REQUIRE(run_program(arguments).status == 0);
    const auto took = duration_cast<microseconds>(steady_clock::now() - start);
    const std::string whole = project_content(project);
    for (double part : {.1, .4, .6, .75, .85, .9, .95, .98}) {
        std::filesystem::remove(project);
        (void)run_program(arguments, duration_cast<microseconds>(took * part));
        if (std::filesystem::exists(project)) CHECK(project_content(project) == whole);
        REQUIRE(run_program(arguments).status == 0);
        CHECK(project_content(project) == whole);
    }
}

TEST_CASE("crash: gather into a project that is there, killed, leaves the old tables or the new ones") {
    const TempFolder folder;
    REQUIRE(
        run_file(UNSTRING_CITY_MAKER, {"--size", "150", "--seed", "5", "--to", folder.file("city")}).status ==
        0);
    REQUIRE(run_file(UNSTRING_CITY_MAKER, {"--size", "150", "--seed", "6", "--to", folder.file("other")})
                .status == 0);
    const std::string project = folder.file("p.gpkg");
    REQUIRE(run_program(gather_arguments(project, folder.file("city"))).status == 0);
    check_step(project,
               {"gather", "--poles", folder.file("other") + "/poles.csv", "--circuits",
                folder.file("other") + "/circuits.csv"},
               folder);
}
