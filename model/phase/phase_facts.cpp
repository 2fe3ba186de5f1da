#include "model/phase/phase_facts.h"

namespace unstring {
namespace {

int earliest(const std::vector<PoleIx>& poles, const Plan& plan, const std::vector<int>& pole_year) {
    int first = 0;
    for (const PoleIx pole : poles) {
        if (plan.poles[pole.place()].choice != Choice::rewire) continue;
        const int year = pole_year[pole.place()];
        if (year != 0 && (first == 0 || year < first)) first = year;
    }
    return first;
}

} // namespace

int work_year(const City& city, const Plan& plan, PoleIx ix) {
    const PolePlan& row = plan.poles[ix.place()];
    if (row.choice != Choice::rewire && row.choice != Choice::solar) return 0;
    if (row.year < plan.settings.first_year || row.year > plan.last_year()) return 0;
    return is_candidate(city, city.poles[ix.place()]) ? row.year : 0;
}

std::vector<int> span_years(const DecideResult& decide, const Plan& plan, const std::vector<int>& pole_year) {
    std::vector<int> years;
    for (const CircuitSpan& span : decide.spans)
        years.push_back(earliest(span.poles_beyond, plan, pole_year));
    return years;
}

std::vector<int> connection_years(const DecideResult& decide, const Plan& plan,
                                  const std::vector<int>& pole_year) {
    std::vector<int> years;
    for (const Circuit& circuit : decide.circuits) years.push_back(earliest(circuit.poles, plan, pole_year));
    return years;
}

} // namespace unstring
