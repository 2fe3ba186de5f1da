#include "model/phase/duct_live.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include <fmt/format.h>

namespace unstring {
namespace {

bool is_solvers(const PhaseFacts& facts, PoleIx pole) {
    const PolePlan& row = facts.plan.poles[pole.place()];
    return row.year_by == YearBy::solver && !row.year_locked;
}

/// Whether the solver set every year that makes the duct live: of the poles that the span is built for, and
/// of the lamps of the duct's string that leave after it.
bool years_are_solvers(const PhaseFacts& facts, const CircuitSpan& span, int year) {
    for (const PoleIx pole : span.poles_beyond)
        if (facts.pole_year[pole.place()] == year && !is_solvers(facts, pole)) return false;
    for (const PoleIx lamp : facts.loops[span.duct_string.place()].lamps)
        if (facts.pole_year[lamp.place()] > year && !is_solvers(facts, lamp)) return false;
    return true;
}

} // namespace

bool is_free_of_duct(const City& city, const CircuitSpan& span) {
    if (span.kind != SpanKind::conduit || !span.duct_string.is_valid()) return true;
    const PoleIx to = span.duct_to;
    return to.is_valid() && city.poles[to.place()].spare_duct == true;
}

DuctLegs duct_legs(const StringLoop& loop, const CircuitSpan& span) {
    const auto position = [&](PoleIx pole) {
        const auto at = std::find(loop.lamps.begin(), loop.lamps.end(), pole);
        return at == loop.lamps.end() ? -1 : static_cast<int>(at - loop.lamps.begin()) + 1;
    };
    const int n = static_cast<int>(loop.lamps.size());
    const int from = span.duct_from.is_valid() ? position(span.duct_from) : -1;
    const int to = span.duct_to.is_valid() ? position(span.duct_to) : -1;
    if (from < 0 && to < 0) return {};
    if (from < 0 || to < 0) { // from the station to a lamp: the home leg that is nearer
        const int lamp = std::max(from, to);
        return lamp * 2 <= n + 1 ? DuctLegs{0, lamp - 1} : DuctLegs{lamp, n};
    }
    return {std::min(from, to), std::max(from, to) - 1};
}

std::vector<DuctState> duct_states(const PhaseFacts& facts) {
    std::vector<DuctState> states(facts.decide.spans.size(), DuctState::free);
    for (std::size_t i = 0; i < states.size(); ++i) {
        const CircuitSpan& span = facts.decide.spans[i];
        if (facts.span_year[i] == 0 || is_free_of_duct(facts.city, span)) continue;
        const std::size_t s = span.duct_string.place();
        const auto t = static_cast<std::size_t>(facts.span_year[i] - facts.plan.settings.first_year + 1);
        const DuctLegs legs = duct_legs(facts.loops[s], span);
        const std::vector<char>& live = facts.at(s, t).leg_is_live;
        if (legs.first > legs.last || std::none_of(live.begin() + legs.first, live.begin() + legs.last + 1,
                                                   [](char leg) { return leg != 0; }))
            continue;
        states[i] = years_are_solvers(facts, span, facts.span_year[i]) ? DuctState::dug : DuctState::live;
    }
    return states;
}

std::vector<Finding> duct_findings(const PhaseFacts& facts) {
    std::vector<Finding> findings;
    std::map<std::pair<std::size_t, int>, std::pair<int, double>> dug; // string, year -> spans, metres
    for (std::size_t i = 0; i < facts.duct.size(); ++i) {
        const CircuitSpan& span = facts.decide.spans[i];
        if (facts.duct[i] == DuctState::free) continue;
        const std::size_t s = span.duct_string.place();
        if (facts.duct[i] == DuctState::dug) {
            auto& [count, metres] = dug[{s, facts.span_year[i]}];
            ++count;
            metres += span.length_m;
            continue;
        }
        const PoleIx record = span.duct_to.is_valid() ? span.duct_to : span.pole;
        findings.push_back(make_finding(
            "duct-live", {}, 0,
            record.is_valid() ? facts.city.poles[record.place()].id : facts.city.strings[s].id,
            fmt::format(
                "the duct is to be pulled in {}, the cable of string {} in it is live at that year's end",
                facts.span_year[i], facts.city.strings[s].id),
            "series cable dead and pulled first",
            "move these poles to the year in which that part of the string is off, or let phase set the "
            "years: it digs",
            "poles"));
    }
    for (const auto& [at, sum] : dug) {
        findings.push_back(make_finding(
            "duct-dug", {}, 0, facts.city.strings[at.first].id,
            fmt::format("{}: {} spans, {:.0f} m, are dug beside ducts whose cable is live; priced as trench",
                        at.second, sum.first, sum.second),
            "a duct whose cable is dead",
            "nothing, where the plan is right; else end that part of the string sooner", "strings"));
        findings.back().severity = Severity::notice;
    }
    return findings;
}

CircuitSpan dug_span(CircuitSpan span) {
    span.kind = span.surface == Surface::paved ? SpanKind::trench_paved : SpanKind::trench_verge;
    span.duct_string = {};
    span.duct_from = span.duct_to = {};
    return span;
}

DecideResult as_built(DecideResult decide, const PhaseResult& phase) {
    for (const int place : phase.spans_dug) {
        CircuitSpan& span = decide.spans.at(static_cast<std::size_t>(place));
        span = dug_span(std::move(span));
    }
    return decide;
}

int service_ready_year(const City& city, const PriceBook& prices, const PlanSettings& settings,
                       ServiceIx ix) {
    const ServicePoint& service = city.services[ix.place()];
    double weeks = service.lead_weeks.value_or(0);
    if (!service.lead_weeks && service.kind == ServiceKind::candidate)
        weeks = prices.at("service_lead_weeks", settings.first_year);
    return settings.first_year + std::max(0, static_cast<int>(std::ceil(weeks / 52)) - 1);
}

} // namespace unstring
