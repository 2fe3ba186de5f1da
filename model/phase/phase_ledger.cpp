#include "model/phase/phase_ledger.h"

#include <algorithm>

#include "model/money/hours.h"
#include "model/money/works.h"
#include "model/phase/duct_live.h"

namespace unstring {
namespace {

CrewHours crew_hours(const TaskHours& task) { return {task.line, task.civil, task.lighting, task.electric}; }

void add(CrewHours& sum, const CrewHours& more) {
    sum.line += more.line;
    sum.civil += more.civil;
    sum.lighting += more.lighting;
    sum.electric += more.electric;
}

SpanWork work_of(SpanKind kind) {
    switch (kind) {
    case SpanKind::trench_verge:
        return SpanWork::trench_verge;
    case SpanKind::trench_paved:
        return SpanWork::trench_paved;
    case SpanKind::bore:
        return SpanWork::bore;
    case SpanKind::conduit:
        return SpanWork::conduit;
    case SpanKind::aerial:
        return SpanWork::aerial;
    case SpanKind::tap:
        return SpanWork::tap;
    case SpanKind::service:
        return SpanWork::service;
    }
    return SpanWork::trench_verge;
}

PoleAsk ask_of(const PhaseFacts& facts, std::size_t i) {
    const int year = facts.pole_year[i];
    if (year == 0) return {PoleIx(i), Choice::keep, 0, {}};
    const PolePlan& row = facts.plan.poles[i];
    return {PoleIx(i), row.choice, year, row.choice == Choice::solar ? row.head : std::string()};
}

class Sum {
public:
    Sum(const PlanSettings& settings, PhaseResult& result) : settings_(settings), result_(result) {
        const int last = ledger_last_year(settings);
        capital_.assign(static_cast<std::size_t>(last - settings.first_year + 1), 0);
        operating_ = capital_;
    }
    void add(const YearCash& cash) {
        for (std::size_t i = 0; i < capital_.size(); ++i) {
            capital_[i] += cash.capital[i];
            operating_[i] += cash.operating[i];
        }
    }
    void add_lines(std::vector<CashLine> lines) {
        for (CashLine& line : lines) result_.lines.push_back(std::move(line));
    }
    void finish(const Plan& plan) {
        for (std::size_t i = 0; i < capital_.size(); ++i) {
            const int year = settings_.first_year + static_cast<int>(i);
            result_.ledger.push_back({year, capital_[i], operating_[i], plan.factor(year)});
            result_.cost += to_dollars(capital_[i] + operating_[i]) * plan.factor(year);
        }
    }

private:
    const PlanSettings& settings_;
    PhaseResult& result_;
    std::vector<Cents> capital_, operating_;
};

bool other_loop_lives(const PhaseFacts& facts, std::size_t string, std::size_t t, TransformerIx unit) {
    for (std::size_t s = 0; s < facts.units.strings.size(); ++s)
        if (s != string && facts.units.strings[s][t].unit == unit) return true;
    return false;
}

} // namespace

std::vector<StringYearCash> string_cash(const PhaseFacts& facts, std::size_t string) {
    std::vector<StringYearCash> all;
    if (facts.loops[string].lamps.empty() || facts.at(string, 0).state.lamps == 0) return all;
    const PlanSettings& settings = facts.plan.settings;
    for (int year = settings.first_year; year <= ledger_last_year(settings); ++year) {
        const bool in_plan = year <= facts.plan.last_year();
        const auto t =
            static_cast<std::size_t>(std::min(year, facts.plan.last_year()) - settings.first_year + 1);
        const StringAtYear& at = facts.at(string, t);
        const TransformerIx unit = facts.units.strings[string][t].unit;
        StringYearCash cash;
        cash.year = year;
        if (at.state.lamps > 0) {
            cash.cable_kw = at.state.cable_w / 1000;
            if (unit.is_valid()) cash.unit_rated_kw = loop_rating_kw(facts.city.transformers[unit.place()]);
        }
        if (in_plan) {
            const TransformerIx before = facts.units.strings[string][t - 1].unit;
            cash.has_work = at.left > 0;
            cash.swaps_unit = at.state.lamps > 0 && unit.is_valid() && unit != before;
            cash.retires = at.state.lamps == 0 && facts.at(string, t - 1).state.lamps > 0 &&
                           before.is_valid() && !other_loop_lives(facts, string, t, before);
            if (before.is_valid()) {
                const Oil oil = facts.city.transformers[before.place()].oil;
                cash.oil_suspect = oil == Oil::pcb || oil == Oil::unknown;
            }
            cash.splices = at.splices;
            cash.jumpers = at.jumpers;
            cash.new_cable_m = at.new_cable_m;
        }
        all.push_back(cash);
    }
    return all;
}

void fill_ledger(const PhaseFacts& facts, CashBook& book, bool with_lines, PhaseResult& result) {
    const PlanSettings& settings = facts.plan.settings;
    Sum sum(settings, result);
    std::vector<PoleAsk> asks;
    for (std::size_t i = 0; i < facts.city.poles.size(); ++i)
        if (is_candidate(facts.city, facts.city.poles[i])) asks.push_back(ask_of(facts, i));
    if (with_lines)
        for (std::vector<CashLine>& lines : book.lines_of(asks)) sum.add_lines(std::move(lines));
    else
        book.warm(asks);
    for (const PoleAsk& ask : asks) sum.add(book.pole(ask));
    for (std::size_t i = 0; i < facts.decide.spans.size(); ++i) {
        if (facts.span_year[i] == 0) continue;
        const bool dug = facts.duct[i] == DuctState::dug;
        sum.add(book.span(i, facts.span_year[i], dug));
        const CircuitSpan& span = facts.decide.spans[i];
        if (with_lines)
            sum.add_lines(span_lines(book.input(), dug ? dug_span(span) : span, facts.span_year[i]));
    }
    for (std::size_t i = 0; i < facts.decide.circuits.size(); ++i) {
        if (facts.connection_year[i] == 0 || !facts.decide.circuits[i].service.is_valid()) continue;
        const ServiceIx service = facts.decide.circuits[i].service;
        sum.add(book.connection(service, facts.connection_year[i]));
        if (with_lines) sum.add_lines(connection_lines(book.input(), service, facts.connection_year[i]));
    }
    for (std::size_t s = 0; s < facts.loops.size(); ++s) {
        std::vector<CashLine> lines = string_lines(book.input(), StringIx(s), string_cash(facts, s));
        sum.add(year_cash(settings, lines));
        if (with_lines) sum.add_lines(std::move(lines));
    }
    sum.finish(facts.plan);
}

CrewHours span_crew_hours(const City& city, const PriceBook& prices, const CircuitSpan& span, int year) {
    const PoleIx at = span.duct_to.is_valid() ? span.duct_to : span.pole;
    const bool has_duct = span.kind == SpanKind::conduit && at.is_valid();
    const double sound = has_duct ? duct_sound_frac(prices, city.poles[at.place()].duct, year) : 1;
    CrewHours hours =
        crew_hours(span_hours(prices, work_of(span.kind), span.length_m, year, sound, span.surface));
    hours.civil += span.boxes / prices.at("pace_pull_box", year) * prices.at("crew_civil", year) *
                   prices.at("day_hours", year);
    return hours;
}

CrewHours connection_crew_hours(const City& city, const PriceBook& prices, ServiceIx service, int year) {
    const bool is_end = city.services[service.place()].kind == ServiceKind::circuit_end;
    return crew_hours(span_hours(prices, is_end ? SpanWork::circuit_end : SpanWork::service, 0, year));
}

std::vector<CrewHours> hours_of(const PhaseFacts& facts) {
    std::vector<CrewHours> hours(static_cast<std::size_t>(facts.years()));
    const int first = facts.plan.settings.first_year;
    const auto at = [&](int year) -> CrewHours& { return hours[static_cast<std::size_t>(year - first)]; };
    for (std::size_t i = 0; i < facts.pole_year.size(); ++i) {
        if (facts.pole_year[i] == 0) continue;
        add(at(facts.pole_year[i]), crew_hours(pole_hours(facts.prices, facts.city.poles[i],
                                                          facts.plan.poles[i].choice, facts.pole_year[i])));
    }
    for (std::size_t i = 0; i < facts.decide.spans.size(); ++i)
        if (facts.span_year[i] != 0) {
            const CircuitSpan& span = facts.decide.spans[i];
            const bool dug = facts.duct[i] == DuctState::dug;
            add(at(facts.span_year[i]),
                span_crew_hours(facts.city, facts.prices, dug ? dug_span(span) : span, facts.span_year[i]));
        }
    for (std::size_t i = 0; i < facts.decide.circuits.size(); ++i)
        if (facts.connection_year[i] != 0 && facts.decide.circuits[i].service.is_valid())
            add(at(facts.connection_year[i]),
                connection_crew_hours(facts.city, facts.prices, facts.decide.circuits[i].service,
                                      facts.connection_year[i]));
    for (std::size_t s = 0; s < facts.loops.size(); ++s)
        for (const StringYearCash& cash : string_cash(facts, s)) {
            if (cash.year > facts.plan.last_year()) break;
            if (!cash.has_work && !cash.swaps_unit && !cash.retires) continue;
            const int swaps =
                (cash.swaps_unit ? 1 : 0) + (cash.retires ? 1 : 0); // taking a unit away is a swap's day too
            add(at(cash.year),
                crew_hours(string_hours(facts.prices, cash.jumpers, cash.splices, swaps, cash.year)));
        }
    return hours;
}

} // namespace unstring
