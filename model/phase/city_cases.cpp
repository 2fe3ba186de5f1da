#include <algorithm>

#include "model/money/hours.h"
#include "model/phase/city_packages.h"
#include "model/phase/duct_live.h"
#include "model/phase/failure_drill.h"
#include "model/phase/package_plan.h"
#include "model/phase/year_limits.h"

namespace unstring {
namespace {

constexpr double kNoUnitPenalty = 2e5; ///< a string left without a unit that carries it, a year end
constexpr double kLowPenalty = 2000;   ///< a load under the unit's range, a year end (assumption)
constexpr double kLeftFlat = 20000;    ///< a section not reached, beside three times its price
constexpr double kWaitPenalty = 1e8;

enum class For { search, bound };

class Builder {
public:
    Builder(const CityYears& city, For purpose)
        : city_(city), purpose_(purpose), years_(static_cast<std::size_t>(city.years())) {}

    PackageCase run() {
        PackageCase packages;
        packages.years = city_.years();
        packages.classes = static_cast<int>(city_.classes.size());
        packages.over_weight = 1000; // what money does not reach is left, not over-run
        packages.wait_penalty = kWaitPenalty;
        packages.buy_cost.assign(years_, kNever);
        packages.owned.assign(years_, {});
        for (std::size_t t = 0; t < years_; ++t) {
            packages.limit.push_back(limit(t));
            for (const auto& units : city_.classes) {
                std::size_t places = 0;
                for (const TransformerIx unit : units)
                    places += std::max<std::size_t>(1, transformer(unit).strings.size());
                packages.owned[t].push_back(static_cast<double>(places));
            }
        }
        for (std::size_t s = 0; s < city_.strings.size(); ++s) packages.strings.push_back(string(s));
        return packages;
    }

private:
    const City& records() const { return city_.input.city; }
    const Transformer& transformer(TransformerIx unit) const { return records().transformers[unit.place()]; }

    Use limit(std::size_t t) const {
        const YearLimits limits = limits_of(records(), city_.year(t));
        Use use = {limits.money.value_or(kNever), limits.line_h.value_or(kNever),
                   limits.civil_h.value_or(kNever), limits.lighting_h.value_or(kNever),
                   limits.electric_h.value_or(kNever)};
        if (purpose_ == For::bound) use[1] = kNever;
        return use;
    }

    std::vector<CashLine> lines(std::size_t s, const StringYearCash& cash) const {
        return string_lines(city_.book.input(), city_.strings[s].string, {cash});
    }
    double price(std::size_t s, const StringYearCash& cash) const { return present_value(lines(s, cash)); }
    Use use(std::size_t s, const StringYearCash& cash, int swaps) const {
        Use out{};
        for (const CashLine& line : lines(s, cash))
            if (line.purse == Purse::capital) out[0] += to_dollars(line.amount);
        if (cash.jumpers + cash.splices + swaps > 0)
            out[1] = string_hours(city_.input.prices, cash.jumpers, cash.splices, swaps, cash.year).line;
        return out;
    }

    PackageString string(std::size_t s) const {
        const CityString& given = city_.strings[s];
        PackageString out;
        out.sections = static_cast<int>(given.sections.size());
        out.start_class = city_.start_class[s];
        out.classes = city_.local_classes[s];
        for (std::size_t t = 0; t < years_; ++t) {
            out.least.push_back(0);
            const auto late =
                std::find_if(given.sections.begin(), given.sections.end(),
                             [&](const CitySection& each) { return each.earliest_t > static_cast<int>(t); });
            out.most.push_back(static_cast<int>(late - given.sections.begin()));
            out.ends.push_back(city_.states[s][t].back().lamps == 0 ? 1 : 0);
            out.done_cost.push_back(0);
            add_string_work(s, t, out);
            add_sections(s, t, out);
            add_states(s, t, out);
            add_jumps(s, t, out);
        }
        add_left(out);
        return out;
    }

    bool has_fixed_work(std::size_t s, std::size_t t) const {
        const auto& fixed = city_.strings[s].fixed_year;
        return std::find(fixed.begin(), fixed.end(), city_.year(t)) != fixed.end();
    }

    void add_string_work(std::size_t s, std::size_t t, PackageString& out) const {
        StringYearCash mobilise, swap, finish;
        mobilise.year = swap.year = finish.year = city_.year(t);
        mobilise.has_work = !has_fixed_work(s, t);
        swap.swaps_unit = true;
        finish.retires = pays_removal(s);
        finish.oil_suspect = oil_is_suspect(s);
        out.mobilise_cost.push_back(price(s, mobilise));
        out.mobilise_use.push_back(use(s, mobilise, 0));
        out.swap_cost.push_back(price(s, swap));
        out.swap_use.push_back(use(s, swap, 1));
        out.finish_cost.push_back(price(s, finish));
        out.finish_use.push_back(use(s, finish, finish.retires ? 1 : 0));
    }

    /// A two-loop unit is taken away once, when its second string ends: left out, so that the bound stays
    /// one.
    bool pays_removal(std::size_t s) const {
        const TransformerIx today = unit_today(records(), city_.strings[s].string);
        return today.is_valid() && transformer(today).strings.size() < 2;
    }

    static bool is_suspect(const Transformer& unit) {
        return unit.oil == Oil::pcb || unit.oil == Oil::unknown;
    }
    bool oil_is_suspect(std::size_t s) const {
        if (purpose_ == For::search) {
            const TransformerIx today = unit_today(records(), city_.strings[s].string);
            return today.is_valid() && is_suspect(transformer(today));
        }
        for (const int cls : city_.local_classes[s])
            if (cls != kNoClass)
                for (const TransformerIx unit : city_.classes[static_cast<std::size_t>(cls)])
                    if (!is_suspect(transformer(unit))) return false;
        return true;
    }

    void add_sections(std::size_t s, std::size_t t, PackageString& out) const {
        std::vector<double> cost;
        std::vector<Use> uses;
        for (const CitySection& section : city_.strings[s].sections) {
            double sum = 0;
            Use sum_use{};
            for (const PoleIx pole : section.poles) {
                const PolePlan& row = city_.input.plan.poles[pole.place()];
                const YearCash& cash =
                    city_.book.pole({pole, row.choice, city_.year(t),
                                     row.choice == Choice::solar ? row.head : std::string()});
                const TaskHours hours =
                    pole_hours(city_.input.prices, records().poles[pole.place()], row.choice, city_.year(t));
                sum += cash.cost;
                const Use more = {to_dollars(cash.capital_sum()), hours.line, hours.civil, hours.lighting,
                                  hours.electric};
                for (std::size_t l = 0; l < kLimits; ++l) sum_use[l] += more[l];
            }
            cost.push_back(sum);
            uses.push_back(sum_use);
        }
        out.work_cost.push_back(std::move(cost));
        out.work_use.push_back(std::move(uses));
    }

    /// What a state costs in year t; in the last year what it costs from then to the horizon, and the keep of
    /// what is left.
    double running(std::size_t s, std::size_t t, const StringState& state, double rated_kw) const {
        double sum = 0;
        const int last = t + 1 == years_ ? ledger_last_year(city_.input.plan.settings) : city_.year(t);
        for (int year = city_.year(t); year <= last; ++year) {
            StringYearCash cash;
            cash.year = year;
            cash.cable_kw = state.cable_w / 1000;
            cash.unit_rated_kw = rated_kw;
            sum += price(s, cash);
        }
        return sum;
    }

    double keep_cost(const CitySection& section) const {
        double sum = 0;
        for (const PoleIx pole : section.poles) sum += city_.book.pole({pole, Choice::keep, 0, {}}).cost;
        return sum;
    }

    void add_states(std::size_t s, std::size_t t, PackageString& out) const {
        const CityString& given = city_.strings[s];
        std::vector<std::vector<double>> cost, penalty;
        for (std::size_t n = 0; n < city_.states[s][t].size(); ++n) {
            const StringState& state = city_.states[s][t][n];
            double left = 0;
            if (t + 1 == years_)
                for (std::size_t k = n; k < given.sections.size(); ++k) left += keep_cost(given.sections[k]);
            std::vector<double> by_class, steer;
            for (const int cls : out.classes) {
                const double rated_kw =
                    cls == kNoClass
                        ? 0
                        : loop_rating_kw(transformer(city_.classes[static_cast<std::size_t>(cls)].front()));
                const bool is_legal = cls == kNoClass || carries(cls, state.load_kva);
                by_class.push_back(is_legal ? running(s, t, state, rated_kw) + left : kNever);
                steer.push_back(cls == kNoClass ? kNoUnitPenalty
                                                : low_penalty(given.string, cls, state.load_kva));
            }
            cost.push_back(std::move(by_class));
            penalty.push_back(std::move(steer));
        }
        out.state_cost.push_back(std::move(cost));
        out.state_penalty.push_back(std::move(penalty));
    }

    bool carries(int cls, double load_kva) const {
        const Transformer& unit = transformer(city_.classes[static_cast<std::size_t>(cls)].front());
        if (load_kva > loop_rating_kw(unit) * (1 + 1e-9)) return false;
        return unit.build != Build::static_unit ||
               load_kva >= min_frac_of(unit) * loop_rating_kw(unit) * (1 - 1e-9);
    }

    double low_penalty(StringIx string, int cls, double load_kva) const {
        const TransformerIx unit = city_.classes[static_cast<std::size_t>(cls)].front();
        const auto fit = city_.kinds->fit(string, unit, load_kva);
        return fit && fit->loading_frac < min_frac_of(transformer(unit)) ? kLowPenalty : 0;
    }

    void add_jumps(std::size_t s, std::size_t t, PackageString& out) const {
        const StringLoop& loop = city_.loops[city_.strings[s].string.place()];
        const auto sections = static_cast<std::size_t>(out.sections);
        std::vector<std::vector<double>> cost(sections), penalty(sections);
        std::vector<std::vector<Use>> uses(sections);
        for (std::size_t n = 0; n < sections; ++n) {
            const StringState& before = city_.states[s][t == 0 ? 0 : t - 1][n];
            for (std::size_t next = n + 1; next <= sections; ++next) {
                StringYearCash cash;
                cash.year = city_.year(t);
                const StringState& after = city_.states[s][t][next];
                const LineWork work = line_work(loop, poles_between(s, n, next), before, after);
                cash.jumpers = work.jumpers;
                cash.splices = work.splices;
                cash.new_cable_m = work.new_cable_m;
                cost[n].push_back(price(s, cash));
                uses[n].push_back(use(s, cash, 0));
                penalty[n].push_back(0);
            }
        }
        out.jump_cost.push_back(std::move(cost));
        out.jump_use.push_back(std::move(uses));
        out.jump_penalty.push_back(std::move(penalty));
    }

    std::vector<PoleIx> poles_between(std::size_t s, std::size_t n, std::size_t next) const {
        std::vector<PoleIx> poles;
        for (std::size_t k = n; k < next; ++k)
            poles.insert(poles.end(), city_.strings[s].sections[k].poles.begin(),
                         city_.strings[s].sections[k].poles.end());
        return poles;
    }

    void add_left(PackageString& out) const {
        const auto sections = static_cast<std::size_t>(out.sections);
        out.left_penalty.assign(sections + 1, 0);
        for (std::size_t k = sections; k-- > 0;) {
            double dearest = 0;
            for (std::size_t t = 0; t < years_; ++t) dearest = std::max(dearest, out.work_cost[t][k]);
            out.left_penalty[k] = out.left_penalty[k + 1] + 3 * dearest + kLeftFlat;
        }
    }

    const CityYears& city_;
    For purpose_;
    std::size_t years_;
};

int place_of(const CityYears& city, StringIx string) {
    for (std::size_t s = 0; s < city.strings.size(); ++s)
        if (city.strings[s].string == string) return static_cast<int>(s);
    return -1;
}

/// Puts an item that one string alone has on its outermost section beyond it.
void add_to_section(const SharedItem& item, PackageCase& packages) {
    const auto [string, section] = item.firsts[0];
    for (std::size_t t = 0; t < item.cost.size(); ++t) {
        packages.strings[string].work_cost[t][static_cast<std::size_t>(section)] += item.cost[t];
        Use& use = packages.strings[string].work_use[t][static_cast<std::size_t>(section)];
        for (std::size_t l = 0; l < kLimits; ++l) use[l] += item.use[t][l];
    }
}

/// Which states of the duct's string leave its cable live.
std::vector<std::vector<char>> live_states(const CityYears& city, const CircuitSpan& span,
                                           std::size_t string) {
    const DuctLegs legs = duct_legs(city.loops[span.duct_string.place()], span);
    std::vector<std::vector<char>> blocks;
    for (const auto& year : city.legs[string]) {
        blocks.emplace_back();
        for (const std::vector<char>& live : year)
            blocks.back().push_back(std::any_of(live.begin() + legs.first, live.begin() + legs.last + 1,
                                                [](char leg) { return leg != 0; })
                                        ? 1
                                        : 0);
    }
    return blocks;
}

bool has_fixed(const CityString& string) {
    return std::any_of(string.fixed_year.begin(), string.fixed_year.end(),
                       [](int year) { return year != 0; });
}

/// A duct of the string itself: a jump that leaves its cable live digs.
void add_own_dig(const SharedItem& item, std::size_t s, int section,
                 const std::vector<std::vector<char>>& live, PackageCase& packages) {
    PackageString& string = packages.strings[s];
    for (std::size_t t = 0; t < live.size(); ++t)
        for (std::size_t n = 0; n <= static_cast<std::size_t>(section); ++n)
            for (std::size_t next = static_cast<std::size_t>(section) + 1; next < live[t].size(); ++next) {
                if (live[t][next] == 0) continue;
                string.jump_cost[t][n][next - n - 1] += item.dig_cost[t];
                for (std::size_t l = 0; l < kLimits; ++l)
                    string.jump_use[t][n][next - n - 1][l] += item.dig_use[t][l];
            }
}

/// A section that waits for another string's state; within one string it is a jump that is to be avoided.
void add_wait(PackageWait wait, PackageCase& packages) {
    if (wait.waiting != wait.blocking) {
        packages.waits.push_back(std::move(wait));
        return;
    }
    PackageString& string = packages.strings[wait.waiting];
    for (std::size_t t = 0; t < wait.blocks.size(); ++t)
        for (std::size_t n = 0; n <= static_cast<std::size_t>(wait.section); ++n)
            for (std::size_t next = static_cast<std::size_t>(wait.section) + 1; next < wait.blocks[t].size();
                 ++next)
                if (wait.blocks[t][next] != 0)
                    string.jump_penalty[t][n][next - n - 1] += packages.wait_penalty;
}

void add_items(const CityYears& city, PackageCase& packages) {
    for (const SharedItem& given : city.items) {
        const CircuitSpan* span =
            given.dig_cost.empty() ? nullptr : &city.decide.spans[static_cast<std::size_t>(given.span)];
        const int in = span == nullptr ? -1 : place_of(city, span->duct_string);
        const bool is_own =
            in < 0 || (given.firsts.size() == 1 && given.firsts[0].first == static_cast<std::size_t>(in));
        const bool hand = in >= 0 && has_fixed(city.strings[static_cast<std::size_t>(in)]);
        if (given.firsts.size() == 1 && given.fixed_t < 0 && is_own && !hand) {
            add_to_section(given, packages);
            if (in >= 0)
                add_own_dig(given, given.firsts[0].first, given.firsts[0].second,
                            live_states(city, *span, static_cast<std::size_t>(in)), packages);
            continue;
        }
        PackageItem item{given.firsts, given.fixed_t,  given.cost,   given.use, in,
                         {},           given.dig_cost, given.dig_use};
        if (in >= 0) item.live = live_states(city, *span, static_cast<std::size_t>(in));
        // Where a hand has set years, a live duct is an error, not a trench.
        if (hand || (in >= 0 && given.fixed_t >= 0)) {
            item.dig_cost.assign(item.dig_cost.size(), packages.wait_penalty);
            item.dig_use.assign(item.dig_use.size(), Use{});
        }
        packages.items.push_back(std::move(item));
    }
}

/// Money and hours that hand years already take of each year.
void take_fixed(const CityYears& city, PackageCase& packages) {
    for (std::size_t s = 0; s < city.strings.size(); ++s) {
        const StringLoop& loop = city.loops[city.strings[s].string.place()];
        std::vector<char> has_work(static_cast<std::size_t>(packages.years), 0);
        for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
            const int year = city.strings[s].fixed_year[i];
            if (year == 0) continue;
            const auto t = static_cast<std::size_t>(year - city.input.plan.settings.first_year);
            const PolePlan& row = city.input.plan.poles[loop.lamps[i].place()];
            const YearCash& cash = city.book.pole(
                {loop.lamps[i], row.choice, year, row.choice == Choice::solar ? row.head : std::string()});
            const TaskHours hours =
                pole_hours(city.input.prices, city.input.city.poles[loop.lamps[i].place()], row.choice, year);
            const Use use = {to_dollars(cash.capital_sum()), hours.line, hours.civil, hours.lighting,
                             hours.electric};
            for (std::size_t l = 0; l < kLimits; ++l) packages.limit[t][l] -= use[l];
            if (has_work[t] == 0) packages.limit[t][0] -= city.input.prices.at("mobilisation", year);
            has_work[t] = 1;
        }
    }
}

void add_control_waits(const CityYears& city, PackageCase& packages) {
    for (std::size_t a = 0; a < city.strings.size(); ++a) {
        const std::string& from = city.input.city.strings[city.strings[a].string.place()].control_from;
        const StringIx other = control_string(city.input.city, city.strings[a].string);
        const int giving = other.is_valid() ? place_of(city, other) : -1;
        if (giving < 0) continue;
        const auto b = static_cast<std::size_t>(giving);
        int section = static_cast<int>(city.strings[b].sections.size()) - 1;
        if (!find_string(city.input.city, from).is_valid()) {
            const PoleIx pole = find_pole(city.input.city, from);
            const auto& sections = city.strings[b].sections;
            const auto at = std::find_if(sections.begin(), sections.end(), [&](const CitySection& each) {
                return std::find(each.poles.begin(), each.poles.end(), pole) != each.poles.end();
            });
            section = at == sections.end() ? -1 : static_cast<int>(at - sections.begin());
        }
        if (section < 0) continue;
        PackageWait wait{b, section, a, {}};
        for (const auto& year : city.states[a]) {
            wait.blocks.emplace_back();
            for (const StringState& state : year) wait.blocks.back().push_back(state.lamps > 0 ? 1 : 0);
        }
        add_wait(std::move(wait), packages);
    }
}

/// See bound_case: exact where one string alone has the item, else equal shares at prices that are never too
/// high.
void add_item_to_bound(const CityYears& city, const SharedItem& item, BoundCase& bound) {
    PackageCase& packages = bound.packages;
    const double share = 1.0 / static_cast<double>(item.firsts.size() + (item.fixed_t >= 0 ? 1 : 0));
    const bool is_one_strings = item.firsts.size() == 1 && item.fixed_t < 0;
    const bool may_dig = !item.dig_cost.empty();
    const int in =
        may_dig ? place_of(city, city.decide.spans[static_cast<std::size_t>(item.span)].duct_string) : -1;
    const bool digs_exactly = is_one_strings && in >= 0 &&
                              static_cast<std::size_t>(in) == item.firsts[0].first &&
                              !has_fixed(city.strings[item.firsts[0].first]);
    double cheapest = kNever;
    for (std::size_t t = 0; t < static_cast<std::size_t>(packages.years); ++t) {
        const double here = item.cost[t] + (may_dig && !digs_exactly ? std::min(0.0, item.dig_cost[t]) : 0);
        cheapest = is_one_strings ? here : std::min(cheapest, here);
        for (const auto& [string, section] : item.firsts) {
            const auto k = static_cast<std::size_t>(section);
            packages.strings[string].work_cost[t][k] += share * cheapest;
            if (!is_one_strings) continue;
            for (std::size_t l = 0; l < kLimits; ++l)
                packages.strings[string].work_use[t][k][l] +=
                    item.use[t][l] + (may_dig && !digs_exactly ? std::min(0.0, item.dig_use[t][l]) : 0);
        }
        if (static_cast<int>(t) == item.fixed_t) bound.fixed_cost += share * cheapest;
    }
    if (digs_exactly)
        add_own_dig(item, item.firsts[0].first, item.firsts[0].second,
                    live_states(city, city.decide.spans[static_cast<std::size_t>(item.span)],
                                static_cast<std::size_t>(in)),
                    packages);
}

} // namespace

PackageCase search_case(const CityYears& city) {
    PackageCase packages = Builder(city, For::search).run();
    add_items(city, packages);
    take_fixed(city, packages);
    add_control_waits(city, packages);
    return packages;
}

BoundCase bound_case(const CityYears& city, bool all_reached, bool all_carried) {
    BoundCase bound{Builder(city, For::bound).run(), 0};
    PackageCase& packages = bound.packages;
    take_fixed(city, packages);
    for (PackageString& string : packages.strings) {
        string.left_penalty.clear();
        string.state_penalty.clear();
        string.jump_penalty.clear();
        if (all_reached) string.least.back() = string.sections;
        for (std::size_t t = 0; t < string.state_cost.size(); ++t) {
            if (!all_carried) string.finish_cost[t] = 0;
            for (auto& by_class : string.state_cost[t])
                if (all_carried) by_class.back() = kNever;
        }
    }
    for (const SharedItem& item : city.items) add_item_to_bound(city, item, bound);
    std::vector<char> moves(city.input.city.poles.size(), 0);
    for (const CityString& string : city.strings)
        for (const CitySection& section : string.sections)
            for (const PoleIx pole : section.poles) moves[pole.place()] = 1;
    std::vector<int> fixed(moves.size(), 0);
    for (const CityString& string : city.strings) {
        std::vector<char> has_work(static_cast<std::size_t>(packages.years), 0);
        for (std::size_t i = 0; i < string.fixed_year.size(); ++i) {
            if (string.fixed_year[i] == 0) continue;
            fixed[city.loops[string.string.place()].lamps[i].place()] = string.fixed_year[i];
            char& has = has_work[static_cast<std::size_t>(string.fixed_year[i] -
                                                          city.input.plan.settings.first_year)];
            StringYearCash mobilise;
            mobilise.year = string.fixed_year[i];
            mobilise.has_work = has == 0;
            has = 1;
            bound.fixed_cost += present_value(string_lines(city.book.input(), string.string, {mobilise}));
        }
    }
    for (std::size_t i = 0; i < moves.size(); ++i) {
        if (moves[i] != 0 || !is_candidate(city.input.city, city.input.city.poles[i])) continue;
        const PolePlan& row = city.input.plan.poles[i];
        const bool works = fixed[i] != 0;
        bound.fixed_cost += city.book
                                .pole({PoleIx(i), works ? row.choice : Choice::keep, fixed[i],
                                       works && row.choice == Choice::solar ? row.head : std::string()})
                                .cost;
    }
    // Design shares are rounded once a string and year in the ledger, here once for each of its parts.
    bound.fixed_cost -= 0.03 * static_cast<double>(city.strings.size()) * packages.years;
    return bound;
}

} // namespace unstring
