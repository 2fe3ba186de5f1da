#include "model/catalog/prices.h"

#include <set>
#include <stdexcept>

#include <catch2/catch.hpp>

#include "tests/support/default_prices.h"

using namespace unstring;

namespace {

PriceRow row_of(const char* item, const char* unit, double base, std::optional<int> from = {},
                std::optional<int> to = {}, double change = 0) {
    PriceRow row;
    row.item = item;
    row.unit = unit;
    row.low = row.base = row.high = base;
    row.from_year = from;
    row.to_year = to;
    row.change_frac_year = change;
    return row;
}

} // namespace

TEST_CASE("prices: the default book holds exactly the closed list, in its order, with its units") {
    const auto rows = default_price_rows();
    REQUIRE(rows.size() == price_items().size());
    for (std::size_t i = 0; i < rows.size(); ++i) {
        INFO(rows[i].item);
        CHECK(rows[i].item == price_items()[i].item);
        CHECK(rows[i].unit == price_items()[i].unit);
    }
}

TEST_CASE("prices: every row of the default book has low <= base <= high and says what it rests on") {
    for (const PriceRow& row : default_price_rows()) {
        INFO(row.item);
        CHECK(row.low >= 0);
        CHECK(row.low <= row.base);
        CHECK(row.base <= row.high);
        const bool marked = row.note.find("assumption") != std::string::npos ||
                            row.note.find("invented") != std::string::npos ||
                            row.note.find("from memory") != std::string::npos;
        CHECK(marked);
    }
}

TEST_CASE("prices: no item stands twice in the closed list") {
    std::set<std::string_view> seen;
    for (const PriceItem& item : price_items()) CHECK(seen.insert(item.item).second);
}

TEST_CASE("prices: a price per foot comes back per metre, a pace in feet in metres a day") {
    const PriceBook book = default_prices();
    CHECK(book.at("trench_soft", 2027) == Approx(45 / 0.3048));
    CHECK(book.at("pace_trench_soft", 2027) == Approx(150 * 0.3048));
    CHECK(book.at("led_head", 2027) == 450);
    CHECK(PriceBook({row_of("trench_soft", "m", 150)}).at("trench_soft", 2027) == 150);
}

TEST_CASE("prices: the last row that has begun holds, and grows from its own year") {
    const PriceBook book(
        {row_of("led_head", "each", 500, 2030, {}, 0.02), row_of("led_head", "each", 400, 2027)});
    CHECK(book.at("led_head", 2029) == 400);
    CHECK(book.at("led_head", 2030) == 500);
    CHECK(book.at("led_head", 2032) == Approx(500 * 1.02 * 1.02));
    CHECK(book.at("led_head", 2020) == 400); // before the first row: the first to come
}

TEST_CASE("prices: after its to_year a row stands still until the next begins") {
    const PriceBook book({row_of("led_head", "each", 400, 2027, 2028, 0.10)});
    CHECK(book.at("led_head", 2028) == Approx(440));
    CHECK(book.at("led_head", 2035) == Approx(440));
}

TEST_CASE("prices: a name outside the closed list is a bug, not a price") {
    CHECK_THROWS_AS(default_prices().at("led-head", 2027), std::logic_error);
    CHECK_THROWS_AS(PriceBook().at("led_head", 2027), std::logic_error);
}

TEST_CASE("prices: a book with one row takes the rest from the defaults and keeps its own") {
    const PriceBook book = PriceBook({row_of("led_head", "each", 777)}).with_defaults(default_prices());
    CHECK(book.at("led_head", 2027) == 777);
    CHECK(book.at("pull_box", 2027) == 1200);
    CHECK(book.rows().size() == price_items().size());
}

TEST_CASE("prices: metres may stand for feet, nothing else for the list's unit") {
    CHECK(price_unit_fits(*find_price_item("trench_soft"), "m"));
    CHECK(price_unit_fits(*find_price_item("pace_pull"), "m per crew-day"));
    CHECK_FALSE(price_unit_fits(*find_price_item("led_head"), "m"));
    CHECK(find_price_item("led-head") == nullptr);
}

TEST_CASE("prices: each conductor size has its wire item in the list") {
    for (const int awg : {14, 12, 10, 8, 6, 4, 3, 2, 1, 0, -1, -2, -3})
        CHECK(find_price_item(wire_item(awg)) != nullptr);
    CHECK(wire_item(-3) == "wire_awg4_0");
}
