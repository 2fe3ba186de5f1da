#include "model/phase/unit_years.h"

#include <algorithm>

#include <fmt/format.h>

namespace unstring {
namespace {

struct Asked { ///< the plan's row for a string and year
    TransformerIx unit;
    double tap = 0;
};

class Assignment {
public:
    Assignment(const City& city, const UnitKinds& kinds,
               const std::vector<const std::vector<StringAtYear>*>& states, UnitYears& out)
        : city_(city), kinds_(kinds), states_(states), out_(out) {}

    void begin(std::size_t t, int year) {
        t_ = t;
        year_ = year;
        users_.assign(city_.transformers.size(), {});
        is_set_.assign(states_.size(), 0);
    }

    bool lives(std::size_t s) const { return (*states_[s])[t_].state.lamps > 0; }
    bool is_set(std::size_t s) const { return is_set_[s] != 0; }
    double load_kva(std::size_t s) const { return (*states_[s])[t_].state.load_kva; }

    bool is_free_for(std::size_t s, TransformerIx unit) const {
        const auto& own = city_.transformers[unit.place()].strings;
        const auto& users = users_[unit.place()];
        const bool is_two_loop = own.size() >= 2;
        const auto is_own = [&](std::size_t each) {
            return std::find(own.begin(), own.end(), StringIx(each)) != own.end();
        };
        if (users.empty()) return true;
        return is_two_loop && is_own(s) && std::all_of(users.begin(), users.end(), is_own);
    }

    void set(std::size_t s, TransformerIx unit, double tap) {
        out_.strings[s][t_] = {unit, tap};
        if (unit.is_valid()) users_[unit.place()].push_back(s);
        is_set_[s] = 1;
    }

    void take_asked(std::size_t s, const Asked& asked) {
        if (!asked.unit.is_valid()) return;
        const auto fit = kinds_.fit(StringIx(s), asked.unit, load_kva(s));
        if (!is_free_for(s, asked.unit)) {
            const std::string& id = city_.transformers[asked.unit.place()].id;
            out_.findings.push_back(
                make_finding("unit-twice", {}, 0, id,
                             fmt::format("planned in {} on string {} and on {}", year_, city_.strings[s].id,
                                         city_.strings[users_[asked.unit.place()].front()].id),
                             "one string for each unit", "give one of the two another unit", "transformers"));
            return;
        }
        if (!fit) return;
        const auto& taps = city_.transformers[asked.unit.place()].taps;
        const double rating_kw = loop_rating_kw(city_.transformers[asked.unit.place()]);
        const bool tap_is_legal = std::find(taps.begin(), taps.end(), asked.tap) != taps.end() &&
                                  load_kva(s) <= rating_kw * asked.tap * (1 + 1e-9);
        set(s, asked.unit, tap_is_legal ? asked.tap : fit->tap);
    }

    void keep_in_service(std::size_t s) {
        const UnitAtYear before = out_.strings[s][t_ - 1];
        if (!before.unit.is_valid() || !is_free_for(s, before.unit)) return;
        if (const auto fit = kinds_.fit(StringIx(s), before.unit, load_kva(s))) set(s, before.unit, fit->tap);
    }

    void swap_or_stay(std::size_t s) {
        const std::vector<TransformerIx> pool = idle();
        auto fit = kinds_.best(StringIx(s), pool, (*states_[s])[t_].aged_kva);
        if (!fit) fit = kinds_.best(StringIx(s), pool, load_kva(s));
        if (fit) return set(s, fit->unit, fit->tap);
        const UnitAtYear before = out_.strings[s][t_ - 1];
        const bool stays = before.unit.is_valid() && is_free_for(s, before.unit);
        set(s, stays ? before.unit : TransformerIx(), 1);
    }

    std::vector<TransformerIx> idle() const {
        std::vector<TransformerIx> free;
        for (std::size_t u = 0; u < city_.transformers.size(); ++u) {
            const Transformer& unit = city_.transformers[u];
            if (users_[u].empty() && !unit.set_aside && unit.state != UnitState::scrapped)
                free.push_back(TransformerIx(u));
        }
        return free;
    }

private:
    const City& city_;
    const UnitKinds& kinds_;
    const std::vector<const std::vector<StringAtYear>*>& states_;
    UnitYears& out_;
    std::size_t t_ = 0;
    int year_ = 0;
    std::vector<std::vector<std::size_t>> users_;
    std::vector<char> is_set_;
};

/// Where a unit stands, in words: its string (two for a two-loop unit) or "spare".
std::string place_of(const City& city, const UnitYears& years, std::size_t unit, std::size_t t) {
    std::string place;
    for (std::size_t s = 0; s < years.strings.size(); ++s)
        if (years.strings[s][t].unit == TransformerIx(unit))
            place += (place.empty() ? "" : ", ") + city.strings[s].id;
    return place.empty() ? "spare" : place;
}

/// Moves of one year: a unit leaves its string once that string has been given its next one.
void order_moves(std::vector<UnitMove> moves, UnitYears& out) {
    while (!moves.empty()) {
        const auto is_waiting = [&](const UnitMove& move) {
            return move.from != "spare" &&
                   std::any_of(moves.begin(), moves.end(), [&](const UnitMove& other) {
                       return &other != &move && other.to == move.from;
                   });
        };
        const auto next = std::find_if_not(moves.begin(), moves.end(), is_waiting);
        if (next == moves.end()) {
            std::string chain;
            for (const UnitMove& move : moves)
                chain += (chain.empty() ? "" : "; ") + move.from + " to " + move.to;
            out.findings.push_back(make_finding("unit-cycle", {}, 0,
                                                fmt::format("year {}", moves.front().year), chain,
                                                "a free unit for the first of these moves",
                                                "take a loaned unit for a night, or accept an outage", {}));
            out.moves.insert(out.moves.end(), moves.begin(), moves.end());
            return;
        }
        out.moves.push_back(*next);
        moves.erase(next);
    }
}

void add_moves(const City& city, int first_year, int years, UnitYears& out) {
    for (int t = 1; t <= years; ++t) {
        std::vector<UnitMove> moves;
        for (std::size_t u = 0; u < city.transformers.size(); ++u) {
            const std::string from = place_of(city, out, u, static_cast<std::size_t>(t - 1));
            const std::string to = place_of(city, out, u, static_cast<std::size_t>(t));
            if (from != to) moves.push_back({first_year + t - 1, TransformerIx(u), from, to});
        }
        order_moves(std::move(moves), out);
    }
}

} // namespace

UnitKinds::UnitKinds(const City& city, const std::vector<StringLoop>& loops) : city_(city) {
    for (const StringLoop& loop : loops) {
        UnitNeed need = unit_need(city, loop, 0);
        std::vector<char> kind;
        for (Transformer unit : city.transformers) {
            unit.build = Build::moving_coil; // its lower end is judged with the load
            kind.push_back(why_unit_refused(unit, need).empty() ? 1 : 0);
        }
        need_.push_back(need);
        kind_.push_back(std::move(kind));
    }
}

std::optional<UnitFit> UnitKinds::fit(StringIx string, TransformerIx unit, double load_kva) const {
    if (!is_kind(string, unit)) return std::nullopt;
    UnitNeed need = need_[string.place()];
    need.load_kva = load_kva;
    const Transformer& row = city_.transformers[unit.place()];
    if (load_kva > loop_rating_kw(row) * (1 + 1e-9)) return std::nullopt;
    const auto fits = units_that_fit(city_, {unit}, need);
    return fits.empty() ? std::nullopt : std::optional(fits.front());
}

std::optional<UnitFit> UnitKinds::best(StringIx string, const std::vector<TransformerIx>& pool,
                                       double load_kva) const {
    std::optional<UnitFit> best;
    const auto carried_kw = [&](const UnitFit& fit) {
        return loop_rating_kw(city_.transformers[fit.unit.place()]) * fit.tap;
    };
    for (const TransformerIx unit : pool) {
        const auto each = fit(string, unit, load_kva);
        if (each && (!best || carried_kw(*each) < carried_kw(*best))) best = each;
    }
    return best;
}

UnitYears unit_years(const City& city, const std::vector<StringLoop>& loops, const UnitKinds& kinds,
                     const std::vector<const std::vector<StringAtYear>*>& states,
                     const std::vector<StringUnit>& plan_units, int first_year, int years) {
    const std::size_t strings = loops.size();
    const auto places = static_cast<std::size_t>(years) + 1;
    UnitYears out;
    out.strings.assign(strings, std::vector<UnitAtYear>(places));
    std::vector<std::vector<Asked>> asked(strings, std::vector<Asked>(places));
    for (const StringUnit& row : plan_units) {
        const int t = row.year - first_year + 1;
        if (row.string.is_valid() && row.string.place() < strings && t >= 1 && t <= years)
            asked[row.string.place()][static_cast<std::size_t>(t)] = {row.transformer, row.tap};
    }
    Assignment assignment(city, kinds, states, out);
    assignment.begin(0, first_year - 1);
    for (std::size_t s = 0; s < strings; ++s) {
        if (loops[s].lamps.empty()) continue;
        const TransformerIx today = unit_today(city, StringIx(s));
        const auto fit =
            today.is_valid() ? kinds.fit(StringIx(s), today, (*states[s])[0].state.load_kva) : std::nullopt;
        assignment.set(s, today, fit ? fit->tap : 1);
    }
    out.idle.push_back(assignment.idle());
    for (std::size_t t = 1; t < places; ++t) {
        assignment.begin(t, first_year + static_cast<int>(t) - 1);
        const auto each = [&](auto&& action) {
            for (std::size_t s = 0; s < strings; ++s)
                if (assignment.lives(s) && !assignment.is_set(s)) action(s);
        };
        each([&](std::size_t s) { assignment.take_asked(s, asked[s][t]); });
        each([&](std::size_t s) { assignment.keep_in_service(s); });
        each([&](std::size_t s) { assignment.swap_or_stay(s); });
        out.idle.push_back(assignment.idle());
    }
    add_moves(city, first_year, years, out);
    return out;
}

} // namespace unstring
