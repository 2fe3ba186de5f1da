// Who may include what: the layers, and the few files that know an outside library.
#include <array>
#include <set>

#include <catch2/catch.hpp>

#include "tests/rules/tree.h"

using namespace rules_test;

namespace {

// A header of the standard library has no ending; <tbb/..>, <fmt/..> are model's own choice.
bool model_may(const Include& include) {
    if (!include.is_system) return starts_with(include.header, "model/");
    if (include.header.find_first_of("./") == std::string::npos) return true;
    for (const char* library : {"tbb/", "fmt/", "tl/"})
        if (starts_with(include.header, library)) return true;
    return include.header == "glpk.h";
}

bool is_qt(const std::string& header) {
    return header.size() > 1 && header[0] == 'Q' &&
           ((header[1] >= 'A' && header[1] <= 'Z') || header[1] == 't');
}

bool is_gdal(const std::string& header) {
    for (const char* start : {"gdal", "ogr", "cpl_", "vrt"})
        if (starts_with(header, start)) return true;
    return false;
}

std::set<std::string> files_with(const std::string& folder, bool (*matches)(const std::string&)) {
    std::set<std::string> files;
    for (const Include& include : includes_under(folder))
        if (include.is_system && matches(include.header)) files.insert(include.path);
    return files;
}

std::set<std::string> product_files_with(bool (*matches)(const std::string&)) {
    std::set<std::string> files;
    for (const char* folder : {"app/", "geo/", "model/"}) files.merge(files_with(folder, matches));
    return files;
}

std::string listed(const std::set<std::string>& files) {
    std::string text;
    for (const std::string& file : files) text += file + "\n";
    return text;
}

} // namespace

TEST_CASE("walls: model includes the standard library, TBB, fmt, expected and itself, nothing else") {
    const auto includes = includes_under("model/");
    REQUIRE(includes.size() > 100);
    for (const Include& include : includes) {
        INFO(include.path << " includes " << include.header);
        CHECK(model_may(include));
    }
}

TEST_CASE("walls: GLPK is known to one file") {
    const auto files = product_files_with([](const std::string& header) { return header == "glpk.h"; });
    INFO(listed(files));
    CHECK(files.size() <= 1);
}

TEST_CASE("walls: geo includes no Qt and nothing of app") {
    const auto includes = includes_under("geo/");
    REQUIRE(includes.size() > 20);
    for (const Include& include : includes) {
        INFO(include.path << " includes " << include.header);
        CHECK_FALSE((include.is_system && is_qt(include.header)));
        CHECK_FALSE(starts_with(include.header, "app/"));
    }
}

TEST_CASE("walls: in app only paper and window, and the main file, know Qt") {
    const auto files = files_with("app/", is_qt);
    for (const std::string& file : files) {
        INFO(file);
        CHECK(
            (starts_with(file, "app/paper/") || starts_with(file, "app/window/") || file == "app/main.cpp"));
    }
}

TEST_CASE("walls: SQLite is known to one file, PROJ to one, GDAL to a handful, all in geo") {
    const auto sqlite =
        product_files_with([](const std::string& header) { return starts_with(header, "sqlite3"); });
    const auto proj =
        product_files_with([](const std::string& header) { return starts_with(header, "proj"); });
    const auto gdal = product_files_with(is_gdal);
    INFO("SQLite\n" << listed(sqlite) << "PROJ\n" << listed(proj) << "GDAL\n" << listed(gdal));
    CHECK(sqlite.size() == 1);
    CHECK(proj.size() == 1);
    CHECK(gdal.size() >= 1);
    CHECK(gdal.size() <= 6);
    for (const auto& files : {sqlite, proj, gdal})
        for (const std::string& file : files) CHECK(starts_with(file, "geo/"));
}

TEST_CASE("walls: what is built for users includes nothing of tests or sampledata") {
    for (const char* folder : {"app/", "geo/", "model/", "resources/"})
        for (const Include& include : includes_under(folder)) {
            INFO(include.path << " includes " << include.header);
            CHECK_FALSE(starts_with(include.header, "tests/"));
            CHECK_FALSE(starts_with(include.header, "sampledata/"));
            CHECK_FALSE(starts_with(include.header, "catch2/"));
        }
}

TEST_CASE("walls: an include of our own names a file that is there, from the root of the tree") {
    std::set<std::string> paths;
    for (const SourceFile& file : tree()) paths.insert(file.path);
    for (const Include& include : includes_under("")) {
        if (include.is_system) continue;
        INFO(include.path << " includes " << include.header);
        CHECK(paths.count(include.header) == 1);
    }
}
