#include <algorithm>
#include <map>
#include <set>
#include <tuple>

#include "model/orders/crew_orders.h"
#include "model/phase/duct_live.h"

namespace unstring {
namespace {

/// The last line order of a string in or before a year: the one that left its old duct dead.
void add_duct_order(const OrderFacts& facts, const std::set<std::string>& ids, StringIx string, int year,
                    std::set<std::string>& after) {
    for (int at = year; at >= facts.input.plan.settings.first_year; --at) {
        const std::string id = order_id(facts.input.city, at, string, Crew::line);
        if (ids.count(id) == 0) continue;
        after.insert(id);
        return;
    }
}

/// Which job builds each span.
std::map<int, const YearJob*> builders(const OrderFacts& facts) {
    std::map<int, const YearJob*> by_span;
    for (const YearJob& job : facts.jobs)
        for (const int span : job.spans) by_span[span] = &job;
    return by_span;
}

/// Ground work of every span between the job's own spans and their source.
void add_upstream(const OrderFacts& facts, const std::map<int, const YearJob*>& by_span, const YearJob& job,
                  std::set<std::string>& after) {
    for (const int own : job.spans)
        for (int span = facts.decide.spans[static_cast<std::size_t>(own)].parent; span >= 0;
             span = facts.decide.spans[static_cast<std::size_t>(span)].parent) {
            const auto at = by_span.find(span);
            if (at != by_span.end())
                after.insert(order_id(facts.input.city, at->second->year, at->second->string, Crew::civil));
        }
}

std::vector<std::string> predecessors(const OrderFacts& facts, const std::map<int, const YearJob*>& by_span,
                                      const std::set<std::string>& ids, const YearJob& job, Crew crew) {
    std::set<std::string> after;
    const auto own = [&](Crew other) {
        after.insert(order_id(facts.input.city, job.year, job.string, other));
    };
    if (crew == Crew::civil)
        for (const int span : job.spans) {
            const CircuitSpan& each = facts.decide.spans[static_cast<std::size_t>(span)];
            if (each.duct_string.is_valid()) add_duct_order(facts, ids, each.duct_string, job.year, after);
        }
    if (crew == Crew::electric) {
        own(Crew::line);
        own(Crew::civil);
        add_upstream(facts, by_span, job, after);
    }
    if (crew == Crew::lighting) {
        own(Crew::line);
        own(Crew::civil);
        own(Crew::electric);
    }
    std::vector<std::string> list;
    for (const std::string& id : after)
        if (ids.count(id) != 0) list.push_back(id);
    return list;
}

/// Another owner's consent, where it is not in hand, is the first hold point of every order that touches the
/// pole.
void add_consent(const OrderFacts& facts, WorkOrder& order) {
    std::string poles;
    for (const OrderPole& row : order.poles) {
        const Pole& pole = facts.pole(row.pole);
        if (pole.owner != Owner::city && pole.consent != true) poles += (poles.empty() ? "" : ", ") + pole.id;
    }
    if (!poles.empty())
        order.steps.insert(order.steps.begin(),
                           {"Owner's consent in writing; without it no work at " + poles, true, false});
}

} // namespace

const char* text_of(Crew crew) {
    switch (crew) {
    case Crew::line:
        return "line";
    case Crew::civil:
        return "civil";
    case Crew::lighting:
        return "lighting";
    case Crew::electric:
        return "electric";
    }
    return "";
}

std::vector<WorkOrder> work_orders(const MoneyInput& input, const DecideResult& decide,
                                   const PhaseResult& phase, int year, const Crew* crew) {
    const DecideResult built = as_built(decide, phase); // spans that phase digs are trench here
    const OrderFacts facts = order_facts(input, built, phase);
    std::vector<std::pair<const YearJob*, WorkOrder>> all;
    std::set<std::string> ids;
    for (const YearJob& job : facts.jobs)
        for (const auto& make : {line_order, civil_order, electric_order, lighting_order})
            if (std::optional<WorkOrder> order = make(facts, job)) {
                ids.insert(order->id);
                add_consent(facts, *order);
                all.emplace_back(&job, std::move(*order));
            }
    const auto by_span = builders(facts);
    std::vector<WorkOrder> orders;
    for (auto& [job, order] : all) {
        if ((year != 0 && order.year != year) || (crew != nullptr && order.crew != *crew)) continue;
        order.after = predecessors(facts, by_span, ids, *job, order.crew);
        orders.push_back(std::move(order));
    }
    std::stable_sort(orders.begin(), orders.end(), [](const WorkOrder& a, const WorkOrder& b) {
        return std::tuple(a.year, a.crew, a.string) < std::tuple(b.year, b.crew, b.string);
    });
    return orders;
}

} // namespace unstring
