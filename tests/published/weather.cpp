// The day's sun outside the atmosphere, diffuse light, the hours of a day, the spread and the sequence of
// days. D&B: J.A. Duffie, W.A. Beckman, Solar Engineering of Thermal Processes, 4th ed. (2013), examples from
// memory; the figures to more digits were computed twice.

#include <algorithm>
#include <cmath>
#include <vector>

#include <catch2/catch.hpp>

#include "model/quantities.h"
#include "model/sun/clearness.h"
#include "model/sun/daily_sun.h"
#include "model/sun/diffuse.h"
#include "model/sun/generated_weather.h"
#include "model/sun/sun_year.h"

using namespace unstring;

namespace {

constexpr double kMJ = 3600.0 / 1e6; // per Wh

} // namespace

// Source: D&B examples 1.10.1 and 1.10.2 (33.8 and 3.79 MJ/m2, from memory).
TEST_CASE(
    "sun of the day: irradiation outside the atmosphere at 43 N on 15 April, the day and one hour of it") {
    const double declination = cooper_declination_deg(105);
    CHECK(declination == Approx(9.415).margin(5e-4));
    CHECK(sunset_hour_angle_deg(43, declination) == Approx(98.895).margin(5e-4));
    CHECK(day_outside_wh_m2(43, declination, 105) * kMJ == Approx(33.775).margin(5e-4));
    CHECK(hours_outside_wh_m2(43, declination, 105, -30, -15) * kMJ == Approx(3.7905).margin(5e-5));
}

// Source: FAO Irrigation and Drainage Paper 56 (1998), example 8: 32.2 MJ/m2 at 20 S on 3 September; its own
// declination and solar constant (0.0820 MJ/m2 min).
TEST_CASE("sun of the day: the worked example of FAO 56") {
    const double declination_deg = 0.409 * std::sin(2 * std::numbers::pi * 246 / 365 - 1.39) / kRadPerDeg;
    CHECK(declination_deg * kRadPerDeg == Approx(.120).margin(5e-4));
    CHECK(sunset_hour_angle_deg(-20, declination_deg) * kRadPerDeg == Approx(1.527).margin(5e-4));
    CHECK(distance_factor(246) == Approx(.985).margin(5e-4));
    CHECK(day_outside_wh_m2(-20, declination_deg, 246, 0.0820e6 / 60) * kMJ == Approx(32.2).margin(0.05));
}

// Source: computed twice; the days are S.A. Klein's mean days of the months, Solar Energy 19 (1977) 325.
TEST_CASE("sun of the day: the mean days of the months at 40 N") {
    const std::vector<int> days = {17, 47, 75, 105, 135, 162, 198, 228, 258, 288, 318, 344};
    const std::vector<double> mj = {15.2, 20.5, 27.4, 34.6, 39.7, 41.8, 40.7, 36.5, 30.0, 22.5, 16.4, 13.8};
    for (std::size_t i = 0; i < days.size(); ++i)
        CHECK(day_outside_wh_m2(40, cooper_declination_deg(days[i]), days[i]) * kMJ ==
              Approx(mj[i]).margin(0.05));
}

TEST_CASE("sun of the day: polar night and polar day are clamped") {
    CHECK(sunset_hour_angle_deg(80, -23) == 0);
    CHECK(sunset_hour_angle_deg(80, 23) == 180);
    CHECK(day_outside_wh_m2(80, -23, 355) == 0);
}

// Source: D.G. Erbs et al., Solar Energy 28 (1982) 293-302; first two rows pvlib-python test_erbs.
TEST_CASE("diffuse: the hourly fraction of Erbs") {
    struct Row {
        double clearness, frac;
    };
    for (const Row& row : {Row{.405723511, .831407}, Row{.718132729, .217860}, Row{.4, .83999},
                           Row{.5, .65915}, Row{.6, .43948}, Row{.8, .16527}})
        CHECK(erbs_hour_frac(row.clearness) == Approx(row.frac).margin(5e-6));
    CHECK(erbs_hour_frac(.9) == .165);
    CHECK(erbs_hour_frac(.1) == Approx(.991));
}

// Source: the same paper; daily constants as in the open package solaR, monthly ones from memory.
TEST_CASE("diffuse: the daily and the monthly fraction of Erbs") {
    struct Row {
        double clearness, winter, summer;
    };
    for (const Row& row : {Row{.3, .8920, .8778}, Row{.5, .5688, .6083}, Row{.7, .1641, .2357}}) {
        CHECK(erbs_day_frac(row.clearness, 81.4) == Approx(row.winter).margin(5e-5));
        CHECK(erbs_day_frac(row.clearness, 81.5) == Approx(row.summer).margin(5e-5));
    }
    for (const Row& row : {Row{.3, .6423, .6637}, Row{.5, .3911, .4291}, Row{.7, .2186, .2502}}) {
        CHECK(erbs_month_frac(row.clearness, 81.4) == Approx(row.winter).margin(5e-5));
        CHECK(erbs_month_frac(row.clearness, 81.5) == Approx(row.summer).margin(5e-5));
    }
}

// Source: D&B example 2.11.1 (St Louis, 3 September, 23.0 MJ/m2). The book rounds the clearness to .69 and
// gets .26.
TEST_CASE("diffuse: a day at 38.6 N") {
    const double declination = cooper_declination_deg(246);
    const double outside = day_outside_wh_m2(38.6, declination, 246) * kMJ;
    CHECK(outside == Approx(33.25).margin(5e-3));
    CHECK(23.0 / outside == Approx(.6916).margin(1e-4));
    CHECK(erbs_day_frac(23.0 / outside, sunset_hour_angle_deg(38.6, declination)) ==
          Approx(.2528).margin(1e-4));
}

// Source: D&B examples 2.13.1 (.076) and 2.13.3 (.108, .102), from memory.
TEST_CASE("hours of a day: shares of global and diffuse") {
    const double melbourne = sunset_hour_angle_deg(-38, cooper_declination_deg(17));
    CHECK(hour_share_global(-52.5, melbourne) == Approx(.07585).margin(5e-6));
    const double madison = sunset_hour_angle_deg(43, cooper_declination_deg(162));
    CHECK(hour_share_global(22.5, madison) == Approx(.10845).margin(5e-6));
    CHECK(hour_share_diffuse(22.5, madison) == Approx(.10148).margin(5e-6));
}

// Source: computed twice.
TEST_CASE("hours of a day: the global share adds up to about 1, the diffuse one exactly") {
    struct Row {
        double sunset_deg, sum;
    };
    for (const Row& row :
         {Row{60, 1.0017}, Row{75, .9927}, Row{90, .9917}, Row{105, .9978}, Row{115, 1.0041}}) {
        double global = 0;
        double diffuse = 0;
        constexpr double kStep_deg = 0.01;
        for (double angle = -row.sunset_deg + kStep_deg / 2; angle < row.sunset_deg; angle += kStep_deg) {
            global += hour_share_global(angle, row.sunset_deg) * kStep_deg / 15;
            diffuse += hour_share_diffuse(angle, row.sunset_deg) * kStep_deg / 15;
        }
        CHECK(global == Approx(row.sum).margin(5e-5));
        CHECK(diffuse == Approx(1).margin(1e-6));
    }
}

// Source: P. Bendt et al., Solar Energy 27 (1981) 1-5; figures computed twice.
TEST_CASE("clearness: the distribution of days about a monthly mean") {
    struct Row {
        double mean, largest, exponent, below_2, below_4, below_6;
        std::vector<double> at; // shares .05 .1 .25 .5 .75 .9
    };
    const std::vector<Row> rows = {
        {.3, .6914, -2.1252, .3668, .7051, .9263, {.068, .086, .147, .269, .434, .571}},
        {.4, .7354, 0.1863, .2081, .4947, .7922, {.086, .123, .230, .404, .572, .671}},
        {.5, .7646, 2.2720, .0997, .2984, .6113, {.132, .200, .359, .539, .666, .728}},
        {.6, .7915, 4.6209, .0336, .1357, .3930, {.247, .349, .512, .648, .732, .769}},
        {.7, .8182, 8.3725, .0040, .0286, .1596, {.464, .545, .653, .736, .784, .806}}};
    const std::vector<double> shares = {.05, .1, .25, .5, .75, .9};
    for (const Row& row : rows) {
        const ClearnessDistribution days(row.mean);
        CHECK(days.largest() == Approx(row.largest).margin(5e-5));
        CHECK(days.exponent() == Approx(row.exponent).margin(5e-5));
        CHECK(days.share_below(.2) == Approx(row.below_2).margin(5e-5));
        CHECK(days.share_below(.4) == Approx(row.below_4).margin(5e-5));
        CHECK(days.share_below(.6) == Approx(row.below_6).margin(5e-5));
        for (std::size_t i = 0; i < shares.size(); ++i)
            CHECK(days.at_share(shares[i]) == Approx(row.at[i]).margin(5e-4));
    }
}

// Source: R. Aguiar et al., Solar Energy 40 (1988) 269-279: stationary laws of matrices from measured series.
// The two agree within .06 of the share of days, up to a clearness of .5.
TEST_CASE("clearness: the distribution is near that of measured days, and darker in the tail") {
    struct Row {
        double mean;
        std::vector<double> measured; // shares below .2 .3 .4 .5
    };
    for (const Row& row : {Row{.241, {.500, .714, .815, .913}}, Row{.334, {.270, .472, .638, .797}},
                           Row{.429, {.116, .248, .418, .611}}, Row{.526, {.046, .098, .197, .373}},
                           Row{.620, {.016, .044, .082, .157}}, Row{.668, {.006, .019, .045, .096}}})
        for (std::size_t i = 0; i < row.measured.size(); ++i)
            CHECK(ClearnessDistribution(row.mean).share_below(.2 + .1 * static_cast<double>(i)) ==
                  Approx(row.measured[i]).margin(.06));
}

// Source: bivariate and trivariate normal integrals; lag-1 and spreads computed twice. 2 000 years of days,
// seed 7; the margins are four standard errors.
TEST_CASE("days in sequence: dark days follow dark days as often as the method says") {
    std::array<double, 12> months{};
    months.fill(0.5);
    const std::vector<double> days = generate_clearness(months, 2000, 7);
    const double worst_tenth = ClearnessDistribution(0.5).at_share(0.1);
    double sum = 0, squares = 0, product = 0, two = 0, three = 0;
    for (std::size_t i = 0; i + 2 < days.size(); ++i) {
        const bool is_dark = days[i] <= worst_tenth;
        two += is_dark && days[i + 1] <= worst_tenth;
        three += is_dark && days[i + 1] <= worst_tenth && days[i + 2] <= worst_tenth;
        sum += days[i];
        squares += days[i] * days[i];
        product += days[i] * days[i + 1];
    }
    const double n = static_cast<double>(days.size() - 2);
    const double mean = sum / n;
    const double variance = squares / n - mean * mean;
    CHECK(two / n == Approx(.021148).margin(.0008));
    CHECK(three / n == Approx(.0046177).margin(.0004));
    CHECK(mean == Approx(.5).margin(.0013));
    CHECK(std::sqrt(variance) == Approx(.1936).margin(.001));
    CHECK((product / n - mean * mean) / variance == Approx(.2751).margin(.005));
    double months_squares = 0;
    const std::size_t blocks = days.size() / 30;
    for (std::size_t block = 0; block < blocks; ++block) {
        double block_sum = 0;
        for (std::size_t i = 0; i < 30; ++i) block_sum += days[block * 30 + i];
        months_squares += (block_sum / 30 - mean) * (block_sum / 30 - mean);
    }
    CHECK(std::sqrt(months_squares / static_cast<double>(blocks)) == Approx(.0466).margin(.001));
}

// Source: computed with the exact sun of 2025 in steps of 2 minutes; here 5-minute steps and the fast sun.
TEST_CASE("nights: hours of darkness in a year by latitude and switching height") {
    struct Row {
        double lat_deg, at_833, at_3, at_5, at_6;
    };
    for (const Row& row : {Row{0, 4337, 4228, 4127, 4076}, Row{20, 4327, 4210, 4100, 4046},
                           Row{40, 4306, 4157, 4019, 3950}, Row{60, 4240, 3969, 3705, 3559}}) {
        const SunYear year = make_sun_year({0, row.lat_deg}, DayModel::psa, 60);
        CHECK(hours_below(year, -.833) == Approx(row.at_833).margin(4));
        CHECK(hours_below(year, -3) == Approx(row.at_3).margin(4));
        CHECK(hours_below(year, -5) == Approx(row.at_5).margin(4));
        CHECK(hours_below(year, -6) == Approx(row.at_6).margin(4));
    }
}
