#include "model/solar/battery.h"

#include <cmath>
#include <random>
#include <vector>

#include <catch2/catch.hpp>

#include "model/solar/battery_life.h"

using namespace unstring;

namespace {

const SunYear& sun_at_40() {
    static const SunYear sun = make_sun_year({0, 40}, DayModel::cooper, 60);
    return sun;
}

/// A battery that takes a unit every evening.
BatteryGroup unit_a_night(double capacity) {
    std::vector<double> load(kHours, 0.0);
    for (std::size_t day = 0; day < kDays; ++day) load[day * 24 + 20] = 1;
    const std::vector<double> air(kHours, 25.0);
    BatteryTerms battery;
    battery.capacity_wh = capacity;
    battery.charge_frac = battery.discharge_frac = 1;
    battery.soc_min = 0;
    BatteryGroup group;
    for (std::size_t lane = 0; lane < kLanes; ++lane) set_lane(group, lane, sun_at_40(), load, air, battery);
    return group;
}

} // namespace

// Exact: two units or none come by day, one goes at night, so that the charge after the night walks by one up
// or down between 0 and N; at 0 a step down is a dark night. With r = p / (1 - p) the share of dark nights is
// (1 - p) (1 - r) / (1 - r^(N + 1)). Seed 11; the error is that of 240 years taken one by one.
TEST_CASE("battery: a random walk goes dark as often as its closed form says, within three standard errors") {
    struct Row {
        int n;
        double p, dark;
    };
    for (const Row& row :
         {Row{5, .6, .019248}, Row{3, .6, .049231}, Row{5, .5, .083333}, Row{10, .55, .012358}}) {
        constexpr std::size_t kYears = 60;
        std::mt19937_64 random(11);
        std::bernoulli_distribution is_sunny(row.p);
        std::vector<double> yield(kYears * kHours * kLanes, 0.0);
        for (std::size_t day = 0; day < kYears * kDays; ++day)
            for (std::size_t lane = 0; lane < kLanes; ++lane)
                if (is_sunny(random)) yield[(day * 24 + 13) * kLanes + lane] = 2;
        const auto runs =
            run_batteries(sun_at_40(), unit_a_night(row.n + 1), yield, {1, 1, 1, 1}, 2, nullptr);
        std::vector<double> shares;
        for (const BatteryRun& run : runs)
            for (const int dark : run.dark_in_year) shares.push_back(dark / 365.0);
        double mean = 0;
        for (const double share : shares) mean += share / static_cast<double>(shares.size());
        double square = 0;
        for (const double share : shares) square += (share - mean) * (share - mean);
        const double n = static_cast<double>(shares.size());
        const double error = std::sqrt(square / (n - 1) / n);
        CAPTURE(row.n, row.p, mean, error);
        CHECK(std::abs(mean - row.dark) < 3 * error);
    }
}

// Seed 3.
TEST_CASE("battery: no energy appears or is lost between panel, cells and lamp") {
    std::mt19937_64 random(3);
    std::uniform_real_distribution<double> light(0, 0.1);
    std::vector<double> yield(2 * kHours * kLanes, 0.0);
    for (std::size_t hour = 0; hour < 2 * kHours; ++hour)
        if (hour % 24 > 8 && hour % 24 < 16) yield[hour * kLanes] = light(random);
    std::vector<double> load(kHours, 0.0);
    for (std::size_t hour = 0; hour < kHours; ++hour)
        if (hour % 24 > 17 || hour % 24 < 6) load[hour] = 12;
    BatteryTerms battery;
    battery.capacity_wh = 1e6; // never full, never empty: what goes in stays in until it goes out
    BatteryGroup group;
    set_lane(group, 0, sun_at_40(), load, std::vector<double>(kHours, 20.0), battery);
    const auto run = run_batteries(sun_at_40(), group, yield, {100}, 0, nullptr)[0];
    double in = 0;
    for (const double month : run.supply_kwh) in += 2 * month * 1000 * battery.charge_frac;
    double out = 0;
    for (const double month : group.demand_kwh[0]) out += 2 * month * 1000 / battery.discharge_frac;
    CHECK(run.unmet_kwh == 0);
    CHECK(run.final_soc * battery.capacity_wh == Approx(1e6 - out + in).margin(1));
}

TEST_CASE("battery: nights are counted noon to noon, and a run of dark ones is found") {
    std::vector<double> yield(1 * kHours * kLanes, 0.0);
    for (std::size_t day = 0; day < kDays; ++day)
        if (day < 100 || day >= 110) yield[(day * 24 + 13) * kLanes] = 1;
    const auto run = run_batteries(sun_at_40(), unit_a_night(1), yield, {1}, 0, nullptr)[0];
    CHECK(run.dark_in_year == std::vector<int>{10});
    CHECK(run.longest_dark_run == 10);
    CHECK(run.unmet_kwh == Approx(0.010));
}

TEST_CASE("battery: cold stops the charge, lowers what can be used, and idle days cost self-discharge") {
    std::vector<double> load(kHours, 0.0);
    std::vector<double> yield(kHours * kLanes, 0.0);
    for (std::size_t day = 0; day < kDays; ++day) yield[(day * 24 + 12) * kLanes] = 1;
    BatteryTerms battery;
    battery.capacity_wh = 100;
    battery.cold_charge_c = 0;
    battery.lost_frac_day = 0.01;
    BatteryGroup cold, mild;
    set_lane(cold, 0, sun_at_40(), load, std::vector<double>(kHours, -1.0), battery);
    set_lane(mild, 0, sun_at_40(), load, std::vector<double>(kHours, 1.0), battery);
    CHECK(run_batteries(sun_at_40(), cold, yield, {100}, 0, nullptr)[0].final_soc ==
          Approx(std::pow(.99, 365)));
    CHECK(run_batteries(sun_at_40(), mild, yield, {100}, 0, nullptr)[0].final_soc > 0.98);
    CHECK(usable_frac(25) == 1);
    CHECK(usable_frac(0) == Approx(.90));
    CHECK(usable_frac(-20) == Approx(.75));
    CHECK(usable_frac(12.5) == Approx(.95));
}

TEST_CASE("battery: lanes do not touch each other") {
    std::vector<double> yield(kHours * kLanes, 0.0);
    for (std::size_t day = 0; day < kDays; ++day) yield[(day * 24 + 13) * kLanes + 2] = 1;
    const auto runs = run_batteries(sun_at_40(), unit_a_night(1), yield, {1, 1, 1, 1}, 0, nullptr);
    CHECK(runs[2].dark_a_year() == 0);
    CHECK(runs[1].dark_a_year() > 360);
    CHECK(runs[1].dark_a_year() == runs[3].dark_a_year());
}

TEST_CASE("battery life: a year of deep daily cycles in heat ends before the cap, an idle cool battery "
          "reaches it") {
    std::vector<float> deep(kHours), idle(kHours, 0.6F);
    for (std::size_t hour = 0; hour < kHours; ++hour) deep[hour] = hour % 24 < 12 ? 0.05F : 1.0F;
    std::array<double, 12> hot{}, cool{};
    hot.fill(45);
    cool.fill(10);
    CHECK(battery_life_yr(sun_at_40(), charge_history(sun_at_40(), deep), hot) < kLifeCap_yr);
    CHECK(battery_life_yr(sun_at_40(), charge_history(sun_at_40(), idle), cool) == kLifeCap_yr);
    CHECK(charge_history(sun_at_40(), idle).c_rate == 0);
}
