#include "app/window/rail/boundary.h"

#include <algorithm>
#include <cstdlib>
#include <set>

namespace unstring {
namespace {

bool has_work(const PolePlan& row) {
    return row.year != 0 && (row.choice == Choice::rewire || row.choice == Choice::solar);
}

bool may_move(const PolePlan& row) { return row.choice == Choice::rewire || row.choice == Choice::solar; }

const PolePlan& row_at(const StringLoop& loop, const Plan& plan, int position) {
    return plan.poles[loop.lamps[std::size_t(position - 1)].place()];
}

bool is_off(const StringLoop& loop, const Plan& plan, int position, int year) {
    const PolePlan& row = row_at(loop, plan, position);
    return has_work(row) && row.year <= year;
}

// Lamps on before the first one that is off, going out from the station.
int on_before(const StringLoop& loop, const Plan& plan, const Fold& fold, bool out_leg, int year) {
    const int length = out_leg ? fold.out : fold.ret();
    int depth = 0;
    while (depth < length && !is_off(loop, plan, fold.position(out_leg, depth + 1), year)) ++depth;
    return depth;
}

// The earliest year of work on the station side of the depths.
int year_inside(const StringLoop& loop, const Plan& plan, const Fold& fold, int out_on, int ret_on) {
    int year = 0;
    for (int position = 1; position <= fold.lamps; ++position) {
        if (fold.depth(position) > (fold.on_out(position) ? out_on : ret_on)) continue;
        const PolePlan& row = row_at(loop, plan, position);
        if (has_work(row) && (year == 0 || row.year < year)) year = row.year;
    }
    return year;
}

} // namespace

Fold fold_of(const StringLoop& loop) {
    const int lamps = int(loop.lamps.size());
    return {lamps, std::clamp(loop.far_position, std::min(1, lamps), lamps)};
}

int cutback_at(const StringLoop& loop, int out_on, int ret_on) {
    const int b = int(loop.lamps.size()) + 1 - ret_on;
    int found = -1;
    for (std::size_t i = 0; i < loop.cutbacks.size(); ++i) {
        const LoopCutBack& cut = loop.cutbacks[i];
        if (cut.a == out_on && cut.b == b &&
            (found < 0 || (cut.confirmed && !loop.cutbacks[std::size_t(found)].confirmed)))
            found = int(i);
    }
    return found;
}

std::vector<Boundary> boundaries_of(const StringLoop& loop, const Plan& plan) {
    const Fold fold = fold_of(loop);
    std::set<int> years;
    for (int position = 1; position <= fold.lamps; ++position)
        if (has_work(row_at(loop, plan, position))) years.insert(row_at(loop, plan, position).year);
    std::vector<Boundary> boundaries;
    for (const int year : years) {
        Boundary boundary;
        boundary.year = year;
        int left_on = 0;
        for (int position = 1; position <= fold.lamps; ++position)
            left_on +=
                loop.burns[std::size_t(position - 1)] == 0 || is_off(loop, plan, position, year) ? 0 : 1;
        if (left_on == 0) continue; // the string ends here
        boundary.out_on = on_before(loop, plan, fold, true, year);
        boundary.ret_on = on_before(loop, plan, fold, false, year);
        boundary.next_year = year_inside(loop, plan, fold, boundary.out_on, boundary.ret_on);
        boundary.is_nested = left_on <= boundary.out_on + boundary.ret_on;
        boundary.cutback = cutback_at(loop, boundary.out_on, boundary.ret_on);
        if (boundary.cutback >= 0)
            boundary.stand =
                loop.cutbacks[std::size_t(boundary.cutback)].confirmed ? Stand::confirmed : Stand::candidate;
        boundaries.push_back(boundary);
    }
    return boundaries;
}

BoundaryMove move_boundary(const StringLoop& loop, const Plan& plan, const Boundary& boundary, int out_on,
                           int ret_on) {
    const Fold fold = fold_of(loop);
    BoundaryMove move;
    move.plan = plan;
    move.out_on = std::clamp(out_on, 0, fold.out);
    move.ret_on = std::clamp(ret_on, 0, fold.ret());
    for (int position = 1; position <= fold.lamps; ++position) {
        const PoleIx pole = loop.lamps[std::size_t(position - 1)];
        PolePlan& row = move.plan.poles[pole.place()];
        if (!may_move(row)) continue;
        const bool leaves = fold.depth(position) > (fold.on_out(position) ? move.out_on : move.ret_on);
        const bool is_gone = row.year != 0 && row.year <= boundary.year;
        if (leaves == is_gone) continue;
        if (row.year_locked) {
            ++move.stayed_locked;
            continue;
        }
        row.year = leaves ? boundary.year : boundary.next_year;
        row.year_by = row.year == 0 ? YearBy::none : YearBy::hand;
        move.year = row.year;
        ++move.moved;
    }
    return move;
}

std::vector<Boundary> end_boundaries(const StringLoop& loop, const Plan& plan, int idle_year) {
    const Fold fold = fold_of(loop);
    int earliest = 0, latest = 0, movable = 0, without_year = 0;
    for (int position = 1; position <= fold.lamps; ++position) {
        const PolePlan& row = row_at(loop, plan, position);
        if (!may_move(row)) continue;
        ++movable;
        if (row.year == 0)
            ++without_year;
        else
            earliest = earliest == 0 ? row.year : std::min(earliest, row.year),
            latest = std::max(latest, row.year);
    }
    std::vector<Boundary> ends;
    if (movable == 0) return ends;
    Boundary at_fold;
    at_fold.year =
        earliest != 0 ? earliest - 1 : std::clamp(idle_year, plan.settings.first_year, plan.last_year());
    at_fold.next_year = earliest;
    at_fold.out_on = fold.out, at_fold.ret_on = fold.ret();
    if (at_fold.year >= plan.settings.first_year) ends.push_back(at_fold);
    Boundary at_station;
    at_station.year = latest;
    at_station.next_year = latest < plan.last_year() ? latest + 1 : 0;
    if (latest != 0 && without_year == 0) ends.push_back(at_station);
    return ends;
}

Depths snap_depths(const StringLoop& loop, int out_on, int ret_on, int reach) {
    Depths best{out_on, ret_on, false};
    int best_away = 2 * reach + 1;
    for (const LoopCutBack& cut : loop.cutbacks) {
        const int cut_out = cut.a, cut_ret = int(loop.lamps.size()) + 1 - cut.b;
        const Fold fold = fold_of(loop);
        if (cut_out > fold.out || cut_ret > fold.ret()) continue; // it joins two places of one leg
        const int away_out = std::abs(cut_out - out_on), away_ret = std::abs(cut_ret - ret_on);
        if (std::max(away_out, away_ret) > reach || away_out + away_ret >= best_away) continue;
        best = {cut_out, cut_ret, true};
        best_away = away_out + away_ret;
    }
    return best;
}

} // namespace unstring
