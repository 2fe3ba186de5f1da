#include <catch2/catch.hpp>

#include <QTest>

#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

namespace {

struct Bench {
    Bench() : window(closed_doors()), city(small_city()) {
        window.show();
        window.show_project(link_to(city));
        settle();
        rail = window.findChild<RailView*>("rail");
    }
    [[nodiscard]] Boundary boundary(StringIx string, std::size_t place) {
        return boundaries_of(window.desk().scene().loops[string.place()], city->view->plan)[place];
    }
    MainWindow window;
    std::shared_ptr<SmallCity> city;
    RailView* rail = nullptr;
};

int years_that_differ(const Plan& a, const Plan& b) {
    int count = 0;
    for (std::size_t i = 0; i < a.poles.size(); ++i) count += a.poles[i].year != b.poles[i].year ? 1 : 0;
    return count;
}

} // namespace

TEST_CASE("rail: a boundary dragged shows the ledger while it is held, is one edit when let go, and undoes "
          "as one") {
    Bench bench;
    const StringIx string = find_string(bench.city->view->city, "S-02");
    const Boundary boundary = bench.boundary(string, 1);
    const Plan before = bench.city->view->plan;
    const RailRow row = bench.rail->row_of(string);
    const QPoint from = bench.rail->handle_of(string, boundary).toPoint();
    QWidget* hand = bench.rail->viewport();

    QTest::mousePress(hand, Qt::LeftButton, Qt::NoModifier, from);
    for (int step = 1; step <= 4; ++step) {
        QTest::mouseMove(hand, from - QPoint(int(row.pitch * step / 2), 0));
        settle(5);
    }
    CHECK(bench.window.desk().has_preview());
    CHECK(bench.city->previews > 0);
    CHECK(bench.city->labels.empty());
    CHECK(bench.city->view->plan.poles == before.poles);
    CHECK(bench.rail->drag_text().contains("4 lamps to"));
    save_picture(bench.window, "rail_dragged");

    QTest::mouseRelease(hand, Qt::LeftButton, Qt::NoModifier, from - QPoint(int(row.pitch * 2), 0));
    CHECK(bench.city->labels ==
          std::vector<std::string>{"boundary of S-02: 4 lamps to " + std::to_string(boundary.next_year)});
    CHECK_FALSE(bench.window.desk().has_preview());
    CHECK(years_that_differ(before, bench.city->view->plan) == 4);
    for (const PolePlan& pole : bench.city->view->plan.poles)
        if (pole.year_by == YearBy::hand) CHECK(pole.year == boundary.next_year);

    QTest::keyClick(bench.rail, Qt::Key_Z, Qt::ControlModifier);
    CHECK(bench.city->view->plan.poles == before.poles);
}

TEST_CASE("rail: Escape puts a held boundary back and writes nothing") {
    Bench bench;
    const StringIx string = find_string(bench.city->view->city, "S-02");
    const QPoint from = bench.rail->handle_of(string, bench.boundary(string, 1)).toPoint();
    QTest::mousePress(bench.rail->viewport(), Qt::LeftButton, Qt::NoModifier, from);
    QTest::mouseMove(bench.rail->viewport(), from + QPoint(40, 0));
    settle();
    REQUIRE(bench.window.desk().has_preview());
    QTest::keyClick(bench.rail, Qt::Key_Escape);
    QTest::mouseRelease(bench.rail->viewport(), Qt::LeftButton, Qt::NoModifier, from + QPoint(40, 0));
    CHECK_FALSE(bench.window.desk().has_preview());
    CHECK(bench.city->labels.empty());
}

TEST_CASE("rail: near a cut-back the boundary snaps to it; lamps whose year is locked stay") {
    Bench bench;
    const StringIx string = find_string(bench.city->view->city, "S-01");
    const std::shared_ptr<const Scene> scene = make_scene(bench.city->view);
    const StringLoop& loop = scene->loops[string.place()];
    bench.window.desk().select({loop.lamps[2]});
    bench.window.desk().toggle_year_lock();
    REQUIRE(bench.city->view->plan.poles[loop.lamps[2].place()].year_locked);
    const Boundary boundary = bench.boundary(string, 0);
    const QPoint from = bench.rail->handle_of(string, boundary).toPoint();
    const int by = int(bench.rail->row_of(string).pitch * (boundary.out_on - 2));
    QTest::mousePress(bench.rail->viewport(), Qt::LeftButton, Qt::NoModifier, from);
    QTest::mouseMove(bench.rail->viewport(), from + QPoint(by, 0));
    settle();
    REQUIRE(bench.rail->drag().has_value());
    CHECK(bench.rail->drag()->is_snapped);
    CHECK(cutback_at(loop, bench.rail->drag()->move.out_on, bench.rail->drag()->move.ret_on) >= 0);
    QTest::mouseRelease(bench.rail->viewport(), Qt::LeftButton, Qt::NoModifier, from + QPoint(by, 0));
    CHECK(bench.city->view->plan.poles[loop.lamps[2].place()].year_locked);
}

TEST_CASE("rail: with the keys alone a string is chosen, a boundary moved by a lamp a leg, and undone") {
    Bench bench;
    bench.rail->setFocus();
    QTest::keyClick(bench.rail, Qt::Key_Down);
    QTest::keyClick(bench.rail, Qt::Key_Down);
    const StringIx string = bench.window.desk().chosen_string();
    REQUIRE(string.is_valid());
    const Boundary before = bench.boundary(string, 0);
    QTest::keyClick(bench.rail, Qt::Key_Left, Qt::ControlModifier);
    CHECK(bench.city->labels.size() == 1);
    CHECK(bench.boundary(string, 0).out_on == before.out_on + 1);
    QTest::keyClick(bench.rail, Qt::Key_Z, Qt::ControlModifier);
    CHECK(bench.boundary(string, 0).out_on == before.out_on);
}
