#include <algorithm>
#include <set>

#include <fmt/format.h>

#include "model/money/new_light.h"
#include "model/orders/approach.h"
#include "model/orders/crew_orders.h"
#include "model/orders/step_texts.h"
#include "model/orders/switch_on.h"
#include "model/series/units.h"

namespace unstring {
namespace {

constexpr double kVoltsPerKilovolt = 1000;
constexpr double kRestoreBefore_h = 1.5; // start restoring so long before the lights are due on (assumption)

std::vector<LoopBead> beads(const OrderFacts& facts, const YearJob& job) {
    const StringLoop& loop = facts.loops[job.string.place()];
    std::vector<LoopBead> all;
    for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
        const PoleIx lamp = loop.lamps[i];
        const int year = facts.phase.pole_year[lamp.place()];
        LoopBead bead;
        bead.pole = lamp;
        bead.id = facts.pole(lamp).id;
        bead.place = facts.pole(lamp).place;
        bead.leaves_now = year == job.year;
        bead.burns_after = loop.burns[i] != 0 && (year == 0 || year > job.year);
        bead.cable_live_after =
            !job.at.leg_is_live.empty() && is_base_live(loop, job.at, static_cast<int>(i) + 1);
        all.push_back(std::move(bead));
    }
    return all;
}

/// The higher of the units that stand in the station during the work; without one, the cable's class.
OpenVolts open_circuit(const City& city, const StringLoop& loop, const YearJob& job) {
    OpenVolts open{loop.cable_kv * kVoltsPerKilovolt, true};
    bool has_unit = false;
    for (const TransformerIx unit : {job.unit_before, job.unit_after}) {
        if (!unit.is_valid()) continue;
        const OpenVolts each = open_volts(city.transformers[unit.place()], loop.current_a);
        if (!has_unit || each.volts > open.volts) open = each;
        has_unit = true;
    }
    return open;
}

void add_open_circuit(const OrderFacts& facts, const YearJob& job, WorkOrder& order) {
    const OpenVolts open = open_circuit(facts.input.city, facts.loops[job.string.place()], job);
    order.open_circuit_v = open.volts;
    order.open_circuit_is_estimate = open.is_estimate;
    order.facts.emplace_back("open-circuit kV",
                             open_kv_text(order) + (open.is_estimate ? "" : " (nameplate)"));
    order.facts.emplace_back("approach distance, gloves", approach_text(open.volts));
}

/// Lights due on, each month, and the hour at which restoring must begin.
void add_switch_on(const OrderFacts& facts, WorkOrder& order) {
    const auto hours = switch_on_year_h(facts.input.city.centre.lat_deg);
    constexpr std::array<const char*, 12> kMonths = {"Jan", "Feb", "Mar", "Apr", "May", "Jun",
                                                     "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"};
    std::string months;
    for (std::size_t i = 0; i < hours.size(); ++i)
        months += fmt::format("{}{} {}", i == 0 ? "" : ", ", kMonths[i], clock_text(hours[i]));
    const double earliest = *std::min_element(hours.begin(), hours.end());
    order.switch_on_time = clock_text(earliest);
    order.facts.emplace_back("lights due on, solar time", months);
    order.facts.emplace_back("not restorable in time",
                             fmt::format("start restoring {:.0f} minutes before; {} in the shortest days",
                                         60 * kRestoreBefore_h, clock_text(earliest - kRestoreBefore_h)));
}

void add_findings(const OrderFacts& facts, const YearJob& job, WorkOrder& order) {
    std::set<std::string> records = {order.string_id, fmt::format("year {}", job.year)};
    for (const PoleIx pole : job.poles) records.insert(facts.pole(pole).id);
    const auto add = [&](const std::vector<Finding>& findings) {
        for (const Finding& finding : findings)
            if (records.count(finding.record) != 0)
                order.findings.push_back(fmt::format("{}: {} {}{}{}", finding.code, finding.record,
                                                     finding.found, finding.remedy.empty() ? "" : ". ",
                                                     finding.remedy));
    };
    add(facts.decide.findings);
    add(facts.phase.failures);
}

std::string traffic_note(const OrderFacts& facts, const YearJob& job) {
    constexpr std::array<const char*, 3> kWords = {"local street", "collector", "arterial"};
    std::array<int, 3> count{};
    for (const PoleIx pole : job.poles) ++count[static_cast<std::size_t>(road_class_of(facts.pole(pole)))];
    std::string text;
    for (std::size_t i = count.size(); i-- > 0;)
        if (count[i] > 0) text += fmt::format("{}{} at {}", text.empty() ? "" : ", ", count[i], kWords[i]);
    return text.empty() ? "none" : text + " (poles by road)";
}

} // namespace

std::string open_kv_text(const WorkOrder& order) {
    return fmt::format("{:.1f}{}", order.open_circuit_v / kVoltsPerKilovolt,
                       order.open_circuit_is_estimate ? " (estimate)" : "");
}

void add_material(WorkOrder& order, const std::string& what, const std::string& unit, double quantity) {
    if (quantity <= 0) return;
    const auto same = [&](const Material& each) { return each.what == what && each.unit == unit; };
    const auto at = std::find_if(order.materials.begin(), order.materials.end(), same);
    if (at == order.materials.end())
        order.materials.push_back({what, unit, quantity});
    else
        at->quantity += quantity;
}

OrderPole order_pole(const OrderFacts& facts, const YearJob& job, PoleIx ix, std::string task) {
    const Pole& pole = facts.pole(ix);
    OrderPole row{ix, pole.id, pole.street, std::move(task), {}, {}, 0, pole.place};
    const auto warn = [&](const std::string& text) {
        row.warning += (row.warning.empty() ? "" : "; ") + text;
    };
    const StringLoop& loop = facts.loops[pole.string.place()];
    const bool is_own = pole.string == job.string && !job.at.leg_is_live.empty();
    if (is_own && is_base_live(loop, job.at, position_of(loop, ix))) warn(kLiveBase);
    if (facts.plan(ix).choice == Choice::solar && !pole.epa_allow_m2)
        warn("pole to be checked: strength not known");
    if (!pole.attachments.empty()) warn("attachments: " + pole.attachments);
    if (pole.critical) warn("critical pole: not dark for one night");
    if (pole.owner != Owner::city)
        warn(fmt::format("owner {}: {}", text_of(pole.owner),
                         pole.consent == true ? "consent given" : "consent to be had first"));
    if (facts.loops[pole.string.place()].order_from != OrderFrom::given)
        warn("wiring order inferred: confirm before the work");
    return row;
}

WorkOrder order_head(const OrderFacts& facts, const YearJob& job, Crew crew) {
    const City& city = facts.input.city;
    WorkOrder order;
    order.id = order_id(city, job.year, job.string, crew);
    order.year = job.year;
    order.crew = crew;
    order.string = job.string;
    order.string_id = city.strings[job.string.place()].id;
    const TransformerIx unit = job.unit_before.is_valid() ? job.unit_before : job.unit_after;
    if (unit.is_valid()) order.unit_id = city.transformers[unit.place()].id;
    order.loop = beads(facts, job);
    add_open_circuit(facts, job, order);
    order.facts.emplace_back("traffic", traffic_note(facts, job));
    add_switch_on(facts, order);
    for (const char* blank :
         {"locate ticket, valid to", "permit, valid to", "emergency number", "nearest hospital"})
        order.facts.emplace_back(blank, "");
    add_findings(facts, job, order);
    return order;
}

} // namespace unstring
