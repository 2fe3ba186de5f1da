// The topics string, loop and route, through their own option reading.

#include <cmath>
#include <filesystem>
#include <fstream>
#include <string>

#include <unistd.h>

#include <catch2/catch.hpp>

#include "app/command/work_out_loop.h"
#include "app/command/work_out_route.h"
#include "app/command/work_out_string.h"

using namespace unstring;

namespace {

WorkOutAnswer asked(void (*add)(CLI::App&, WorkOutAnswer&), const std::string& topic, const std::string& text,
                    const std::string& more = {}) {
    const std::string path =
        std::filesystem::temp_directory_path() / ("unstring-" + topic + "-" + std::to_string(getpid()));
    std::ofstream(path) << text;
    WorkOutAnswer answer;
    CLI::App app;
    add(app, answer);
    app.parse(topic + " " + path + " " + more);
    std::filesystem::remove(path);
    return answer;
}

WorkOutAnswer string_of(const std::string& text) { return asked(add_work_out_string, "string", text); }
WorkOutAnswer loop_of(const std::string& text) { return asked(add_work_out_loop, "loop", text); }
WorkOutAnswer route_of(const std::string& text, const std::string& more = {}) {
    return asked(add_work_out_route, "route", text, more);
}

std::string lamps(int count, const std::string& lamp) {
    std::string list;
    for (int i = 0; i < count; ++i) list += (i == 0 ? "" : ",") + lamp;
    return "[" + list + "]";
}

} // namespace

TEST_CASE("work-out string: thirty lamps of 188 W at pf .8 on 2 300 m of AWG 8, every key of the contract") {
    const WorkOutAnswer answer = string_of(
        R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 2300, "transformer": {"rated_kw": 10}, "lamps": )" +
        lamps(30, R"({"w": 188, "pf": 0.8})") + "}");
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["volts"].get<double>() == Approx(1096).margin(0.6));
    CHECK(answer.json["load_kva"].get<double>() == Approx(7.23).margin(0.006));
    CHECK(answer.json["load_kw"].get<double>() ==
          Approx(5.640 + answer.json["cable_w"].get<double>() / 1000));
    CHECK(answer.json["cable_w"].get<double>() ==
          Approx(6.6 * 6.6 * 2.3 * 0.778 / 0.3048 * (1 - 0.00323 * 50)));
    CHECK(answer.json["pf"].get<double>() ==
          Approx(answer.json["load_kw"].get<double>() / answer.json["load_kva"].get<double>()));
    CHECK(answer.json["loading_frac"].get<double>() == Approx(0.723).margin(0.001));
    CHECK(answer.json["verdict"] == "good");
    CHECK(answer.json["primary_pf"].get<double>() ==
          Approx((answer.json["load_kw"].get<double>() + 0.4) / (10.4 / 0.78)));
    CHECK(answer.steps_text.find("Source: ") != std::string::npos);
}

TEST_CASE("work-out string: each input counts") {
    const auto volts = [](const std::string& more) {
        const WorkOutAnswer answer =
            string_of(R"({"cable_m": 5000, "lamps": [{"w": 188, "pf": 0.8}], )" + more + "}");
        REQUIRE_FALSE(answer.fault);
        return answer.json["volts"].get<double>();
    };
    const double usual = volts(R"("current_a": 6.6, "cable_awg": 8)");
    CHECK(volts(R"("current_a": 20, "cable_awg": 8)") != Approx(usual));
    CHECK(volts(R"("current_a": 6.6, "cable_awg": 6)") < usual);
    CHECK(volts(R"("current_a": 6.6, "cable_awg": "1/0")") < volts(R"("current_a": 6.6, "cable_awg": 6)"));
    CHECK(volts(R"("current_a": 6.6, "cable_awg": "1/0")") == volts(R"("current_a": 6.6, "cable_awg": 0)"));
    CHECK(volts(R"("current_a": 6.6, "cable_awg": 8, "cable_c": 75)") > usual);
    CHECK(volts(R"("current_a": 6.6, "cable_awg": 8, "ageing_frac": 0.1)") > usual);
}

TEST_CASE("work-out string: without a transformer the string is open, without lamps none") {
    const WorkOutAnswer open =
        string_of(R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 100, "lamps": [{"w": 188, "pf": 0.8}]})");
    CHECK(open.json["verdict"] == "open");
    CHECK(open.json["loading_frac"].is_null());
    CHECK(open.json["primary_pf"].is_null());
    const WorkOutAnswer none = string_of(
        R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 100, "lamps": [{"w": 0, "pf": 0.8}], "transformer": {"rated_kw": 5}})");
    CHECK(none.json["verdict"] == "none");
    const WorkOutAnswer low = string_of(
        R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 100, "lamps": [{"w": 188, "pf": 0.8}], "transformer": {"rated_kw": 0.5, "min_frac": 0.6}, "cable_kv": 5})");
    CHECK(low.json["verdict"] == "low");
    CHECK(low.json["within_cable_class"] == true);
}

TEST_CASE("work-out string: what cannot be is refused by its field") {
    const auto field = [](const std::string& text) {
        const WorkOutAnswer answer = string_of(text);
        REQUIRE(answer.fault);
        return answer.fault->field;
    };
    CHECK(field(R"({"current_a": 0, "cable_awg": 8, "cable_m": 1, "lamps": []})") == "current_a");
    CHECK(field(R"({"current_a": 6.6, "cable_awg": 7, "cable_m": 1, "lamps": []})") == "cable_awg");
    CHECK(field(R"({"current_a": 6.6, "cable_awg": 8, "cable_m": -1, "lamps": []})") == "cable_m");
    CHECK(field(R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 1})") == "lamps");
    CHECK(
        field(
            R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 1, "lamps": [{"w": 1, "pf": 1}, {"w": 1, "pf": 0}]})") ==
        "lamps[1].pf");
    CHECK(
        field(
            R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 1, "lamps": [], "transformer": {"rated_kw": 0}})") ==
        "transformer.rated_kw");
    CHECK(field(R"({"current_a": 6.6, "cable_awg": 8, "cable_m": 1, "lamps": [], "lamp": 1})") == "lamp");
    CHECK(string_of("{").fault->code == FaultCode::file_broken);
}

TEST_CASE("work-out loop: the example of its help, and the same without a live lamp") {
    const std::string legs =
        R"({"legs_m": [100, 35, 35, 20, 35, 35, 100], "cutbacks": [{"a": 1, "b": 6, "new_cable_m": 20}], "live": )";
    const WorkOutAnswer answer = loop_of(legs + "[1, 6]}");
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["cable_m"] == 220.0);
    CHECK(answer.json["new_cable_m"] == 20.0);
    CHECK(answer.json["used"] == nlohmann::json::array({0}));
    const WorkOutAnswer dark = loop_of(legs + "[]}");
    CHECK(dark.json["cable_m"] == 0.0);
    CHECK(dark.json["used"] == nlohmann::json::array());
    const WorkOutAnswer held = loop_of(legs + "[1, 4, 6]}");
    CHECK(held.json["cable_m"] == 360.0);
}

TEST_CASE("work-out loop: what cannot be is refused by its field") {
    const auto field = [](const std::string& text) {
        const WorkOutAnswer answer = loop_of(text);
        REQUIRE(answer.fault);
        return answer.fault->field;
    };
    CHECK(field(R"({"legs_m": [], "live": []})") == "legs_m");
    CHECK(field(R"({"legs_m": [1, -2], "live": []})") == "legs_m[1]");
    CHECK(field(R"({"legs_m": [1, 2], "live": [2]})") == "live[0]");
    CHECK(field(R"({"legs_m": [1, 2], "live": [0.5]})") == "live[0]");
    CHECK(field(R"({"legs_m": [1, 2, 3], "live": [1.5]})") == "live");
    CHECK(field(R"({"legs_m": [1, 2], "live": [1], "cutbacks": [{"a": 0, "b": 3, "new_cable_m": 1}]})") ==
          "cutbacks[0].b");
    CHECK(field(R"({"legs_m": [1, 2], "live": [1], "cutbacks": [{"a": 1, "b": 1, "new_cable_m": 1}]})") ==
          "cutbacks[0].b");
    CHECK(field(R"({"legs_m": [1, 2], "live": [1], "cutbacks": [{"a": 0, "b": 1}]})") ==
          "cutbacks[0].new_cable_m");
}

TEST_CASE("work-out route: a square, open and closed, with a heading or without, decimal commas too") {
    const WorkOutAnswer open = route_of("x,y\n0,0\n10,10\n10,0\n0,10\n");
    REQUIRE_FALSE(open.fault);
    CHECK(open.json["length"] == 30.0);
    CHECK(open.json["order"][0] == 0);
    CHECK(route_of("x,y\n0,0\n10,10\n10,0\n0,10\n", "--closed").json["length"] == 40.0);
    CHECK(route_of("0,0\n10,10\n10,0\n0,10\n", "--closed").json["order"].size() == 4);
    CHECK(route_of("id;y;x\na;0;0\nb;2,5;0\n").json["length"] == 2.5);
}

TEST_CASE("work-out route: a cell that is no number is refused with its row") {
    const WorkOutAnswer answer = route_of("x,y\n0,0\n1,north\n");
    REQUIRE(answer.fault);
    CHECK(answer.fault->row == 3);
    CHECK(answer.fault->field == "y");
    CHECK(route_of("x\n1\n").fault.has_value());
    CHECK(route_of("x,y\n").fault.has_value());
}

TEST_CASE("work-out route: a thousand points stay within 12 % of the random-uniform constant of the shortest "
          "tour") {
    // Beardwood, Halton and Hammersley 1959; constant .7124 (from memory): L = .7124 sqrt(n A), some 3 % more
    // at n = 1000.
    std::string text = "x,y\n";
    unsigned state = 12345;
    for (int i = 0; i < 2000; ++i) {
        state = state * 1664525U + 1013904223U;
        text += std::to_string((state >> 8) % 100000) + (i % 2 == 0 ? "," : "\n");
    }
    const double length = route_of(text, "--closed").json["length"];
    CHECK(length > 0.7124 * std::sqrt(1000.0) * 100000 * 0.95);
    CHECK(length < 0.7124 * std::sqrt(1000.0) * 100000 * 1.12);
}
