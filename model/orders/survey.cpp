#include "model/orders/survey.h"

#include <algorithm>
#include <limits>
#include <map>
#include <utility>

#include <fmt/format.h>

#include "model/money/hours.h"
#include "model/money/new_light.h"
#include "model/money/works.h"
#include "model/orders/step_texts.h"
#include "model/orders/year_jobs.h"
#include "model/series/units.h"

namespace unstring {
namespace {

struct Ask { ///< one thing to look at, at one pole
    PoleIx pole;
    std::string task;
    double worth = 0; ///< dollars
    double hours = 0;
};

struct Survey {
    const MoneyInput& input;
    const DecideResult& decide;
    std::vector<StringLoop> loops;
    int year = 0;
    double at(std::string_view item) const { return input.prices.at(item, year); }
    const Pole& pole(PoleIx ix) const { return input.city.poles[ix.place()]; }
};

double cost_of(const PoleDecision& decision, Choice choice) {
    const OptionCost& option =
        decision.options[static_cast<std::size_t>(choice) - static_cast<std::size_t>(Choice::keep)];
    return option.possible ? option.cost : std::numeric_limits<double>::infinity();
}

double crew_hours(const Survey& survey, double days, std::string_view crew) {
    return days * survey.at(crew) * survey.at("day_hours");
}

/// A pole of unknown strength: the new pole that is expected in solar's cost, all of it or none.
void add_pole(const Survey& survey, const PoleDecision& decision, std::vector<Ask>& asks) {
    const Pole& pole = survey.pole(decision.pole);
    const double solar = cost_of(decision, Choice::solar);
    if (pole.epa_allow_m2 || solar == std::numeric_limits<double>::infinity()) return;
    const double fails = survey.at("pole_fail_frac");
    const int year = survey.input.plan.decide_year();
    const double new_pole = survey.input.plan.factor(year) * survey.input.prices.at("pole_new", year) *
                            (1 + survey.at("design_frac"));
    const double worth = what_knowing_is_worth(fails, solar + (1 - fails) * new_pole,
                                               solar - fails * new_pole, cost_of(decision, Choice::rewire));
    asks.push_back({decision.pole,
                    fmt::format("inspect the pole for a solar head: {}",
                                pole.pole_kind.empty() ? "kind not known" : pole.pole_kind),
                    worth, crew_hours(survey, 1 / survey.at("pace_survey"), "crew_lighting")});
}

/// An old duct that the plan reuses: pulled where sound, dug where bad.
void add_duct(const Survey& survey, const CircuitSpan& span, std::vector<Ask>& asks) {
    if (span.kind != SpanKind::conduit || !span.duct_to.is_valid()) return;
    const Pole& pole = survey.pole(span.duct_to);
    if (pole.duct == Duct::proven) return;
    const int year = survey.input.plan.decide_year();
    const auto price = [&](std::string_view item) { return survey.input.prices.at(item, year); };
    const double sound = duct_sound_frac(survey.input.prices, pole.duct, year);
    const double dig = price(span.surface == Surface::paved ? "trench_paved" : "trench_soft") +
                       price(wire_item(span.awg)) - price("pull");
    const double gap =
        survey.input.plan.factor(year) * span.length_m * std::max(0.0, dig) * (1 + price("design_frac"));
    double rewire = 0, other = 0;
    for (const PoleIx beyond : span.poles_beyond) {
        const PoleDecision* decision = survey.decide.find(beyond);
        if (decision == nullptr) continue;
        rewire += cost_of(*decision, Choice::rewire);
        other += cost_of(*decision, Choice::solar);
    }
    const double worth =
        what_knowing_is_worth(1 - sound, rewire + sound * gap, rewire - (1 - sound) * gap, other);
    asks.push_back(
        {span.duct_to,
         fmt::format("prove the old duct, {:.0f} m, noted as {}", span.length_m, text_of(pole.duct)), worth,
         span_hours(survey.input.prices, SpanWork::conduit, span.length_m, survey.year).civil});
}

std::vector<std::string> string_questions(const Survey& survey, const StringLoop& loop) {
    const City& city = survey.input.city;
    const SeriesString& string = city.strings[loop.string.place()];
    std::vector<std::string> asks;
    if (loop.order_from != OrderFrom::given)
        asks.push_back("trace the loop: the wiring order is " + std::string(text_of(loop.order_from)));
    const auto open = std::count_if(loop.cutbacks.begin(), loop.cutbacks.end(),
                                    [](const LoopCutBack& each) { return !each.confirmed; });
    if (open > 0) asks.push_back(fmt::format("confirm {} cut-backs on site", open));
    if (!string.asfound_v || !string.asfound_a) asks.push_back("read amperes and volts at the transformer");
    const TransformerIx ix = unit_today(city, loop.string);
    if (!ix.is_valid()) return asks;
    const Transformer& unit = city.transformers[ix.place()];
    if (!unit.open_v) asks.push_back("nameplate of " + unit.id + ": open-circuit volts");
    if (!unit.output_a || !unit.primary_v || !unit.mount)
        asks.push_back("nameplate of " + unit.id + ": output current, primary volts, mounting");
    if (unit.tested.empty()) asks.push_back("test of " + unit.id + ": none on record");
    if (unit.oil == Oil::unknown) asks.push_back("oil sample of " + unit.id);
    return asks;
}

WorkOrder head_of(const Survey& survey, StringIx string, Crew crew) {
    WorkOrder order;
    order.id = order_id(survey.input.city, survey.year, string, crew);
    order.year = survey.year;
    order.crew = crew;
    order.string = string;
    order.string_id = survey.input.city.strings[string.place()].id;
    order.cautions = cautions_for(crew, false, true);
    for (const char* blank : {"permit, valid to", "emergency number", "nearest hospital"})
        order.facts.emplace_back(blank, "");
    return order;
}

std::vector<OrderStep> survey_steps(Crew crew) {
    std::vector<OrderStep> steps = {
        {"Job briefing; traffic control set", false, false},
        {"Nothing is opened, cut or moved: reading and looking only", true, false}};
    if (crew == Crew::line) {
        steps.push_back({"Readings at live terminals by qualified people with the glove class of the "
                         "open-circuit volts, or under a switching clearance",
                         true, false});
        steps.push_back(
            {"Trace the loop by tone or at its pull boxes; write the poles in wiring order", false, false});
        steps.push_back({"Oil sample only with the unit isolated and grounded, or from its sampling valve by "
                         "the owner's procedure",
                         true, false});
    } else if (crew == Crew::civil) {
        steps.push_back({"A duct that holds series cable is not rodded while that cable is live: line crew's "
                         "signature first",
                         true, false});
        steps.push_back(
            {"Prove with a mandrel from box to box; length and state written down", false, false});
    } else {
        steps.push_back({"Base, bolts, wall and welds looked at and sounded; rating plate read; photo taken",
                         false, false});
    }
    steps.push_back({"What is found goes back on this sheet, blank where not done", false, false});
    return steps;
}

/// One order a string out of the asks at its poles.
void add_orders(const Survey& survey, Crew crew, std::vector<Ask> asks,
                std::vector<std::pair<double, WorkOrder>>& orders) {
    std::stable_sort(asks.begin(), asks.end(), [](const Ask& a, const Ask& b) { return a.worth > b.worth; });
    std::map<StringIx, std::size_t> place_of;
    for (const Ask& ask : asks) {
        const StringIx string = survey.pole(ask.pole).string;
        const auto [at, is_new] = place_of.try_emplace(string, orders.size());
        if (is_new) {
            orders.emplace_back(0.0, head_of(survey, string, crew));
            orders.back().second.steps = survey_steps(crew);
        }
        auto& [worth, order] = orders[at->second];
        worth += ask.worth;
        order.hours += ask.hours;
        const Pole& pole = survey.pole(ask.pole);
        order.poles.push_back({ask.pole,
                               pole.id,
                               pole.street,
                               fmt::format("{}; knowing it is worth {:.0f} dollars", ask.task, ask.worth),
                               {},
                               {},
                               0,
                               pole.place});
    }
}

void add_string_order(const Survey& survey, const StringLoop& loop,
                      std::vector<std::pair<double, WorkOrder>>& orders) {
    if (loop.lamps.empty()) return;
    const std::vector<std::string> questions = string_questions(survey, loop);
    if (questions.empty()) return;
    WorkOrder order = head_of(survey, loop.string, Crew::line);
    order.as_found = {{"current", "A"},
                      {"volts", "V"},
                      {"lamps lit", ""},
                      {"open-circuit volts, nameplate", "V"},
                      {"oil, ppm PCB", ""}};
    order.steps = survey_steps(Crew::line);
    for (const std::string& question : questions)
        order.steps.push_back({"Find out: " + question, false, false});
    if (loop.order_from != OrderFrom::given)
        for (const PoleIx lamp : loop.lamps)
            order.poles.push_back({lamp,
                                   survey.pole(lamp).id,
                                   survey.pole(lamp).street,
                                   "place in the wiring order",
                                   {},
                                   {},
                                   0,
                                   survey.pole(lamp).place});
    order.title = fmt::format("Survey of string {}: {} questions", order.string_id, questions.size());
    const bool traces = loop.order_from != OrderFrom::given;
    order.hours = crew_hours(survey, traces ? 1 / survey.at("pace_trace") : 0.25 / survey.at("pace_trace"),
                             "crew_line");
    orders.emplace_back(0.0, std::move(order));
}

} // namespace

double what_knowing_is_worth(double bad_frac, double bad, double good, double other) {
    if (other == std::numeric_limits<double>::infinity() || bad == std::numeric_limits<double>::infinity())
        return 0;
    const double blind = std::min(bad_frac * bad + (1 - bad_frac) * good, other);
    return std::max(0.0, blind - bad_frac * std::min(bad, other) - (1 - bad_frac) * std::min(good, other));
}

std::vector<WorkOrder> survey_orders(const MoneyInput& input, const DecideResult& decide) {
    const Survey survey{input, decide, string_loops(input.city, input.catalog),
                        input.plan.settings.first_year - 1};
    std::vector<Ask> poles, ducts;
    for (const PoleDecision& decision : decide.poles) add_pole(survey, decision, poles);
    for (const CircuitSpan& span : decide.spans) add_duct(survey, span, ducts);
    std::vector<std::pair<double, WorkOrder>> orders;
    for (const StringLoop& loop : survey.loops) add_string_order(survey, loop, orders);
    add_orders(survey, Crew::civil, std::move(ducts), orders);
    add_orders(survey, Crew::lighting, std::move(poles), orders);
    std::stable_sort(orders.begin(), orders.end(), [](const auto& a, const auto& b) {
        return a.second.crew != b.second.crew ? a.second.crew < b.second.crew : a.first > b.first;
    });
    std::vector<WorkOrder> answer;
    for (auto& [worth, order] : orders) {
        if (order.title.empty())
            order.title =
                fmt::format("Survey at string {}: {} {}, worth {:.0f} dollars to know", order.string_id,
                            order.poles.size(), order.crew == Crew::civil ? "ducts" : "poles", worth);
        answer.push_back(std::move(order));
    }
    return answer;
}

} // namespace unstring
