// Battery and lamp: the deterministic case, rainflow, ageing.

#include <array>
#include <map>

#include <catch2/catch.hpp>

#include "model/solar/battery_life.h"
#include "model/solar/night.h"

using namespace unstring;

namespace {

NightCase deterministic_case() {
    NightCase night;
    night.place = {0, 40};
    night.clearness = {.42, .46, .50, .52, .54, .57, .59, .58, .55, .51, .43, .39};
    night.temp_c = {0, 2, 7, 12, 17, 22, 25, 24, 19, 13, 6, 1};
    night.panel_wp = 100;
    night.battery.capacity_wh = 400;
    night.led_w = 12;
    night.sun_step_min = 60;
    return night;
}

}  // namespace

// Source: computed twice, by this program and by the one that made the figures; no publication claims it.
TEST_CASE("battery: the deterministic case of one year comes out to its printed digits") {
    const NightAnswer answer = run_night(deterministic_case());
    CHECK(answer.ghi_kwh_m2 == Approx(1506.680).margin(5e-4));
    CHECK(answer.panel_kwh == Approx(132.113).margin(5e-4));
    CHECK(answer.demand_kwh == Approx(48.760).margin(5e-4));
    CHECK(answer.unmet_kwh == Approx(1.24995).margin(5e-6));
    CHECK(answer.nights_dark_year == 48);
    CHECK(answer.cycles_year == Approx(122.449).margin(5e-4));
    CHECK(answer.final_soc == Approx(.2270).margin(5e-5));
    CHECK(answer.lit_h_year == Approx(4063.3).margin(0.05));
    CHECK(answer.worst_month == 12);
    CHECK(answer.shade_score == Approx(0).margin(1e-12));
}
