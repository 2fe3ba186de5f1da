#include "model/money/pole_option.h"

#include <algorithm>
#include <random>

#include <catch2/catch.hpp>

#include "model/money/worth.h"
#include "tests/model/money/money_case.h"

using namespace unstring;

TEST_CASE("pole option: keep without rise, failures and the conversion owed is the 3 505 dollars worked out "
          "by hand") {
    // 188 W x 4100 h x 0.15 and 120 a year, 20 years at 3 %: methods note, check of sense. By hand: (115.62 +
    // 120) x 14.8775.
    MoneyCase test;
    test.set_price("upkeep_series_rise_frac", 0);
    double sum = 0;
    for (const CashLine& line : test.option(Choice::keep).lines)
        if (line.what == "energy, kWh" || line.what == "series upkeep")
            sum += to_dollars(line.amount) * line.factor;
    CHECK(sum == Approx(3505).margin(1));
    CHECK(sum == Approx((0.188 * 4100 * 0.15 + 120) * upv(.03, 20)).margin(0.05));
}

TEST_CASE("pole option: series upkeep rises 3 % a year from the first year's price") {
    const auto lines = MoneyCase().option(Choice::keep).lines;
    const auto upkeep = [&](int year) {
        return *std::find_if(lines.begin(), lines.end(), [&](const CashLine& line) {
            return line.what == "series upkeep" && line.year == year;
        });
    };
    CHECK(upkeep(2027).amount == 12000);
    CHECK(upkeep(2028).amount == 12360);
    CHECK(upkeep(2046).amount == to_cents(120 * std::pow(1.03, 19)));
}

TEST_CASE("pole option: keep owes the conversion at the horizon, discounted from there") {
    const auto lines = MoneyCase().option(Choice::keep).lines;
    const CashLine& owed = lines.back();
    CHECK(owed.what == "conversion still owed");
    CHECK(owed.year == 2046);
    CHECK(owed.factor == Approx(spv(.03, 20)));
    // Proven duct, luminaire, base, removal, local traffic, span of 35 m, design: cheaper than the 4 500
    // dollar head here.
    const double works = 450 + 350 + 100 + 300 * (1.0 / 14 + 1.0 / 8);
    const double span = 35 / 0.3048 * (.95 * 8 + .05 * (45 + 2.2));
    CHECK(to_dollars(owed.amount) == Approx((works + span) * 1.18).margin(0.02));
}

TEST_CASE("pole option: the works of a rewire fall in their year, the old light before it, the new one from "
          "it on") {
    const auto option = MoneyCase().option(Choice::rewire, 2030);
    REQUIRE(option.possible);
    for (const CashLine& line : option.lines) {
        if (line.what == "series upkeep") CHECK(line.year < 2030);
        if (line.what == "LED upkeep") CHECK(line.year >= 2030);
        if (line.purse == Purse::capital) CHECK(line.year == 2030);
    }
    CHECK(sum_of(option.lines, "series upkeep") == Approx(120 * (1 + 1.03 + 1.03 * 1.03)).margin(0.01));
    CHECK(sum_of(option.lines, "LED upkeep") == 17 * 30);
    CHECK(sum_of(option.lines, "LED luminaire") == 450);
    CHECK(sum_of(option.lines, "design and supervision") ==
          Approx(.18 * (900 + 300 * (1.0 / 14 + 1.0 / 8))).margin(0.01));
}

TEST_CASE("pole option: the new luminaire follows the need, else the old lamp's watts") {
    MoneyCase test;
    const auto yearly_kwh = [&] {
        for (const CashLine& line : test.option(Choice::rewire, 2027).lines)
            if (line.what == "energy, kWh") return line.quantity;
        return 0.0;
    };
    CHECK(yearly_kwh() == Approx(.060 * 4100));
    test.city.poles[0].need_lm = 5000;
    CHECK(yearly_kwh() == Approx(.040 * 4100));
    test.city.poles[0].need_lm = 50000; // nothing is enough: the largest
    CHECK(yearly_kwh() == Approx(.090 * 4100));
}

TEST_CASE("pole option: batteries and heads are renewed where the simulation and the catalogue end them") {
    const auto option = MoneyCase().option(Choice::solar, 2027);
    REQUIRE(option.possible);
    std::vector<int> batteries, heads;
    for (const CashLine& line : option.lines) {
        if (line.what == "battery renewed, old one disposed of") batteries.push_back(line.year);
        if (line.what == "solar head renewed") heads.push_back(line.year);
    }
    CHECK(batteries ==
          std::vector<int>{2035}); // 8 years; the next would fall after the head's renewal and its horizon
    CHECK(heads == std::vector<int>{2042});
    CHECK(sum_of(option.lines, "battery renewed, old one disposed of") == 640);
    // Renewed at the end of 2042, 4 of 15 years old at the horizon.
    CHECK(sum_of(option.lines, "solar head, value left") == Approx(-4500 * 11.0 / 15).margin(0.01));
}

TEST_CASE("pole option: work after the horizon leaves no value at it, and no year without a light's cost") {
    MoneyCase test;
    test.plan.settings.horizon_years = 5;
    for (const CashLine& line : test.option(Choice::rewire, 2034).lines) {
        INFO(line.what);
        CHECK(line.amount > 0);
        CHECK((line.year <= 2031 || line.year == 2034));
    }
}

TEST_CASE("pole option: a sound pole's solar head lies between 7 200 and 8 700 dollars, the check of sense") {
    MoneyCase test;
    test.shade.poles[0].heads[0].battery_years = 12;
    test.set_price("knockdown_frac", 0);
    CHECK(test.option(Choice::solar, 2027).cost > 7200);
    CHECK(test.option(Choice::solar, 2027).cost < 8700);
}

TEST_CASE("pole option: a pole of unknown strength pays its inspection and the chance of a new pole") {
    MoneyCase test;
    const double known = test.option(Choice::solar).cost;
    test.city.poles[0].epa_allow_m2.reset();
    const auto unknown = test.option(Choice::solar);
    CHECK(unknown.possible);
    CHECK(sum_of(unknown.lines, "pole inspection") == 150);
    CHECK(sum_of(unknown.lines, "new pole, chance that it is needed") == Approx(.3 * 8500));
    CHECK(unknown.cost > known + 1000);
}

TEST_CASE("pole option: what stops an option is said with its number") {
    MoneyCase test;
    test.city.poles[0].epa_allow_m2 = 0.4;
    CHECK(test.option(Choice::solar).stopped_by == "wind area 0.50 m2 of head M, the pole is allowed 0.40");
    test.city.poles[0].epa_allow_m2 = 1;
    test.city.poles[0].need_lm = 9000;
    CHECK(test.option(Choice::solar).stopped_by == "the road needs 9000 lm, head M gives 6000");
    test.city.poles[0].need_lm.reset();
    test.shade.poles[0].heads[0].eligible = false;
    test.shade.poles[0].heads[0].why = "41 nights dark a year of 3 allowed";
    CHECK(test.option(Choice::solar).stopped_by == "41 nights dark a year of 3 allowed");
    CHECK(test.option(Choice::rewire).possible);
    test.city.poles[0].earliest_year = 2031;
    test.city.poles[0].owner = Owner::utility;
    test.city.poles[0].consent = false;
    CHECK(test.option(Choice::rewire, 2030).possible); // its owner holds back the hand-out, not the plan
    CHECK(test.option(Choice::keep).possible);
}

TEST_CASE("pole option: critical poles and a head outside price book or catalogue are refused in words") {
    MoneyCase test;
    test.city.poles[0].critical = true;
    CHECK_FALSE(test.option(Choice::solar).possible);
    test.city.poles[0].solar_ok = true;
    CHECK(test.option(Choice::solar).possible);
    CHECK_FALSE(test.option(Choice::solar, 2030, "XL").possible);
    test.catalog.heads[0].price_item = "solar_head_m2";
    const auto option = test.option(Choice::solar);
    CHECK_FALSE(option.possible);
    CHECK(option.stopped_by.find("solar_head_m2") != std::string::npos);
}

TEST_CASE("pole option: a flat charge replaces the meter for every light that burns mains power") {
    MoneyCase test;
    test.set_price("energy_flat", 84);
    const auto option = test.option(Choice::rewire, 2030);
    CHECK(sum_of(option.lines, "energy, flat") == 20 * 84);
    CHECK(sum_of(option.lines, "energy, kWh") == 0);
}

TEST_CASE("pole option: cost is the sum of amount times factor over its lines, to the cent; amounts are "
          "quantity times price") {
    const unsigned seed = 20270101;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> factor(0.3, 3);
    std::uniform_int_distribution<int> years(2025, 2050);
    for (int round = 0; round < 50; ++round) {
        MoneyCase test;
        for (const char* item :
             {"led_head", "solar_head_m", "energy_kwh", "upkeep_led", "pole_base", "battery"})
            test.set_price(item, test.prices.at(item, 2027) * factor(random));
        test.plan.settings.rate = 0.02 * factor(random);
        for (const Choice choice : {Choice::keep, Choice::rewire, Choice::solar}) {
            const auto option = test.option(choice, years(random));
            double sum = 0;
            for (const CashLine& line : option.lines) {
                REQUIRE(line.amount == to_cents(line.quantity * line.unit_price));
                REQUIRE(line.factor == test.plan.factor(line.year));
                sum += to_dollars(line.amount) * line.factor;
            }
            REQUIRE(to_cents(option.cost) == to_cents(sum));
        }
    }
}

TEST_CASE("pole option: a price changed and changed back gives the same lines") {
    MoneyCase test;
    const auto before = test.option(Choice::solar);
    test.set_price("solar_head_m", 5000);
    CHECK(test.option(Choice::solar).cost > before.cost);
    test.set_price("solar_head_m", 4500);
    const auto after = test.option(Choice::solar);
    REQUIRE(after.lines.size() == before.lines.size());
    for (std::size_t i = 0; i < after.lines.size(); ++i) {
        CHECK(after.lines[i].amount == before.lines[i].amount);
        CHECK(after.lines[i].factor == before.lines[i].factor);
    }
}

TEST_CASE("pole option: the work year is met with that year's price") {
    MoneyCase test;
    std::vector<PriceRow> rows = test.prices.rows();
    for (PriceRow& row : rows)
        if (row.item == "led_head") {
            row.from_year = 2027;
            row.change_frac_year = -0.05;
        }
    test.prices = PriceBook(rows);
    CHECK(sum_of(test.option(Choice::rewire, 2032).lines, "LED luminaire") ==
          Approx(450 * std::pow(.95, 5)).margin(0.005));
}
