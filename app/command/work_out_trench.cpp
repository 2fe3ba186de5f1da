#include "app/command/work_out_trench.h"

#include <charconv>
#include <chrono>
#include <cmath>
#include <memory>
#include <string>

#include <fmt/format.h>

#include "geo/imports/stp_file.h"
#include "model/decide/steiner.h"

namespace unstring {
namespace {

struct TrenchChoices {
    std::string file;
    std::string root;
};

/// Whole numbers stay whole; the scale divides out exactly for up to six decimals.
double from_scaled(std::int64_t value) { return static_cast<double>(value) / kStpScale; }

Expected<int> root_of(const TrenchChoices& choices, const StpFile& file) {
    if (choices.root.empty()) return file.problem.root;
    int root = 0;
    const char* end = choices.root.data() + choices.root.size();
    const auto [at, error] = std::from_chars(choices.root.data(), end, root);
    if (error != std::errc{} || at != end || root < 1 || root > file.vertices_given)
        return tl::unexpected(Fault{FaultCode::bad_usage,
                                    {},
                                    0,
                                    "--root",
                                    choices.root,
                                    fmt::format("a vertex from 1 to {}", file.vertices_given),
                                    "name a vertex of the file"});
    return root - 1;
}

std::string steps_of(const TrenchChoices& choices, const StpFile& file, int root, const SteinerAnswer& found,
                     double gap_frac) {
    std::int64_t edges = 0;
    for (const int e : found.edges) edges += file.problem.edges[static_cast<std::size_t>(e)].cost;
    std::string text =
        fmt::format("Input: {}: {} vertices, {} edges, {} that have to be in, {} with a prize, root {}\n",
                    choices.file, file.vertices_given, file.edges_given, file.terminals, file.prizes,
                    root < 0 ? std::string("free") : std::to_string(root + 1));
    text += fmt::format("Tree: {} vertices, {} edges that cost {}\n", found.vertices.size(),
                        found.edges.size(), from_scaled(edges));
    text += fmt::format("Prizes left outside: {}\nCost: {}\n", from_scaled(found.cost - edges),
                        from_scaled(found.cost));
    text += fmt::format("Bound by dual ascent, fixing and branching: {}; gap {:.4f} %{}\n",
                        from_scaled(found.bound), gap_frac * 100, found.is_proven ? " (proven best)" : "");
    if (!found.feasible) text += "No tree holds every vertex that has to be in.\n";
    text += "Source: R. T. Wong, A dual ascent approach for Steiner tree problems on a directed graph, "
            "Mathematical "
            "Programming 28 (1984); D. S. Johnson, M. Minkoff, S. Phillips, The prize collecting Steiner "
            "tree problem, SODA 2000.\n";
    return text;
}

void run(const TrenchChoices& choices, WorkOutAnswer& answer) {
    const auto start = std::chrono::steady_clock::now();
    Expected<StpFile> file = read_stp_file(choices.file);
    if (!file) {
        answer.fault = file.error();
        return;
    }
    const Expected<int> root = root_of(choices, *file);
    if (!root) {
        answer.fault = root.error();
        return;
    }
    file->problem.root = *root;
    const SteinerAnswer found = solve_steiner(file->problem);
    const double gap_frac =
        found.cost > 0 ? static_cast<double>(found.cost - found.bound) / static_cast<double>(found.cost) : 0;

    answer.json["cost"] = from_scaled(found.cost);
    answer.json["bound"] = from_scaled(found.bound);
    answer.json["gap_frac"] = gap_frac;
    answer.json["edges"] = nlohmann::json::array();
    for (const int e : found.edges) {
        const SteinerEdge& edge = file->problem.edges[static_cast<std::size_t>(e)];
        answer.json["edges"].push_back({edge.u + 1, edge.v + 1});
    }
    answer.json["nodes"] = nlohmann::json::array();
    for (const int v : found.vertices) answer.json["nodes"].push_back(v + 1);
    answer.json["feasible"] = found.feasible;
    if (!found.feasible) {
        answer.fault = Fault{FaultCode::no_solution,
                             choices.file,
                             0,
                             "T",
                             "a vertex that has to be in and hangs together with no root",
                             "one connected part that holds root and all T",
                             "add the missing edges"};
    }
    answer.json["seconds"] = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    answer.steps_text = steps_of(choices, *file, *root, found, gap_frac);
}

} // namespace

void add_work_out_trench(CLI::App& work_out, WorkOutAnswer& answer) {
    const auto choices = std::make_shared<TrenchChoices>();
    CLI::App* topic = work_out.add_subcommand(
        "trench", "Cheapest tree of trenches: edges of the tree + prizes left outside, with a proven bound");
    topic->add_option("file", choices->file, "Steiner problem in STP format (T, TP, RootP)")->required();
    topic->add_option("--root", choices->root, "vertex that the tree has to hold, 1..n");
    topic->footer("Example: unstring work-out trench street.stp --root 12");
    topic->callback([choices, &answer] { run(*choices, answer); });
}

} // namespace unstring
