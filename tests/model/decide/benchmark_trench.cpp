// Every benchmark with a proved optimum: read here by its own few lines, not by the program's reader.
#include <catch2/catch.hpp>

#include <chrono>
#include <cmath>
#include <cstdio>
#include <fstream>
#include <sstream>

#include "model/decide/steiner.h"

using namespace unstring;

namespace {

struct Known {
    std::string file;
    double optimum = 0;
    int root = 0;
};

std::vector<Known> known_optima() {
    std::ifstream stream(std::string(UNSTRING_BENCHMARKS) + "/steiner/known.csv");
    std::vector<Known> out;
    std::string line;
    std::getline(stream, line);
    while (std::getline(stream, line)) {
        std::stringstream cells(line);
        std::string file, skip, optimum, root;
        std::getline(cells, file, ',');
        for (int i = 0; i < 3; ++i) std::getline(cells, skip, ',');
        std::getline(cells, optimum, ',');
        std::getline(cells, root, ',');
        if (!file.empty()) out.push_back({file, std::stod(optimum), std::stoi(root)});
    }
    return out;
}

SteinerProblem read_problem(const std::string& file) {
    std::ifstream stream(std::string(UNSTRING_BENCHMARKS) + "/steiner/" + file);
    SteinerProblem problem;
    std::string line, key;
    while (std::getline(stream, line)) {
        std::stringstream words(line);
        words >> key;
        int u = 0, v = 0;
        double x = 0;
        if (key == "Nodes" && words >> u) {
            problem.prize.assign(static_cast<std::size_t>(u), 0);
            problem.must.assign(static_cast<std::size_t>(u), 0);
        } else if (key == "E" && words >> u >> v >> x) {
            problem.edges.push_back({u - 1, v - 1, std::llround(x * 1e6)});
        } else if (key == "TP" && words >> u >> x) {
            problem.prize[static_cast<std::size_t>(u - 1)] = std::llround(x * 1e6);
        } else if (key == "T" && words >> u) {
            problem.must[static_cast<std::size_t>(u - 1)] = 1;
        } else if (key == "RootP" && words >> u) {
            problem.root = u - 1;
        }
    }
    return problem;
}

} // namespace

TEST_CASE("trench benchmarks: every cost is within 0.5 % of the proved optimum and no bound is above it") {
    const std::vector<Known> list = known_optima();
    REQUIRE(list.size() == 53);
    double gaps = 0;
    int reached = 0;
    for (const Known& known : list) {
        SteinerProblem problem = read_problem(known.file);
        problem.root = known.root - 1;
        const auto start = std::chrono::steady_clock::now();
        const SteinerAnswer answer = solve_steiner(problem);
        const double seconds =
            std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
        const double cost = static_cast<double>(answer.cost) / 1e6,
                     bound = static_cast<double>(answer.bound) / 1e6;
        std::printf("%-28s cost %14.2f bound %14.2f optimum %14.2f  %.3f %%  %.3f s\n", known.file.c_str(),
                    cost, bound, known.optimum, 100 * (cost / known.optimum - 1), seconds);
        INFO(known.file);
        const SteinerCheck check = check_steiner(problem, answer.edges, answer.vertices);
        CHECK(check.is_tree);
        CHECK(check.holds_musts);
        CHECK(check.cost == answer.cost);
        // Cologne's optima are given to 0.01.
        CHECK(bound <= known.optimum + 0.01);
        CHECK(cost >= known.optimum - 0.01);
        const bool is_tight = known.file.starts_with("JMP") || known.file.starts_with("cologne") ||
                              known.file.starts_with("grid");
        CHECK(cost <= known.optimum * (is_tight ? 1.001 : 1.005) + 0.01);
        gaps += (cost - bound) / cost;
        ++reached;
    }
    CHECK(gaps / static_cast<double>(list.size()) < 0.005);
    std::printf("benchmarks: %d of 53\n", reached);
}

TEST_CASE("trench benchmarks: with no root given the files without one give the same optimum") {
    for (const Known& known : known_optima()) {
        if (!known.file.starts_with("JMP") && !known.file.starts_with("CRR")) continue;
        const SteinerProblem problem = read_problem(known.file);
        REQUIRE(problem.root == -1);
        const SteinerAnswer answer = solve_steiner(problem);
        INFO(known.file);
        CHECK(static_cast<double>(answer.bound) / 1e6 <= known.optimum);
        CHECK(static_cast<double>(answer.cost) / 1e6 == Approx(known.optimum).epsilon(0.001));
        CHECK(check_steiner(problem, answer.edges, answer.vertices).cost == answer.cost);
    }
}
