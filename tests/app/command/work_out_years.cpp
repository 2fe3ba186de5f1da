#include "app/command/work_out_years.h"

#include <filesystem>
#include <fstream>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

/// One string of two sections, two years, one class. Done together in year 1: 1000 + 100 paid, nothing kept.
nlohmann::json tiny_case() {
    return {{"T", 2},
            {"discount", 0.0},
            {"keepGrowth", 0.0},
            {"minfrac", 0.1},
            {"mobilisationCost", 100},
            {"mobilisationHours", 1},
            {"swapCost", 50},
            {"swapHours", 1},
            {"buyCost", 500},
            {"spareFraction", 0.0},
            {"ratings", {10}},
            {"budget", {2000, 2000}},
            {"hours", {100, 100}},
            {"unitsOwned", {{1}, {1}}},
            {"strings",
             {{{"ratingIndex", 0},
               {"fixedKeep", 10},
               {"load", {4, 4}},
               {"capital", {400, 600}},
               {"hours", {10, 10}},
               {"keep", {30, 30}}}}}};
}

WorkOutAnswer answer_of(const nlohmann::json& json) {
    const auto path = std::filesystem::temp_directory_path() / "unstring_work_out_years.json";
    std::ofstream(path) << json.dump();
    WorkOutAnswer answer;
    CLI::App app;
    add_work_out_years(app, answer);
    app.parse("years " + path.string());
    std::filesystem::remove(path);
    return answer;
}

} // namespace

TEST_CASE("work-out years: everything in the first year is cheapest where money allows it") {
    const WorkOutAnswer answer = answer_of(tiny_case());
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["feasible"] == true);
    CHECK(answer.json["cost"].get<double>() == Approx(1100));
    CHECK(answer.json["bound"].get<double>() == Approx(1100).margin(0.01));
    CHECK(answer.json["gap_frac"].get<double>() == Approx(0).margin(1e-5));
    CHECK(answer.json["plan"][0]["done"] == nlohmann::json({2, 2}));
    CHECK(answer.json["plan"][0]["classes"] == nlohmann::json({nullptr, nullptr}));
    CHECK(answer.json["bought"] == nlohmann::json({{0}, {0}}));
    CHECK(answer.json["short"].empty());
    CHECK_FALSE(answer.steps_text.empty());
}

TEST_CASE("work-out years: money splits the work, and a year costs its keep and a second mobilisation") {
    nlohmann::json json = tiny_case();
    json["budget"] = {600, 900};
    const WorkOutAnswer answer = answer_of(json);
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["plan"][0]["done"] == nlohmann::json({1, 2}));
    CHECK(answer.json["cost"].get<double>() == Approx(1000 + 200 + 10 + 30));
    CHECK(answer.json["plan"][0]["classes"] == nlohmann::json({0, nullptr}));
}

TEST_CASE("work-out years: what cannot be is proved, and says which year, which limit, by how much") {
    nlohmann::json json = tiny_case();
    json["budget"] = {450, 650}; // 500 and 700 are wanted
    const WorkOutAnswer answer = answer_of(json);
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["feasible"] == false);
    CHECK(answer.json["proved_infeasible"] == true);
    CHECK(answer.json["gap_frac"].is_null());
    REQUIRE(answer.json["short"].size() == 2);
    CHECK(answer.json["short"][0]["year"] == 1);
    CHECK(answer.json["short"][0]["limit"] == "money");
    CHECK(answer.json["short"][0]["by"].get<double>() == Approx(50));
    CHECK(answer.json["short"][1]["by"].get<double>() == Approx(50));
}

TEST_CASE("work-out years: a wrong field is a fault that names it") {
    nlohmann::json json = tiny_case();
    SECTION("missing") {
        json.erase("T");
        CHECK(answer_of(json).fault->field == "T");
    }
    SECTION("one value too few") {
        json["budget"] = {600};
        CHECK(answer_of(json).fault->field == "budget");
    }
    SECTION("inside a string") {
        json["strings"][0]["capital"] = {400};
        CHECK(answer_of(json).fault->field == "strings[0].capital");
    }
    SECTION("negative units") {
        json["unitsOwned"] = {{1}, {-1}};
        CHECK(answer_of(json).fault->field == "unitsOwned");
    }
    SECTION("a key that is not known") {
        json["Budget"] = 1;
        CHECK(answer_of(json).fault->field == "Budget");
    }
    SECTION("no strings") {
        json["strings"] = nlohmann::json::array();
        CHECK(answer_of(json).fault->field == "strings");
    }
}
