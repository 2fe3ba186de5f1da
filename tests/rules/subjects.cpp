// The subjects of model: what each may include is read from model/CMakeLists.txt, so that the two cannot
// differ.
#include <map>
#include <set>

#include <catch2/catch.hpp>

#include "tests/rules/tree.h"

using namespace rules_test;

namespace {

using Links = std::map<std::string, std::set<std::string>>;

// The lines `unstring_subject(name others ..)`; the function's own definition is no such line.
Links linked() {
    static const std::regex kSubject(R"(^unstring_subject\(([a-z_ \t]+)\))", std::regex::multiline);
    const std::string text = text_of(std::string(UNSTRING_SOURCE) + "/model/CMakeLists.txt");
    Links links;
    for (auto at = std::sregex_iterator(text.begin(), text.end(), kSubject); at != std::sregex_iterator();
         ++at) {
        std::istringstream words((*at)[1]);
        std::string name, other;
        words >> name;
        links[name];
        while (words >> other) links[name].insert(other);
    }
    return links;
}

// "model/<subject>/file.h" -> subject; empty for the files that lie in model itself.
std::string subject_of(const std::string& path) {
    const std::string inside = path.substr(std::string("model/").size());
    const auto slash = inside.find('/');
    return slash == std::string::npos ? "" : inside.substr(0, slash);
}

bool reaches(const Links& links, const std::string& from, const std::string& to,
             std::set<std::string>& seen) {
    if (!seen.insert(from).second) return false;
    for (const std::string& next : links.at(from))
        if (next == to || reaches(links, next, to, seen)) return true;
    return false;
}

} // namespace

TEST_CASE("subjects: a subject of model includes only subjects that its library links") {
    const Links links = linked();
    REQUIRE(links.size() >= 10);
    int across = 0;
    for (const Include& include : includes_under("model/")) {
        if (include.is_system || !starts_with(include.header, "model/")) continue;
        const std::string from = subject_of(include.path), to = subject_of(include.header);
        if (from == to || to.empty()) continue;
        // flow.h shows the whole flow on one page; it is the one file of model itself that looks down.
        if (include.path == "model/flow.h") continue;
        INFO(include.path << " includes " << include.header);
        REQUIRE(links.count(from) == 1);
        CHECK(links.at(from).count(to) == 1);
        ++across;
    }
    CHECK(across > 20);
}

TEST_CASE("subjects: the folders of model are the subjects of its CMakeLists.txt") {
    std::set<std::string> folders, names;
    for (const SourceFile& file : tree())
        if (is_code(file) && starts_with(file.path, "model/") && !subject_of(file.path).empty())
            folders.insert(subject_of(file.path));
    for (const auto& [name, others] : linked()) names.insert(name);
    for (const std::string& folder : folders) {
        INFO(folder);
        CHECK(names.count(folder) == 1);
    }
}

TEST_CASE("subjects: they form no circle, and each links only subjects that exist") {
    const Links links = linked();
    for (const auto& [name, others] : links) {
        for (const std::string& other : others) {
            INFO(name << " links " << other);
            REQUIRE(links.count(other) == 1);
        }
        INFO(name);
        std::set<std::string> seen;
        CHECK_FALSE(reaches(links, name, name, seen));
    }
}
