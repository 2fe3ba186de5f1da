#include "model/decide/pole_cases.h"

#include <algorithm>

#include <fmt/format.h>
#include <tbb/parallel_for.h>

namespace unstring {
namespace {

using Place = std::size_t;
constexpr const char* kNoWay = "no street, neighbour, old conduit or service within reach: no way for a wire";

Mode mode_of(Choice choice) {
    if (choice == Choice::rewire) return Mode::rewire;
    return choice == Choice::solar ? Mode::solar : Mode::keep;
}

class Modes {
public:
    Modes(const MoneyInput& input, DecideResult& result) : input_(input), result_(result) {}

    void settle(PoleCase& each) {
        const PolePlan& wish = input_.plan.poles[each.pole.place()];
        if (each.of(Choice::rewire).stopped_by == kNoWay)
            say("pole-unreached", each, kNoWay, "a way to a source",
                "check the pole's place and the streets, or give a service near by");
        if (wish.lock != Choice::undecided)
            lock(each, wish.lock);
        else if (wish.mark == Choice::undecided || !mark(each, wish.mark))
            leave_open(each);
    }

private:
    [[nodiscard]] const Pole& pole(const PoleCase& each) const {
        return input_.city.poles[each.pole.place()];
    }
    void say(const char* code, const PoleCase& each, std::string found, std::string wanted,
             std::string remedy) {
        const Pole& at = pole(each);
        result_.findings.push_back(make_finding(code, at.from.file, at.from.row, at.id, std::move(found),
                                                std::move(wanted), std::move(remedy), "poles"));
    }
    [[nodiscard]] bool string_must_stay(const PoleCase& each) const {
        const PlanSettings& settings = input_.plan.settings;
        if (settings.policy != Policy::must_stay) return false;
        const std::string& id = input_.city.strings[pole(each).string.place()].id;
        return std::find(settings.must_stay.begin(), settings.must_stay.end(), id) !=
               settings.must_stay.end();
    }
    [[nodiscard]] bool may_keep(const PoleCase& each) const {
        return input_.plan.settings.policy == Policy::may_stay || string_must_stay(each);
    }
    void lock(PoleCase& each, Choice choice) {
        each.is_locked = true;
        each.mode = mode_of(choice);
        const OptionCost& option = each.of(choice);
        if (choice == Choice::keep && !may_keep(each))
            say("policy-end", each, "locked to keep", "every string ends",
                "take the lock off, or let the string stay; it has no last year now");
        if (option.possible) return;
        const bool is_open = choice == Choice::rewire ? option.stopped_by == kNoWay : option.lines.empty();
        say(is_open ? "no-way" : "lock-breaks-check", each,
            fmt::format("locked to {}: {}", text_of(choice), option.stopped_by), "an option that is possible",
            "take the lock off, or mend what stands against it");
        result_.feasible = result_.feasible && !is_open;
    }
    /// False when the mark is refused.
    bool mark(PoleCase& each, Choice choice) {
        std::string reason;
        if (choice == Choice::keep && !may_keep(each))
            reason = "policy-end: every string ends, so no lamp can stay";
        else if (!each.of(choice).possible)
            reason = each.of(choice).stopped_by;
        if (!reason.empty()) {
            result_.marks_refused.push_back({each.pole, fmt::format("{}: {}", text_of(choice), reason)});
            return false;
        }
        each.mode = mode_of(choice);
        each.mark_followed = true;
        ++result_.marks_followed;
        return true;
    }
    void leave_open(PoleCase& each) {
        const bool can_rewire = each.of(Choice::rewire).possible, can_solar = each.of(Choice::solar).possible;
        if (string_must_stay(each))
            each.mode = Mode::keep;
        else if (can_rewire)
            each.mode = can_solar ? Mode::open : Mode::rewire;
        else if (can_solar)
            each.mode = Mode::solar;
        else if (input_.plan.settings.policy == Policy::may_stay)
            each.mode = Mode::keep;
        else {
            each.mode = Mode::stuck;
            result_.feasible = false;
            say("no-way", each,
                fmt::format("rewire: {}; solar: {}", each.of(Choice::rewire).stopped_by,
                            each.of(Choice::solar).stopped_by),
                "one option that is possible",
                "lock the pole, mend what stands against one option, or let its string stay");
        }
    }

    const MoneyInput& input_;
    DecideResult& result_;
};

} // namespace

Expected<std::vector<PoleCase>> pole_cases(const MoneyInput& input, const GroundGraph& graph,
                                           const Progress& progress) {
    std::vector<PoleCase> cases;
    for (Place i = 0; i < input.city.poles.size(); ++i) {
        if (!is_candidate(input.city, input.city.poles[i])) continue;
        cases.emplace_back();
        cases.back().pole = PoleIx(i);
    }
    const Ways ways = shortest_ways(graph, {GroundGraph::kRoot});
    const int year = input.plan.decide_year();
    tbb::parallel_for(Place{0}, cases.size(), [&](Place i) {
        if (progress.is_cancelled()) return;
        PoleCase& each = cases[i];
        for (const Choice choice : {Choice::keep, Choice::rewire, Choice::solar})
            each.of(choice) = pole_option(input, each.pole, choice, year);
        OptionCost& rewire = each.of(Choice::rewire);
        if (!rewire.possible || ways.cost[Place(graph.vertex_of[each.pole.place()])] >= 0) return;
        rewire.possible = false;
        rewire.stopped_by = kNoWay;
    });
    if (progress.is_cancelled()) return tl::unexpected(Fault{FaultCode::cancelled, {}, 0, {}, {}, {}, {}});
    return cases;
}

void settle_modes(const MoneyInput& input, std::vector<PoleCase>& cases, DecideResult& result) {
    Modes modes(input, result);
    for (PoleCase& each : cases) modes.settle(each);
}

} // namespace unstring
