#pragma once
// What is to be done at each string in each year, before it is split among crews. Each pole, span and
// connection of the plan is in exactly one job.

#include <vector>

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"
#include "model/orders/work_order.h"
#include "model/phase/phase_result.h"
#include "model/phase/string_years.h"

namespace unstring {

struct YearJob {
    int year = 0;
    StringIx string;
    std::vector<PoleIx> poles; ///< whose work falls in the year, far end first
    std::vector<int>
        spans; ///< places in decide.spans, built in the year for the first of those poles beyond it
    std::vector<int> connections;          ///< places in decide.circuits
    TransformerIx unit_before, unit_after; ///< at the ends of the year before and of this one
    double tap_after = 1;
    StringYear before, after; ///< planned readings
    StringAtYear at;          ///< cable and splices
    bool swaps = false, retires = false;
};

struct OrderFacts { ///< what every order reads
    const MoneyInput& input;
    const DecideResult& decide;
    const PhaseResult& phase;
    std::vector<StringLoop> loops;
    std::vector<int> span_year;
    std::vector<YearJob> jobs; ///< by year, then string

    [[nodiscard]] const Pole& pole(PoleIx ix) const { return input.city.poles[ix.place()]; }
    [[nodiscard]] const PolePlan& plan(PoleIx ix) const { return input.plan.poles[ix.place()]; }
};

[[nodiscard]] OrderFacts order_facts(const MoneyInput& input, const DecideResult& decide,
                                     const PhaseResult& phase);

/// "2029-S-04-line"
[[nodiscard]] std::string order_id(const City& city, int year, StringIx string, Crew crew);

/// Series cable stays live in the base of the lamp at this position (1..n) once the year's work is done.
[[nodiscard]] bool is_base_live(const StringLoop& loop, const StringAtYear& at, int position);
/// Position of a pole on its loop, 0 = not on it.
[[nodiscard]] int position_of(const StringLoop& loop, PoleIx pole);

} // namespace unstring
