#include "model/phase/duct_live.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

namespace unstring {

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
    if (from < 0 || to < 0) {  // from the station to a lamp: the home leg that is nearer
        const int lamp = std::max(from, to);
        return lamp * 2 <= n + 1 ? DuctLegs{0, lamp - 1} : DuctLegs{lamp, n};
    }
    return {std::min(from, to), std::max(from, to) - 1};
}

std::vector<Finding> live_duct_findings(const PhaseFacts& facts) {
    std::vector<Finding> findings;
    for (std::size_t i = 0; i < facts.decide.spans.size(); ++i) {
        const CircuitSpan& span = facts.decide.spans[i];
        if (facts.span_year[i] == 0 || is_free_of_duct(facts.city, span)) continue;
        const std::size_t s = span.duct_string.place();
        const auto t = static_cast<std::size_t>(facts.span_year[i] - facts.plan.settings.first_year + 1);
        const DuctLegs legs = duct_legs(facts.loops[s], span);
        const std::vector<char>& live = facts.at(s, t).leg_is_live;
        const bool is_live = std::any_of(live.begin() + legs.first, live.begin() + legs.last + 1, [](char leg) { return leg != 0; });
        if (legs.first > legs.last || !is_live) continue;
        const PoleIx record = span.duct_to.is_valid() ? span.duct_to : span.pole;
        findings.push_back(make_finding(
            "duct-live", {}, 0, record.is_valid() ? facts.city.poles[record.place()].id : facts.city.strings[s].id,
            fmt::format("the duct is to be pulled in {}, the cable of string {} in it is live at that year's end", facts.span_year[i], facts.city.strings[s].id),
            "series cable dead and pulled first", "move these poles to the year in which that part of the string is off, or dig", "poles"));
    }
    return findings;
}

int service_ready_year(const City& city, const PriceBook& prices, const PlanSettings& settings, ServiceIx ix) {
    const ServicePoint& service = city.services[ix.place()];
    double weeks = service.lead_weeks.value_or(0);
    if (!service.lead_weeks && service.kind == ServiceKind::candidate) weeks = prices.at("service_lead_weeks", settings.first_year);
    return settings.first_year + std::max(0, static_cast<int>(std::ceil(weeks / 52)) - 1);
}

}  // namespace unstring
