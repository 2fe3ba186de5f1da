#include <algorithm>
#include <cmath>
#include <map>

#include <fmt/format.h>

#include "model/catalog/cables.h"
#include "model/money/hours.h"
#include "model/orders/crew_orders.h"
#include "model/orders/step_texts.h"
#include "model/phase/phase_ledger.h"

namespace unstring {
namespace {

const char* words_of(SpanKind kind) {
    switch (kind) {
    case SpanKind::trench_verge:
        return "trench in verge";
    case SpanKind::trench_paved:
        return "trench in pavement";
    case SpanKind::bore:
        return "bore";
    case SpanKind::conduit:
        return "old duct proved";
    case SpanKind::aerial:
        return "aerial span";
    case SpanKind::tap:
        return "tap of the secondary";
    case SpanKind::service:
        return "service";
    }
    return "span";
}

bool is_dug(SpanKind kind) {
    return kind == SpanKind::trench_verge || kind == SpanKind::trench_paved || kind == SpanKind::bore;
}

const CircuitSpan& span_at(const OrderFacts& facts, int place) {
    return facts.decide.spans[static_cast<std::size_t>(place)];
}

/// Where a span comes from: the nearest pole towards the source, else the service.
std::string from_text(const OrderFacts& facts, const CircuitSpan& span) {
    for (int at = span.parent; at >= 0; at = span_at(facts, at).parent)
        if (span_at(facts, at).pole.is_valid()) return facts.pole(span_at(facts, at).pole).id;
    return span.service.is_valid() ? "service " + facts.input.city.services[span.service.place()].id
                                   : std::string("the secondary");
}

/// The pole whose row tells of a span: its own far end where that is in the job, else the first of the job
/// beyond it.
PoleIx row_of(const OrderFacts& facts, const YearJob& job, const CircuitSpan& span) {
    const auto in_job = [&](PoleIx pole) {
        return facts.plan(pole).choice == Choice::rewire &&
               std::find(job.poles.begin(), job.poles.end(), pole) != job.poles.end();
    };
    if (span.pole.is_valid() && in_job(span.pole)) return span.pole;
    const auto at = std::find_if(span.poles_beyond.begin(), span.poles_beyond.end(), in_job);
    return at == span.poles_beyond.end() ? PoleIx() : *at;
}

struct Part { ///< "wire AWG 8" .. "from 07-275": pieces of one kind from one place are one part
    std::string what, from;
    double length_m = 0; ///< 0 = not by length
    int boxes = 0;
};
using Tasks = std::map<PoleIx, std::vector<Part>>;

void add_task(Tasks& tasks, PoleIx pole, Part part) {
    std::vector<Part>& parts = tasks[pole];
    const auto same = std::find_if(parts.begin(), parts.end(), [&](const Part& each) {
        return each.what == part.what && each.from == part.from;
    });
    if (same == parts.end()) {
        parts.push_back(std::move(part));
        return;
    }
    same->length_m += part.length_m;
    same->boxes += part.boxes;
}

std::string task_text(const std::vector<Part>& parts) {
    std::string text;
    for (const Part& part : parts) {
        text += (text.empty() ? "" : "; ") + part.what;
        if (part.length_m > 0) text += fmt::format(" {:.0f} m", std::max(1.0, part.length_m));
        if (!part.from.empty()) text += " from " + part.from;
        if (part.boxes > 0) text += fmt::format(", {} pull box{}", part.boxes, part.boxes == 1 ? "" : "es");
    }
    return text;
}

/// Rows in the job's working order.
void add_rows(const OrderFacts& facts, const YearJob& job, const Tasks& tasks, WorkOrder& order) {
    for (const PoleIx pole : job.poles) {
        const auto at = tasks.find(pole);
        if (at != tasks.end()) order.poles.push_back(order_pole(facts, job, pole, task_text(at->second)));
    }
}

void add_span_work(const OrderFacts& facts, const YearJob& job, const CircuitSpan& span, Tasks& tasks,
                   WorkOrder& order) {
    std::string what = words_of(span.kind);
    if (span.duct_string.is_valid())
        what += fmt::format(" (cable of {} dead and pulled first)",
                            facts.input.city.strings[span.duct_string.place()].id);
    add_task(tasks, row_of(facts, job, span),
             {std::move(what), from_text(facts, span), span.length_m, span.boxes});
    if (is_dug(span.kind)) add_material(order, "conduit", "m", span.length_m);
    add_material(order, "pull box", "each", span.boxes);
    order.hours += span_crew_hours(facts.input.city, facts.input.prices, span, job.year).civil;
}

bool has_live_base(const WorkOrder& order) {
    return std::any_of(order.poles.begin(), order.poles.end(), [](const OrderPole& pole) {
        return pole.warning.find(kLiveBase) != std::string::npos;
    });
}

void add_wire(const OrderFacts& facts, const YearJob& job, const CircuitSpan& span, Tasks& tasks,
              WorkOrder& order) {
    const bool is_piece = span.kind == SpanKind::tap || span.kind == SpanKind::service;
    const std::string from = from_text(facts, span);
    const std::string what =
        is_piece ? std::string(words_of(span.kind))
                 : fmt::format("{}wire AWG {},", span.kind == SpanKind::aerial ? "aerial " : "",
                               awg_text(span.awg));
    add_task(tasks, row_of(facts, job, span), {what, from, is_piece ? 0 : span.length_m, 0});
    if (!is_piece)
        add_material(order,
                     fmt::format("wire, three conductors AWG {} and ground{}", awg_text(span.awg),
                                 span.kind == SpanKind::aerial ? ", aerial" : ""),
                     "m", span.length_m);
    else
        add_material(order, "tap connector set", "each", 1);
    order.hours += span_crew_hours(facts.input.city, facts.input.prices, span, job.year).electric;
}

void add_connections(const OrderFacts& facts, const YearJob& job, WorkOrder& order) {
    const City& city = facts.input.city;
    for (const int place : job.connections) {
        const Circuit& circuit = facts.decide.circuits[static_cast<std::size_t>(place)];
        const ServicePoint& service = city.services[circuit.service.place()];
        order.facts.emplace_back(
            "connection", fmt::format("{} {}: {:.0f} V, device {:.0f} A, {:.1f} A and {:.2f} kVA planned",
                                      text_of(service.kind), service.id, service.volts, circuit.device_a,
                                      circuit.source_a, circuit.load_kva));
        add_material(order, fmt::format("overcurrent device, {:.0f} A", circuit.device_a), "each", 1);
        order.hours += connection_crew_hours(city, facts.input.prices, circuit.service, job.year).electric;
    }
}

/// Planned volts of the order's poles, and the one with the fewest.
const OrderPole* add_volts(const OrderFacts& facts, WorkOrder& order) {
    const OrderPole* last = nullptr;
    for (OrderPole& row : order.poles) {
        const PoleDecision* decision = facts.decide.find(row.pole);
        if (decision != nullptr) row.volts = decision->volts;
        if (last == nullptr || row.volts < last->volts) last = &row;
    }
    return last;
}

} // namespace

std::optional<WorkOrder> civil_order(const OrderFacts& facts, const YearJob& job) {
    WorkOrder order = order_head(facts, job, Crew::civil);
    Tasks tasks;
    bool reuses_duct = false, sets_poles = false;
    for (const int place : job.spans) {
        const CircuitSpan& span = span_at(facts, place);
        if (span_crew_hours(facts.input.city, facts.input.prices, span, job.year).civil <= 0) continue;
        add_span_work(facts, job, span, tasks, order);
        reuses_duct = reuses_duct || span.kind == SpanKind::conduit;
    }
    for (const PoleIx pole : job.poles) {
        const double hours =
            pole_hours(facts.input.prices, facts.pole(pole), facts.plan(pole).choice, job.year).civil;
        if (hours <= 0) continue;
        add_task(tasks, pole, {"new pole and footing only where the inspection fails this one", {}, 0, 0});
        order.hours += hours;
        sets_poles = true;
    }
    if (tasks.empty()) return std::nullopt;
    add_rows(facts, job, tasks, order);
    order.title = fmt::format("Ground work for string {}: {} poles", order.string_id, order.poles.size());
    order.steps = civil_steps(reuses_duct, sets_poles);
    order.cautions = cautions_for(Crew::civil, false, has_live_base(order));
    order.as_found = {
        {"duct sound, length proved", "m"}, {"depth of new conduit", "m"}, {"other services met", ""}};
    return order;
}

std::optional<WorkOrder> electric_order(const OrderFacts& facts, const YearJob& job) {
    WorkOrder order = order_head(facts, job, Crew::electric);
    Tasks tasks;
    for (const PoleIx pole : job.poles) {
        if (facts.plan(pole).choice != Choice::rewire) continue;
        add_task(tasks, pole, {"base: splice, fuse, bond", {}, 0, 0});
        order.hours += pole_hours(facts.input.prices, facts.pole(pole), Choice::rewire, job.year).electric;
        add_material(order, "fuse and holder", "each", 1);
        add_material(order, "bonding set", "each", 1);
    }
    if (tasks.empty()) return std::nullopt;
    for (const int place : job.spans) add_wire(facts, job, span_at(facts, place), tasks, order);
    add_connections(facts, job, order);
    add_rows(facts, job, tasks, order);
    const OrderPole* last = add_volts(facts, order);
    order.title =
        fmt::format("Lighting circuit for string {}: {} poles", order.string_id, order.poles.size());
    order.steps =
        electric_steps(last == nullptr ? std::string() : last->id, last == nullptr ? 0 : last->volts);
    order.cautions = cautions_for(Crew::electric, false, has_live_base(order));
    order.as_found = {{"insulation of the new wire", "Mohm"}, {"grounding path", "ohm"},
                      {"volts at the source", "V"},           {"volts at the last pole", "V"},
                      {"amperes at the source", "A"},         {"contact volts on poles", "V"}};
    return order;
}

} // namespace unstring
