// The speed table of ./dev bench: ours beside a reference measured in the same run; below 1 ours is the
// faster one.

#include <cstdio>
#include <filesystem>
#include <numeric>
#include <random>

#include <gdal_priv.h>
#include <ogrsf_frmts.h>
#include <unistd.h>

#include "geo/imports/gathered.h"
#include "model/decide/steiner.h"
#include "model/series/energised_loop.h"
#include "model/sun/spa.h"
#include "model/sun/sun_position.h"
#include "sampledata/write_city.h"
#include "tests/bench/stopwatch.h"

namespace {

using namespace unstring;
using unstring::bench::row;

volatile double keep_result = 0; // what is worked out must not be optimised away

void bench_sun() {
    constexpr int kCount = 20000;
    const LonLat place{-130, 34};
    row(
        "sun position, bulk", "full solar position algorithm", kCount, "position",
        [&] {
            double sum = 0;
            for (int i = 0; i < kCount; ++i) sum += psa_sun(9000 + i / 24.0, place).elevation_deg;
            keep_result = sum;
        },
        [&] {
            double sum = 0;
            for (int i = 0; i < kCount; ++i) sum += spa_sun({9000 + i / 24.0, place}).elevation_deg;
            keep_result = sum;
        });
}

double loop_by_brute_force(const std::vector<double>& legs, const std::vector<char>& live,
                           const std::vector<LoopCutBack>& cutbacks) {
    double best = std::accumulate(legs.begin(), legs.end(), 0.0);
    const double whole = best;
    for (unsigned choice = 1; choice < (1U << cutbacks.size()); ++choice) {
        double metres = whole;
        int end = 0;
        bool is_good = true;
        for (std::size_t i = 0; i < cutbacks.size() && is_good; ++i) {
            if ((choice >> i & 1U) == 0) continue;
            const LoopCutBack& c = cutbacks[i];
            is_good = c.a >= end;
            for (int p = c.a + 1; p < c.b && is_good; ++p)
                is_good = live[static_cast<std::size_t>(p - 1)] == 0;
            for (int p = c.a; p < c.b && is_good; ++p) metres -= legs[static_cast<std::size_t>(p)];
            metres += c.new_cable_m;
            end = c.b;
        }
        if (is_good) best = std::min(best, metres);
    }
    return best;
}

void bench_loop() {
    constexpr int kLamps = 60, kRounds = 50;
    std::mt19937 random(7);
    std::vector<double> legs(kLamps + 1, 30);
    std::vector<char> live(kLamps, 1);
    for (int i = 20; i < 40; ++i) live[static_cast<std::size_t>(i)] = 0;
    std::vector<LoopCutBack> cutbacks;
    for (int a = 5; a + 4 < kLamps; a += 5)
        cutbacks.push_back(
            {a, a + 4, 20.0 + static_cast<double>(random() % 9), -1, true, CutBackKind::pullbox});
    row(
        "energised loop, 60 lamps", "every choice of cut-backs tried", kRounds, "state",
        [&] {
            for (int i = 0; i < kRounds; ++i) keep_result = energised_loop(legs, live, cutbacks).cable_m;
        },
        [&] {
            for (int i = 0; i < kRounds; ++i) keep_result = loop_by_brute_force(legs, live, cutbacks);
        });
}

// Least spanning tree by sorted edges: about the least that any method for the shared trench has to do.
double spanning_tree_cost(const SteinerProblem& problem) {
    std::vector<std::size_t> order(problem.edges.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(),
              [&](std::size_t a, std::size_t b) { return problem.edges[a].cost < problem.edges[b].cost; });
    std::vector<int> parent(problem.prize.size());
    std::iota(parent.begin(), parent.end(), 0);
    const auto find = [&](int v) {
        while (parent[static_cast<std::size_t>(v)] != v)
            v = parent[static_cast<std::size_t>(v)] =
                parent[static_cast<std::size_t>(parent[static_cast<std::size_t>(v)])];
        return v;
    };
    double cost = 0;
    for (std::size_t e : order) {
        const int u = find(problem.edges[e].u), v = find(problem.edges[e].v);
        if (u == v) continue;
        parent[static_cast<std::size_t>(u)] = v;
        cost += static_cast<double>(problem.edges[e].cost);
    }
    return cost;
}

void bench_trench(int side) {
    SteinerProblem problem;
    std::mt19937 random(11);
    const int n = side * side;
    problem.root = 0;
    problem.prize.assign(static_cast<std::size_t>(n), 0);
    problem.must.assign(static_cast<std::size_t>(n), 0);
    for (int i = 1; i < n; ++i)
        if (random() % 4 == 0)
            problem.prize[static_cast<std::size_t>(i)] =
                100000 + static_cast<std::int64_t>(random() % 400000);
    for (int i = 0; i < n; ++i) {
        if (i % side + 1 < side)
            problem.edges.push_back({i, i + 1, 80000 + static_cast<std::int64_t>(random() % 150000)});
        if (i + side < n)
            problem.edges.push_back({i, i + side, 80000 + static_cast<std::int64_t>(random() % 150000)});
    }
    double gap = 0;
    row(
        fmt::format("shared trench, {} vertices, with bound", n),
        "least spanning tree alone, by sorted edges", 1, "problem",
        [&] {
            const SteinerAnswer answer = solve_steiner(problem);
            gap = static_cast<double>(answer.cost - answer.bound) / static_cast<double>(answer.cost);
            keep_result = static_cast<double>(answer.cost);
        },
        [&] { keep_result = spanning_tree_cost(problem); });
    fmt::print("{:<34} gap {:.3f} %\n", "", 100 * gap);
}

void bench_poles(const std::string& folder, long poles) {
    if (!sample::write_city({poles, 3, folder, false})) return;
    GatherFiles files;
    files.poles = folder + "/poles.csv";
    files.circuits = folder + "/circuits.csv";
    files.crs = "EPSG:32609";
    row(
        fmt::format("gather, {} poles", poles), "GDAL's own reader of the same file",
        static_cast<double>(poles), "pole",
        [&] {
            const auto gathered = read_files(files, nullptr, {});
            keep_result = gathered ? static_cast<double>(gathered->city.poles.size()) : 0;
        },
        [&] {
            GDALDatasetUniquePtr file(GDALDataset::Open(files.poles.c_str(), GDAL_OF_VECTOR));
            double sum = 0;
            if (file)
                for (auto& feature : file->GetLayer(0))
                    for (int i = 0; i < feature->GetFieldCount(); ++i)
                        sum += static_cast<double>(std::string(feature->GetFieldAsString(i)).size());
            keep_result = sum;
        });
}

} // namespace

int main() {
    GDALAllRegister();
    fmt::print("{:<34} {:>15}  {:<40} {:>15}  {:>9}\n", "ours", "", "reference, same run", "", "ours/ref");
    bench_sun();
    bench_loop();
    bench_trench(30);
    bench_trench(100);
    const auto folder = std::filesystem::temp_directory_path() / fmt::format("unstring-bench-{}", getpid());
    std::filesystem::create_directories(folder);
    bench_poles(folder.string(), 20000);
    std::filesystem::remove_all(folder);
    return 0;
}
