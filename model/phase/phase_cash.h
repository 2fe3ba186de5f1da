#pragma once
// Cash by year of what a plan is made of: poles, spans, connections, each worked out once for each year it
// may fall in.

#include <string>
#include <vector>

#include "model/decide/span_cost.h"
#include "model/money/pole_option.h"

namespace unstring {

struct YearCash { ///< cents by calendar year of the ledger, place 0 = first_year
    std::vector<Cents> capital, operating;
    double cost = 0; ///< dollars, present value
    bool possible = true;
    [[nodiscard]] Cents capital_sum() const;
};

/// First and last calendar year of the ledger: to the horizon, or to the plan's last year where that is
/// later.
[[nodiscard]] int ledger_last_year(const PlanSettings& settings);

[[nodiscard]] YearCash year_cash(const PlanSettings& settings, const std::vector<CashLine>& lines);

struct PoleAsk {
    PoleIx pole;
    Choice choice = Choice::keep;
    int year = 0; ///< read for rewire and solar only
    std::string head;
};

class CashBook {
public:
    CashBook(const MoneyInput& input, const DecideResult& decide);

    /// Forgets what rests on other settings (rate, horizon, first year).
    void use(const PlanSettings& settings);
    /// Works out what is asked and not yet known, in parallel.
    void warm(const std::vector<PoleAsk>& asks);
    /// The lines of every ask, one a pole, in parallel; what is worked out is known from then on.
    [[nodiscard]] std::vector<std::vector<CashLine>> lines_of(const std::vector<PoleAsk>& asks);
    [[nodiscard]] const YearCash& pole(const PoleAsk& ask);
    /// @param dug  as trench beside its old duct
    [[nodiscard]] const YearCash& span(std::size_t place, int year, bool dug);
    [[nodiscard]] const YearCash& connection(ServiceIx service, int year);

    /// Input with the settings in use: for the cash functions of other subjects.
    [[nodiscard]] MoneyInput input() const {
        return {input_.city, input_.catalog, input_.prices, plan_, input_.shade};
    }

private:
    struct Known {
        Choice choice;
        int year;
        std::string head;
        YearCash cash;
    };
    [[nodiscard]] const YearCash* find(const PoleAsk& ask) const;
    std::vector<CashLine> work_out(const PoleAsk& ask);

    const MoneyInput input_;
    const DecideResult& decide_;
    Plan plan_; ///< settings only
    std::vector<std::vector<Known>> poles_;
    std::vector<std::vector<std::pair<int, YearCash>>> spans_, dug_spans_, connections_;
};

} // namespace unstring
