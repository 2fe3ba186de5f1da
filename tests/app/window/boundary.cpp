#include <catch2/catch.hpp>

#include <random>

#include "app/window/rail/boundary.h"
#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

namespace {

StringLoop loop_of(const Scene& scene, const char* id) {
    return scene.loops[find_string(scene.view->city, id).place()];
}

} // namespace

TEST_CASE("boundary: one per year that leaves lamps on, from the far end inward, cut-backs told apart") {
    const auto scene = make_scene(small_view());
    const StringLoop loop = loop_of(*scene, "S-01");
    const std::vector<Boundary> boundaries = boundaries_of(loop, scene->view->plan);
    REQUIRE(boundaries.size() == 3);
    for (std::size_t i = 1; i < boundaries.size(); ++i) {
        CHECK(boundaries[i].year > boundaries[i - 1].year);
        CHECK(boundaries[i].out_on <= boundaries[i - 1].out_on);
        CHECK(boundaries[i].ret_on <= boundaries[i - 1].ret_on);
        CHECK(boundaries[i].is_nested);
    }
}

TEST_CASE("boundary: a boundary moved out keeps lamps to the next year, and moved back gives the same plan") {
    const auto scene = make_scene(small_view());
    const StringLoop loop = loop_of(*scene, "S-02");
    const Plan& plan = scene->view->plan;
    const Boundary boundary = boundaries_of(loop, plan)[1];
    const BoundaryMove out = move_boundary(loop, plan, boundary, boundary.out_on + 1, boundary.ret_on + 1);
    CHECK(out.moved == 2);
    CHECK(out.year == boundary.next_year);
    const Boundary moved = boundaries_of(loop, out.plan)[1];
    CHECK(moved.out_on == boundary.out_on + 1);
    const BoundaryMove back = move_boundary(loop, out.plan, moved, boundary.out_on, boundary.ret_on);
    for (std::size_t i = 0; i < plan.poles.size(); ++i) CHECK(back.plan.poles[i].year == plan.poles[i].year);
}

TEST_CASE("boundary: any move changes years only, of lamps of its own string, and never a locked one") {
    const auto scene = make_scene(small_view());
    const unsigned seed = 20261201;
    CAPTURE(seed);
    std::mt19937 dice(seed);
    Plan plan = scene->view->plan;
    const StringLoop loop = loop_of(*scene, "S-02");
    plan.poles[loop.lamps[4].place()].year_locked = true;
    plan.poles[loop.lamps[17].place()].year_locked = true;
    plan.poles[loop.lamps[9].place()].choice = Choice::keep;
    plan.poles[loop.lamps[9].place()].year = 0;
    for (int round = 0; round < 200; ++round) {
        const std::vector<Boundary> boundaries = boundaries_of(loop, plan);
        if (boundaries.empty()) break;
        const Boundary& boundary = boundaries[dice() % boundaries.size()];
        const BoundaryMove move =
            move_boundary(loop, plan, boundary, int(dice() % 16) - 1, int(dice() % 16) - 1);
        int changed = 0;
        for (std::size_t i = 0; i < plan.poles.size(); ++i) {
            PolePlan before = plan.poles[i], after = move.plan.poles[i];
            const bool is_changed = before.year != after.year;
            changed += is_changed ? 1 : 0;
            if (is_changed) CHECK(scene->view->city.poles[i].string == loop.string);
            if (is_changed) CHECK_FALSE(before.year_locked);
            if (is_changed) CHECK(before.choice != Choice::keep);
            before.year = after.year, before.year_by = after.year_by;
            CHECK(before == after);
        }
        CHECK(changed == move.moved);
        plan = move.plan;
    }
}

TEST_CASE("boundary: near a cut-back it snaps to it, further away it does not") {
    const auto scene = make_scene(small_view());
    const StringLoop loop = loop_of(*scene, "S-01");
    REQUIRE_FALSE(loop.cutbacks.empty());
    const Depths near = snap_depths(loop, 4, 4, 1);
    CHECK(near.is_snapped);
    CHECK(cutback_at(loop, near.out_on, near.ret_on) >= 0);
    CHECK_FALSE(snap_depths(loop, 1, 1, 1).is_snapped);
}

TEST_CASE("boundary: a string whose work is all in one year is split from the fold or from the station, "
          "within the plan's years") {
    const auto scene = make_scene(small_view());
    const StringLoop loop = loop_of(*scene, "S-01");
    Plan plan = scene->view->plan;
    for (const PoleIx lamp : loop.lamps) plan.poles[lamp.place()].year = 2029;
    CHECK(boundaries_of(loop, plan).empty());
    const std::vector<Boundary> ends = end_boundaries(loop, plan, 2030);
    REQUIRE(ends.size() == 2);
    CHECK(ends[0].year == 2028);
    CHECK(ends[1].next_year == 2030);
    const BoundaryMove earlier = move_boundary(loop, plan, ends[0], ends[0].out_on - 2, ends[0].ret_on - 2);
    CHECK(earlier.moved == 4);
    CHECK(earlier.year == 2028);
    CHECK(boundaries_of(loop, earlier.plan).size() == 1);
    const BoundaryMove later = move_boundary(loop, plan, ends[1], 3, 3);
    CHECK(later.moved == 6);
    CHECK(later.year == 2030);
    for (const PoleIx lamp : loop.lamps) plan.poles[lamp.place()].year = 2027;
    CHECK(end_boundaries(loop, plan, 2030).size() == 1);
    for (const PoleIx lamp : loop.lamps) plan.poles[lamp.place()].year = 0;
    const std::vector<Boundary> idle = end_boundaries(loop, plan, 2030);
    REQUIRE(idle.size() == 1);
    CHECK(move_boundary(loop, plan, idle[0], 0, 0).year == 2030);
}
