#include "model/orders/year_jobs.h"

#include <algorithm>
#include <map>
#include <utility>

#include <fmt/format.h>

#include "model/phase/phase_facts.h"

namespace unstring {
namespace {

using Jobs = std::map<std::pair<int, StringIx>, YearJob>;

YearJob& job_at(Jobs& jobs, int year, StringIx string) {
    YearJob& job = jobs[{year, string}];
    job.year = year;
    job.string = string;
    return job;
}

/// Rings of the sections, so that the far end comes first; a pole in no section comes last.
std::vector<int> rings_of(const City& city, const PhaseResult& phase) {
    std::vector<int> rings(city.poles.size(), 1 << 20);
    for (const Section& section : phase.sections)
        for (const PoleIx pole : section.poles) rings[pole.place()] = section.ring;
    return rings;
}

/// The pole for which something shared is built in `year`: the first of those beyond it whose rewire falls
/// then.
PoleIx built_for(const OrderFacts& facts, const std::vector<PoleIx>& poles_beyond, int year) {
    for (const PoleIx pole : poles_beyond)
        if (facts.plan(pole).choice == Choice::rewire && facts.phase.pole_year[pole.place()] == year)
            return pole;
    return {};
}

void add_shared(const OrderFacts& facts, Jobs& jobs) {
    for (std::size_t i = 0; i < facts.decide.spans.size(); ++i) {
        if (facts.span_year[i] == 0) continue;
        const PoleIx pole = built_for(facts, facts.decide.spans[i].poles_beyond, facts.span_year[i]);
        job_at(jobs, facts.span_year[i], facts.pole(pole).string).spans.push_back(static_cast<int>(i));
    }
    const std::vector<int> years = connection_years(facts.decide, facts.input.plan, facts.phase.pole_year);
    for (std::size_t i = 0; i < facts.decide.circuits.size(); ++i) {
        const Circuit& circuit = facts.decide.circuits[i];
        if (years[i] == 0 || !circuit.service.is_valid()) continue;
        const PoleIx pole = built_for(facts, circuit.poles, years[i]);
        job_at(jobs, years[i], facts.pole(pole).string).connections.push_back(static_cast<int>(i));
    }
}

const StringYear* state_of(const PhaseResult& phase, StringIx string, int year) {
    const auto at =
        std::find_if(phase.string_years.begin(), phase.string_years.end(),
                     [&](const StringYear& each) { return each.string == string && each.year == year; });
    return at == phase.string_years.end() ? nullptr : &*at;
}

bool feeds_another(const PhaseResult& phase, StringIx string, int year, TransformerIx unit) {
    return std::any_of(phase.string_years.begin(), phase.string_years.end(), [&](const StringYear& each) {
        return each.year == year && each.string != string && each.transformer == unit && each.lamps > 0;
    });
}

/// Readings, transformers and cable of each string and year; a swap or a removal makes a job of its own.
void add_strings(const OrderFacts& facts, Jobs& jobs) {
    const PlanSettings& settings = facts.input.plan.settings;
    for (std::size_t s = 0; s < facts.loops.size(); ++s) {
        const StringLoop& loop = facts.loops[s];
        if (loop.lamps.empty()) continue;
        std::vector<int> lamp_year;
        for (const PoleIx lamp : loop.lamps) lamp_year.push_back(facts.phase.pole_year[lamp.place()]);
        const auto states = string_years(loop, lamp_year, settings.first_year, settings.years, 0);
        for (int year = settings.first_year; year <= facts.input.plan.last_year(); ++year) {
            const StringYear* before = state_of(facts.phase, StringIx(s), year - 1);
            const StringYear* after = state_of(facts.phase, StringIx(s), year);
            if (before == nullptr || after == nullptr) continue;
            const bool swaps = after->lamps > 0 && after->transformer.is_valid() &&
                               after->transformer != before->transformer;
            const bool ends = after->lamps == 0 && before->lamps > 0;
            if (!swaps && !ends && jobs.find({year, StringIx(s)}) == jobs.end()) continue;
            YearJob& job = job_at(jobs, year, StringIx(s));
            job.before = *before;
            job.after = *after;
            job.unit_before = before->transformer;
            job.unit_after = after->transformer;
            job.tap_after = after->tap;
            job.at = states[static_cast<std::size_t>(year - settings.first_year + 1)];
            job.swaps = swaps;
            job.retires = ends && before->transformer.is_valid() &&
                          !feeds_another(facts.phase, StringIx(s), year, before->transformer);
        }
    }
}

} // namespace

OrderFacts order_facts(const MoneyInput& input, const DecideResult& decide, const PhaseResult& phase) {
    OrderFacts facts{input,
                     decide,
                     phase,
                     string_loops(input.city, input.catalog),
                     span_years(decide, input.plan, phase.pole_year),
                     {}};
    Jobs jobs;
    for (std::size_t i = 0; i < phase.pole_year.size(); ++i)
        if (phase.pole_year[i] != 0)
            job_at(jobs, phase.pole_year[i], input.city.poles[i].string).poles.push_back(PoleIx(i));
    add_shared(facts, jobs);
    add_strings(facts, jobs);
    const std::vector<int> rings = rings_of(input.city, phase);
    for (auto& [key, job] : jobs) {
        const StringLoop& loop = facts.loops[key.second.place()];
        std::sort(job.poles.begin(), job.poles.end(), [&](PoleIx a, PoleIx b) {
            const auto place = [&](PoleIx pole) {
                return std::pair(rings[pole.place()], position_of(loop, pole));
            };
            return place(a) != place(b) ? place(a) < place(b) : a < b;
        });
        facts.jobs.push_back(std::move(job));
    }
    return facts;
}

std::string order_id(const City& city, int year, StringIx string, Crew crew) {
    return fmt::format("{}-{}-{}", year, city.strings[string.place()].id, text_of(crew));
}

int position_of(const StringLoop& loop, PoleIx pole) {
    const auto at = std::find(loop.lamps.begin(), loop.lamps.end(), pole);
    return at == loop.lamps.end() ? 0 : static_cast<int>(at - loop.lamps.begin()) + 1;
}

bool is_base_live(const StringLoop& loop, const StringAtYear& at, int position) {
    if (at.state.lamps == 0 || position < 1) return false;
    const auto leg = static_cast<std::size_t>(position);
    if (at.leg_is_live[leg - 1] != 0 || at.leg_is_live[leg] != 0) return true;
    return std::any_of(at.state.used.begin(), at.state.used.end(),
                       [&](int place) { // between two cut-backs: their own cable ends here
                           const LoopCutBack& cutback = loop.cutbacks[static_cast<std::size_t>(place)];
                           return cutback.a == position || cutback.b == position;
                       });
}

} // namespace unstring
