// Battery and lamp: the deterministic case, rainflow, ageing.

#include <array>
#include <cmath>
#include <map>
#include <utility>
#include <vector>

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

} // namespace

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

// Source: computed twice, day 355 of the same case: irradiation outside the atmosphere, sunset, the hours'
// shares.
TEST_CASE("battery: the shortest day of the deterministic case, step by step") {
    const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    CHECK(sun.days[354].outside_wh_m2 == Approx(3753.036).margin(5e-4));
    CHECK(sun.days[354].sunset_deg == Approx(68.655).margin(5e-4));
    const double global[5] = {.00354, .05504, .10900, .15361, .17881};
    const double diffuse[5] = {.00497, .06509, .11418, .14889, .16686};
    for (std::size_t i = 0; i < 5; ++i) {
        CHECK(sun.global_share[354 * 24 + 7 + i] == Approx(global[i]).margin(5e-6));
        CHECK(sun.diffuse_share[354 * 24 + 7 + i] == Approx(diffuse[i]).margin(5e-6));
    }
    const std::vector<double> load = lamp_load_wh(sun, 1, {});
    double lit_h = 0;
    for (std::size_t h = 0; h < 24; ++h) lit_h += load[354 * 24 + h];
    CHECK(lit_h == Approx(14.0).margin(0.05));
}

// Source: ASTM E1049-85 section 5.4.4, its history; counts as in the open library rainflow, tests, case 1.
TEST_CASE("battery: cycles are counted as in the standard's example") {
    const std::vector<float> history = {-2, 1, -3, 5, -1, 3, -4, 4, -2};
    const std::vector<Cycle> cycles = rainflow(turning_points(history));
    std::map<double, double> counts;
    for (const Cycle& cycle : cycles) counts[cycle.range] += cycle.count;
    CHECK(counts == std::map<double, double>{{3, .5}, {4, 1.5}, {6, .5}, {8, 1.0}, {9, .5}});
    const std::vector<std::pair<double, double>> in_order = {{3, .5}, {4, .5}, {4, 1}, {8, .5},
                                                             {9, .5}, {8, .5}, {6, .5}};
    REQUIRE(cycles.size() == in_order.size());
    for (std::size_t i = 0; i < cycles.size(); ++i) {
        CHECK(cycles[i].range == in_order[i].first);
        CHECK(cycles[i].count == in_order[i].second);
    }
}

// Source: P. Gasper et al., J. Energy Storage (2023) 109042, the cell coded openly by NREL; figures computed
// twice.
TEST_CASE("battery: ageing of the large-format cell") {
    struct Row {
        double temp_c, soc, years, lost_percent;
    };
    for (const Row& row :
         {Row{25, .5, 1, 1.10}, Row{25, .5, 5, 2.57}, Row{25, .5, 10, 3.70}, Row{25, .9, 1, 1.68},
          Row{25, .9, 5, 3.91}, Row{25, .9, 10, 5.63}, Row{40, .9, 10, 13.66}})
        CHECK(100 * calendar_rate(row.temp_c, row.soc) * std::pow(row.years * 365, kCalendarPower) ==
              Approx(row.lost_percent).margin(6e-3));
    struct CycleRow {
        double depth, c_rate, full_cycles, lost_percent;
    };
    for (const CycleRow& row : {CycleRow{.3, .1, 1000, 3.08}, CycleRow{.3, .1, 3000, 7.65},
                                CycleRow{.8, .2, 1000, 4.24}, CycleRow{.8, .2, 3000, 10.53}})
        CHECK(100 * cycle_rate(25, row.depth, row.c_rate) * std::pow(row.full_cycles, kCyclePower) ==
              Approx(row.lost_percent).margin(6e-3));
    const auto to_end = [](double depth, double c_rate) {
        return std::pow(kEndOfLife / cycle_rate(25, depth, c_rate), 1 / kCyclePower);
    };
    CHECK(to_end(.3, .1) == Approx(9576).margin(1));
    CHECK(to_end(.8, .2) == Approx(6512).margin(1));
    CHECK(to_end(1.0, .5) == Approx(3703).margin(1));
}
