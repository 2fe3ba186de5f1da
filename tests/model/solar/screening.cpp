#include "model/solar/screening.h"

#include <catch2/catch.hpp>

#include "tests/support/shade_scene.h"

using namespace unstring;

TEST_CASE("screening: what stops a head is said in words and numbers, in one order") {
    const Head head = ShadeScene::head("h", 80, 500, 12, 1800); // wind area 0.3 m2
    Pole pole;
    CHECK(what_stops(pole, head).empty());
    pole.epa_allow_m2 = 0.29;
    CHECK(what_stops(pole, head) == "the pole allows 0.29 m2 of wind area, the head has 0.30 m2");
    pole.need_lm = 2500;
    CHECK(what_stops(pole, head) == "2500 lm are needed, the head gives 1800 lm");
    pole.owner = Owner::utility;
    pole.consent = false;
    CHECK(what_stops(pole, head) ==
          "2500 lm are needed, the head gives 1800 lm"); // consent holds back the hand-out only
    pole.critical = true;
    CHECK(what_stops(pole, head) == "critical pole: solar only where solar_ok is yes");
    pole.solar_ok = false;
    CHECK(what_stops(pole, head) == "solar_ok is no at this pole");
}

TEST_CASE("screening: unknown strength, attachments, blank consent and a critical pole with solar_ok do not "
          "stop it") {
    const Head head = ShadeScene::head("h", 80, 500, 12, 1800);
    Pole pole;
    pole.attachments = "camera";
    pole.owner = Owner::other;
    pole.critical = true;
    pole.solar_ok = true;
    pole.need_lm = 1800;
    pole.epa_allow_m2 = 0.3;
    CHECK(what_stops(pole, head).empty());
    CHECK(goal_of(pole, 3) == kCriticalGoal);
    pole.critical = false;
    CHECK(goal_of(pole, 3) == 3);
}
