#pragma once
// What one choice at one pole costs, year by year, everything that belongs to the pole alone: works, removal,
// energy, upkeep, renewals, residual value. Trench, wire and service are the circuit's
// (model/decide/span_cost.h); mobilisation, swaps, and the station's losses are the string's (string_lines).

#include <string_view>

#include "model/catalog/catalog.h"
#include "model/catalog/prices.h"
#include "model/city/city.h"
#include "model/money/cash.h"
#include "model/plan/plan.h"
#include "model/solar/shade.h"

namespace unstring {

struct MoneyInput { ///< all by reference; they outlive the call
    const City& city;
    const Catalog& catalog;
    const PriceBook& prices;
    const Plan& plan;
    const ShadeResult& shade;
};

/// Cost of a choice whose work falls in calendar year `year`: keep cost in the years before it, then capital,
/// removal and the new light's running cost from that year to the horizon. For Choice::keep the year is not
/// read: upkeep that rises, failures at the emergency price, and the conversion still owed at the horizon.
/// possible = false with the reason in words where a hard check refuses it (shade, lumens, pole; policy is
/// not looked at here, and an owner's consent holds back the hand-out, not the plan). @param head  solar
/// only; empty = the shade step's best
[[nodiscard]] OptionCost pole_option(const MoneyInput& input, PoleIx pole, Choice choice, int year,
                                     std::string_view head = {});

/// Cash lines of a string's own from first_year to the horizon: unit loss, cable loss (kW per year given),
/// upkeep of the station, each until the year its last lamp leaves; mobilisation in each year with work;
/// swaps; removal of the unit.
struct StringYearCash {
    int year = 0;
    double cable_kw = 0;      ///< mean of the year
    double unit_rated_kw = 0; ///< 0 = no unit in service
    bool has_work = false;
    bool swaps_unit = false;
    bool retires = false;     ///< the last lamp leaves in this year
    bool oil_suspect = false; ///< PCB or unknown: the dearer removal
    int splices = 0, jumpers = 0;
    double new_cable_m = 0;
};
[[nodiscard]] std::vector<CashLine> string_lines(const MoneyInput& input, StringIx string,
                                                 const std::vector<StringYearCash>& years);

} // namespace unstring
