#include "geo/imports/text_table.h"

#include <random>
#include <string>

#include "geo/imports/text_encoding.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

struct Parsed {
    Table table;
    std::vector<Finding> findings;
};

Parsed parsed(const std::string& text) {
    std::vector<Finding> findings;
    auto table = parse_text_table(text, "t.csv", "poles", findings);
    REQUIRE(table);
    return {std::move(*table), std::move(findings)};
}

std::string in_quotes(const std::string& cell) {
    std::string out = "\"";
    for (const char c : cell) out += c == '"' ? std::string("\"\"") : std::string(1, c);
    return out + "\"";
}

} // namespace

TEST_CASE("text table: the delimiter is the one by which most rows have the header's cells") {
    CHECK(parsed("a,b\n1,2\n").table.delimiter == ',');
    CHECK(parsed("a;b\n1,5;2,5\n").table.delimiter == ';');
    CHECK(parsed("a\tb\n1,2\t3\n").table.delimiter == '\t');
    CHECK(parsed("a|b\n1|2\n").table.delimiter == '|');
    CHECK(parsed("a,b;c\n\"x;y\",2\n\"p;q\",3\n").table.delimiter == ',');
}

TEST_CASE(
    "text table: line ends of any kind, blank lines and a missing last line end make no rows and lose none") {
    for (const char* text :
         {"a,b\n1,2\n\n3,4\n", "a,b\r\n1,2\r\n\r\n3,4", "a,b\r1,2\r\r3,4\r", "\n\na,b\n1,2\n,\n3,4"}) {
        const auto [table, findings] = parsed(text);
        REQUIRE(table.rows() == 2);
        CHECK(table.read == 2);
        CHECK(table.cell(1, 1) == "4");
        CHECK(findings.empty());
    }
}

TEST_CASE("text table: a quote that never closes costs its own line only") {
    const auto [table, findings] = parsed("a,b\n1,\"open\n2,x\n3,y\n");
    CHECK(table.read == 3);
    CHECK(table.rows() == 2);
    CHECK(table.cell(0, 0) == "2");
    REQUIRE(findings.size() == 1);
    CHECK(findings[0].code == "row-broken");
    CHECK(findings[0].row == 2);
}

TEST_CASE("text table: cells over 64 KiB and rows without end are refused before they are kept") {
    const auto [table, findings] = parsed("a,b\n1," + std::string(70'000, 'x') + "\n2,y\n");
    CHECK(table.rows() == 1);
    CHECK(findings.size() == 1);
    std::vector<Finding> ignored;
    CHECK(parse_text_table("a" + std::string(5'000, ',') + "\n", "t.csv", "poles", ignored).error().code ==
          FaultCode::file_broken);
}

TEST_CASE("text table: of two columns of one name the first is read and the other is said") {
    const auto [table, findings] = parsed("a,b,a\n1,2,3\n");
    CHECK(table.columns == std::vector<std::string>{"a", "b", ""});
    CHECK(table.rows() == 1);
    REQUIRE(findings.size() == 1);
    CHECK(findings[0].code == "column-twice");
}

TEST_CASE("text table: a header without rows is a table of none, a file of blank lines is no table") {
    CHECK(parsed("a,b\n").table.rows() == 0);
    std::vector<Finding> ignored;
    CHECK_FALSE(parse_text_table("\n\n", "t.csv", "poles", ignored));
}

TEST_CASE("text table: whatever is written in quotes comes back, for random cells") {
    const unsigned seed = 42;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    const std::string letters = "ab\",;\n\r\t'|0.5 ";
    for (int round = 0; round < 300; ++round) {
        std::vector<std::string> cells;
        std::string text = "p,q,r\n";
        for (int i = 0; i < 30; ++i) {
            std::string cell = "x";
            for (unsigned n = random() % 8; n > 0; --n) cell += letters[random() % letters.size()];
            cell += "y";
            cells.push_back(cell);
            text += in_quotes(cell) + (i % 3 == 2 ? "\n" : ",");
        }
        const auto [table, findings] = parsed(text);
        REQUIRE(findings.empty());
        REQUIRE(table.rows() == 10);
        for (std::size_t i = 0; i < cells.size(); ++i)
            REQUIRE(std::string(table.cell(i / 3, i % 3)) == cells[i]);
    }
}

TEST_CASE("text table: random bytes end in a table or a fault, and every row is counted") {
    const unsigned seed = 7;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    const std::string letters = "a1,;\"\n\r \xE9\xC3\xA9";
    for (int round = 0; round < 3000; ++round) {
        std::string text;
        for (unsigned n = random() % 60; n > 0; --n) text += letters[random() % letters.size()];
        std::vector<Finding> findings;
        const auto table = parse_text_table(text, "t.csv", "poles", findings);
        if (!table) continue;
        const long broken = std::count_if(findings.begin(), findings.end(),
                                          [](const Finding& each) { return each.code == "row-broken"; });
        REQUIRE(table->read == static_cast<long>(table->rows()) + broken);
    }
}

TEST_CASE("encoding: marks, UTF-8, the one given, else a guess with a sample") {
    CHECK(decode_text("\xEF\xBB\xBF"
                      "ab",
                      "", "f")
              ->utf8 == "ab");
    CHECK(decode_text(std::string("\xFF\xFE"
                                  "a\0\xE9\0",
                                  6),
                      "", "f")
              ->utf8 == "a\xC3\xA9");
    CHECK(decode_text("r\xC3\xA9", "", "f")->encoding == "UTF-8");
    CHECK(decode_text("r\xC3\xA9", "ISO-8859-15", "f")->encoding == "UTF-8");
    CHECK(decode_text("\xA4", "ISO-8859-15", "f")->utf8 == "\xE2\x82\xAC");
    const auto guessed = decode_text("a,b\nRue des \xC9tangs,2\n", "", "f");
    CHECK(guessed->is_guessed);
    CHECK(guessed->sample_line == 2);
    CHECK(guessed->sample.find("\xC3\x89tangs") != std::string::npos);
    CHECK(decode_text("\x81\xE9", "", "f")->encoding == "ISO-8859-1");
    CHECK(decode_text("\xE9", "no-such-set", "f").error().code == FaultCode::bad_usage);
    CHECK(decode_text(std::string("a\0b", 3), "", "f").error().code == FaultCode::file_broken);
    CHECK_FALSE(is_utf8("\xC0\xAF"));
    CHECK_FALSE(is_utf8("\xED\xA0\x80"));
    CHECK_FALSE(is_utf8("\xF4\x90\x80\x80"));
    CHECK_FALSE(is_utf8("\xE2\x82"));
}
