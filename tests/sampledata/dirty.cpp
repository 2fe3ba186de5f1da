#include "sampledata/dirty.h"

#include <algorithm>
#include <filesystem>
#include <set>

#include <catch2/catch.hpp>

#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;

namespace {

std::string dirty(const std::string& file) {
    return std::string(UNSTRING_SOURCE) + "/sampledata/dirty/" + file;
}

std::vector<std::string> lines_of(const std::string& text) {
    std::vector<std::string> lines(1);
    for (const char letter : text)
        if (letter == '\n')
            lines.emplace_back();
        else
            lines.back() += letter;
    return lines;
}

} // namespace

TEST_CASE("dirty set: made again it is the committed one, byte for byte") {
    const auto folder = std::filesystem::temp_directory_path() / "unstring_sampledata_dirty";
    std::filesystem::remove_all(folder);
    REQUIRE(unstring::sample::write_dirty(folder.string()));
    std::set<std::string> made, kept;
    for (const auto& entry : std::filesystem::directory_iterator(folder))
        made.insert(entry.path().filename());
    for (const auto& entry : std::filesystem::directory_iterator(dirty("")))
        kept.insert(entry.path().filename());
    CHECK(made == kept);
    for (const std::string& file : made) {
        INFO(file);
        CHECK(text_of_file((folder / file).string()) == text_of_file(dirty(file)));
    }
    std::filesystem::remove_all(folder);
}

TEST_CASE("dirty set: every code that gather and vet can give has a row, and the row names its record") {
    // The contract's list without those that only a shade, a decision or a plan can give.
    const std::set<std::string> wanted = {"row-broken",          "number-unreadable", "column-missing",
                                          "pole-id-twice",       "place-missing",     "place-swapped",
                                          "string-unknown",      "current-mixed",     "transformer-twice",
                                          "order-twice",         "load-over",         "volts-over",
                                          "pole-near-twin",      "place-far",         "string-name-variant",
                                          "transformer-missing", "order-missing",     "order-gap",
                                          "span-long",           "load-low",          "lamp-unknown",
                                          "led-on-string",       "date-odd",          "reading-differs",
                                          "owner-consent",       "pole-unknown",      "attachments",
                                          "unit-guessed",        "order-inferred",    "cutback-unconfirmed",
                                          "untested-spare",      "encoding-guessed"};
    std::set<std::string> shown;
    for (const Row& row : read_csv(dirty("expected.csv"))) {
        INFO(row.at("code") << " " << row.at("file") << " line " << row.at("line"));
        shown.insert(row.at("code"));
        const auto lines = lines_of(text_of_file(dirty(row.at("file"))));
        const auto line = static_cast<std::size_t>(std::stoi(row.at("line")));
        REQUIRE(line < lines.size());
        CHECK(lines[line - 1].find(row.at("record")) != std::string::npos);
    }
    CHECK(shown == wanted);
}

TEST_CASE("dirty set: the pole file is Latin-1 with CRLF and semicolons, and not UTF-8") {
    const std::string text = text_of_file(dirty("poles.csv"));
    CHECK(text.find("fa\xe7"
                    "ade") != std::string::npos);
    CHECK(std::count(text.begin(), text.end(), '\r') == std::count(text.begin(), text.end(), '\n'));
    const auto lines = lines_of(text);
    CHECK(std::count(lines[0].begin(), lines[0].end(), ';') == 23);
}
