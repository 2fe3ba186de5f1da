#include "model/solar/panel_bearing.h"

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("bearing: the arm's from the file and the head's turn, else the street's, else the equator's") {
    City city;
    city.centre = {0, 40};
    Pole pole;
    pole.place = {0, 0};
    CHECK(panel_bearing(arm_bearing(city, pole), 30).bearing_deg == 180);
    CHECK(panel_bearing(arm_bearing(city, pole), 30).from == "south");
    Street street;
    street.line = {{-50, 6}, {50, 6}};
    city.streets.push_back(street);
    CHECK(panel_bearing(arm_bearing(city, pole), 0).bearing_deg == Approx(0));
    CHECK(panel_bearing(arm_bearing(city, pole), 180).bearing_deg == Approx(180));
    CHECK(panel_bearing(arm_bearing(city, pole), 0).from == "street");
    pole.arm_deg = 250;
    CHECK(panel_bearing(arm_bearing(city, pole), 180).bearing_deg == Approx(70));
    CHECK(panel_bearing(arm_bearing(city, pole), 180).from == "file");
}

TEST_CASE("bearing: a street far away says nothing; south of the equator the panel leans north") {
    City city;
    city.centre = {0, -40};
    city.convergence_deg = 2;
    Street street;
    street.line = {{-50, 200}, {50, 200}};
    city.streets.push_back(street);
    Pole pole;
    const PanelBearing bearing = panel_bearing(arm_bearing(city, pole), 0);
    CHECK(bearing.from == "north");
    CHECK(bearing.bearing_deg == Approx(358)); // grid bearing of true north
}
