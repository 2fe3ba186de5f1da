#include "model/phase/phase_checks.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/money/hours.h"
#include "model/money/money_text.h"
#include "model/phase/duct_live.h"
#include "model/phase/failure_drill.h"
#include "model/phase/fund_check.h"

namespace unstring {
namespace {

constexpr double kRounding = 1e-6;
constexpr double kCoverGoal = 0.95;

class Checks {
public:
    Checks(const PhaseFacts& facts, CashBook& book, PhaseResult& result)
        : facts_(facts), book_(book), result_(result) {}

    void run() {
        for (std::size_t s = 0; s < facts_.loops.size(); ++s)
            if (!facts_.loops[s].lamps.empty()) check_string(s);
        for (const Finding& finding : facts_.units.findings) result_.failures.push_back(finding);
        for (Finding& finding : duct_findings(facts_)) result_.failures.push_back(std::move(finding));
        check_controls();
        check_critical();
        check_limits();
        check_spares();
        check_lead_times();
        check_poles();
        for (Finding& finding : fund_findings(facts_, book_)) result_.failures.push_back(std::move(finding));
        for (const Finding& finding : result_.failures)
            if (finding.severity == Severity::error || finding.code == "money-short" ||
                finding.code == "hours-short")
                result_.feasible = false;
        // A year that is not reached breaks no limit: what it would take is said, and the plan stands.
        check_money_for_rest();
        check_hours_for_rest();
    }

private:
    void say(std::string code, std::string record, std::string found, std::string wanted, std::string remedy,
             std::string table) {
        result_.failures.push_back(make_finding(std::move(code), {}, 0, std::move(record), std::move(found),
                                                std::move(wanted), std::move(remedy), std::move(table)));
    }
    const std::string& string_id(std::size_t s) const { return facts_.city.strings[s].id; }
    std::size_t last() const { return static_cast<std::size_t>(facts_.years()); }
    const Transformer* unit_at(std::size_t s, std::size_t t) const {
        const TransformerIx unit = facts_.units.strings[s][t].unit;
        return unit.is_valid() ? &facts_.city.transformers[unit.place()] : nullptr;
    }
    double loading(std::size_t s, std::size_t t) const {
        const Transformer* unit = unit_at(s, t);
        return unit == nullptr ? 0 : facts_.at(s, t).state.load_kva / loop_rating_kw(*unit);
    }

    /// The first year end at which a test fails, and how many do.
    template <class Test>
    std::pair<std::size_t, int> when(Test test) const {
        std::size_t first = 0;
        int count = 0;
        for (std::size_t t = 1; t <= last(); ++t) {
            if (!test(t)) continue;
            if (count++ == 0) first = t;
        }
        return {first, count};
    }
    std::string at_ends(std::size_t first, int count) const {
        return count == 1 ? fmt::format("at the end of {}", facts_.year(first))
                          : fmt::format("at {} year ends from {} on", count, facts_.year(first));
    }

    void check_string(std::size_t s) {
        const auto lives = [&](std::size_t t) { return facts_.at(s, t).state.lamps > 0; };
        const double class_v = facts_.loops[s].cable_kv * 1000;
        if (const auto [t, n] = when([&](std::size_t y) { return lives(y) && unit_at(s, y) == nullptr; });
            n > 0)
            say("transformer-missing", string_id(s),
                fmt::format("{} lamps without a transformer {}", facts_.at(s, t).state.lamps, at_ends(t, n)),
                "a unit of the pool that fits", "add the unit that feeds it, or buy one", "strings");
        if (const auto [t, n] = when([&](std::size_t y) { return loading(s, y) > 1 + kRounding; }); n > 0)
            say("load-over", string_id(s),
                fmt::format("{:.2f} kVA on {} of {:g} kW {}", facts_.at(s, t).state.load_kva,
                            unit_at(s, t)->id, loop_rating_kw(*unit_at(s, t)), at_ends(t, n)),
                "a load within the rating", "give it a larger unit, or move a section to an earlier year",
                "strings");
        if (const auto [t, n] = when([&](std::size_t y) {
                return lives(y) && facts_.at(s, y).state.volts > class_v * (1 + kRounding);
            });
            n > 0)
            say("volts-over", string_id(s),
                fmt::format("{:.0f} V {}", facts_.at(s, t).state.volts, at_ends(t, n)),
                fmt::format("at most {:.0f} V, the cable's class", class_v),
                "move a section to an earlier year", "strings");
        if (const auto [t, n] = when([&](std::size_t y) { return is_low(s, y); }); n > 0) check_low(s, t, n);
        check_cutbacks(s);
        check_tests(s);
    }

    void check_cutbacks(std::size_t s) {
        const auto& cutbacks = facts_.loops[s].cutbacks;
        std::vector<char> is_said(cutbacks.size(), 0);
        const auto name = [&](int position) {
            const auto& lamps = facts_.loops[s].lamps;
            if (position == 0) return std::string("out");
            if (position > static_cast<int>(lamps.size())) return std::string("return");
            return facts_.city.poles[lamps[static_cast<std::size_t>(position - 1)].place()].id;
        };
        for (std::size_t t = 1; t <= last(); ++t)
            for (const int place : facts_.at(s, t).state.used) {
                const LoopCutBack& cutback = cutbacks[static_cast<std::size_t>(place)];
                if (cutback.confirmed || is_said[static_cast<std::size_t>(place)] != 0) continue;
                is_said[static_cast<std::size_t>(place)] = 1;
                say("cutback-unconfirmed", string_id(s),
                    fmt::format("{} to {}, in use from {}, {:.0f} m of new cable", name(cutback.a),
                                name(cutback.b), facts_.year(t), cutback.new_cable_m),
                    "a splice that was looked at", "survey it, then give it in the cut-back file", "strings");
            }
    }

    void check_tests(std::size_t s) {
        for (std::size_t t = 1; t <= last(); ++t) {
            const TransformerIx unit = facts_.units.strings[s][t].unit;
            if (!unit.is_valid() || unit == facts_.units.strings[s][t - 1].unit) continue;
            const Transformer& row = facts_.city.transformers[unit.place()];
            if (is_untested(row, facts_.year(t)))
                say("untested-spare", row.id,
                    fmt::format("goes to string {} in {}, tested: {}", string_id(s), facts_.year(t),
                                row.tested.empty() ? "never" : row.tested),
                    "a test in the five years before", "test it before it is moved", "transformers");
        }
    }

    bool is_low(std::size_t s, std::size_t t) const {
        const Transformer* unit = unit_at(s, t);
        return unit != nullptr && facts_.at(s, t).state.lamps > 0 &&
               loading(s, t) / facts_.units.strings[s][t].tap < min_frac_of(*unit) - kRounding;
    }

    /// Hard for static units only: they do not hold their current there.
    void check_low(std::size_t s, std::size_t t, int n) {
        const Transformer& unit = *unit_at(s, t);
        say("load-low", string_id(s),
            fmt::format("{:.2f} kVA on {} of {:g} kW, {:.0f} % {}", facts_.at(s, t).state.load_kva, unit.id,
                        loop_rating_kw(unit), 100 * loading(s, t) / facts_.units.strings[s][t].tap,
                        at_ends(t, n)),
            fmt::format("at least {:.0f} %", 100 * min_frac_of(unit)),
            "swap to a smaller unit, or end the string sooner", "strings");
        if (unit.build == Build::static_unit) result_.failures.back().severity = Severity::error;
    }

    bool control_is_lost(std::size_t s, std::size_t t) const {
        const std::string& from = facts_.city.strings[s].control_from;
        if (facts_.at(s, t).state.lamps == 0) return false;
        if (const StringIx other = find_string(facts_.city, from); other.is_valid())
            return other != StringIx(s) && facts_.at(other.place(), 0).state.lamps > 0 &&
                   facts_.at(other.place(), t).state.lamps == 0;
        const PoleIx pole = find_pole(facts_.city, from);
        return pole.is_valid() && facts_.pole_year[pole.place()] != 0 &&
               facts_.pole_year[pole.place()] <= facts_.year(t);
    }

    void check_controls() {
        for (std::size_t s = 0; s < facts_.loops.size(); ++s) {
            if (facts_.city.strings[s].control_from.empty() || facts_.loops[s].lamps.empty()) continue;
            const auto [t, n] = when([&](std::size_t y) { return control_is_lost(s, y); });
            if (n == 0) continue;
            say("control-lost", string_id(s),
                fmt::format("{} lamps left {}, their control at {} is gone", facts_.at(s, t).state.lamps,
                            at_ends(t, n), facts_.city.strings[s].control_from),
                "a control for as long as a lamp burns",
                "end this string first, keep that position, or give it a control of its own", "strings");
        }
    }

    bool string_is_dark(std::size_t s, std::size_t t) const {
        return unit_at(s, t) == nullptr || loading(s, t) > 1 + kRounding || control_is_lost(s, t);
    }

    void check_critical() {
        for (std::size_t i = 0; i < facts_.city.poles.size(); ++i) {
            const Pole& pole = facts_.city.poles[i];
            if (!pole.critical || !is_candidate(facts_.city, pole)) continue;
            const std::size_t s = pole.string.place();
            const int leaves = facts_.pole_year[i];
            const auto [t, n] = when([&](std::size_t y) {
                return (leaves == 0 || leaves > facts_.year(y)) && string_is_dark(s, y);
            });
            if (n == 0) continue;
            say("critical-dark", pole.id,
                fmt::format("its string {} does not burn safely {}", string_id(s), at_ends(t, n)),
                "a critical pole is never dark", "mend the string's finding, or convert this pole before",
                "poles");
        }
    }

    void check_limit(std::string code, const PhaseYear& year, const char* what, double used,
                     const std::optional<double>& limit) {
        if (!limit || used <= *limit + 0.005) return;
        say(std::move(code), fmt::format("year {}", year.year),
            fmt::format("{} {:.0f}, short by {:.0f}", what, used, used - *limit),
            fmt::format("at most {:.0f}", *limit), "move work to another year, or raise the limit", "budget");
    }

    void check_limits() {
        for (const PhaseYear& year : result_.years) {
            check_limit("money-short", year, "capital", to_dollars(year.money), year.money_limit);
            check_limit("hours-short", year, "line crew hours", year.hours.line, year.line_limit_h);
            check_limit("hours-short", year, "civil crew hours", year.hours.civil, year.civil_limit_h);
            check_limit("hours-short", year, "lighting crew hours", year.hours.lighting,
                        year.lighting_limit_h);
            check_limit("hours-short", year, "electricians' hours", year.hours.electric,
                        year.electric_limit_h);
        }
    }

    void check_spares() {
        for (const PhaseYear& year : result_.years)
            for (const SpareCover& cover : year.spares) {
                if (cover.cover_frac >= kCoverGoal) continue;
                say("spare-short", fmt::format("year {}", year.year),
                    fmt::format("units of {:g} kW, {:g} A, {:g} V: a spare is there in {:.0f} % of cases",
                                cover.rated_kw, cover.output_a, cover.primary_v, 100 * cover.cover_frac),
                    "95 %", "free a unit that fits by ending a string sooner, or buy one", "transformers");
            }
    }

    void check_lead_times() {
        for (std::size_t i = 0; i < facts_.decide.circuits.size(); ++i) {
            if (!facts_.decide.circuits[i].service.is_valid()) continue;
            const ServicePoint& service = facts_.city.services[facts_.decide.circuits[i].service.place()];
            const int ready = service_ready_year(facts_.city, facts_.prices, facts_.plan.settings,
                                                 facts_.decide.circuits[i].service);
            if (facts_.connection_year[i] == 0 || facts_.connection_year[i] >= ready) continue;
            say("service-late", service.id, fmt::format("first used in {}", facts_.connection_year[i]),
                fmt::format("ready in {}", ready), "move the first poles on it to a later year", "services");
        }
    }

    void check_poles() {
        unreached_.resize(facts_.city.strings.size());
        for (std::size_t i = 0; i < facts_.city.poles.size(); ++i) {
            const Pole& pole = facts_.city.poles[i];
            if (!is_candidate(facts_.city, pole)) continue;
            const Choice choice = facts_.plan.poles[i].choice;
            if (facts_.pole_year[i] == 0 && choice != Choice::keep)
                unreached_[pole.string.place()].push_back(i);
            if (facts_.pole_year[i] == 0) continue;
            if (pole.earliest_year && facts_.pole_year[i] < *pole.earliest_year)
                say("owner-consent", pole.id, fmt::format("work in {}", facts_.pole_year[i]),
                    fmt::format("not before {}", *pole.earliest_year), "move it to a later year", "poles");
            check_choice(i);
        }
        for (std::size_t s = 0; s < unreached_.size(); ++s) check_unreached(s, unreached_[s]);
    }

    /// What the poles without a year would take of the last year's money, beside what is left of it.
    void check_money_for_rest() {
        if (result_.not_reached == 0 || result_.years.empty() || !result_.years.back().money_limit) return;
        const PhaseYear& year = result_.years.back();
        double needed = 0;
        int poles = 0;
        for (const auto& of_string : unreached_)
            for (const std::size_t i : of_string) {
                const PolePlan& row = facts_.plan.poles[i];
                if (row.choice != Choice::rewire && row.choice != Choice::solar) continue;
                ++poles;
                needed += to_dollars(book_
                                         .pole({PoleIx(i), row.choice, year.year,
                                                row.choice == Choice::solar ? row.head : std::string()})
                                         .capital_sum());
            }
        const double left = std::max(0.0, *year.money_limit - to_dollars(year.money));
        if (poles == 0 || needed <= left) return;
        say("money-short", fmt::format("year {}", year.year),
            fmt::format(
                "{} poles not reached want {} more, trench and transformers apart; {} is left, short by {}",
                poles, dollars_text(needed), dollars_text(left), dollars_text(needed - left)),
            fmt::format("at least {} in that year, or years after it",
                        dollars_text(to_dollars(year.money) + needed)),
            "raise money, or add years", "budget");
    }

    /// Likewise of each crew's hours.
    void check_hours_for_rest() {
        if (result_.not_reached == 0 || result_.years.empty()) return;
        const PhaseYear& year = result_.years.back();
        TaskHours needed;
        for (const auto& of_string : unreached_)
            for (const std::size_t i : of_string)
                needed +=
                    pole_hours(facts_.prices, facts_.city.poles[i], facts_.plan.poles[i].choice, year.year);
        const auto check = [&](const char* crew, double wanted, double used,
                               const std::optional<double>& limit) {
            if (!limit || wanted <= std::max(0.0, *limit - used)) return;
            const double left = std::max(0.0, *limit - used);
            say("hours-short", fmt::format("year {}", year.year),
                fmt::format("the poles not reached want {:.0f} {} more, trench and wire apart; {:.0f} are "
                            "left, short by {:.0f}",
                            wanted, crew, left, wanted - left),
                fmt::format("at least {:.0f} in that year, or years after it", used + wanted),
                "raise the crew's hours, or add years", "budget");
        };
        check("civil crew hours", needed.civil, year.hours.civil, year.civil_limit_h);
        check("lighting crew hours", needed.lighting, year.hours.lighting, year.lighting_limit_h);
        check("electricians' hours", needed.electric, year.hours.electric, year.electric_limit_h);
    }

    void check_unreached(std::size_t s, const std::vector<std::size_t>& poles) {
        if (poles.empty()) return;
        result_.not_reached += static_cast<int>(poles.size());
        std::string list;
        for (std::size_t k = 0; k < std::min<std::size_t>(5, poles.size()); ++k)
            list += (k == 0 ? "" : ", ") + facts_.city.poles[poles[k]].id;
        if (poles.size() > 5) list += ", ..";
        say("pole-unreached", string_id(s), fmt::format("{} poles without a year: {}", poles.size(), list),
            fmt::format("a year by {}", facts_.plan.last_year()), "raise money or hours, or add years",
            "strings");
    }

    /// Decide chose at one year's prices; at the real year the other way may be the cheaper one.
    void check_choice(std::size_t i) {
        const PolePlan& row = facts_.plan.poles[i];
        const PoleDecision* decision = facts_.decide.find(PoleIx(i));
        if (decision == nullptr || row.lock == row.choice || row.mark == row.choice ||
            decision->choice != row.choice)
            return;
        const int decided = facts_.plan.decide_year();
        if (facts_.pole_year[i] == decided) return;
        const OptionCost& rewire = decision->options[1];
        const OptionCost& solar = decision->options[2];
        if (!rewire.possible || !solar.possible) return;
        const bool is_rewire = row.choice == Choice::rewire;
        if (is_rewire ? rewire.cost > solar.cost : solar.cost > rewire.cost)
            return; // not chosen for its own price
        const std::string head = is_rewire ? std::string() : row.head;
        const double share = rewire.cost - book_.pole({PoleIx(i), Choice::rewire, decided, {}}).cost;
        const int year = facts_.pole_year[i];
        const double share_then = share * facts_.plan.factor(year) / facts_.plan.factor(decided);
        const YearCash& rewire_then = book_.pole({PoleIx(i), Choice::rewire, year, {}});
        const double rewire_cost = rewire_then.cost + share_then;
        const YearCash& solar_then = book_.pole({PoleIx(i), Choice::solar, year, head});
        const double chosen = is_rewire ? rewire_cost : solar_then.cost;
        const double other = is_rewire ? solar_then.cost : rewire_cost;
        if (!solar_then.possible || chosen <= other + 0.01) return;
        say("choice-late", facts_.city.poles[i].id,
            fmt::format("in {} {} costs {}, {} {}", year, text_of(row.choice), dollars_text(chosen),
                        is_rewire ? "solar" : "rewire", dollars_text(other)),
            fmt::format("the cheaper way at the prices of {}", year),
            "run decide again at that year, or leave it", "poles");
    }

    const PhaseFacts& facts_;
    CashBook& book_;
    PhaseResult& result_;
    std::vector<std::vector<std::size_t>> unreached_; ///< [string] poles without a year
};

} // namespace

void check_phase(const PhaseFacts& facts, CashBook& book, PhaseResult& result) {
    Checks(facts, book, result).run();
}

} // namespace unstring
