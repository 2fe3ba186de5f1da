#include <catch2/catch.hpp>

#include <QApplication>

#include "tests/app/window/small_city.h"

using namespace unstring;
using namespace unstring::test;

TEST_CASE("window: day and night sheets, at 100 and 200 %, are drawn full and kept as pictures") {
    MainWindow window(closed_doors());
    window.resize(1600, 1000);
    window.show();
    settle();
    save_picture(window, "start");
    CHECK(drawn_frac(window) > 0.01);
    window.show_project(link_to(small_city()));
    Desk& desk = window.desk();
    desk.set_year(2029);
    desk.select({find_pole(desk.view().city, "02-110")});
    settle();
    save_picture(window, "window_day");
    save_picture(window, "window_day_2x", 2);
    CHECK(drawn_frac(window) > 0.2);
    desk.set_night(true);
    settle();
    save_picture(window, "window_night");
    desk.set_night(false);
    window.resize(1024, 640);
    settle();
    save_picture(window, "window_small", 2);
    window.resize(1600, 1000);
    window.show_side(MainWindow::Side::string);
    settle();
    save_picture(window, "side_string");
    window.show_side(MainWindow::Side::findings);
    settle();
    save_picture(window, "side_findings");
}
