#include "model/sun/sun_year.h"

#include <cmath>
#include <random>

#include <catch2/catch.hpp>

#include "model/sun/diffuse.h"
#include "model/sun/generated_weather.h"
#include "model/sun/hourly_sky.h"

using namespace unstring;

TEST_CASE("sun year: the hours of a day share out its light, or there is none") {
    for (const double lat : {0.0, 40.0, -55.0, 78.0})
        for (const DayModel model : {DayModel::cooper, DayModel::psa}) {
            const SunYear year = make_sun_year({-75, lat}, model, 60, -5);
            for (std::size_t day = 0; day < kDays; ++day) {
                double global = 0;
                double diffuse = 0;
                for (std::size_t h = 0; h < 24; ++h) {
                    global += year.global_share[day * 24 + h];
                    diffuse += year.diffuse_share[day * 24 + h];
                }
                CHECK((global == 0 || global == Approx(1)));
                CHECK((diffuse == 0 || diffuse == Approx(1)));
            }
        }
}

TEST_CASE("sun year: a night ends in the first hour after mean solar noon, also where that is near the "
          "clock's midnight") {
    const SunYear cooper = make_sun_year({0, 40}, DayModel::cooper, 60);
    CHECK(cooper.noon[0] == 12);
    CHECK(cooper.noon[364] == 364 * 24 + 12);
    const SunYear utc = make_sun_year({-130, 34}, DayModel::psa, 60);
    CHECK(utc.noon[100] % 24 == 21); // 130 degrees west: 8 h 40 min behind
    const SunYear local = make_sun_year({-130, 34}, DayModel::psa, 60, -9);
    CHECK(local.noon[100] % 24 == 12);
    const SunYear date_line = make_sun_year({179, -17}, DayModel::psa, 60);
    for (std::size_t day = 1; day < kDays; ++day) CHECK(date_line.noon[day] - date_line.noon[day - 1] == 24);
}

TEST_CASE("sun year: the clock only moves the hours, not the light of a year") {
    const SunYear utc = make_sun_year({-130, 34}, DayModel::psa, 60);
    const SunYear local = make_sun_year({-130, 34}, DayModel::psa, 60, -9);
    CHECK(hours_below(utc, -4.6) == Approx(hours_below(local, -4.6)).margin(0.2));
    CHECK(monthly_outside_wh_m2(utc)[5] == Approx(monthly_outside_wh_m2(local)[5]).epsilon(1e-3));
}

// Seed 5.
TEST_CASE("hourly sky: a day's global and diffuse energy is kept") {
    const SunYear sun = make_sun_year({0, 47}, DayModel::cooper, 60);
    std::mt19937_64 random(5);
    std::uniform_real_distribution<double> clearness(0.05, 0.8);
    std::vector<double> days(kDays);
    for (double& day : days) day = clearness(random);
    const HourlySky sky = make_hourly_sky(sun, days, 0);
    for (std::size_t day = 0; day < kDays; ++day) {
        double global = 0;
        double beam_and_diffuse = 0;
        for (std::size_t h = day * 24; h < day * 24 + 24; ++h) {
            global += sky.global[h];
            beam_and_diffuse += sky.beam_like[h] + sky.even_sky[h];
        }
        CHECK(global == Approx(days[day] * sun.days[day].outside_wh_m2));
        CHECK(beam_and_diffuse == Approx(global));
    }
}

TEST_CASE("generated weather: one seed gives one series, another seed another") {
    std::array<double, 12> months = {.42, .46, .50, .52, .54, .57, .59, .58, .55, .51, .43, .39};
    CHECK(generate_clearness(months, 2, 1) == generate_clearness(months, 2, 1));
    CHECK(generate_clearness(months, 2, 1) != generate_clearness(months, 2, 2));
    months[3] = 0.02;
    CHECK_THROWS_AS(generate_clearness(months, 1, 1), std::logic_error);
}
