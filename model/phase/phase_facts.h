#pragma once
// What follows from a plan before money and checks: years in force, string states, units, when each span is
// built.

#include <vector>

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"
#include "model/phase/string_years.h"
#include "model/phase/unit_years.h"
#include "model/plan/plan.h"

namespace unstring {

enum class DuctState; // model/phase/duct_live.h

struct PhaseFacts {
    const City& city;
    const PriceBook& prices;
    const Plan& plan;
    const DecideResult& decide;
    const std::vector<StringLoop>& loops;
    const UnitKinds& kinds;
    std::vector<int> pole_year; ///< calendar year of the work, 0 = none in the plan's years
    std::vector<const std::vector<StringAtYear>*> states; ///< [string] -> [0 = today, t]
    UnitYears units;
    std::vector<int> span_year;       ///< [span] earliest year of any pole beyond, 0 = not built
    std::vector<int> connection_year; ///< [circuit] likewise
    std::vector<DuctState> duct;      ///< [span]

    [[nodiscard]] int years() const { return plan.settings.years; }
    [[nodiscard]] int year(std::size_t t) const { return plan.settings.first_year + static_cast<int>(t) - 1; }
    [[nodiscard]] const StringAtYear& at(std::size_t string, std::size_t t) const {
        return (*states[string])[t];
    }
};

/// The year in which a pole's work falls under a plan: its own where it is to be converted within the plan's
/// years, else 0.
[[nodiscard]] int work_year(const City& city, const Plan& plan, PoleIx pole);
[[nodiscard]] std::vector<int> span_years(const DecideResult& decide, const Plan& plan,
                                          const std::vector<int>& pole_year);
[[nodiscard]] std::vector<int> connection_years(const DecideResult& decide, const Plan& plan,
                                                const std::vector<int>& pole_year);

} // namespace unstring
