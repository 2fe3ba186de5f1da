#pragma once
// Cash by year: the one form in which every cost is held. Present value, ledger, report and `why` all read
// these lines.

#include <string>
#include <vector>

#include "model/plan/plan.h"
#include "model/quantities.h"

namespace unstring {

enum class Purse { capital, operating }; ///< capital counts against the year's money

struct CashLine {
    std::string what;      ///< in the trade's words: "LED head", "lamp energy"
    int year = 0;          ///< calendar year at whose end it falls
    double quantity = 0;   ///< in the unit that `what` says
    double unit_price = 0; ///< dollars
    Cents amount = 0;      ///< quantity x unit_price, rounded once; negative = residual value
    double factor = 1;     ///< (1 + rate)^-t
    Purse purse = Purse::capital;
};

/// One line, its amount rounded to cents once.
[[nodiscard]] CashLine cash_line(const Plan& plan, std::string what, int year, double quantity,
                                 double unit_price, Purse purse);

/// Sum of amount x factor [dollars], as a double, not rounded.
[[nodiscard]] double present_value(const std::vector<CashLine>& lines);

struct OptionCost {
    bool possible = true;
    std::string stopped_by; ///< in words, with the number; empty when possible
    double cost = 0;        ///< present_value(lines) rounded to cents
    std::vector<CashLine> lines;
};

} // namespace unstring
