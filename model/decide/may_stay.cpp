#include "model/decide/may_stay.h"

#include <algorithm>

#include "model/series/string_loop.h"
#include "model/series/units.h"

namespace unstring {
namespace {

using Place = std::size_t;

SteinerLimits quick_limits() {
    SteinerLimits limits;
    limits.rounds = 1;
    limits.shakes = 0;
    limits.branch_work = 0;
    return limits;
}

/// The string year by year, to the horizon or retired in decide_year.
Cents own_cost(const MoneyInput& input, const StringLoop& loop, bool stays) {
    const TransformerIx unit = unit_today(input.city, loop.string);
    const StringState today = string_state(loop, loop.burns);
    const PlanSettings& settings = input.plan.settings;
    std::vector<StringYearCash> years;
    for (int year = settings.first_year; year < settings.first_year + settings.horizon_years; ++year) {
        StringYearCash cash;
        cash.year = year;
        const bool is_last = !stays && year == input.plan.decide_year();
        cash.cable_kw = today.cable_w / 1000;
        if (unit.is_valid()) {
            const Transformer& at = input.city.transformers[unit.place()];
            cash.unit_rated_kw = loop_rating_kw(at);
            cash.oil_suspect = at.oil == Oil::unknown || at.oil == Oil::pcb;
        }
        cash.has_work = cash.retires = is_last;
        years.push_back(cash);
        if (is_last) break;
    }
    return to_cents(present_value(string_lines(input, loop.string, years)));
}

bool is_fixed(const PoleCase& each) { return each.is_locked || each.mark_followed; }

std::vector<PoleCase> with_string_kept(std::vector<PoleCase> cases, const StringCost& string) {
    for (const int i : string.cases)
        if (!is_fixed(cases[Place(i)])) cases[Place(i)].mode = Mode::keep;
    return cases;
}

/// The most that keeping the string could save: its lamps' own costs as they are and every edge that one of
/// them uses.
Cents most_saved(const GroundGraph& graph, const std::vector<PoleCase>& cases, const JointPlan& plan,
                 const StringCost& string) {
    Cents sum = string.end - string.live;
    bool uses_trench = false;
    for (const int i : string.cases) {
        if (is_fixed(cases[Place(i)])) continue;
        sum += cases[Place(i)].cents(plan.choices[Place(i)]) - cases[Place(i)].cents(Choice::keep);
        uses_trench = uses_trench || plan.choices[Place(i)] == Choice::rewire;
    }
    if (uses_trench)
        for (const int e : plan.edges) sum += graph.edges[Place(e)].cost;
    return sum;
}

} // namespace

std::vector<StringCost> string_costs(const MoneyInput& input, const std::vector<PoleCase>& cases) {
    std::vector<StringCost> out;
    std::vector<int> place(input.city.strings.size(), -1);
    for (const StringLoop& loop : string_loops(input.city, input.catalog)) {
        if (!loop.string.is_valid() || loop.lamps.empty()) continue;
        place[loop.string.place()] = static_cast<int>(out.size());
        StringCost each;
        each.string = loop.string;
        each.live = own_cost(input, loop, true);
        each.end = own_cost(input, loop, false);
        out.push_back(std::move(each));
    }
    for (Place i = 0; i < cases.size(); ++i) {
        const int at = place[input.city.poles[cases[i].pole.place()].string.place()];
        if (at < 0) continue;
        out[Place(at)].cases.push_back(static_cast<int>(i));
        if (cases[i].mode == Mode::keep) out[Place(at)].is_forced = out[Place(at)].stays = true;
    }
    return out;
}

void choose_stays(const GroundGraph& graph, std::vector<PoleCase>& cases, std::vector<StringCost>& strings,
                  const Progress& progress) {
    JointPlan now = solve_joint(graph, cases, quick_limits(), progress);
    for (int pass = 0; pass < 3; ++pass) {
        bool changed = false;
        for (StringCost& string : strings) {
            if (string.saving > 0 || progress.is_cancelled() || most_saved(graph, cases, now, string) <= 0)
                continue;
            std::vector<PoleCase> kept = with_string_kept(cases, string);
            JointPlan other = solve_joint(graph, kept, quick_limits(), progress);
            const Cents saving = now.cost - other.cost + (string.is_forced ? 0 : string.end - string.live);
            if (saving <= 0) continue;
            string.stays = changed = true;
            string.saving = saving;
            cases = std::move(kept);
            now = std::move(other);
        }
        if (!changed) break;
    }
}

Cents bound_with_stays(const GroundGraph& graph, std::vector<PoleCase> cases,
                       const std::vector<StringCost>& strings, const Progress& progress) {
    Cents fixed = 0;
    for (const StringCost& string : strings) {
        const Cents more = string.is_forced ? 0 : std::max<Cents>(0, string.live - string.end);
        fixed += string.is_forced ? string.live : std::min(string.live, string.end);
        const Cents part = string.cases.empty() ? 0 : more / static_cast<Cents>(string.cases.size());
        for (const int i : string.cases) {
            PoleCase& each = cases[Place(i)];
            if (is_fixed(each)) continue;
            const Cents kept = each.cents(Choice::keep) + part;
            OptionCost& other = each.of(Choice::solar);
            if (!other.possible || to_cents(other.cost) > kept) other.cost = to_dollars(kept);
            other.possible = true;
            each.mode = each.of(Choice::rewire).possible ? Mode::open : Mode::solar;
        }
    }
    SteinerLimits limits = quick_limits();
    limits.rounds = 3;
    return solve_joint(graph, cases, limits, progress).bound + fixed;
}

Cents sum_of(const std::vector<StringCost>& strings) {
    Cents sum = 0;
    for (const StringCost& string : strings) sum += string.stays ? string.live : string.end;
    return sum;
}

} // namespace unstring
