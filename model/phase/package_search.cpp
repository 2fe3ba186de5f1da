#include "model/phase/package_search.h"

#include <algorithm>
#include <numeric>
#include <random>

namespace unstring {
namespace {

/// The plans in hand and what they use together.
class Hand {
public:
    explicit Hand(const PackageCase& packages)
        : packages_(packages), over_price_(steep_over_price(packages)),
          used_(static_cast<std::size_t>(packages.years), Use{}),
          in_service_(used_.size(), std::vector<int>(static_cast<std::size_t>(packages.classes), 0)),
          plans_(packages.strings.size()), figures_(packages.strings.size()),
          has_(packages.strings.size(), 0) {}

    void take_out(std::size_t s) {
        if (has_[s] == 0) return;
        count(figures_[s], -1);
        has_[s] = 0;
    }

    void put(std::size_t s, StringPlan plan) {
        figures_[s] = column_figures(packages_, s, plan);
        plans_[s] = std::move(plan);
        count(figures_[s], 1);
        has_[s] = 1;
    }

    /// Puts a string back at its best; false when it has no legal plan.
    bool put_best(std::size_t s) {
        PricedColumn best = best_column_in(packages_, s, room(s));
        if (best.value == kNever) return false;
        put(s, std::move(best.plan));
        return true;
    }

    double worth() const {
        const PackagePlan plan = add_up(packages_, plans_, over_price_);
        return plan.cost + plan.penalty;
    }
    const std::vector<StringPlan>& plans() const { return plans_; }
    const StringPlan& plan(std::size_t s) const { return plans_[s]; }
    PackagePlan sum() const { return add_up(packages_, plans_, over_price_); }

private:
    void count(const ColumnFigures& figures, int sign) {
        for (std::size_t t = 0; t < used_.size(); ++t) {
            for (std::size_t l = 0; l < kLimits; ++l) used_[t][l] += sign * figures.use[t][l];
            if (figures.in_class[t] != kNoClass)
                in_service_[t][static_cast<std::size_t>(figures.in_class[t])] += sign;
        }
    }

    void open_extras(std::size_t s, Room& room) const {
        if (!room.section_cost.empty()) return;
        const auto sections = static_cast<std::size_t>(packages_.strings[s].sections);
        room.section_cost.assign(used_.size(), std::vector<double>(sections, 0));
        room.section_use.assign(used_.size(), std::vector<Use>(sections, Use{}));
        room.state_cost.assign(used_.size(), std::vector<double>(sections + 1, 0));
        room.state_use.assign(used_.size(), std::vector<Use>(sections + 1, Use{}));
    }

    static void add(Use& sum, const Use& more, double sign) {
        for (std::size_t l = 0; l < kLimits; ++l) sum[l] += sign * more[l];
    }

    void add_waits(std::size_t s, Room& room) const {
        for (const PackageWait& wait : packages_.waits) {
            const bool waits = wait.waiting == s && has_[wait.blocking] != 0;
            const bool blocks = wait.blocking == s && has_[wait.waiting] != 0;
            if (!waits && !blocks) continue;
            open_extras(s, room);
            for (std::size_t t = 0; waits && t < used_.size(); ++t)
                if (wait.blocks[t][static_cast<std::size_t>(plans_[wait.blocking].done[t])] != 0)
                    room.section_cost[t][static_cast<std::size_t>(wait.section)] += packages_.wait_penalty;
            const int done = blocks ? year_done(plans_[wait.waiting], wait.section) : -1;
            if (done < 0) continue;
            const auto t = static_cast<std::size_t>(done);
            for (std::size_t n = 0; n < wait.blocks[t].size(); ++n)
                if (wait.blocks[t][n] != 0) room.state_cost[t][n] += packages_.wait_penalty;
        }
    }

    bool is_live(const PackageItem& item, std::size_t t) const {
        const auto in = static_cast<std::size_t>(item.duct_string);
        return item.duct_string >= 0 && has_[in] != 0 &&
               item.live[t][static_cast<std::size_t>(plans_[in].done[t])] != 0;
    }

    /// What each shared item takes already, by the other strings, and what this one would add by coming first
    /// or by keeping its duct live.
    void add_items(std::size_t s, Room& room) const {
        for (const PackageItem& item : packages_.items) {
            const int paid = item_year(item, plans_, &has_); // s itself is out
            const bool is_paid = paid < packages_.years;
            const auto year = static_cast<std::size_t>(paid);
            if (is_paid) add(room.use[year], item.use[year], -1);
            if (is_paid && item.duct_string != static_cast<int>(s) && is_live(item, year))
                add(room.use[year], item.dig_use[year], -1);
            const auto first = std::find_if(item.firsts.begin(), item.firsts.end(),
                                            [&](const auto& each) { return each.first == s; });
            const int section = first == item.firsts.end() ? -1 : first->second;
            if (section >= 0) add_first(item, s, section, paid, room);
            if (item.duct_string == static_cast<int>(s)) add_own_duct(item, s, section, paid, room);
        }
    }

    void add_first(const PackageItem& item, std::size_t s, int section, int paid, Room& room) const {
        open_extras(s, room);
        const bool is_paid = paid < packages_.years;
        const auto later = static_cast<std::size_t>(paid);
        double saved = is_paid ? item.cost[later] : 0;
        if (is_paid && item.duct_string != static_cast<int>(s) && is_live(item, later))
            saved += item.dig_cost[later];
        for (std::size_t t = 0; t < std::min(later, used_.size()); ++t) {
            const bool digs = item.duct_string != static_cast<int>(s) && is_live(item, t);
            room.section_cost[t][static_cast<std::size_t>(section)] +=
                item.cost[t] + (digs ? item.dig_cost[t] : 0) - saved;
            add(room.section_use[t][static_cast<std::size_t>(section)], item.use[t], 1);
            if (digs) add(room.section_use[t][static_cast<std::size_t>(section)], item.dig_use[t], 1);
        }
    }

    /// The duct is this string's own: live at the year in which others pay, or in which it comes first
    /// itself.
    void add_own_duct(const PackageItem& item, std::size_t s, int section, int paid, Room& room) const {
        open_extras(s, room);
        if (paid < packages_.years) {
            const auto t = static_cast<std::size_t>(paid);
            const std::size_t upto =
                section < 0 ? item.live[t].size() : static_cast<std::size_t>(section) + 1;
            for (std::size_t n = 0; n < upto; ++n) {
                if (item.live[t][n] == 0) continue;
                room.state_cost[t][n] += item.dig_cost[t];
                add(room.state_use[t][n], item.dig_use[t], 1);
            }
        }
        if (section < 0) return;
        if (room.jump_cost.empty()) open_jumps(s, room);
        for (std::size_t t = 0; t < used_.size() && static_cast<int>(t) <= paid; ++t)
            for (std::size_t n = 0; n <= static_cast<std::size_t>(section); ++n)
                for (std::size_t next = static_cast<std::size_t>(section) + 1; next < item.live[t].size();
                     ++next) {
                    if (item.live[t][next] == 0) continue;
                    room.jump_cost[t][n][next - n - 1] += item.dig_cost[t];
                    add(room.jump_use[t][n][next - n - 1], item.dig_use[t], 1);
                }
    }

    void open_jumps(std::size_t s, Room& room) const {
        const auto sections = static_cast<std::size_t>(packages_.strings[s].sections);
        room.jump_cost.assign(used_.size(), std::vector<std::vector<double>>(sections));
        room.jump_use.assign(used_.size(), std::vector<std::vector<Use>>(sections));
        for (std::size_t t = 0; t < used_.size(); ++t)
            for (std::size_t n = 0; n < sections; ++n) {
                room.jump_cost[t][n].assign(sections - n, 0);
                room.jump_use[t][n].assign(sections - n, Use{});
            }
    }

    Room room(std::size_t s) const {
        Room room;
        room.over_price = over_price_;
        room.use = packages_.limit;
        room.unit_is_there.assign(used_.size(),
                                  std::vector<char>(static_cast<std::size_t>(packages_.classes), 0));
        std::vector<int> held(static_cast<std::size_t>(packages_.classes), 0);
        for (std::size_t t = 0; t < used_.size(); ++t) {
            for (std::size_t l = 0; l < kLimits; ++l) room.use[t][l] -= used_[t][l];
            for (std::size_t c = 0; c < held.size(); ++c) {
                held[c] = std::max(held[c], units_wanting(packages_, t, c, in_service_[t][c]));
                room.unit_is_there[t][c] = units_wanting(packages_, t, c, in_service_[t][c] + 1) <= held[c];
            }
        }
        add_waits(s, room);
        add_items(s, room);
        return room;
    }

    const PackageCase& packages_;
    Use over_price_;
    std::vector<Use> used_;
    std::vector<std::vector<int>> in_service_;
    std::vector<StringPlan> plans_;
    std::vector<ColumnFigures> figures_;
    std::vector<char> has_;
};

double size_of(const PackageString& string) {
    double sum = 0;
    for (const Use& use : string.work_use.front()) sum += use[0];
    return sum;
}

bool construct(const PackageCase& packages, const SearchChoices& choices, Hand& hand) {
    std::vector<std::size_t> order(packages.strings.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
        return size_of(packages.strings[a]) > size_of(packages.strings[b]);
    });
    if (!choices.start.empty()) {
        for (std::size_t s = 0; s < order.size(); ++s) hand.put(s, choices.start[s]);
        return true;
    }
    return std::all_of(order.begin(), order.end(), [&](std::size_t s) { return hand.put_best(s); });
}

} // namespace

PackagePlan search_packages(const PackageCase& packages, const SearchChoices& choices,
                            const Progress& progress) {
    Hand hand(packages);
    if (packages.years == 0 || packages.strings.empty() || !construct(packages, choices, hand)) return {};
    const std::size_t strings = packages.strings.size();
    double best = hand.worth();
    std::mt19937 random(choices.seed);
    int idle = 0;
    for (int round = 0; round < choices.rounds && !progress.is_cancelled(); ++round) {
        const std::size_t out =
            std::min<std::size_t>(strings, round < static_cast<int>(strings) ? 1 : 2 + random() % 5);
        std::vector<std::size_t> taken;
        if (out == 1) taken.push_back(static_cast<std::size_t>(round) % strings);
        while (taken.size() < out) {
            const std::size_t s = random() % strings;
            if (std::find(taken.begin(), taken.end(), s) == taken.end()) taken.push_back(s);
        }
        std::vector<StringPlan> before;
        for (const std::size_t s : taken) {
            before.push_back(hand.plan(s));
            hand.take_out(s);
        }
        for (const std::size_t s : taken) hand.put_best(s);
        const double now = hand.worth();
        if (now <= best) {
            idle = now < best - 1e-7 ? 0 : idle + 1;
            best = now;
        } else {
            ++idle;
            for (std::size_t i = 0; i < taken.size(); ++i) {
                hand.take_out(taken[i]);
                hand.put(taken[i], before[i]);
            }
        }
        if (idle > 150 * static_cast<int>(strings)) break; // nothing has helped for long
        progress.at(static_cast<double>(round + 1) / choices.rounds);
    }
    return hand.sum();
}

} // namespace unstring
