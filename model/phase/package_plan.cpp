#include "model/phase/package_plan.h"

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

constexpr double kWhole = 1e-9; ///< a fraction of a unit under this is rounding

using Counts = std::vector<std::vector<int>>;

Counts buy(const PackageCase& packages, const Counts& in_service, PackagePlan& plan) {
    const auto years = static_cast<std::size_t>(packages.years);
    const auto classes = static_cast<std::size_t>(packages.classes);
    Counts bought(years, std::vector<int>(classes, 0));
    for (std::size_t cls = 0; cls < classes; ++cls) {
        int held = 0;
        for (std::size_t t = 0; t < years; ++t) {
            const int more = units_wanting(packages, t, cls, in_service[t][cls]) - held;
            if (more <= 0) continue;
            if (packages.buy_cost[t] == kNever) {
                plan.penalty += more * packages.unit_penalty;
                continue;
            }
            bought[t][cls] = more;
            held += more;
            plan.cost += more * packages.buy_cost[t];
        }
    }
    return bought;
}

} // namespace

int year_done(const StringPlan& plan, int section) {
    for (std::size_t t = 0; t < plan.done.size(); ++t)
        if (plan.done[t] > section) return static_cast<int>(t);
    return -1;
}

int item_year(const PackageItem& item, const std::vector<StringPlan>& strings,
              const std::vector<char>* counts) {
    const int never = static_cast<int>(item.cost.size());
    int first = item.fixed_t < 0 ? never : item.fixed_t;
    for (const auto& [string, section] : item.firsts) {
        if (counts != nullptr && (*counts)[string] == 0) continue;
        const int t = year_done(strings[string], section);
        if (t >= 0) first = std::min(first, t);
    }
    return first;
}

bool is_broken(const PackageWait& wait, const std::vector<StringPlan>& strings) {
    const int t = year_done(strings[wait.waiting], wait.section);
    if (t < 0) return false;
    const auto year = static_cast<std::size_t>(t);
    return wait.blocks[year][static_cast<std::size_t>(strings[wait.blocking].done[year])] != 0;
}

int units_wanting(const PackageCase& packages, std::size_t t, std::size_t cls, int in_service) {
    if (in_service == 0) return 0;
    const double wanting = packages.pool_factor * in_service - packages.owned[t][cls];
    return std::max(0, static_cast<int>(std::ceil(wanting - kWhole)));
}

PackagePlan add_up(const PackageCase& packages, std::vector<StringPlan> strings, const Use& over_price) {
    PackagePlan plan;
    const auto years = static_cast<std::size_t>(packages.years);
    std::vector<Use> use(years, Use{});
    Counts in_service(years, std::vector<int>(static_cast<std::size_t>(packages.classes), 0));
    for (std::size_t s = 0; s < strings.size(); ++s) {
        const ColumnFigures figures = column_figures(packages, s, strings[s]);
        plan.cost += figures.cost;
        plan.penalty += figures.penalty;
        for (std::size_t t = 0; t < years; ++t) {
            for (std::size_t l = 0; l < kLimits; ++l) use[t][l] += figures.use[t][l];
            if (figures.in_class[t] != kNoClass)
                ++in_service[t][static_cast<std::size_t>(figures.in_class[t])];
        }
    }
    for (const PackageWait& wait : packages.waits)
        if (is_broken(wait, strings)) plan.penalty += packages.wait_penalty;
    for (const PackageItem& item : packages.items) {
        const int paid = item_year(item, strings, nullptr);
        if (paid >= packages.years) continue;
        const auto t = static_cast<std::size_t>(paid);
        const bool digs =
            item.duct_string >= 0 && item.live[t][static_cast<std::size_t>(
                                         strings[static_cast<std::size_t>(item.duct_string)].done[t])] != 0;
        plan.cost += item.cost[t] + (digs ? item.dig_cost[t] : 0);
        for (std::size_t l = 0; l < kLimits; ++l)
            use[t][l] += item.use[t][l] + (digs ? item.dig_use[t][l] : 0);
    }
    plan.bought = buy(packages, in_service, plan);
    for (std::size_t t = 0; t < years; ++t)
        for (std::size_t l = 0; l < kLimits; ++l) {
            const double by = use[t][l] - packages.limit[t][l];
            if (by <= 1e-7 * std::max(1.0, std::abs(packages.limit[t][l]))) continue;
            plan.over.push_back({static_cast<int>(t), l, by});
            plan.penalty += by * over_price[l];
        }
    plan.strings = std::move(strings);
    return plan;
}

Use steep_over_price(const PackageCase& packages) {
    double dearest = 1;
    for (const PackageString& string : packages.strings)
        for (std::size_t k = 0; k < static_cast<std::size_t>(string.sections); ++k) {
            double most = 0;
            for (const auto& year : string.work_cost) most = std::max(most, std::abs(year[k]));
            dearest += most;
        }
    Use price{};
    for (std::size_t l = 0; l < kLimits; ++l) {
        double largest = 0;
        for (const Use& limit : packages.limit)
            if (limit[l] < kNever) largest = std::max(largest, limit[l]);
        price[l] = packages.over_weight * dearest / std::max(1.0, largest);
    }
    return price;
}

} // namespace unstring
