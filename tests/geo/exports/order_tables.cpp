#include "geo/exports/order_tables.h"

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <sstream>

#include <catch2/catch.hpp>
#include <unistd.h>

using namespace unstring;

namespace {

std::string folder() {
    const auto path =
        std::filesystem::temp_directory_path() / ("unstring-tables-" + std::to_string(getpid()));
    std::filesystem::create_directories(path);
    return path;
}

std::string content_of(const std::string& path) {
    std::stringstream text;
    text << std::ifstream(path, std::ios::binary).rdbuf();
    return text.str();
}

/// RFC 4180 rows read back: the second way to the same cells.
std::vector<std::vector<std::string>> rows_of(const std::string& text) {
    std::vector<std::vector<std::string>> rows(1, {""});
    bool quoted = false;
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char c = text[i];
        if (quoted && c == '"' && i + 1 < text.size() && text[i + 1] == '"') {
            rows.back().back() += c;
            ++i;
        } else if (c == '"') {
            quoted = !quoted;
        } else if (c == ',' && !quoted) {
            rows.back().emplace_back();
        } else if (c == '\r' && !quoted) {
            ++i;
            rows.push_back({""});
        } else {
            rows.back().back() += c;
        }
    }
    rows.pop_back();
    return rows;
}

std::vector<WorkOrder> two_orders() {
    WorkOrder line;
    line.id = "2029-S-04-line";
    line.year = 2029;
    line.string_id = "S-04";
    line.unit_id = "RO-03";
    line.planned_volts_before = 1542.9;
    line.planned_volts_after = 731.04;
    line.open_circuit_v = 3181.8;
    line.hours = 35.25;
    line.poles.resize(2);
    line.poles[0].id = "04-208";
    line.poles[0].street = "=Cooper, \"Street\"";
    line.poles[1].id = "04-209";
    line.steps.resize(2);
    line.steps[0].text = "Test dead";
    line.steps[0].hold_point = true;
    line.steps[1].text = "Release";
    line.materials = {{"splice kit", "each", 4}, {"series cable", "m", 62.5}};
    WorkOrder swap;
    swap.id = "2029-S-05-line";
    swap.year = 2029;
    swap.after = {"2028-S-05-line", "2029-S-04-line"};
    return {line, swap};
}

} // namespace

TEST_CASE(
    "order tables: one row a pole, an order without poles has a row too, cells read back as they were") {
    const auto files = write_order_tables(folder(), City(), two_orders());
    REQUIRE(files.has_value());
    REQUIRE(files->size() == 3);
    const auto rows = rows_of(content_of((*files)[0]));
    REQUIRE(rows.size() == 4);
    const auto cell = [&](std::size_t row, const std::string& column) {
        const auto at = std::find(rows[0].begin(), rows[0].end(), column);
        REQUIRE(at != rows[0].end());
        return rows[row][static_cast<std::size_t>(at - rows[0].begin())];
    };
    for (const auto& row : rows) CHECK(row.size() == rows[0].size());
    CHECK(cell(1, "pole_id") == "04-208");
    CHECK(cell(1, "street") == "'=Cooper, \"Street\"");
    CHECK(cell(2, "place") == "2");
    CHECK(cell(1, "planned_volts_after") == "731.0");
    CHECK(cell(1, "open_circuit_from") == "estimate");
    CHECK(cell(1, "order_hours") == "35.25");
    CHECK(cell(3, "order_id") == "2029-S-05-line");
    CHECK(cell(3, "pole_id").empty());
    CHECK(cell(3, "after_orders") == "2028-S-05-line 2029-S-04-line");
    for (const char* returned : {"done", "date", "order", "amps", "volts", "insulation_mohm", "duct_found",
                                 "serial", "battery_date", "note"})
        CHECK(cell(1, returned).empty());
}

TEST_CASE("order tables: steps keep their order and their hold points, materials their quantities") {
    const auto files = write_order_tables(folder(), City(), two_orders());
    REQUIRE(files.has_value());
    const auto steps = rows_of(content_of((*files)[1]));
    REQUIRE(steps.size() == 3);
    CHECK(steps[1] == std::vector<std::string>{"2029-S-04-line", "1", "Test dead", "yes", "no"});
    CHECK(steps[2] == std::vector<std::string>{"2029-S-04-line", "2", "Release", "no", "no"});
    const auto materials = rows_of(content_of((*files)[2]));
    REQUIRE(materials.size() == 3);
    CHECK(materials[2] ==
          std::vector<std::string>{"2029-S-04-line", "2029", "line", "series cable", "m", "62.5"});
}

TEST_CASE("order tables: a folder that is not there is a fault that names the file, and nothing is left half "
          "written") {
    const auto files = write_order_tables("/no/such/folder", City(), two_orders());
    REQUIRE_FALSE(files.has_value());
    CHECK(files.error().code == FaultCode::write_failed);
    CHECK(files.error().file == "/no/such/folder/orders.csv");
    for (const auto& entry : std::filesystem::directory_iterator(folder()))
        CHECK(entry.path().extension() != ".part");
}
