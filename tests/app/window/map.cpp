#include <catch2/catch.hpp>

#include <QApplication>
#include <QTest>
#include <QWheelEvent>

#include <algorithm>
#include <random>

#include "app/window/map/year_strip.h"
#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

TEST_CASE("pick grid: the nearest pole is the one that a look at every pole finds") {
    const unsigned seed = 7;
    CAPTURE(seed);
    std::mt19937 dice(seed);
    std::uniform_real_distribution<double> place(0, 3000);
    std::vector<PickGrid::Place> places;
    for (std::uint32_t i = 0; i < 5000; ++i) places.push_back({{place(dice), place(dice) / 7}, i});
    const PickGrid grid(places);
    for (int click = 0; click < 10000; ++click) {
        const MapPoint at{place(dice), place(dice) / 7};
        std::optional<std::uint32_t> best;
        double best_m = 12;
        for (const PickGrid::Place& other : places)
            if (const double far_m = distance_m(at, other.at); far_m < best_m)
                best_m = far_m, best = other.record;
        REQUIRE(grid.nearest(at, 12) == best);
    }
}

TEST_CASE("pick grid: poles on one line, on one place, or none at all are no trouble") {
    CHECK_FALSE(PickGrid().nearest({0, 0}, 5).has_value());
    CHECK(PickGrid({{{5, 5}, 3}, {{5, 5}, 2}}).nearest({5, 5}, 1) == 2u);
    std::vector<PickGrid::Place> line;
    for (std::uint32_t i = 0; i < 1000; ++i) line.push_back({{10.0 * i, 0}, i});
    CHECK(PickGrid(line).nearest({5004, 1}, 9) == 500u);
}

TEST_CASE("map: the wheel zooms about the pointer, a drag pans by as much as the hand moves") {
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(small_city()));
    settle();
    auto* map = window.findChild<MapView*>("map");
    const QPointF at(300, 120);
    const MapPoint held = map->camera().to_map(at);
    const double scale = map->camera().m_per_px;
    QWheelEvent wheel(at, map->mapToGlobal(at), QPoint(), QPoint(0, 240), Qt::NoButton, Qt::NoModifier,
                      Qt::NoScrollPhase, false);
    QApplication::sendEvent(map, &wheel);
    CHECK(map->camera().m_per_px < scale);
    CHECK(distance_m(map->camera().to_map(at), held) < 1e-6);

    const QPoint empty(40, 60);
    const MapPoint before = map->camera().centre;
    QTest::mousePress(map, Qt::LeftButton, Qt::NoModifier, empty);
    QTest::mouseMove(map, empty + QPoint(50, 20));
    QTest::mouseMove(map, empty + QPoint(100, 40));
    QTest::mouseRelease(map, Qt::LeftButton, Qt::NoModifier, empty + QPoint(100, 40));
    CHECK(map->camera().centre.x_m == Approx(before.x_m - 100 * map->camera().m_per_px));
    CHECK(map->camera().centre.y_m == Approx(before.y_m + 40 * map->camera().m_per_px));
    CHECK(window.desk().selection().empty());
}

TEST_CASE("map: the pixels after twenty pans are those of a fresh paint") {
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(small_city()));
    settle();
    auto* map = window.findChild<MapView*>("map");
    const unsigned seed = 42;
    CAPTURE(seed);
    std::mt19937 dice(seed);
    for (int pan = 0; pan < 20; ++pan) {
        const QPoint from(200, 150), to = from + QPoint(int(dice() % 240) - 120, int(dice() % 160) - 80);
        QTest::mousePress(map, Qt::LeftButton, Qt::NoModifier, from);
        QTest::mouseMove(map, (from + to) / 2);
        QTest::mouseMove(map, to);
        QTest::mouseRelease(map, Qt::LeftButton, Qt::NoModifier, to);
        (void)map->grab();
    }
    window.desk().select({});
    QTest::mouseMove(map, QPoint(5, 5));
    settle();
    const QImage panned = map->grab().toImage();
    Q_EMIT window.desk().look_changed(); // throws every cached picture away
    settle();
    CHECK(panned == map->grab().toImage());
}

TEST_CASE("map: arrow keys walk along the string, brackets change the year looked at") {
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city();
    window.show_project(link_to(city));
    settle();
    auto* map = window.findChild<MapView*>("map");
    window.desk().select({find_pole(city->view->city, "02-105")});
    QTest::keyClick(map, Qt::Key_Right);
    CHECK(window.desk().selection().front() == find_pole(city->view->city, "02-106"));
    QTest::keyClick(map, Qt::Key_Left);
    QTest::keyClick(map, Qt::Key_Left);
    CHECK(window.desk().selection().front() == find_pole(city->view->city, "02-104"));
    CHECK(window.desk().year() == 2027);
    QTest::keyClick(map, Qt::Key_BracketRight);
    CHECK(window.desk().year() == 2028);
    for (int i = 0; i < 4; ++i) QTest::keyClick(map, Qt::Key_BracketLeft);
    CHECK(window.desk().year() == 2026);
}

TEST_CASE("map: the year slider follows the mouse") {
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(small_city()));
    settle();
    auto* strip = window.findChild<YearStrip*>("year_strip");
    QTest::mouseClick(strip, Qt::LeftButton, Qt::NoModifier,
                      strip->place_of_year(2030).toPoint() - QPoint(0, 8));
    CHECK(window.desk().year() == 2030);
}

TEST_CASE("live loop: without cut-backs the whole cable stays live until the last lamp is off; with them the "
          "far end dies") {
    const auto scene = make_scene(small_view());
    const Plan& plan = scene->view->plan;
    const StringLoop& jumpered = scene->loops[1];
    const LiveLoop one = live_loop(jumpered, plan, 2029);
    CHECK(one.lamps > 0);
    CHECK(std::count(one.legs.begin(), one.legs.end(), 1) == long(one.legs.size()));
    const LiveLoop none = live_loop(jumpered, plan, 2031);
    CHECK(none.lamps == 0);
    CHECK(std::count(none.legs.begin(), none.legs.end(), 1) == 0);
    const StringLoop& cut = scene->loops[0];
    const LiveLoop half = live_loop(cut, plan, 2028);
    CHECK_FALSE(half.used.empty());
    CHECK(std::count(half.legs.begin(), half.legs.end(), 0) > 0);
}
