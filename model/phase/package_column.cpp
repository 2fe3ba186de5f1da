#include "model/phase/package_column.h"

#include <algorithm>

namespace unstring {

const char* limit_text(std::size_t limit) {
    constexpr std::array<const char*, kLimits> kText = {"money", "line-hours", "civil-hours",
                                                        "lighting-hours", "electric-hours"};
    return kText.at(limit);
}

namespace {

Use plus(Use a, const Use& b) {
    for (std::size_t l = 0; l < kLimits; ++l) a[l] += b[l];
    return a;
}

/// Linear prices of rows: the pricing problem of the master.
struct LinearCharge {
    const RowPrices& prices;
    double use(int t, const Use& used) const {
        double sum = 0;
        const Use& price = prices.use[static_cast<std::size_t>(t)];
        for (std::size_t l = 0; l < kLimits; ++l) sum += price[l] * used[l];
        return sum;
    }
    double unit(int t, int cls, bool /*held_before*/) const {
        return cls == kNoClass ? 0 : prices.unit[static_cast<std::size_t>(t)][static_cast<std::size_t>(cls)];
    }
    double steer(double /*penalty*/) const { return 0; }
    double section(int /*t*/, int /*k*/, Use& /*use*/) const { return 0; }
    double arrival(int /*t*/, int /*n*/, int /*next*/, Use& /*use*/) const { return 0; }
};

/// Over-runs of what the others leave, charged steeply.
struct RoomCharge {
    const PackageCase& packages;
    const Room& room;
    double use(int t, const Use& used) const {
        double sum = 0;
        const Use& free = room.use[static_cast<std::size_t>(t)];
        for (std::size_t l = 0; l < kLimits; ++l) {
            const double before = std::max(0.0, -free[l]);
            const double after = std::max(0.0, used[l] - free[l]);
            if (after > before) sum += (after - before) * room.over_price[l];
        }
        return sum;
    }
    bool is_there(int t, int cls) const {
        return room.unit_is_there[static_cast<std::size_t>(t)][static_cast<std::size_t>(cls)] != 0;
    }
    double unit(int t, int cls, bool held_before) const {
        if (cls == kNoClass || is_there(t, cls)) return 0;
        const double price = packages.buy_cost[static_cast<std::size_t>(t)];
        if (price == kNever) return packages.unit_penalty;
        const bool bought_before = held_before && t > 0 && !is_there(t - 1, cls);
        return bought_before ? 0 : price;
    }
    double steer(double penalty) const { return penalty; }
    double section(int t, int k, Use& use) const {
        if (room.section_cost.empty()) return 0;
        const auto year = static_cast<std::size_t>(t), place = static_cast<std::size_t>(k);
        use = plus(use, room.section_use[year][place]);
        return room.section_cost[year][place];
    }
    double arrival(int t, int n, int next, Use& use) const {
        if (room.section_cost.empty()) return 0;
        const auto year = static_cast<std::size_t>(t), to = static_cast<std::size_t>(next),
                   from = static_cast<std::size_t>(n);
        double cost = room.state_cost[year][to];
        use = plus(use, room.state_use[year][to]);
        if (next == n || room.jump_cost.empty()) return cost;
        use = plus(use, room.jump_use[year][from][to - from - 1]);
        return cost + room.jump_cost[year][from][to - from - 1];
    }
};

template <class Charge>
class ColumnSearch {
public:
    ColumnSearch(const PackageCase& packages, std::size_t place, const Charge& charge,
                 const ColumnLimits* within)
        : string_(packages.strings[place]), charge_(charge), within_(within), years_(packages.years),
          classes_(static_cast<int>(string_.classes.size())) {
        width_ = (string_.sections + 1) * (classes_ + 1);
        value_.assign(static_cast<std::size_t>(years_ * width_), kNever);
        from_.assign(value_.size(), -1);
    }

    PricedColumn run() {
        std::vector<double> before(static_cast<std::size_t>(width_), kNever);
        const int start = string_.start_class == kNoClass ? classes_ : string_.start_class;
        before[static_cast<std::size_t>(state(0, start))] = 0;
        for (int t = 0; t < years_; ++t) {
            step(t, before);
            std::copy_n(value_.begin() + t * width_, width_, before.begin());
        }
        return trace();
    }

private:
    int state(int n, int c) const { return n * (classes_ + 1) + c; }
    int least(int t) const {
        return within_ ? within_->least[static_cast<std::size_t>(t)]
                       : string_.least[static_cast<std::size_t>(t)];
    }
    int most(int t) const {
        return within_ ? within_->most[static_cast<std::size_t>(t)]
                       : string_.most[static_cast<std::size_t>(t)];
    }
    bool is_banned(int t, int c) const {
        return within_ && within_->banned[static_cast<std::size_t>(t)][static_cast<std::size_t>(c)] != 0;
    }

    void reach(int t, int to, double cost, int from) {
        const auto place = static_cast<std::size_t>(t * width_ + to);
        if (cost < value_[place]) {
            value_[place] = cost;
            from_[place] = from;
        }
    }

    /// Cost at the year's end of a live state, kNever where it is not legal.
    double live_cost(int t, int n, int c) const {
        if (is_banned(t, c)) return kNever;
        double cost = string_.state_cost[static_cast<std::size_t>(t)][static_cast<std::size_t>(n)]
                                        [static_cast<std::size_t>(c)];
        if (!string_.state_penalty.empty())
            cost +=
                charge_.steer(string_.state_penalty[static_cast<std::size_t>(t)][static_cast<std::size_t>(n)]
                                                   [static_cast<std::size_t>(c)]);
        return cost + end_penalty(t, n);
    }

    double end_penalty(int t, int n) const {
        if (t + 1 != years_ || string_.left_penalty.empty()) return 0;
        return charge_.steer(string_.left_penalty[static_cast<std::size_t>(n)]);
    }

    void step(int t, const std::vector<double>& before) {
        const auto year = static_cast<std::size_t>(t);
        for (int n = 0; n <= string_.sections; ++n) {
            if (!any_finite(before, n)) continue;
            double work = 0;
            Use use{};
            for (int next = n; next <= std::min(string_.sections, most(t)); ++next) {
                if (next > n) {
                    if (next == n + 1) {
                        work += string_.mobilise_cost[year];
                        use = plus(use, string_.mobilise_use[year]);
                    }
                    work += string_.work_cost[year][static_cast<std::size_t>(next - 1)];
                    use = plus(use, string_.work_use[year][static_cast<std::size_t>(next - 1)]);
                    work += charge_.section(t, next - 1, use);
                }
                if (next < least(t)) continue;
                Use whole_use = with_jump(t, n, next, use);
                const double whole = work + jump_cost(t, n, next) + charge_.arrival(t, n, next, whole_use);
                if (next == string_.sections && string_.ends[year] != 0)
                    finish(t, n, whole, whole_use, before);
                else
                    carry_on(t, n, next, whole, whole_use, before);
            }
        }
    }

    double jump_cost(int t, int n, int next) const {
        if (next == n || string_.jump_cost.empty()) return 0;
        const auto year = static_cast<std::size_t>(t), from = static_cast<std::size_t>(n),
                   by = static_cast<std::size_t>(next - n - 1);
        double cost = string_.jump_cost[year][from][by];
        if (!string_.jump_penalty.empty()) cost += charge_.steer(string_.jump_penalty[year][from][by]);
        return cost;
    }

    Use with_jump(int t, int n, int next, const Use& use) const {
        if (next == n || string_.jump_use.empty()) return use;
        return plus(use, string_.jump_use[static_cast<std::size_t>(t)][static_cast<std::size_t>(n)]
                                         [static_cast<std::size_t>(next - n - 1)]);
    }

    bool any_finite(const std::vector<double>& before, int n) const {
        for (int c = 0; c <= classes_; ++c)
            if (before[static_cast<std::size_t>(state(n, c))] < kNever) return true;
        return false;
    }

    void finish(int t, int n, double work, const Use& use, const std::vector<double>& before) {
        const auto year = static_cast<std::size_t>(t);
        const double idle_cost = work + charge_.use(t, use);
        const Use with_end = string_.finish_use.empty() ? use : plus(use, string_.finish_use[year]);
        const double end_cost = work + string_.finish_cost[year] + charge_.use(t, with_end);
        for (int c = 0; c <= classes_; ++c) {
            const bool ends_now = n < string_.sections || c < classes_;
            const double start = before[static_cast<std::size_t>(state(n, c))];
            reach(t, state(string_.sections, classes_),
                  start + (ends_now ? end_cost : idle_cost) + string_.done_cost[year], state(n, c));
        }
    }

    void carry_on(int t, int n, int next, double work, const Use& use, const std::vector<double>& before) {
        const auto year = static_cast<std::size_t>(t);
        const double same = work + charge_.use(t, use);
        const double swapped =
            work + string_.swap_cost[year] + charge_.use(t, plus(use, string_.swap_use[year]));
        for (int to = 0; to < classes_; ++to) {
            const double here = live_cost(t, next, to);
            if (here == kNever) continue;
            const int cls = string_.classes[static_cast<std::size_t>(to)];
            for (int c = 0; c <= classes_; ++c) {
                const double start = before[static_cast<std::size_t>(state(n, c))];
                if (start == kNever) continue;
                const double cost = start + (c == to ? same : swapped) + here + charge_.unit(t, cls, c == to);
                reach(t, state(next, to), cost, state(n, c));
            }
        }
    }

    PricedColumn trace() const {
        const auto last = value_.begin() + (years_ - 1) * width_;
        const auto best = std::min_element(last, last + width_);
        PricedColumn answer;
        answer.value = *best;
        if (*best == kNever) return answer;
        answer.plan.done.resize(static_cast<std::size_t>(years_));
        answer.plan.cls.resize(static_cast<std::size_t>(years_));
        int at = static_cast<int>(best - last);
        for (int t = years_ - 1; t >= 0; --t) {
            const int c = at % (classes_ + 1);
            answer.plan.done[static_cast<std::size_t>(t)] = at / (classes_ + 1);
            answer.plan.cls[static_cast<std::size_t>(t)] = c == classes_ ? kNoClass : c;
            at = from_[static_cast<std::size_t>(t * width_ + at)];
        }
        return answer;
    }

    const PackageString& string_;
    const Charge& charge_;
    const ColumnLimits* within_;
    int years_, classes_, width_ = 0;
    std::vector<double> value_;
    std::vector<int> from_;
};

} // namespace

ColumnFigures column_figures(const PackageCase& packages, std::size_t place, const StringPlan& plan) {
    const PackageString& string = packages.strings[place];
    ColumnFigures figures;
    int n = 0;
    int c = string.start_class;
    for (std::size_t t = 0; t < plan.done.size(); ++t) {
        Use use{};
        const int next = plan.done[t];
        if (next > n) {
            figures.cost += string.mobilise_cost[t];
            use = plus(use, string.mobilise_use[t]);
        }
        for (int k = n; k < next; ++k) {
            figures.cost += string.work_cost[t][static_cast<std::size_t>(k)];
            use = plus(use, string.work_use[t][static_cast<std::size_t>(k)]);
        }
        if (next > n && !string.jump_cost.empty()) {
            const auto from = static_cast<std::size_t>(n), by = static_cast<std::size_t>(next - n - 1);
            figures.cost += string.jump_cost[t][from][by];
            if (!string.jump_use.empty()) use = plus(use, string.jump_use[t][from][by]);
            if (!string.jump_penalty.empty()) figures.penalty += string.jump_penalty[t][from][by];
        }
        int in_class = kNoClass;
        if (next == string.sections && string.ends[t] != 0) {
            figures.cost += string.done_cost[t];
            if (n < next || c != kNoClass) {
                figures.cost += string.finish_cost[t];
                if (!string.finish_use.empty()) use = plus(use, string.finish_use[t]);
            }
        } else {
            const auto to = static_cast<std::size_t>(plan.cls[t]);
            figures.cost += string.state_cost[t][static_cast<std::size_t>(next)][to];
            if (!string.state_penalty.empty())
                figures.penalty += string.state_penalty[t][static_cast<std::size_t>(next)][to];
            if (plan.cls[t] != c) {
                figures.cost += string.swap_cost[t];
                use = plus(use, string.swap_use[t]);
            }
            in_class = string.classes[to];
        }
        figures.use.push_back(use);
        figures.in_class.push_back(in_class);
        n = next;
        c = plan.cls[t];
    }
    if (n < string.sections && !string.left_penalty.empty())
        figures.penalty += string.left_penalty[static_cast<std::size_t>(n)];
    return figures;
}

PricedColumn cheapest_column(const PackageCase& packages, std::size_t string, const RowPrices& prices,
                             const ColumnLimits* within) {
    const LinearCharge charge{prices};
    return ColumnSearch<LinearCharge>(packages, string, charge, within).run();
}

PricedColumn best_column_in(const PackageCase& packages, std::size_t string, const Room& room) {
    const RoomCharge charge{packages, room};
    return ColumnSearch<RoomCharge>(packages, string, charge, nullptr).run();
}

} // namespace unstring
