// The topics drop, worth and spares, through their own option reading.

#include <filesystem>
#include <fstream>
#include <string>

#include <unistd.h>

#include <catch2/catch.hpp>

#include "app/command/work_out_drop.h"
#include "app/command/work_out_spares.h"
#include "app/command/work_out_worth.h"

using namespace unstring;

namespace {

WorkOutAnswer asked(void (*add)(CLI::App&, WorkOutAnswer&), const std::string& words) {
    WorkOutAnswer answer;
    CLI::App app;
    add(app, answer);
    app.parse(words);
    return answer;
}

WorkOutAnswer drop_of(const std::string& text) {
    const std::string path =
        std::filesystem::temp_directory_path() / ("unstring-drop-" + std::to_string(getpid()) + ".json");
    std::ofstream(path) << text;
    WorkOutAnswer answer = asked(add_work_out_drop, "drop " + path);
    std::filesystem::remove(path);
    return answer;
}

} // namespace

TEST_CASE("work-out drop: case V4, ten drivers of 120 W on resistance alone") {
    std::string nodes;
    for (int i = 0; i < 10; ++i)
        nodes += (i == 0 ? "" : ",") + ("{\"id\": \"P" + std::to_string(i) + "\", \"parent\": \"" +
                                        (i == 0 ? "" : "P" + std::to_string(i - 1)) +
                                        "\", \"r_ohm\": 0.1167, \"w\": 120, \"pf\": 1}");
    const WorkOutAnswer answer = drop_of("{\"source_v\": 240, \"wires\": 2, \"nodes\": [" + nodes + "]}");
    REQUIRE_FALSE(answer.fault.has_value());
    CHECK(answer.json["converged"] == true);
    CHECK(answer.json["nodes"][9]["id"] == "P9");
    CHECK(answer.json["nodes"][9]["volts"].get<double>() == Approx(233.431015).margin(5e-7));
    CHECK(answer.json["worst_drop_frac"].get<double>() == Approx(.027371).margin(5e-7));
    CHECK(answer.json["source_a"].get<double>() == Approx(5.097865).margin(5e-7));
    CHECK(answer.json["loss_w"].get<double>() == Approx(23.48769).margin(5e-6));
    CHECK(answer.steps_text.find("Rest (1e-10 V)") != std::string::npos);
}

TEST_CASE("work-out drop: sizes are read from the table, thick ones as text") {
    const auto volts = [](const std::string& size) {
        const WorkOutAnswer answer = drop_of("{\"source_v\": 240, \"wires\": 2, \"nodes\": [{\"id\": \"P\", "
                                             "\"parent\": \"\", \"length_m\": 304.8, \"a\": 10, " +
                                             size + "}]}");
        REQUIRE_FALSE(answer.fault.has_value());
        return answer.json["nodes"][0]["volts"].get<double>();
    };
    CHECK(240 - volts("\"awg\": 8, \"metal\": \"cu\"") == Approx(2 * .778 * 10).margin(.01));
    CHECK(240 - volts("\"awg\": \"1/0\", \"metal\": \"al\"") == Approx(2 * .201 * 10).margin(.01));
    CHECK(volts("\"awg\": \"1/0\"") == volts("\"awg\": 0"));
}

TEST_CASE("work-out drop: a load beyond the circuit is told as not converged, its numbers as null") {
    const WorkOutAnswer answer = drop_of(
        "{\"source_v\": 240, \"nodes\": [{\"id\": \"P\", \"parent\": \"\", \"r_ohm\": 0.778, \"w\": 9300}]}");
    REQUIRE_FALSE(answer.fault.has_value());
    CHECK(answer.json["converged"] == false);
    CHECK(answer.json["worst_drop_frac"].is_null());
    CHECK(answer.steps_text.find("voltage collapse") != std::string::npos);
}

TEST_CASE("work-out drop: bad input is a fault that names the field") {
    const auto field = [](const std::string& nodes) {
        return drop_of("{\"source_v\": 240, \"wires\": 2, \"nodes\": " + nodes + "}").fault.value().field;
    };
    CHECK(field("[]") == "nodes");
    CHECK(field("[{\"id\": \"A\", \"parent\": \"B\", \"r_ohm\": 1}]") == "nodes[0].parent");
    CHECK(field("[{\"id\": \"A\", \"parent\": \"B\", \"r_ohm\": 1}, {\"id\": \"B\", \"parent\": \"A\", "
                "\"r_ohm\": 1}]") == "nodes[0].parent");
    CHECK(field("[{\"id\": \"A\", \"r_ohm\": 1}, {\"id\": \"A\", \"r_ohm\": 1}]") == "nodes[1].id");
    CHECK(field("[{\"id\": \"A\", \"length_m\": 10, \"awg\": 7}]") == "nodes[0].awg");
    CHECK(field("[{\"id\": \"A\", \"length_m\": -10, \"awg\": 8}]") == "nodes[0].length_m");
    CHECK(field("[{\"id\": \"A\", \"length_m\": 10, \"awg\": 8, \"w\": 60, \"a\": 1}]") == "nodes[0].a");
    CHECK(field("[{\"id\": \"A\", \"length_m\": 10, \"awg\": 8, \"pf\": 0}]") == "nodes[0].pf");
    CHECK(field("[{\"id\": \"A\", \"length_m\": 10, \"awg\": 8, \"leg\": \"a\"}]") == "nodes[0].leg");
    CHECK(field("[{\"id\": \"A\", \"length_m\": 10, \"awg\": 8, \"watt\": 1}]") == "nodes[0].watt");
    CHECK(asked(add_work_out_drop, "drop /no/such/file.json").fault.value().code == FaultCode::file_missing);
}

TEST_CASE("work-out worth: 3 % over 20 years, a rise of nothing being the uniform value") {
    const WorkOutAnswer answer = asked(add_work_out_worth, "worth --rate 0.03 --years 20");
    CHECK(answer.json["spv"].get<double>() == Approx(.5537).margin(5e-5));
    CHECK(answer.json["upv"].get<double>() == Approx(14.8775).margin(5e-5));
    CHECK(answer.json["upv_rising"].get<double>() == answer.json["upv"].get<double>());
    CHECK(answer.json["crf"].get<double>() == Approx(.067216).margin(5e-7));
    CHECK(asked(add_work_out_worth, "worth --rate 0.03 --years 25 --rise 0.03")
              .json["upv_rising"]
              .get<double>() == 25);
}

TEST_CASE("work-out worth: a rate in per cent, or no number, is refused with the remedy") {
    CHECK(asked(add_work_out_worth, "worth --rate 3 --years 20").fault.value().field == "--rate");
    CHECK(asked(add_work_out_worth, "worth --rate nan --years 20").fault.value().code ==
          FaultCode::bad_usage);
    CHECK(asked(add_work_out_worth, "worth --rate 0.03 --years 0").fault.value().field == "--years");
}

TEST_CASE("work-out spares: a mean of 2 wants 5 spares for 95 %, since 4 give 94.73 %") {
    const WorkOutAnswer answer = asked(add_work_out_spares, "spares --mean 2 --target 0.95");
    CHECK(answer.json["stock"] == 5);
    CHECK(answer.json["cover_frac"].get<double>() == Approx(.983436).margin(5e-7));
    CHECK(asked(add_work_out_spares, "spares --mean -1 --target 0.95").fault.value().field == "--mean");
    CHECK(asked(add_work_out_spares, "spares --mean 2 --target 1").fault.value().field == "--target");
}
