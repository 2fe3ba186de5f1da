// Rules for single files.
#include <set>

#include <catch2/catch.hpp>

#include "tests/rules/tree.h"

using namespace rules_test;

TEST_CASE("files: every header opens with #pragma once") {
    int headers = 0;
    for (const SourceFile& file : tree()) {
        if (!ends_with(file.path, ".h")) continue;
        ++headers;
        INFO(file.path);
        CHECK(starts_with(file.text, "#pragma once\n"));
    }
    CHECK(headers > 50);
}

TEST_CASE("files: nothing is left marked as work to do") {
    const std::regex marks("\\b(TO"
                           "DO|FIX"
                           "ME|XX"
                           "X)\\b");
    for (const SourceFile& file : tree()) {
        if (!is_code(file) && !ends_with(file.path, ".md") && !ends_with(file.path, ".txt") &&
            !ends_with(file.path, ".csv") && !ends_with(file.path, ".json") && file.path != "dev")
            continue;
        INFO(file.path);
        CHECK_FALSE(std::regex_search(file.text, marks));
    }
}

// Paths stand in `back ticks`; one that begins with a folder of the tree must lead somewhere. Names with a
// blank, a star or <..> are commands and patterns, and build/ is not there before the first build.
TEST_CASE("files: a path that a page names is there") {
    static const std::regex kTicked("`([^`\\n]+)`");
    std::set<std::string> tops;
    for (const SourceFile& file : tree()) tops.insert(file.path.substr(0, file.path.find('/')));
    int named = 0;
    for (const SourceFile& page : tree()) {
        if (!ends_with(page.path, ".md")) continue;
        for (auto at = std::sregex_iterator(page.text.begin(), page.text.end(), kTicked);
             at != std::sregex_iterator(); ++at) {
            std::string path = (*at)[1];
            if (path.find_first_of(" *<>{}|:") != std::string::npos) continue;
            if (starts_with(path, "./")) path = path.substr(2);
            if (tops.count(path.substr(0, path.find('/'))) == 0) continue;
            ++named;
            INFO(page.path << " names " << path);
            CHECK(std::filesystem::exists(std::filesystem::path(UNSTRING_SOURCE) / path));
        }
    }
    CHECK(named >= (std::filesystem::exists(std::filesystem::path(UNSTRING_SOURCE) / "README.md") ? 3 : 0));
}

TEST_CASE("files: a test lies where its subject lies") {
    const std::set<std::string> apart = {"published", "end_to_end", "crash",  "fuzz",
                                         "bench",     "rules",      "support"};
    for (const SourceFile& file : tree()) {
        if (!is_code(file) || !starts_with(file.path, "tests/")) continue;
        const std::string inside = file.path.substr(6), folder = inside.substr(0, inside.find('/'));
        if (apart.count(folder) == 1) continue;
        INFO(file.path);
        CHECK(std::filesystem::exists(std::filesystem::path(UNSTRING_SOURCE) /
                                      inside.substr(0, inside.rfind('/'))));
    }
}
