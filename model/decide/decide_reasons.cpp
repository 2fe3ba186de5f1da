#include "model/decide/decide_reasons.h"

#include <fmt/format.h>

#include "model/decide/span_cost.h"
#include "model/money/money_text.h"
#include "model/money/new_light.h"

namespace unstring {
namespace {

using Place = std::size_t;

/// Present value of one more metre of trench at the pole: dug along its street, wire and design share
/// included.
double trench_per_m(const MoneyInput& input, const Pole& pole) {
    CircuitSpan span;
    span.kind =
        surface_at(input.city, pole) == Surface::paved ? SpanKind::trench_paved : SpanKind::trench_verge;
    span.length_m = 100;
    return present_value(span_lines(input, span, input.plan.decide_year())) / 100;
}

/// The marginal share as capital of decide_year, so that the option's cost is the sum of its lines.
void add_share_line(const MoneyInput& input, const Share& share, OptionCost& rewire) {
    const int year = input.plan.decide_year();
    const double amount = to_dollars(share.cost) / input.plan.factor(year);
    const double quantity = share.length_m > 0 ? share.length_m : 1;
    rewire.lines.push_back(cash_line(input.plan,
                                     share.length_m > 0 ? "trench, conduit, wire and service: own share, m"
                                                        : "connection: own share",
                                     year, quantity, amount / quantity, Purse::capital));
    rewire.cost = to_dollars(to_cents(present_value(rewire.lines)));
}

std::string against(const PoleDecision& at, Choice other) {
    const OptionCost& option = at.options[static_cast<Place>(other) - 1];
    if (!option.possible) return fmt::format("{} is not possible: {}", text_of(other), option.stopped_by);
    if (other != Choice::rewire)
        return fmt::format("{} would cost {}", text_of(other), dollars_text(option.cost));
    return fmt::format("rewire would cost {}, of which {} for {:.0f} m of its own connection",
                       dollars_text(option.cost), dollars_text(at.trench_share), at.trench_m);
}

std::string reason_of(const PoleCase& each, const PoleDecision& at) {
    const double cost =
        at.choice == Choice::undecided ? 0 : at.options[static_cast<Place>(at.choice) - 1].cost;
    std::string text;
    if (each.is_locked)
        text = fmt::format("Locked to {} by the planner. ", text_of(at.choice));
    else if (each.mark_followed)
        text = fmt::format("Marked {} by the staff. ", text_of(at.choice));
    switch (at.choice) {
    case Choice::undecided:
        return text + "No option is possible: " + against(at, Choice::rewire) + "; " +
               against(at, Choice::solar) + ".";
    case Choice::keep:
        return text + fmt::format("Stays on its string at {}; {}; {}.", dollars_text(cost),
                                  against(at, Choice::rewire), against(at, Choice::solar));
    case Choice::rewire:
        return text +
               fmt::format("Rewire at {}, of which {} for {:.0f} m of trench that only this pole needs; {}.",
                           dollars_text(cost), dollars_text(at.trench_share), at.trench_m,
                           against(at, Choice::solar));
    case Choice::solar:
        return text + fmt::format("Solar{} at {}; {}.", at.head.empty() ? "" : " (" + at.head + ")",
                                  dollars_text(cost), against(at, Choice::rewire));
    }
    return text;
}

std::string head_of(const MoneyInput& input, PoleIx pole) {
    const PoleShade* shade = input.shade.find(pole);
    return shade == nullptr || shade->best < 0 ? std::string{} : shade->heads[Place(shade->best)].head;
}

} // namespace

std::vector<PoleDecision> pole_decisions(const MoneyInput& input, const std::vector<PoleCase>& cases,
                                         const JointPlan& plan, const std::vector<Share>& shares) {
    std::vector<PoleDecision> out;
    for (Place i = 0; i < cases.size(); ++i) {
        const PoleCase& each = cases[i];
        const Pole& pole = input.city.poles[each.pole.place()];
        PoleDecision at;
        at.pole = each.pole;
        at.choice = plan.choices[i];
        at.options = each.own;
        if (at.choice == Choice::solar) at.head = head_of(input, each.pole);
        const double own = each.of(Choice::rewire).cost, solar = each.of(Choice::solar).cost,
                     per_m = trench_per_m(input, pole);
        at.breakeven_trench_m = each.of(Choice::solar).possible && solar > own ? (solar - own) / per_m : -1;
        if (shares[i].cost >= 0) {
            at.trench_share = to_dollars(shares[i].cost);
            at.trench_m = shares[i].length_m;
            add_share_line(input, shares[i], at.options[static_cast<Place>(Choice::rewire) - 1]);
        }
        at.reason = reason_of(each, at);
        at.numbers = {{"rewire_own", own},
                      {"solar", solar},
                      {"keep", each.of(Choice::keep).cost},
                      {"trench_share", at.trench_share},
                      {"trench_share_m", at.trench_m},
                      {"trench_per_m", per_m},
                      {"breakeven_trench_m", at.breakeven_trench_m},
                      {"decide_year", static_cast<double>(input.plan.decide_year())},
                      {"rate", input.plan.settings.rate}};
        at.sources = {"price book of the project", "present value: NIST Handbook 135, flows at year ends",
                      "joint choice: prize-collecting Steiner tree, bound by dual ascent (Wong 1984)"};
        out.push_back(std::move(at));
    }
    return out;
}

} // namespace unstring
