#include "geo/project/lock.h"

#include <csignal>
#include <filesystem>

#include <catch2/catch.hpp>
#include <sys/wait.h>

#include "tests/geo/project/sample_tables.h"

using namespace unstring;
using namespace unstring::tests;

TEST_CASE("lock: a second writer is told who holds it, and the file goes when the first is done") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    {
        const auto first = WriterLock::take(path);
        REQUIRE(first);
        const auto second = WriterLock::take(path);
        REQUIRE_FALSE(second);
        CHECK(second.error().code == FaultCode::file_busy);
        CHECK(second.error().found.find(user_name()) != std::string::npos);
        CHECK(second.error().found.find(" since 20") != std::string::npos);
    }
    CHECK_FALSE(std::filesystem::exists(path + ".lock"));
    CHECK(WriterLock::take(path));
}

TEST_CASE("lock: a holder that was killed holds nothing") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    int ready[2];
    REQUIRE(pipe(ready) == 0);
    const pid_t child = fork();
    if (child == 0) {
        const auto held = WriterLock::take(path);
        const char mark = held ? 'y' : 'n';
        (void)!write(ready[1], &mark, 1);
        pause();
        _exit(0);
    }
    char mark = 0;
    REQUIRE(read(ready[0], &mark, 1) == 1);
    REQUIRE(mark == 'y');
    CHECK_FALSE(WriterLock::take(path));
    kill(child, SIGKILL);
    waitpid(child, nullptr, 0);
    CHECK(std::filesystem::exists(path + ".lock"));
    CHECK(WriterLock::take(path));
}
