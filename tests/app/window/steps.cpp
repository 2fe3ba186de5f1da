#include <catch2/catch.hpp>

#include <QApplication>
#include <QComboBox>
#include <QContextMenuEvent>
#include <QLabel>
#include <QLineEdit>
#include <QMenu>
#include <QPushButton>
#include <QTest>
#include <QTreeWidget>

#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

TEST_CASE("step line: a running step shows how far it is, can be cancelled, and no edit slips in") {
    auto view = small_view();
    view->steps[3].standing = StepStanding::stale;
    const auto city = small_city(view);
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    auto* run = window.findChild<QPushButton*>("run_next");
    auto* cancel = window.findChild<QPushButton*>("cancel_step");
    CHECK(run->text() == "Run decide");
    CHECK_FALSE(cancel->isVisible());
    QTest::mouseClick(run, Qt::LeftButton);
    CHECK(window.desk().running_step() == Step::decide);
    CHECK(cancel->isVisible());
    REQUIRE(QTest::qWaitFor([&] { return window.desk().running_frac() > 0.1; }, 5000));
    save_picture(window, "step_running");
    window.desk().select({find_pole(city->view->city, "01-102")});
    QTest::keyClick(&window, Qt::Key_K);
    CHECK(city->labels.empty());
    QTest::mouseClick(cancel, Qt::LeftButton);
    REQUIRE(QTest::qWaitFor([&] { return !window.desk().is_running(); }, 5000));
    CHECK(city->steps_cancelled == 1);
    CHECK(city->steps_ended == 0);
    CHECK(window.findChild<QLabel*>("notice")->text().contains("as it was before"));
    CHECK(run->isVisible());
}

TEST_CASE("step line: a step runs to its end by its own word, and the window says how long it took") {
    auto view = small_view();
    view->steps[2].standing = StepStanding::not_yet;
    const auto city = small_city(view);
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    QTest::mouseClick(window.findChild<StepKnot*>("step_shade"), Qt::LeftButton, Qt::NoModifier,
                      QPoint(40, 18));
    REQUIRE(QTest::qWaitFor([&] { return city->steps_ended == 1 && !window.desk().is_running(); }, 8000));
    CHECK(window.findChild<QLabel*>("notice")->text().startsWith("shade took"));
}

TEST_CASE("step line: a step with findings opens them, and one click leads to the pole") {
    const auto city = small_city();
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    QTest::mouseClick(window.findChild<StepKnot*>("step_vet"), Qt::LeftButton, Qt::NoModifier,
                      QPoint(40, 18));
    auto* list = window.findChild<QTreeWidget*>("findings_list");
    REQUIRE(list->isVisible());
    QTreeWidgetItem* finding = list->topLevelItem(0)->child(0);
    list->setCurrentItem(finding);
    REQUIRE(window.desk().selection().size() == 1);
    CHECK(window.findChild<QLabel*>("finding_detail")->text().contains("row"));
    CHECK(list->isVisible());
}

TEST_CASE("step line: a vet stopped by errors offers to set their records aside, and only then") {
    auto view = small_view();
    view->findings.push_back(make_finding("pole-id-twice", "poles.csv", 30, "02-111", "the id of row 29",
                                          "an id of its own", "Give one of them another id", "poles"));
    view->steps[1] = {StepStanding::stopped, 1, 2, "2026-11-30T10:41:00"};
    const auto city = small_city(view);
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    QTest::mouseClick(window.findChild<StepKnot*>("step_vet"), Qt::LeftButton, Qt::NoModifier,
                      QPoint(40, 18));
    auto* aside = window.findChild<QPushButton*>("set_aside");
    REQUIRE(aside->isVisible());
    save_picture(window, "vet_stopped");
    QTest::mouseClick(aside, Qt::LeftButton);
    REQUIRE(QTest::qWaitFor([&] { return !window.desk().is_running(); }, 5000));
    CHECK_FALSE(aside->isVisible());
}

TEST_CASE("step line: the menu of a step that is up to date runs it again") {
    const auto city = small_city();
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    auto* knot = window.findChild<StepKnot*>("step_vet");
    QContextMenuEvent ask(QContextMenuEvent::Keyboard, QPoint(20, 20), knot->mapToGlobal(QPoint(20, 20)));
    QApplication::sendEvent(knot, &ask);
    auto* menu = window.findChild<QMenu*>("step_menu");
    REQUIRE(menu != nullptr);
    menu->actions().front()->trigger();
    CHECK(window.desk().running_step() == Step::vet);
    menu->close();
    window.desk().cancel();
    REQUIRE(QTest::qWaitFor([&] { return !window.desk().is_running(); }, 5000));
}

TEST_CASE("hand out: the dialogue shows the cautions, and hands folder, year, crew and paper to the step") {
    const auto city = small_city();
    MainWindow window(closed_doors());
    window.show();
    window.show_project(link_to(city));
    settle();
    QTest::mouseClick(window.findChild<StepKnot*>("step_hand_out"), Qt::LeftButton, Qt::NoModifier,
                      QPoint(40, 18));
    auto* dialog = window.findChild<QDialog*>("hand_out_dialog");
    REQUIRE(dialog != nullptr);
    settle();
    save_picture(*dialog, "hand_out");
    CHECK(dialog->findChild<QLabel*>("standing_cautions")->text().contains("never open a live string"));
    dialog->findChild<QLineEdit*>("hand_out_folder")->setText("/tmp/orders");
    dialog->findChild<QComboBox*>("hand_out_year")->setCurrentIndex(2);
    dialog->findChild<QComboBox*>("hand_out_crew")->setCurrentIndex(1);
    dialog->findChild<QComboBox*>("hand_out_paper")->setCurrentIndex(1);
    QTest::mouseClick(dialog->findChild<QPushButton*>("hand_out_write"), Qt::LeftButton);
    REQUIRE(QTest::qWaitFor([&] { return !window.desk().is_running() && !city->handed_out.empty(); }, 5000));
    CHECK(city->handed_out[0].to == "/tmp/orders");
    CHECK(city->handed_out[0].year == 2028);
    CHECK(city->handed_out[0].crew == "line");
    CHECK(city->handed_out[0].paper == "letter");
    CHECK(window.findChild<QLabel*>("notice")->text().contains("1 file"));
}

TEST_CASE("start page: a file that cannot be opened is said with what to do, and the page stays") {
    MainWindow window(closed_doors());
    window.show();
    CHECK(window.findChild<QWidget*>("start_page")->isVisible());
    CHECK_FALSE(window.open_path("/no/such/city.unstring"));
    CHECK(window.findChild<QLabel*>("notice")->text().contains("/no/such/city.unstring"));
    CHECK(window.findChild<QLabel*>("notice")->text().contains("Choose another file"));
    CHECK(window.findChild<QWidget*>("start_page")->isVisible());
}
