#pragma once
// The pool of RO transformers through the years: which unit carries which string at each year's end, and the
// moves.

#include <string>
#include <vector>

#include "model/finding.h"
#include "model/phase/phase_result.h"
#include "model/phase/string_years.h"
#include "model/plan/plan.h"
#include "model/series/units.h"

namespace unstring {

struct UnitAtYear {
    TransformerIx unit; ///< not valid: none carries the string
    double tap = 1;
};

struct UnitYears {
    std::vector<std::vector<UnitAtYear>> strings; ///< [string][0 = today, t]
    std::vector<std::vector<TransformerIx>> idle; ///< [0 = today, t] in nobody's service and not scrapped
    std::vector<UnitMove> moves;   ///< within a year in an order in which each takes a free unit
    std::vector<Finding> findings; ///< unit-twice, unit-cycle
};

/// Which units are of the right kind for which string, whatever its load: current, primary volts, mounting,
/// cable class.
class UnitKinds {
public:
    UnitKinds(const City& city, const std::vector<StringLoop>& loops);
    [[nodiscard]] bool is_kind(StringIx string, TransformerIx unit) const {
        return kind_[string.place()][unit.place()] != 0;
    }
    /// The unit's fit for a load: the smallest tap that carries it; none where it is refused.
    [[nodiscard]] std::optional<UnitFit> fit(StringIx string, TransformerIx unit, double load_kva) const;
    /// The best of a pool by the swap rule: smallest rating x tap that carries the load.
    [[nodiscard]] std::optional<UnitFit> best(StringIx string, const std::vector<TransformerIx>& pool,
                                              double load_kva) const;

private:
    const City& city_;
    std::vector<UnitNeed> need_;
    std::vector<std::vector<char>> kind_;
};

/// Units of the plan where they are legal; else the one in service while it carries the load; else the swap
/// rule over the idle ones (aged load first, planned load where nothing carries that); else the one in
/// service, over-loaded. A two-loop unit serves its own two strings, and is idle only when both have left it.
[[nodiscard]] UnitYears unit_years(const City& city, const std::vector<StringLoop>& loops,
                                   const UnitKinds& kinds,
                                   const std::vector<const std::vector<StringAtYear>*>& states,
                                   const std::vector<StringUnit>& plan_units, int first_year, int years);

} // namespace unstring
