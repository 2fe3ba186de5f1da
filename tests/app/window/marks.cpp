#include <catch2/catch.hpp>

#include <QLabel>
#include <QTest>

#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

TEST_CASE(
    "window: a click on a pole opens its card; K R S mark it, L locks it, U clears, undo and redo follow") {
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city();
    window.show_project(link_to(city));
    settle();
    auto* map = window.findChild<MapView*>("map");
    REQUIRE(map != nullptr);
    const PoleIx pole = find_pole(city->view->city, "02-104");
    QTest::mouseClick(map, Qt::LeftButton, Qt::NoModifier, map->place_of(pole).toPoint());
    REQUIRE(window.desk().selection() == std::vector<PoleIx>{pole});
    CHECK(window.findChild<QLabel*>("card_name")->text() == "Pole 02-104");
    CHECK(window.findChild<QLabel*>("rewire_cost")->text() == "$5,862");
    const auto row = [&]() -> const PolePlan& { return city->view->plan.poles[pole.place()]; };

    QTest::keyClick(map, Qt::Key_K);
    CHECK(row().mark == Choice::keep);
    QTest::keyClick(map, Qt::Key_R);
    CHECK(row().mark == Choice::rewire);
    QTest::keyClick(map, Qt::Key_S);
    CHECK(row().mark == Choice::solar);
    CHECK(city->labels.size() == 3);
    CHECK(window.findChild<QPushButton*>("mark_solar")->isChecked());
    QTest::keyClick(map, Qt::Key_L);
    CHECK(row().lock == Choice::solar);
    QTest::keyClick(map, Qt::Key_U);
    CHECK(row().mark == Choice::undecided);
    CHECK(row().lock == Choice::undecided);
    CHECK(city->labels.back() == "clear mark and lock: pole 02-104");

    QTest::keyClick(map, Qt::Key_Z, Qt::ControlModifier);
    CHECK(row().lock == Choice::solar);
    QTest::mouseClick(window.findChild<QPushButton*>("undo"), Qt::LeftButton);
    CHECK(row().lock == Choice::undecided);
    QTest::keyClick(map, Qt::Key_Z, Qt::ControlModifier | Qt::ShiftModifier);
    CHECK(row().lock == Choice::solar);
}

TEST_CASE("window: L without a mark locks the choice of the plan") {
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city();
    window.show_project(link_to(city));
    settle();
    const PoleIx pole = find_pole(city->view->city, "01-102");
    window.desk().select({pole});
    QTest::keyClick(&window, Qt::Key_L);
    CHECK(city->view->plan.poles[pole.place()].lock == city->view->plan.poles[pole.place()].choice);
}

TEST_CASE("window: a shift-drag chooses the poles inside it, and one key marks them all as one edit") {
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city();
    window.show_project(link_to(city));
    settle();
    auto* map = window.findChild<MapView*>("map");
    const QPoint from = (map->place_of(find_pole(city->view->city, "01-106")) + QPointF(-15, -15)).toPoint();
    const QPoint to = (map->place_of(find_pole(city->view->city, "01-110")) + QPointF(-8, 15)).toPoint();
    QTest::mousePress(map, Qt::LeftButton, Qt::ShiftModifier, from);
    QTest::mouseMove(map, (from + to) / 2);
    QTest::mouseMove(map, to);
    QTest::mouseRelease(map, Qt::LeftButton, Qt::ShiftModifier, to);
    const std::size_t chosen = window.desk().selection().size();
    CHECK(chosen >= 4);
    CHECK(chosen < 12);
    for (const PoleIx pole : window.desk().selection())
        CHECK(city->view->city.poles[pole.place()].string == StringIx{0});
    QTest::keyClick(map, Qt::Key_R);
    CHECK(city->labels.size() == 1);
    for (const PoleIx pole : window.desk().selection())
        CHECK(city->view->plan.poles[pole.place()].mark == Choice::rewire);
    CHECK(window.findChild<QLabel*>("card_name")->text() == QString("%1 poles").arg(chosen));
}

TEST_CASE("window: a pole on a parallel circuit takes no mark, and the window says why") {
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city();
    window.show_project(link_to(city));
    settle();
    window.desk().select({find_pole(city->view->city, "P-2")});
    QTest::keyClick(&window, Qt::Key_S);
    CHECK(city->labels.empty());
    CHECK(window.findChild<QLabel*>("notice")->text().contains("nothing to decide"));
}

TEST_CASE("window: a project that is read-only takes no edit, and a banner says who writes") {
    auto view = small_view();
    view->is_read_only = true;
    view->read_only_reason = "written by anna on desk-3 since 10:41";
    MainWindow window(closed_doors());
    window.show();
    const auto city = small_city(view);
    window.show_project(link_to(city));
    settle();
    auto* banner = window.findChild<QLabel*>("read_only_banner");
    CHECK(banner->isVisible());
    CHECK(banner->text().contains("anna on desk-3"));
    window.desk().select({find_pole(city->view->city, "01-102")});
    QTest::keyClick(&window, Qt::Key_S);
    CHECK(city->labels.empty());
    CHECK_FALSE(window.findChild<QPushButton*>("mark_solar")->isEnabled());
}
