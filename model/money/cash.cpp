#include "model/money/cash.h"

#include <utility>

namespace unstring {

CashLine cash_line(const Plan& plan, std::string what, int year, double quantity, double unit_price,
                   Purse purse) {
    return {std::move(what),   year, quantity, unit_price, to_cents(quantity * unit_price),
            plan.factor(year), purse};
}

double present_value(const std::vector<CashLine>& lines) {
    double sum = 0;
    for (const CashLine& line : lines) sum += to_dollars(line.amount) * line.factor;
    return sum;
}

} // namespace unstring
