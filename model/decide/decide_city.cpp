#include "model/decide/decide_city.h"

#include <algorithm>
#include <chrono>

#include <fmt/format.h>

#include "model/decide/circuit_limits.h"
#include "model/decide/decide_reasons.h"
#include "model/decide/joint.h"
#include "model/decide/may_stay.h"
#include "model/decide/plan_tree.h"
#include "model/decide/pole_cases.h"
#include "model/decide/span_cost.h"

namespace unstring {
namespace {

using Place = std::size_t;

Fault cancelled() { return {FaultCode::cancelled, {}, 0, {}, {}, {}, {}}; }

/// Long exact search gains little on a whole city and would be felt; the iterated search gains (Quillhaven:
/// gap 0.75 % to 0.46 %).
SteinerLimits plan_limits() {
    SteinerLimits limits;
    limits.shakes = 120;
    limits.branch_work = 3'000'000;
    limits.exact_vertices = 6000;
    return limits;
}

/// The bound and the gap are wanted of the plan alone; for comparisons a good tree is enough.
SteinerLimits quick_limits() {
    SteinerLimits limits;
    limits.rounds = 1;
    limits.shakes = 0;
    limits.branch_work = 0;
    return limits;
}

/// What all poles would cost by one kind, each where it is possible, else by the other kind.
double all_of(const GroundGraph& graph, std::vector<PoleCase> cases, Choice choice, int& not_possible,
              const Progress& progress) {
    not_possible = 0;
    for (PoleCase& each : cases) {
        if (each.mode == Mode::keep) continue;
        const Choice other = choice == Choice::rewire ? Choice::solar : Choice::rewire;
        if (!each.of(choice).possible) ++not_possible;
        const Choice taken = each.of(choice).possible ? choice : other;
        each.mode = !each.of(taken).possible  ? Mode::stuck
                    : taken == Choice::rewire ? Mode::rewire
                                              : Mode::solar;
    }
    return to_dollars(solve_joint(graph, cases, quick_limits(), progress).cost);
}

/// What larger wire adds to the edges' price: the spans as they are now against the edges that they lie on.
Cents larger_wire(const MoneyInput& input, const GroundGraph& graph, const JointPlan& plan,
                  const DecideResult& result) {
    Cents sum = 0;
    for (const CircuitSpan& span : result.spans)
        sum += to_cents(present_value(span_lines(input, span, input.plan.decide_year())));
    for (const int e : plan.edges)
        if (!graph.edges[Place(e)].service.is_valid()) sum -= graph.edges[Place(e)].cost;
    return sum;
}

void set_volts(const MoneyInput& input, const std::vector<double>& volts, DecideResult& result) {
    for (const Circuit& circuit : result.circuits) {
        const double source = source_volts(input.city, circuit.service);
        for (const PoleIx pole : circuit.poles) {
            const auto at =
                std::lower_bound(result.poles.begin(), result.poles.end(), pole,
                                 [](const PoleDecision& each, PoleIx wanted) { return each.pole < wanted; });
            at->volts = volts[pole.place()];
            at->drop_frac = at->volts > 0 ? 1 - at->volts / source : 0;
        }
    }
}

/// Which strings stay and why, at each of their poles.
void say_stays(const MoneyInput& input, const std::vector<StringCost>& strings, DecideResult& result) {
    std::vector<Cents> saving(input.city.strings.size(), 0);
    for (const StringCost& string : strings)
        if (string.stays) saving[string.string.place()] = string.saving;
    for (PoleDecision& each : result.poles) {
        const StringIx string = input.city.poles[each.pole.place()].string;
        if (each.choice != Choice::keep || saving[string.place()] <= 0) continue;
        each.numbers["string_saving"] = to_dollars(saving[string.place()]);
        each.reason += fmt::format(" String {} stays: ending it would cost {:.0f} more.",
                                   input.city.strings[string.place()].id, to_dollars(saving[string.place()]));
    }
}

void count(DecideResult& result) {
    for (const PoleDecision& each : result.poles) {
        result.keep += each.choice == Choice::keep ? 1 : 0;
        result.rewire += each.choice == Choice::rewire ? 1 : 0;
        result.solar += each.choice == Choice::solar ? 1 : 0;
    }
}

} // namespace

const PoleDecision* DecideResult::find(PoleIx pole) const {
    const auto at =
        std::lower_bound(poles.begin(), poles.end(), pole,
                         [](const PoleDecision& each, PoleIx wanted) { return each.pole < wanted; });
    return at != poles.end() && at->pole == pole ? &*at : nullptr;
}

Expected<DecideResult> decide_city(const MoneyInput& input, const Progress& progress) {
    const auto start = std::chrono::steady_clock::now();
    DecideResult result;
    const GroundGraph graph = ground_graph(input);
    progress.at(0.1);
    Expected<std::vector<PoleCase>> cases = pole_cases(input, graph, progress);
    if (!cases) return tl::unexpected(cases.error());
    settle_modes(input, *cases, result);
    progress.at(0.3);

    const bool may_stay = input.plan.settings.policy == Policy::may_stay;
    const std::vector<PoleCase> settled = *cases;
    std::vector<StringCost> strings;
    if (may_stay) strings = string_costs(input, settled);
    const Cents ended = sum_of(strings);
    if (may_stay) choose_stays(graph, *cases, strings, progress);
    const JointPlan joint = solve_joint(graph, *cases, plan_limits(), progress);
    if (progress.is_cancelled()) return tl::unexpected(cancelled());
    progress.at(0.7);
    const JointPlan plan = keep_limits(input, graph, *cases, joint, result.findings, progress);
    result.feasible = result.feasible && plan.feasible;
    lay_out(input, graph, *cases, plan, result);
    const std::vector<double> volts = size_circuits(input, result);
    result.poles = pole_decisions(input, *cases, plan, marginal_shares(graph, *cases, plan));
    set_volts(input, volts, result);
    count(result);
    const Cents cost = plan.cost + larger_wire(input, graph, plan, result);
    result.cost = to_dollars(cost + sum_of(strings));
    result.bound = to_dollars(may_stay ? bound_with_stays(graph, settled, strings, progress) : plan.bound);
    result.limits_price = to_dollars(cost - joint.cost);
    say_stays(input, strings, result);
    progress.at(0.8);

    result.all_rewire_cost =
        to_dollars(ended) + all_of(graph, settled, Choice::rewire, result.all_rewire_not_possible, progress);
    result.all_solar_cost =
        to_dollars(ended) + all_of(graph, settled, Choice::solar, result.all_solar_not_possible, progress);
    result.greedy_cost = to_dollars(ended + greedy_plan(graph, settled).cost);
    if (progress.is_cancelled()) return tl::unexpected(cancelled());
    progress.at(1);
    result.seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    return result;
}

} // namespace unstring
