#include "app/command/work_out_trench.h"

#include <catch2/catch.hpp>

#include <algorithm>
#include <filesystem>
#include <fstream>

using namespace unstring;

namespace {

WorkOutAnswer work_out(const std::string& content, const std::vector<std::string>& more = {}) {
    const std::filesystem::path path =
        std::filesystem::temp_directory_path() / "unstring_work_out_trench.stp";
    std::ofstream(path) << content;
    CLI::App app;
    WorkOutAnswer answer;
    add_work_out_trench(app, answer);
    std::vector<std::string> words = more;
    words.insert(words.begin(), path.string());
    words.insert(words.begin(), "trench");
    std::reverse(words.begin(), words.end());
    app.parse(words);
    std::filesystem::remove(path);
    return answer;
}

const std::string kHead = "33D32945 STP File, STP Format Version 1.0\n";
const std::string kLine = kHead +
                          "SECTION Graph\nNodes 4\nEdges 4\nE 1 2 2.5\nE 2 3 1\nE 2 3 4\nE 3 4 10\nEND\n"
                          "SECTION Terminals\nTerminals 3\nRootP 1\nTP 3 4.25\nTP 4 9\nEND\nEOF\n";

} // namespace

TEST_CASE("work-out trench: a line of four with two prizes, worked by hand") {
    // 1-2-3 costs 3.5 and collects 4.25; going on to 4 costs 10 for 9: left outside. Cost 3.5 + 9.
    const WorkOutAnswer answer = work_out(kLine);
    REQUIRE_FALSE(answer.fault);
    CHECK(answer.json["cost"] == 12.5);
    CHECK(answer.json["bound"] == 12.5);
    CHECK(answer.json["gap_frac"] == 0);
    CHECK(answer.json["edges"] == nlohmann::json({{1, 2}, {2, 3}}));
    CHECK(answer.json["nodes"] == nlohmann::json({1, 2, 3}));
    CHECK(answer.json["seconds"].is_number());
    CHECK(answer.steps_text.find("12.5") != std::string::npos);
    CHECK(answer.steps_text.find("Wong") != std::string::npos);
}

TEST_CASE("work-out trench: --root moves the root, a vertex with T and TP has to be in") {
    const WorkOutAnswer moved = work_out(kLine, {"--root", "4"});
    CHECK(moved.json["cost"] == 4.25);
    CHECK(moved.json["nodes"] == nlohmann::json({4}));

    std::string both = kLine;
    both.replace(both.find("TP 4 9"), 6, "T 4\nTP 4 9");
    CHECK(work_out(both).json["cost"] == 13.5);
}

TEST_CASE("work-out trench: without root and T the best tree wins, or one vertex alone") {
    std::string free = kLine;
    free.replace(free.find("RootP 1\n"), 8, "");
    const WorkOutAnswer answer = work_out(free);
    CHECK(answer.json["cost"] == 4.25);
    CHECK(answer.json["nodes"] == nlohmann::json({4}));
}

TEST_CASE("work-out trench: a broken file names its row and field") {
    const auto fault_of = [](const std::string& content) {
        const WorkOutAnswer answer = work_out(content);
        REQUIRE(answer.fault);
        return *answer.fault;
    };
    CHECK(fault_of("not a steiner file\n").code == FaultCode::file_broken);
    CHECK(fault_of("").code == FaultCode::file_broken);
    const Fault nan = fault_of(kHead + "SECTION Graph\nNodes 2\nE 1 2 nan\nEND\n");
    CHECK(nan.row == 4);
    CHECK(nan.field == "cost");
    CHECK(fault_of(kHead + "SECTION Graph\nNodes 2\nE 1 2 -4\nEND\n").field == "cost");
    CHECK(fault_of(kHead + "SECTION Graph\nNodes 2\nE 1 3 4\nEND\n").field == "vertex");
    CHECK(fault_of(kHead + "SECTION Graph\nNodes 2\nE 1 2 5e12\nEND\n").field == "cost");
    CHECK(fault_of(kHead + "SECTION Graph\nE 1 2 5\nEND\n").field == "Nodes");
    CHECK(fault_of(kHead + "SECTION Graph\nNodes 9e99\nEND\n").field == "Nodes");
    CHECK(fault_of(kHead + "SECTION Graph\nNodes 3\nE 1 2 5\nEND\nSECTION Terminals\nT 1\nT 3\nEND\n").code ==
          FaultCode::no_solution);

    CLI::App app;
    WorkOutAnswer answer;
    add_work_out_trench(app, answer);
    app.parse(std::vector<std::string>{"/nowhere/at/all.stp", "trench"});
    REQUIRE(answer.fault);
    CHECK(answer.fault->code == FaultCode::file_missing);
}
