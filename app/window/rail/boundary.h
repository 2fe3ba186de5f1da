#pragma once
// Year boundaries of one string, and what moving one does to the plan. Pure: no screen.
//
//   depth = number of lamps between a lamp and the station along its own leg, itself included:
//
//     fold  o-o-o|o-o-o-o  station      out leg, depth 7..1 from left to right
//           `-o-o|o-o-o-o'              return leg
//
// A boundary of year Y stays out_on lamps deep on the out leg and ret_on on the return leg: those lamps still
// burn at the end of Y, every lamp further out is off.

#include <vector>

#include "model/city/city.h"
#include "model/plan/plan.h"
#include "model/series/string_loop.h"

namespace unstring {

struct Fold {
    int lamps = 0;
    int out = 0; ///< lamps on the out leg, 1..far_position
    [[nodiscard]] int ret() const { return lamps - out; }
    [[nodiscard]] bool on_out(int position) const { return position <= out; }
    [[nodiscard]] int depth(int position) const { return on_out(position) ? position : lamps + 1 - position; }
    [[nodiscard]] int position(bool on_out_leg, int at_depth) const {
        return on_out_leg ? at_depth : lamps + 1 - at_depth;
    }
};
[[nodiscard]] Fold fold_of(const StringLoop& loop);

enum class Stand { jumpered, candidate, confirmed }; ///< what a boundary stands on

struct Boundary {
    int year = 0;      ///< work of this year and before lies beyond it
    int next_year = 0; ///< year of the work on its station side; 0 = no work there (kept, or not reached)
    int out_on = 0, ret_on = 0;
    Stand stand = Stand::jumpered;
    int cutback = -1;      ///< place in StringLoop.cutbacks
    bool is_nested = true; ///< false: lamps beyond it still burn, or lamps before it are off
};

/// One boundary per year with work that leaves lamps on, from the far end inward.
[[nodiscard]] std::vector<Boundary> boundaries_of(const StringLoop& loop, const Plan& plan);

/// The cut-back that closes the loop at these depths, -1 = none.
[[nodiscard]] int cutback_at(const StringLoop& loop, int out_on, int ret_on);

struct BoundaryMove {
    Plan plan;
    int moved = 0;         ///< lamps that change year
    int year = 0;          ///< the year they go to (of the last one)
    int stayed_locked = 0; ///< lamps passed over because their year is locked
    int out_on = 0, ret_on = 0;
};

/// The plan with a boundary moved to new depths. Lamps it passes go to the year on the other side, set by
/// hand; locked years and kept lamps stay.
[[nodiscard]] BoundaryMove move_boundary(const StringLoop& loop, const Plan& plan, const Boundary& boundary,
                                         int out_on, int ret_on);

/// The boundaries that stand at the two ends of a string and can be drawn in from there:
/// at the fold, for work one year before its earliest (`idle_year` where it has no work yet); at the station,
/// for lamps that stay on one year after its last work (0 = no year, when that was the plan's last). Only
/// those that can be.
[[nodiscard]] std::vector<Boundary> end_boundaries(const StringLoop& loop, const Plan& plan, int idle_year);

/// Depths that a boundary snaps to near the wanted ones: a cut-back within `reach` lamps on both legs, else
/// the wanted.
struct Depths {
    int out_on = 0, ret_on = 0;
    bool is_snapped = false;
};
[[nodiscard]] Depths snap_depths(const StringLoop& loop, int out_on, int ret_on, int reach);

} // namespace unstring
