#include "geo/exports/csv_cell.h"

#include <string>

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("csv cell: what a spreadsheet would run stays text, numbers stay numbers") {
    CHECK(safe_text("=1+1") == "'=1+1");
    CHECK(safe_text("  =HYPERLINK(\"x\")") == "'  =HYPERLINK(\"x\")");
    CHECK(safe_text("@SUM(A1)") == "'@SUM(A1)");
    CHECK(safe_text("+49 30 1234") == "'+49 30 1234");
    CHECK(safe_text("-cmd") == "'-cmd");
    CHECK(safe_text("\tx") == "'\tx");
    CHECK(safe_text("\r=1+1") == "'=1+1");
    CHECK(safe_text("\x01=1") == "'=1");
    CHECK(safe_text("-12.5") == "-12.5");
    CHECK(safe_text("04-201") == "04-201");
    CHECK(safe_text("Tide Lane") == "Tide Lane");
    CHECK(safe_text("") == "");
}

TEST_CASE("csv cell: commas, quotes and line feeds are quoted by RFC 4180") {
    CHECK(csv_row({"a", "b,c", "say \"x\"", "two\nlines", ""}) ==
          "a,\"b,c\",\"say \"\"x\"\"\",\"two\nlines\",\r\n");
    CHECK(csv_row({"\xC3\x9C"
                   "ber",
                   "\xD7\xA8\xD7\x97"}) == "\xC3\x9C"
                                           "ber,\xD7\xA8\xD7\x97\r\n");
}
