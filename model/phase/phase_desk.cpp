#include "model/phase/phase_desk.h"

#include <algorithm>

#include "model/phase/duct_live.h"
#include "model/phase/failure_drill.h"
#include "model/phase/phase_cash.h"
#include "model/phase/phase_checks.h"
#include "model/phase/phase_facts.h"
#include "model/phase/phase_ledger.h"
#include "model/phase/phase_plan.h"
#include "model/phase/year_limits.h"

namespace unstring {
namespace {

struct KnownString { ///< the states of one string, kept while its lamps' years stay
    std::vector<int> lamp_year;
    int first_year = 0, years = -1;
    std::vector<StringAtYear> states;
};

void fill_string_years(const PhaseFacts& facts, PhaseResult& result) {
    for (std::size_t s = 0; s < facts.loops.size(); ++s) {
        if (facts.loops[s].lamps.empty()) continue;
        for (std::size_t t = 0; t <= static_cast<std::size_t>(facts.years()); ++t) {
            const StringState& state = facts.at(s, t).state;
            const UnitAtYear& unit = facts.units.strings[s][t];
            StringYear row{StringIx(s),  facts.year(t), state.lamps, state.load_kw, state.load_kva,
                           state.volts,  state.cable_m, unit.unit,   unit.tap,      0,
                           Verdict::none};
            const bool has_unit = unit.unit.is_valid();
            double min_frac = kUsualMinFrac;
            if (has_unit) {
                const Transformer& carried_by = facts.city.transformers[unit.unit.place()];
                row.loading_frac = state.load_kva / (loop_rating_kw(carried_by) * unit.tap);
                min_frac = min_frac_of(carried_by);
            }
            row.verdict = verdict_of(has_unit, state.lamps, row.loading_frac, min_frac);
            result.string_years.push_back(row);
        }
    }
}

void fill_years(const PhaseFacts& facts, PhaseResult& result) {
    const std::vector<CrewHours> hours = hours_of(facts);
    for (std::size_t t = 1; t <= static_cast<std::size_t>(facts.years()); ++t) {
        PhaseYear year;
        year.year = facts.year(t);
        const YearLimits limits = limits_of(facts.city, year.year);
        year.money = result.ledger[t - 1].capital;
        year.operating = result.ledger[t - 1].operating;
        year.money_limit = limits.money;
        year.hours = hours[t - 1];
        year.line_limit_h = limits.line_h;
        year.civil_limit_h = limits.civil_h;
        year.lighting_limit_h = limits.lighting_h;
        year.electric_limit_h = limits.electric_h;
        for (std::size_t i = 0; i < facts.pole_year.size(); ++i)
            if (facts.pole_year[i] == year.year)
                ++(facts.plan.poles[i].choice == Choice::rewire ? year.rewire : year.solar);
        for (std::size_t s = 0; s < facts.loops.size(); ++s)
            year.series_lamps_left += facts.at(s, t).state.lamps;
        DrillYear drill = drill_year(facts, t);
        year.dark_transformers = drill.dark_transformers;
        year.dark_cable = drill.dark_cable;
        year.spares = std::move(drill.spares);
        result.years.push_back(std::move(year));
    }
}

} // namespace

struct PhaseDesk::Inside {
    const MoneyInput input;
    const DecideResult& decide;
    const std::vector<StringLoop> loops;
    const std::vector<Section> sections;
    const UnitKinds kinds;
    CashBook book;
    std::vector<double> ageing;
    std::vector<KnownString> known;

    Inside(const MoneyInput& given, const DecideResult& circuits)
        : input(given), decide(circuits), loops(string_loops(given.city, given.catalog)),
          sections(sections_of(loops)), kinds(given.city, loops), book(given, circuits), known(loops.size()) {
        for (const StringLoop& loop : loops) ageing.push_back(ageing_of(given.city, given.catalog, loop));
    }

    const std::vector<StringAtYear>& states_of(std::size_t s, const Plan& plan,
                                               const std::vector<int>& pole_year) {
        std::vector<int> lamp_year;
        for (const PoleIx lamp : loops[s].lamps) lamp_year.push_back(pole_year[lamp.place()]);
        KnownString& string = known[s];
        const PlanSettings& settings = plan.settings;
        if (string.lamp_year != lamp_year || string.first_year != settings.first_year ||
            string.years != settings.years)
            string = {lamp_year, settings.first_year, settings.years,
                      string_years(loops[s], lamp_year, settings.first_year, settings.years, ageing[s])};
        return string.states;
    }
};

PhaseDesk::PhaseDesk(const MoneyInput& input, const DecideResult& decide)
    : inside_(std::make_unique<Inside>(input, decide)) {}
PhaseDesk::~PhaseDesk() = default;

PhaseResult PhaseDesk::evaluate(const Plan& plan, bool with_lines) {
    Inside& in = *inside_;
    in.book.use(plan.settings);
    PhaseFacts facts{
        in.input.city, in.input.prices, plan, in.decide, in.loops, in.kinds, {}, {}, {}, {}, {}, {}};
    for (std::size_t i = 0; i < in.input.city.poles.size(); ++i)
        facts.pole_year.push_back(work_year(in.input.city, plan, PoleIx(i)));
    for (std::size_t s = 0; s < in.loops.size(); ++s)
        facts.states.push_back(&in.states_of(s, plan, facts.pole_year));
    facts.span_year = span_years(in.decide, plan, facts.pole_year);
    facts.connection_year = connection_years(in.decide, plan, facts.pole_year);
    facts.duct = duct_states(facts);
    facts.units = unit_years(in.input.city, in.loops, in.kinds, facts.states, plan.units,
                             plan.settings.first_year, plan.settings.years);

    PhaseResult result;
    fill_ledger(facts, in.book, with_lines, result);
    fill_string_years(facts, result);
    fill_years(facts, result);
    result.sections = in.sections;
    result.moves = facts.units.moves;
    for (std::size_t i = 0; i < facts.duct.size(); ++i)
        if (facts.duct[i] == DuctState::dug) result.spans_dug.push_back(static_cast<int>(i));
    check_phase(facts, in.book, result);
    result.pole_year = std::move(facts.pole_year);
    return result;
}

PhaseResult evaluate_phase(const MoneyInput& input, const DecideResult& decide) {
    return PhaseDesk(input, decide).evaluate(input.plan, true);
}

} // namespace unstring
