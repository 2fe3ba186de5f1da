// Present-worth factors against printed tables: NIST Handbook 135 supplement (3 %), a published 7 % annuity
// table, and a published engineering-economy page (0.25 %). UPV* also against the plain sum of its terms, the
// second way.

#include "model/money/worth.h"

#include <cmath>

#include <catch2/catch.hpp>

using namespace unstring;

TEST_CASE("money: single and uniform present values are those of the NIST Handbook 135 supplement") {
    struct Row {
        double rate;
        int years;
        double spv, upv, crf;
    };
    // SPV and UPV of 3 % at 10, 20, 25 and 30 years are printed (0.744/8.53 ..); the others follow the same
    // formula.
    const Row rows[] = {{.03, 10, .7441, 8.5302, .117231},  {.03, 15, .6419, 11.9379, .083767},
                        {.03, 20, .5537, 14.8775, .067216}, {.03, 25, .4776, 17.4131, .057428},
                        {.03, 30, .4120, 19.6004, .051019}, {.02, 25, .6095, 19.5235, .051220},
                        {.02, 30, .5521, 22.3965, .044650}, {.07, 20, .2584, 10.5940, .094393},
                        {.07, 25, .1842, 11.6536, .085811}, {.07, 30, .1314, 12.4090, .080586}};
    for (const Row& row : rows) {
        INFO(row.rate << " over " << row.years);
        CHECK(spv(row.rate, row.years) == Approx(row.spv).margin(0.00005));
        CHECK(upv(row.rate, row.years) == Approx(row.upv).margin(0.00005));
        CHECK(crf(row.rate, row.years) == Approx(row.crf).margin(0.0000005));
    }
}

TEST_CASE("money: the published 7 % annuity table") {
    CHECK(upv(.07, 10) == Approx(7.024).margin(0.0005));
    CHECK(upv(.07, 15) == Approx(9.108).margin(0.0005));
    CHECK(upv(.07, 20) == Approx(10.594).margin(0.0005));
}

TEST_CASE("money: a published engineering-economy page at 0.25 % over 25 periods") {
    CHECK(1 / spv(.0025, 25) == Approx(1.0644).margin(0.00005));
    CHECK(spv(.0025, 25) == Approx(0.9395).margin(0.00005));
    CHECK(upv(.0025, 25) == Approx(24.2055).margin(0.00005));
    CHECK(crf(.0025, 25) == Approx(0.04131).margin(0.000005));
    CHECK(crf(.0025, 25) - .0025 == Approx(0.03881).margin(0.000005));
}

TEST_CASE("money: rising flows by the closed form, by the sum of their terms, and at the limit") {
    struct Row {
        double rate, rise;
        int years;
        double upv_rising;
    };
    const Row rows[] = {{.03, .01, 25, 19.5689}, {.03, .02, 25, 22.0766},   {.03, .02, 30, 25.8818},
                        {.03, .03, 25, 25.0},    {.03, -.005, 25, 16.4501}, {.03, .04, 25, 28.4147}};
    for (const Row& row : rows) {
        INFO(row.rate << " rising " << row.rise << " over " << row.years);
        double sum = 0;
        for (int year = 1; year <= row.years; ++year) sum += std::pow((1 + row.rise) / (1 + row.rate), year);
        CHECK(upv_rising(row.rate, row.rise, row.years) == Approx(row.upv_rising).margin(0.00005));
        CHECK(upv_rising(row.rate, row.rise, row.years) == Approx(sum).epsilon(1e-12));
    }
}

TEST_CASE("money: near the limit no digit is lost, and a rate of nothing counts years") {
    CHECK(upv_rising(.03, .03 - 1e-13, 25) == Approx(25).epsilon(1e-10));
    CHECK(upv(0, 20) == 20);
    CHECK(crf(0, 20) == Approx(0.05));
    CHECK(spv(0, 20) == 1);
}
