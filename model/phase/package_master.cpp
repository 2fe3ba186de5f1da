#include "model/phase/package_master.h"

#include <algorithm>
#include <cmath>

#include "model/phase/linear_program.h"

namespace unstring {
namespace {

bool fits(const MasterColumn& column, const ColumnLimits& limits) {
    for (std::size_t t = 0; t < column.plan.done.size(); ++t) {
        if (column.plan.done[t] < limits.least[t] || column.plan.done[t] > limits.most[t]) return false;
        if (column.plan.cls[t] != kNoClass && limits.banned[t][static_cast<std::size_t>(column.plan.cls[t])])
            return false;
    }
    return true;
}

constexpr double kOverrun = 1e-6; ///< shares of a limit above this are an over-run, not rounding

class Master {
public:
    Master(const PackageCase& packages, const MasterBranch& branch, std::vector<MasterColumn>& columns)
        : packages_(packages), branch_(branch), columns_(columns),
          years_(static_cast<std::size_t>(packages.years)),
          classes_(static_cast<std::size_t>(packages.classes)) {
        over_price_ = steep_over_price(packages);
        make_rows();
        make_purchases();
        for (std::size_t place = 0; place < columns_.size(); ++place)
            if (fits(columns_[place], branch_.strings[columns_[place].string])) enter(place);
    }

    /// Column generation to its end. @return false where a string has no plan in the branch, or the master
    /// fails.
    bool run(bool only_overrun, const Progress& progress) {
        only_overrun_ = only_overrun;
        set_costs();
        for (int round = 0; round < 3000 && !progress.is_cancelled(); ++round) {
            if (!program_.solve()) return false;
            bool improved = false;
            slack_ = 0;
            const RowPrices prices = row_prices();
            for (std::size_t s = 0; s < packages_.strings.size(); ++s) {
                const double dual = program_.price(string_rows_[s]);
                const PricedColumn best = priced(s, prices);
                if (best.value == kNever) return false;
                slack_ += std::min(0.0, best.value - dual);
                if (best.value >= dual - tolerance() || is_entered(s, best.plan)) continue;
                columns_.push_back({s, best.plan, column_figures(packages_, s, best.plan)});
                enter(columns_.size() - 1);
                improved = true;
            }
            if (!improved) return true;
            if (only_overrun && (bound() > kOverrun || program_.objective() < kOverrun / 10)) return true;
        }
        return false;
    }

    bool seed() {
        const RowPrices none = {std::vector<Use>(years_, Use{}),
                                std::vector<std::vector<double>>(years_, std::vector<double>(classes_, 0))};
        for (std::size_t s = 0; s < packages_.strings.size(); ++s) {
            const PricedColumn best = cheapest_column(packages_, s, none, &branch_.strings[s]);
            if (best.value == kNever) return false;
            columns_.push_back({s, best.plan, column_figures(packages_, s, best.plan)});
            enter(columns_.size() - 1);
        }
        return true;
    }

    /// The Lagrangian bound at the last prices: what rounding leaves of the pricing is taken off.
    double bound() const { return program_.objective() + slack_; }
    double overrun() const {
        double sum = 0;
        for (const Over& over : over_)
            sum += program_.value(over.column) / std::max(1.0, std::abs(packages_.limit[over.t][over.limit]));
        return sum + missing_units();
    }

    void answer(MasterAnswer& out) const {
        for (const auto& [place, column] : entered_)
            if (program_.value(column) > 1e-9) out.used.push_back({place, program_.value(column)});
        out.bought.assign(years_, std::vector<double>(classes_, 0));
        for (const Bought& each : bought_) out.bought[each.t][each.cls] = program_.value(each.column);
    }

private:
    struct Over {
        std::size_t t, limit;
        int column;
    };
    struct Bought {
        std::size_t t, cls;
        int column;
    };

    double tolerance() const { return only_overrun_ ? 1e-9 : 1e-6; }

    bool is_entered(std::size_t s, const StringPlan& plan) const {
        return std::any_of(entered_.begin(), entered_.end(), [&](const auto& each) {
            return columns_[each.first].string == s && columns_[each.first].plan == plan;
        });
    }

    void make_rows() {
        for (std::size_t s = 0; s < packages_.strings.size(); ++s)
            string_rows_.push_back(program_.add_row_equal(1));
        use_rows_.assign(years_, std::array<int, kLimits>{});
        unit_rows_.assign(years_, std::vector<int>(classes_, 0));
        for (std::size_t t = 0; t < years_; ++t) {
            for (std::size_t l = 0; l < kLimits; ++l) {
                if (packages_.limit[t][l] == kNever) continue;
                const int row = program_.add_row_at_most(packages_.limit[t][l]);
                use_rows_[t][l] = row;
                over_.push_back({t, l, program_.add_column(0, 0, kNever, {{row, -1.0}})});
            }
            for (std::size_t c = 0; c < classes_; ++c)
                unit_rows_[t][c] = program_.add_row_at_most(packages_.owned[t][c]);
        }
    }

    void make_purchases() {
        for (std::size_t t = 0; t < years_; ++t)
            for (std::size_t c = 0; c < classes_; ++c) {
                // Without it the rows could not be met before the columns that meet them are found.
                missing_.push_back(program_.add_column(0, 0, kNever, {{unit_rows_[t][c], -1.0}}));
                if (packages_.buy_cost[t] == kNever) continue;
                std::vector<std::pair<int, double>> entries;
                for (std::size_t later = t; later < years_; ++later)
                    entries.push_back({unit_rows_[later][c], -1.0});
                bought_.push_back(
                    {t, c, program_.add_column(0, branch_.buy_low[t][c], branch_.buy_high[t][c], entries)});
            }
    }

    double missing_units() const {
        double sum = 0;
        for (const int column : missing_) sum += program_.value(column);
        return sum;
    }

    void set_costs() {
        for (const Over& over : over_) {
            const double share = 1 / std::max(1.0, std::abs(packages_.limit[over.t][over.limit]));
            program_.set_cost(over.column, only_overrun_ ? share : over_price_[over.limit]);
        }
        for (const int column : missing_)
            program_.set_cost(column, only_overrun_ ? 1 : packages_.unit_penalty);
        for (const Bought& each : bought_)
            program_.set_cost(each.column, only_overrun_ ? 0 : packages_.buy_cost[each.t]);
        for (const auto& [place, column] : entered_)
            program_.set_cost(column, only_overrun_ ? 0 : columns_[place].figures.cost);
    }

    void enter(std::size_t place) {
        const MasterColumn& column = columns_[place];
        std::vector<std::pair<int, double>> entries = {{string_rows_[column.string], 1.0}};
        for (std::size_t t = 0; t < years_; ++t) {
            for (std::size_t l = 0; l < kLimits; ++l)
                if (use_rows_[t][l] != 0 && column.figures.use[t][l] != 0)
                    entries.push_back({use_rows_[t][l], column.figures.use[t][l]});
            if (column.figures.in_class[t] != kNoClass)
                entries.push_back({unit_rows_[t][static_cast<std::size_t>(column.figures.in_class[t])],
                                   packages_.pool_factor});
        }
        const double cost = only_overrun_ ? 0 : column.figures.cost;
        entered_.push_back({place, program_.add_column(cost, 0, kNever, entries)});
    }

    RowPrices row_prices() const {
        RowPrices prices;
        prices.use.assign(years_, Use{});
        prices.unit.assign(years_, std::vector<double>(classes_, 0));
        for (std::size_t t = 0; t < years_; ++t) {
            for (std::size_t l = 0; l < kLimits; ++l)
                if (use_rows_[t][l] != 0) prices.use[t][l] = std::max(0.0, -program_.price(use_rows_[t][l]));
            for (std::size_t c = 0; c < classes_; ++c)
                prices.unit[t][c] = std::max(0.0, -program_.price(unit_rows_[t][c])) * packages_.pool_factor;
        }
        return prices;
    }

    PricedColumn priced(std::size_t s, const RowPrices& prices) {
        if (!only_overrun_) return cheapest_column(packages_, s, prices, &branch_.strings[s]);
        if (free_.strings.empty()) free_ = without_cost(packages_);
        return cheapest_column(free_, s, prices, &branch_.strings[s]);
    }

    /// The same case in which only the limits count: costs are 0 where a state is legal.
    static PackageCase without_cost(PackageCase packages) {
        const auto zero = [](double& cost) { cost = cost == kNever ? kNever : 0; };
        for (PackageString& string : packages.strings) {
            for (auto& year : string.work_cost) std::for_each(year.begin(), year.end(), zero);
            for (auto& year : string.state_cost)
                for (auto& states : year) std::for_each(states.begin(), states.end(), zero);
            for (auto* list :
                 {&string.done_cost, &string.finish_cost, &string.mobilise_cost, &string.swap_cost})
                std::for_each(list->begin(), list->end(), zero);
        }
        return packages;
    }

    const PackageCase& packages_;
    const MasterBranch& branch_;
    std::vector<MasterColumn>& columns_;
    std::size_t years_, classes_;
    Use over_price_{};
    bool only_overrun_ = false;
    double slack_ = 0; ///< <= 0
    PackageCase free_;
    LinearProgram program_;
    std::vector<int> string_rows_;
    std::vector<std::array<int, kLimits>> use_rows_;
    std::vector<std::vector<int>> unit_rows_;
    std::vector<Over> over_;
    std::vector<Bought> bought_;
    std::vector<int> missing_;
    std::vector<std::pair<std::size_t, int>> entered_;
};

} // namespace

MasterBranch whole_branch(const PackageCase& packages) {
    const auto years = static_cast<std::size_t>(packages.years);
    const auto classes = static_cast<std::size_t>(packages.classes);
    MasterBranch branch;
    for (const PackageString& string : packages.strings)
        branch.strings.push_back(
            {string.least, string.most,
             std::vector<std::vector<char>>(years, std::vector<char>(string.classes.size(), 0))});
    branch.buy_low.assign(years, std::vector<double>(classes, 0));
    branch.buy_high.assign(years, std::vector<double>(classes, kNever));
    return branch;
}

MasterAnswer solve_master(const PackageCase& packages, const MasterBranch& branch, MasterAim aim,
                          std::vector<MasterColumn>& columns, const Progress& progress) {
    MasterAnswer answer;
    Master master(packages, branch, columns);
    if (!master.seed()) {
        answer.is_solved = answer.is_infeasible = true;
        return answer;
    }
    answer.is_solved = master.run(aim == MasterAim::any_plan, progress);
    if (!answer.is_solved) return answer;
    if (aim == MasterAim::any_plan)
        answer.is_infeasible = master.bound() > kOverrun;
    else
        answer.bound = master.bound();
    answer.overrun = master.overrun();
    master.answer(answer);
    return answer;
}

double separate_bound(const PackageCase& packages) {
    const auto years = static_cast<std::size_t>(packages.years);
    const RowPrices none = {std::vector<Use>(years, Use{}),
                            std::vector<std::vector<double>>(
                                years, std::vector<double>(static_cast<std::size_t>(packages.classes), 0))};
    double sum = 0;
    for (std::size_t s = 0; s < packages.strings.size(); ++s)
        sum += cheapest_column(packages, s, none, nullptr).value;
    return sum;
}

} // namespace unstring
