#include "model/phase/phase_plan.h"

#include <algorithm>
#include <chrono>
#include <tuple>

#include "model/phase/city_packages.h"
#include "model/phase/package_master.h"
#include "model/phase/package_search.h"
#include "model/phase/phase_desk.h"

namespace unstring {
namespace {

constexpr int kStarts = 4; ///< searches from scratch, each with its own seed
constexpr int kSearchRounds = 6000;

Fault stopped() { return {FaultCode::cancelled, {}, 0, {}, "stopped by the user", {}, "run phase again"}; }

/// Fewest errors, then fewest over-runs, then most poles reached, then least cost.
bool is_better(const PhaseResult& a, const PhaseResult& b) {
    const auto rank = [](const PhaseResult& result) {
        const auto count = [&](auto&& test) {
            return std::count_if(result.failures.begin(), result.failures.end(), test);
        };
        return std::tuple(count([](const Finding& each) { return each.severity == Severity::error; }),
                          count([](const Finding& each) {
                              return each.code == "money-short" || each.code == "hours-short";
                          }),
                          result.not_reached, result.cost);
    };
    return rank(a) < rank(b);
}

/// The sum of each string's cheapest plan by itself, or the relaxation of the whole with its money where that
/// is higher.
double bound_of(const CityYears& city, const PhaseResult& result, const Progress& progress) {
    const bool all_carried =
        std::none_of(result.failures.begin(), result.failures.end(), [](const Finding& each) {
            return each.code == "transformer-missing" || each.code == "load-over" ||
                   each.code == "unit-twice";
        });
    const BoundCase bound = bound_case(city, result.not_reached == 0, all_carried);
    double best = separate_bound(bound.packages);
    if (result.feasible) {
        std::vector<MasterColumn> columns;
        const MasterAnswer relaxed = solve_master(bound.packages, whole_branch(bound.packages),
                                                  MasterAim::least_cost, columns, progress);
        if (relaxed.is_solved) best = std::max(best, relaxed.bound);
    }
    return best + bound.fixed_cost;
}

} // namespace

Expected<PhaseOutcome> phase_plan(const MoneyInput& input, const DecideResult& decide,
                                  const PhaseChoices& choices, const Progress& progress) {
    const auto start = std::chrono::steady_clock::now();
    CashBook book(input, decide);
    auto city = city_years(input, decide, choices, book, progress);
    if (!city) return tl::unexpected(city.error());
    progress.at(0.15);

    PhaseDesk desk(input, decide);
    PhaseOutcome best;
    const PackageCase packages = search_case(**city);
    for (int start_no = 0; start_no < kStarts; ++start_no) {
        Progress part = progress;
        part.on_progress = [&](double done) { progress.at(0.15 + 0.7 * (start_no + done) / kStarts); };
        const PackagePlan found =
            search_packages(packages, {kSearchRounds, static_cast<unsigned>(start_no + 1), {}}, part);
        if (progress.is_cancelled()) return tl::unexpected(stopped());
        Plan plan = with_years(**city, packages, found.strings);
        PhaseResult result = desk.evaluate(plan, false);
        if (start_no == 0 || is_better(result, best.result)) best = {std::move(plan), std::move(result)};
    }
    best.result = desk.evaluate(best.plan, true);
    best.result.bound = bound_of(**city, best.result, progress);
    if (progress.is_cancelled()) return tl::unexpected(stopped());
    best.result.seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    progress.at(1);
    return best;
}

} // namespace unstring
