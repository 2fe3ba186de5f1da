#include "geo/imports/columns.h"

#include <string>

#include "geo/imports/gathered.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

Table table_of(const std::string& name, std::vector<std::string> columns) {
    Table table;
    table.name = name;
    table.file = name + ".csv";
    table.columns = std::move(columns);
    return table;
}

std::string column_of(const Table& table, const Columns& columns, const char* field) {
    const auto at = columns.at(field).column;
    return at ? table.columns[*at] : std::string();
}

} // namespace

TEST_CASE("columns: the words of the field are matched without case, blanks, strokes and units") {
    const Table table =
        table_of("poles", {"PoleNum", "CKT_ID", "Seq No.", "X_ft", "Y_ft", "LAMP WATTS", "Lamp Type",
                           "Mounting Height (ft)", "Street Name", "EPA_sqft", "REMARKS", "FOO"});
    const auto columns = match_columns(table, {});
    REQUIRE(columns);
    CHECK(column_of(table, *columns, "pole_id") == "PoleNum");
    CHECK(column_of(table, *columns, "string_id") == "CKT_ID");
    CHECK(column_of(table, *columns, "order") == "Seq No.");
    CHECK(column_of(table, *columns, "easting") == "X_ft");
    CHECK(column_of(table, *columns, "northing") == "Y_ft");
    CHECK(column_of(table, *columns, "lamp_w") == "LAMP WATTS");
    CHECK(column_of(table, *columns, "fixture") == "Lamp Type");
    CHECK(column_of(table, *columns, "mount_m") == "Mounting Height (ft)");
    CHECK(column_of(table, *columns, "street") == "Street Name");
    CHECK(column_of(table, *columns, "epa_allow_m2") == "EPA_sqft");
    CHECK(column_of(table, *columns, "note") == "REMARKS");
    CHECK(columns->at("mount_m").to_si == 0.3048);
    CHECK(columns->at("epa_allow_m2").to_si == Approx(0.09290304).epsilon(1e-12));
    CHECK(columns->unused == std::vector<std::string>{"FOO"});
    CHECK(columns->guessed.size() == 11);
}

TEST_CASE("columns: our own names are taken before any guess") {
    const Table table = table_of("poles", {"ID", "Tag", "pole_id", "order", "sequence"});
    const auto columns = match_columns(table, {});
    CHECK(column_of(table, *columns, "pole_id") == "pole_id");
    CHECK(column_of(table, *columns, "order") == "order");
    CHECK(columns->guessed.empty());
}

TEST_CASE("columns: every field's own name is found as its own column, in every table") {
    for (const char* name : {"poles", "circuits", "transformers", "cutbacks", "services", "streets", "canopy",
                             "obstacles", "climate", "budget", "prices", "marks", "asbuilt"}) {
        std::vector<std::string> names;
        for (const Field& field : fields_of(name)) names.emplace_back(field.name);
        const Table table = table_of(name, names);
        const auto columns = match_columns(table, {});
        REQUIRE(columns);
        for (const Field& field : fields_of(name))
            CHECK(column_of(table, *columns, std::string(field.name).c_str()) == field.name);
    }
}

TEST_CASE("columns: the map goes before names and guesses, and null leaves a field out") {
    const TempFolder folder;
    const auto map =
        read_column_map(folder.write("map.json", R"({"poles": {"pole_id": "Other", "order": null}})"));
    REQUIRE(map);
    const Table table = table_of("poles", {"pole_id", "Other", "order"});
    const auto columns = match_columns(table, *map);
    REQUIRE(columns);
    CHECK(column_of(table, *columns, "pole_id") == "Other");
    CHECK_FALSE(columns->has("order"));
}

TEST_CASE("columns: names that a Shapefile cut at ten letters are known") {
    const Table table =
        table_of("poles", {"pole_id", "epa_allow_", "earliest_y", "secondary_", "attachment"});
    const auto columns = match_columns(table, {});
    REQUIRE(columns);
    CHECK(columns->unused.empty());
    CHECK(column_of(table, *columns, "earliest_year") == "earliest_y");
    CHECK(column_of(table, *columns, "secondary_here") == "secondary_");
}

TEST_CASE("columns: heights that can only be feet are read as feet and said, once told they are believed") {
    const TempFolder folder;
    GatherFiles files;
    files.poles = folder.write(
        "poles.csv", "pole_id,easting,northing,Mount "
                     "Ht,Arm\nA,400000,3760000,30,6\nB,400030,3760000,25,\nC,400060,3760000,35,8\n");
    files.crs = "EPSG:32609";
    const auto guessed = read_files(files, nullptr, {});
    REQUIRE(guessed);
    CHECK(*guessed->city.poles[0].mount_m == Approx(9.144));
    CHECK(*guessed->city.poles[0].arm_m == Approx(1.8288));
    REQUIRE(guessed->findings.size() == 1);
    CHECK(guessed->findings[0].code == "unit-guessed");
    files.columns = folder.write("map.json", R"({"units": {"length": "m"}})");
    const auto told = read_files(files, nullptr, {});
    REQUIRE(told);
    CHECK(*told->city.poles[0].mount_m == 30);
    CHECK(told->findings.empty());
}

TEST_CASE("columns: a map that cannot be meant is refused by key") {
    const TempFolder folder;
    const auto fault_of = [&](const char* json) {
        return read_column_map(folder.write("map.json", json)).error();
    };
    CHECK(fault_of("{").code == FaultCode::file_broken);
    CHECK(fault_of("[1]").code == FaultCode::file_broken);
    CHECK(fault_of(R"({"pole": {}})").code == FaultCode::value_unknown);
    CHECK(fault_of(R"({"poles": {"polid": "A"}})").field == "poles.polid");
    CHECK(fault_of(R"({"poles": {"pole_id": 3}})").code == FaultCode::value_unknown);
    CHECK(fault_of(R"({"poles": []})").code == FaultCode::value_unknown);
    CHECK(fault_of(R"({"units": {"length": "yd"}})").field == "units.length");
    CHECK(fault_of(R"({"units": {"mass": "lb"}})").code == FaultCode::value_unknown);
    CHECK(read_column_map(folder.path("none.json")).error().code == FaultCode::file_missing);
    const auto map = read_column_map(folder.write("map.json", R"({"poles": {"pole_id": "Nope"}})"));
    const auto columns = match_columns(table_of("poles", {"pole_id"}), *map);
    REQUIRE_FALSE(columns);
    CHECK(columns.error().code == FaultCode::column_missing);
    CHECK(columns.error().field == "pole_id");
}
