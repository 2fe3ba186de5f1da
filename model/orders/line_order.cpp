#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/catalog/cables.h"
#include "model/money/hours.h"
#include "model/orders/approach.h"
#include "model/orders/crew_orders.h"
#include "model/orders/step_texts.h"
#include "model/series/units.h"

namespace unstring {
namespace {

std::string pole_name(const OrderFacts& facts, const StringLoop& loop, int position) {
    if (position <= 0) return "station out";
    if (position > static_cast<int>(loop.lamps.size())) return "station return";
    return facts.pole(loop.lamps[static_cast<std::size_t>(position - 1)]).id;
}

/// The cut-backs that the new loop rests on, or that the lamps are jumpered at their bases.
std::string cutback_text(const OrderFacts& facts, const YearJob& job) {
    const StringLoop& loop = facts.loops[job.string.place()];
    if (job.at.state.lamps == 0) return "none, the string ends";
    std::string text;
    for (const int place : job.at.state.used) {
        const LoopCutBack& cutback = loop.cutbacks[static_cast<std::size_t>(place)];
        text += fmt::format("{}{} to {}{}", text.empty() ? "" : ", ", pole_name(facts, loop, cutback.a),
                            pole_name(facts, loop, cutback.b), cutback.confirmed ? "" : " (to be confirmed)");
    }
    return text.empty() ? "none, lamps are jumpered at their bases" : text;
}

std::string swap_text(const OrderFacts& facts, const YearJob& job) {
    if (!job.swaps && !job.retires) return {};
    const auto& units = facts.input.city.transformers;
    const std::string out = job.unit_before.is_valid() ? units[job.unit_before.place()].id : "none";
    if (job.retires)
        return fmt::format("Take transformer {} out of the station; terminals shorted and tagged", out);
    return fmt::format("Swap the transformer: {} out, {} in, tap {:.0f} %; output current, primary volts and "
                       "mounting read off its plate first",
                       out, units[job.unit_after.place()].id, 100 * job.tap_after);
}

std::string controlled_strings(const OrderFacts& facts, const YearJob& job) {
    const City& city = facts.input.city;
    std::string text;
    for (const SeriesString& other : city.strings) {
        if (other.control_from.empty()) continue;
        const bool from_string = other.control_from == city.strings[job.string.place()].id;
        const bool from_pole = std::any_of(job.poles.begin(), job.poles.end(), [&](PoleIx pole) {
            return facts.pole(pole).id == other.control_from;
        });
        if (from_string || from_pole) text += (text.empty() ? "" : ", ") + other.id;
    }
    return text;
}

bool is_two_loop(const City& city, TransformerIx unit) {
    return unit.is_valid() && city.transformers[unit.place()].strings.size() > 1;
}

std::string strings_of(const City& city, TransformerIx unit) {
    std::string text;
    for (const StringIx string : city.transformers[unit.place()].strings)
        text += (text.empty() ? "" : ", ") + city.strings[string.place()].id;
    return text + ": one clearance darkens both";
}

bool is_oil_suspect(const City& city, TransformerIx unit) {
    if (!unit.is_valid()) return false;
    const Oil oil = city.transformers[unit.place()].oil;
    return oil == Oil::pcb || oil == Oil::unknown;
}

/// Mean volts of one of the lamps that leave; of any lamp where none does.
double lamp_volts(const StringLoop& loop, const YearJob& job) {
    double sum = 0;
    int count = 0;
    for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
        const bool leaves = std::find(job.poles.begin(), job.poles.end(), loop.lamps[i]) != job.poles.end();
        if (!leaves && !job.poles.empty()) continue;
        if (loop.lamp_w[i] <= 0) continue;
        sum += loop.lamp_w[i] / (loop.current_a * loop.lamp_pf[i]);
        ++count;
    }
    return count == 0 ? 0 : sum / count;
}

/// Current within which a string may stay on, 6.40 to 6.70 A at 6.6 A; other currents in proportion.
/// Source: UFC 3-535-01 table 15-3.
std::string current_band(double current_a) {
    return fmt::format("{:.2f}-{:.2f} A", current_a * 6.40 / 6.6, current_a * 6.70 / 6.6);
}

void add_readings(const OrderFacts& facts, const YearJob& job, WorkOrder& order) {
    const City& city = facts.input.city;
    const SeriesString& string = city.strings[job.string.place()];
    const StringLoop& loop = facts.loops[job.string.place()];
    const auto fact = [&](const char* label, std::string text) {
        order.facts.emplace_back(label, std::move(text));
    };
    order.planned_volts_before = job.before.volts;
    order.planned_volts_after = job.after.volts;
    order.lamp_volts = lamp_volts(loop, job);
    fact("RO transformer", order.unit_id.empty() ? "none known" : order.unit_id);
    fact("primary circuit", string.primary_feeder);
    fact("switch number", "");
    fact("person in charge of the clearance, number", "");
    fact("amperes after", current_band(loop.current_a) + " or stop");
    fact("volts, planned", fmt::format("{:.0f} before, {:.0f} after, change {:+.0f}", job.before.volts,
                                       job.after.volts, job.after.volts - job.before.volts));
    fact("load, planned",
         fmt::format("{:.2f} kVA before, {:.2f} after", job.before.load_kva, job.after.load_kva));
    if (job.after.lamps > 0)
        fact("loading after",
             fmt::format("{:.0f} %, {}", 100 * job.after.loading_frac, text_of(job.after.verdict)));
    fact("lamps", fmt::format("{} before, {} after", job.before.lamps, job.after.lamps));
    fact("live cable, planned",
         fmt::format("{:.0f} m before, {:.0f} after", job.before.cable_m, job.after.cable_m));
    fact("cut-backs", cutback_text(facts, job));
    if (is_two_loop(city, job.unit_before))
        fact("strings of this transformer", strings_of(city, job.unit_before));
    if (string.asfound_v)
        fact("last reading on record", fmt::format("{:.0f} V {}", *string.asfound_v, string.asfound_date));
    for (const UnitMove& move : facts.phase.moves)
        if (move.year == job.year && (move.from == string.id || move.to == string.id) &&
            move.transformer.is_valid())
            fact("transformer move",
                 fmt::format("{} from {} to {}", city.transformers[move.transformer.place()].id, move.from,
                             move.to));
    order.as_found = {{"current before", "A"},
                      {"volts before", "V"},
                      {"load before", "kVA"},
                      {"lamps lit before", ""},
                      {"insulation", "Mohm"},
                      {"current after", "A"},
                      {"volts after", "V"},
                      {"contact volts on poles before", "V"},
                      {"contact volts on poles after", "V"}};
}

void add_line_materials(const YearJob& job, const StringLoop& loop, WorkOrder& order) {
    add_material(order, fmt::format("splice kit, {:.0f} kV", loop.cable_kv), "each", job.at.splices);
    add_material(order, "jumper for a pole base", "each", job.at.jumpers);
    add_material(order,
                 fmt::format("series cable, AWG {}, {:.0f} kV", awg_text(loop.cable->awg), loop.cable_kv),
                 "m", std::ceil(job.at.new_cable_m));
    const int dead = job.at.left - job.at.jumpers;
    add_material(order, "end cap", "each", 2.0 * dead);
    add_material(order, "tag with the string's id", "each", 2.0 * dead + job.at.splices);
}

} // namespace

std::optional<WorkOrder> line_order(const OrderFacts& facts, const YearJob& job) {
    if (job.poles.empty() && !job.swaps && !job.retires) return std::nullopt;
    const City& city = facts.input.city;
    const StringLoop& loop = facts.loops[job.string.place()];
    WorkOrder order = order_head(facts, job, Crew::line);
    order.title = fmt::format("Series circuit (string) {}: {} lamps off, {} stay{}", order.string_id,
                              job.poles.size(), job.after.lamps,
                              job.swaps     ? ", transformer swapped"
                              : job.retires ? ", string ends"
                                            : "");
    bool has_live_base = false;
    for (const PoleIx pole : job.poles) {
        const bool is_live = is_base_live(loop, job.at, position_of(loop, pole));
        has_live_base = has_live_base || is_live;
        order.poles.push_back(order_pole(facts, job, pole,
                                         is_live ? "lamp off: jumper at the base, cable stays live"
                                                 : "lamp off: cable dead, cap both ends"));
    }
    add_readings(facts, job, order);
    const bool two_loop = is_two_loop(city, job.unit_before) || is_two_loop(city, job.unit_after);
    SeriesWords words;
    words.string_id = order.string_id;
    words.unit_id = order.unit_id;
    words.cutbacks = cutback_text(facts, job);
    words.swap = swap_text(facts, job);
    words.open_kv = open_kv_text(order);
    words.approach = approach_text(order.open_circuit_v);
    words.band = current_band(loop.current_a);
    words.change_v = job.after.volts - job.before.volts;
    words.lamp_v = order.lamp_volts;
    words.retires = job.after.lamps == 0;
    words.is_two_loop = two_loop;
    words.is_oil_suspect = is_oil_suspect(city, job.unit_before);
    words.controls = controlled_strings(facts, job);
    order.steps = series_steps(words);
    order.cautions = cautions_for(Crew::line, two_loop, has_live_base);
    add_line_materials(job, loop, order);
    const int swaps = (job.swaps ? 1 : 0) + (job.retires ? 1 : 0);
    order.hours = string_hours(facts.input.prices, job.at.jumpers, job.at.splices, swaps, job.year).line;
    return order;
}

} // namespace unstring
