#pragma once
// What phase answers: a year per pole, the state of each string at each year's end, the ledger, the moves of
// transformers, cost and bound.

#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/finding.h"
#include "model/money/cash.h"
#include "model/series/sections.h"
#include "model/series/verdict.h"

namespace unstring {

struct CrewHours {
    double line = 0, civil = 0, lighting = 0, electric = 0;
};

struct SpareCover {
    double rated_kw = 0, output_a = 0, primary_v = 0;
    int count = 0;         ///< idle units of this class at the year's end
    double cover_frac = 1; ///< Poisson chance that the demand over the lead time is covered by units that fit
};

struct PhaseYear {
    int year = 0;
    Cents money = 0; ///< capital of the year
    std::optional<double> money_limit;
    Cents operating = 0;
    CrewHours hours;
    std::optional<double> line_limit_h, civil_limit_h, lighting_limit_h, electric_limit_h;
    int rewire = 0, solar = 0;                    ///< poles whose work falls in the year
    int series_lamps_left = 0;                    ///< at the year's end
    double dark_transformers = 0, dark_cable = 0; ///< expected lamp-nights in the year
    std::vector<SpareCover> spares;
};

struct LedgerYear { ///< every year of the horizon; the plan's cost is the sum of (capital + operating) x
                    ///< factor
    int year = 0;
    Cents capital = 0, operating = 0;
    double factor = 1;
};

struct StringYear {
    StringIx string;
    int year = 0;
    int lamps = 0;
    double load_kw = 0, load_kva = 0, volts = 0, cable_m = 0;
    TransformerIx transformer;
    double tap = 1, loading_frac = 0;
    Verdict verdict = Verdict::none;
};

struct UnitMove {
    int year = 0;
    TransformerIx transformer;
    std::string from, to; ///< string id, "spare", "scrapped", "bought"
};

struct PhaseResult {
    std::vector<PhaseYear> years;
    std::vector<LedgerYear> ledger;
    std::vector<CashLine> lines;          ///< every cash line of the plan; the ledger is their sum by year
    std::vector<StringYear> string_years; ///< by string, then year; year first_year - 1 = today
    std::vector<UnitMove> moves;
    std::vector<Section> sections;
    std::vector<int> spans_dug; ///< places in DecideResult::spans: conduit whose cable is live when it is
                                ///< built, dug instead
    std::vector<int> pole_year; ///< one per pole of the city: calendar year, 0 = none
    int not_reached = 0;
    double cost = 0, bound = 0; ///< dollars, present value
    bool feasible =
        true; ///< no hard check failed and no year over its money or hours; poles not reached do not count
    std::vector<Finding> failures;
    double seconds = 0;
};

} // namespace unstring
