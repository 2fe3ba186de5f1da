#include "model/phase/package_exact.h"

#include <algorithm>
#include <cmath>
#include <queue>

#include "model/phase/package_search.h"

namespace unstring {
namespace {

constexpr double kHalfCent = 0.005;
constexpr double kShare = 1e-6; ///< a share nearer than this to a whole number is whole

struct Node {
    double bound = 0;
    int id = 0;
    MasterBranch branch;
    bool operator<(const Node& other) const { // the queue gives the lowest bound first, then the newest
        if (bound != other.bound) return bound > other.bound;
        return id < other.id;
    }
};

struct Split {
    MasterBranch left, right;
};

/// Splits on the number of sections done where the shares disagree.
std::optional<Split> split_done(const MasterAnswer& answer, const std::vector<MasterColumn>& columns,
                                const MasterBranch& branch) {
    double widest = 0;
    std::size_t string = 0, year = 0;
    int at = 0;
    for (std::size_t s = 0; s < branch.strings.size(); ++s)
        for (std::size_t t = 0; t < branch.strings[s].least.size(); ++t) {
            double mean = 0, weight = 0, spread = 0;
            for (const auto& [place, share] : answer.used)
                if (columns[place].string == s) {
                    mean += share * columns[place].plan.done[t];
                    weight += share;
                }
            mean /= std::max(weight, 1e-12);
            for (const auto& [place, share] : answer.used)
                if (columns[place].string == s)
                    spread += share * std::abs(columns[place].plan.done[t] - mean);
            if (spread <= std::max(widest, kShare)) continue;
            widest = spread;
            string = s;
            year = t;
            at = static_cast<int>(std::floor(mean + kShare));
        }
    if (widest == 0) return std::nullopt;
    Split split{branch, branch};
    split.left.strings[string].most[year] = std::min(at, branch.strings[string].most[year]);
    split.right.strings[string].least[year] = std::max(at + 1, branch.strings[string].least[year]);
    return split;
}

/// Splits on the class in service where the shares disagree.
std::optional<Split> split_class(const MasterAnswer& answer, const std::vector<MasterColumn>& columns,
                                 const MasterBranch& branch) {
    for (std::size_t s = 0; s < branch.strings.size(); ++s)
        for (std::size_t t = 0; t < branch.strings[s].banned.size(); ++t) {
            std::vector<double> share_of(branch.strings[s].banned[t].size(), 0);
            for (const auto& [place, share] : answer.used)
                if (columns[place].string == s && columns[place].plan.cls[t] != kNoClass)
                    share_of[static_cast<std::size_t>(columns[place].plan.cls[t])] += share;
            for (std::size_t c = 0; c < share_of.size(); ++c) {
                if (share_of[c] <= kShare || share_of[c] >= 1 - kShare) continue;
                Split split{branch, branch};
                split.left.strings[s].banned[t][c] = 1;
                for (std::size_t other = 0; other < share_of.size(); ++other)
                    if (other != c) split.right.strings[s].banned[t][other] = 1;
                return split;
            }
        }
    return std::nullopt;
}

/// Splits on a purchase that is not a whole number of units.
std::optional<Split> split_purchase(const MasterAnswer& answer, const MasterBranch& branch) {
    for (std::size_t t = 0; t < answer.bought.size(); ++t)
        for (std::size_t c = 0; c < answer.bought[t].size(); ++c) {
            const double units = answer.bought[t][c];
            if (std::abs(units - std::round(units)) <= kShare) continue;
            Split split{branch, branch};
            split.left.buy_high[t][c] = std::floor(units);
            split.right.buy_low[t][c] = std::ceil(units);
            return split;
        }
    return std::nullopt;
}

/// A whole-numbered answer that over-runs a limit says nothing of its branch: split wherever there is a
/// choice left.
std::optional<Split> split_any(const MasterBranch& branch) {
    for (std::size_t s = 0; s < branch.strings.size(); ++s)
        for (std::size_t t = 0; t < branch.strings[s].least.size(); ++t) {
            const int least = branch.strings[s].least[t];
            const int most = branch.strings[s].most[t];
            if (least >= most) continue;
            Split split{branch, branch};
            split.left.strings[s].most[t] = (least + most) / 2;
            split.right.strings[s].least[t] = (least + most) / 2 + 1;
            return split;
        }
    for (std::size_t s = 0; s < branch.strings.size(); ++s)
        for (std::size_t t = 0; t < branch.strings[s].banned.size(); ++t) {
            const auto& banned = branch.strings[s].banned[t];
            const auto allowed = std::find(banned.begin(), banned.end(), 0);
            if (allowed == banned.end() || std::find(allowed + 1, banned.end(), 0) == banned.end()) continue;
            Split split{branch, branch};
            const auto c = static_cast<std::size_t>(allowed - banned.begin());
            split.left.strings[s].banned[t][c] = 1;
            std::fill(split.right.strings[s].banned[t].begin(), split.right.strings[s].banned[t].end(), 1);
            split.right.strings[s].banned[t][c] = 0;
            return split;
        }
    return std::nullopt;
}

std::optional<Split> split_of(const MasterAnswer& answer, const std::vector<MasterColumn>& columns,
                              const MasterBranch& branch) {
    if (auto split = split_done(answer, columns, branch)) return split;
    if (auto split = split_class(answer, columns, branch)) return split;
    if (auto split = split_purchase(answer, branch)) return split;
    if (answer.overrun > 1e-7) return split_any(branch);
    return std::nullopt;
}

/// The plan that takes each string's largest share.
PackagePlan rounded(const PackageCase& packages, const MasterAnswer& answer,
                    const std::vector<MasterColumn>& columns) {
    std::vector<StringPlan> plans(packages.strings.size());
    std::vector<double> best(plans.size(), -1);
    for (const auto& [place, share] : answer.used) {
        const std::size_t s = columns[place].string;
        if (share <= best[s]) continue;
        best[s] = share;
        plans[s] = columns[place].plan;
    }
    return add_up(packages, std::move(plans), steep_over_price(packages));
}

bool is_better(const PackagePlan& plan, const PackagePlan& than) {
    if (than.strings.empty()) return true;
    return plan.cost + plan.penalty < than.cost + than.penalty - 1e-9;
}

} // namespace

PackageAnswer solve_packages(const PackageCase& packages, int search_rounds, int branches,
                             const Progress& progress) {
    PackageAnswer answer;
    answer.plan = search_packages(packages, {search_rounds, 1, {}}, progress);
    answer.is_feasible = !answer.plan.strings.empty() && answer.plan.penalty == 0;
    answer.bound = separate_bound(packages);
    std::vector<MasterColumn> columns;
    std::priority_queue<Node> open;
    open.push({answer.bound, 0, whole_branch(packages)});
    int next_id = 1;
    while (!open.empty() && answer.branches < branches && !progress.is_cancelled()) {
        Node node = open.top();
        open.pop();
        if (answer.is_feasible && node.bound >= answer.plan.cost - kHalfCent) continue;
        ++answer.branches;
        // Until there is a plan, only the root is priced; the others ask whether any plan is left in them.
        const bool ask_cost = answer.is_feasible || node.id == 0;
        const MasterAnswer relaxed = solve_master(
            packages, node.branch, ask_cost ? MasterAim::least_cost : MasterAim::any_plan, columns, progress);
        if (!relaxed.is_solved) { // its bound stays the parent's
            open.push(std::move(node));
            break;
        }
        if (relaxed.is_infeasible) continue;
        if (ask_cost) node.bound = std::max(node.bound, relaxed.bound);
        PackagePlan near = rounded(packages, relaxed, columns);
        if (is_better(near, answer.plan)) {
            answer.plan = std::move(near);
            answer.is_feasible = answer.plan.penalty == 0;
        }
        if (answer.is_feasible && node.bound >= answer.plan.cost - kHalfCent) continue;
        auto split = split_of(relaxed, columns, node.branch);
        if (!split) continue; // the relaxation is a plan, and it was taken above
        open.push({node.bound, next_id++, std::move(split->left)});
        open.push({node.bound, next_id++, std::move(split->right)});
    }
    if (answer.is_feasible && branches > 0) {
        const double left_open =
            open.empty() ? answer.plan.cost : std::min(answer.plan.cost, open.top().bound);
        answer.bound = std::max(answer.bound, left_open);
    }
    answer.is_proved_infeasible = branches > 0 && open.empty() && !answer.is_feasible;
    return answer;
}

} // namespace unstring
