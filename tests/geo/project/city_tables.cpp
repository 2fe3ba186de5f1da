#include "geo/project/city_tables.h"

#include <catch2/catch.hpp>

#include "geo/project/input_hash.h"
#include "tests/geo/project/project_case.h"

using namespace unstring;
using namespace unstring::tests;

TEST_CASE("city tables: every column that is written is read back, so the hash of all records stays") {
    const TempFolder folder;
    const CityTables before = sample_tables();
    const auto database = make_project(folder.file("p.gpkg"), before);
    const CityTables after = read_city_tables(*database);
    REQUIRE_FALSE(database->is_failed());
    CHECK(vet_input_hash(after) == vet_input_hash(before));
    CHECK(shade_input_hash(after, 3, {}) == shade_input_hash(before, 3, {}));
    CHECK(after.city.poles[0].note == before.city.poles[0].note);
    CHECK(after.city.poles[4].from.row == 6);
    CHECK_FALSE(after.city.poles[3].has_place);
    CHECK(after.city.canopy[0].is_protected);
    CHECK(after.city.obstacles[0].ring.size() == 4);
    CHECK(after.counts.size() == 1);
    CHECK(after.counts[0].set_aside == 1);
    CHECK(after.city.convergence_deg == before.city.convergence_deg);
    CHECK(after.canopy_raster == "/data/canopy.tif");
}

TEST_CASE("input hash: a price changed and changed back leaves it as it was, and a note does not touch it") {
    CityTables tables = sample_tables();
    const Plan plan = new_plan(tables.city, "first");
    const auto decide = [&] { return decide_input_hash(tables, {}, plan, "shade"); };
    const std::string at_first = decide();
    auto rows = tables.prices.rows();
    rows[0].base = 46;
    tables.prices = PriceBook(rows);
    CHECK(decide() != at_first);
    rows[0].base = 45;
    tables.prices = PriceBook(rows);
    CHECK(decide() == at_first);
    tables.city.poles[0].note = "seen in the rain";
    tables.city.poles[0].from.row = 99;
    CHECK(decide() == at_first);
    tables.city.poles[0].need_lm = 5000;
    CHECK(decide() != at_first);
}

TEST_CASE("input hash: the order of rows in a file does not matter, the values do") {
    CityTables tables = sample_tables();
    const std::string at_first = vet_input_hash(tables);
    std::swap(tables.city.poles[0], tables.city.poles[4]);
    CHECK(vet_input_hash(tables) == at_first);
    std::swap(tables.city.poles[0].order, tables.city.poles[4].order);
    CHECK(vet_input_hash(tables) != at_first);
}

TEST_CASE("city tables: records set aside are marked in the tables as they lie") {
    const TempFolder folder;
    const auto database = make_project(folder.file("p.gpkg"));
    CityTables tables = read_city_tables(*database);
    tables.city.poles[2].set_aside = true;
    tables.city.transformers[0].set_aside = true;
    REQUIRE(database->transaction([&] { write_set_aside(*database, tables.city); }));
    const CityTables after = read_city_tables(*database);
    CHECK(after.city.poles[2].set_aside);
    CHECK_FALSE(after.city.poles[1].set_aside);
    CHECK(after.city.transformers[0].set_aside);
}
