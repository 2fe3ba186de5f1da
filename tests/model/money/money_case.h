#pragma once
// One pole on one string with everything that a price needs, as a small invented case.

#include "model/money/pole_option.h"
#include "tests/support/default_prices.h"

namespace unstring {

struct MoneyCase {
    City city;
    Catalog catalog;
    PriceBook prices = default_prices();
    Plan plan;
    ShadeResult shade;

    MoneyCase() {
        SeriesString string;
        string.id = "S-01";
        city.strings.push_back(string);
        Pole pole;
        pole.id = "01-001";
        pole.string = StringIx(0);
        pole.has_place = true;
        pole.fixture = "HPS150";
        pole.epa_allow_m2 = 1.0;
        pole.duct = Duct::proven;
        city.poles.push_back(pole);
        catalog.lamps = {{"HPS150", {}, 188, 0.9, LampKind::hps}};
        catalog.luminaires = {{"L40", 40, .95, 5600, "led_head", ""},
                              {"L60", 60, .95, 8400, "led_head", ""},
                              {"L90", 90, .95, 12600, "led_head", ""}};
        Head head;
        head.head = "M";
        head.lumens = 6000;
        head.epa_m2 = 0.5;
        head.life_yr = 15;
        head.price_item = "solar_head_m";
        head.battery_item = "battery";
        catalog.heads.push_back(head);
        plan.settings.first_year = 2027;
        plan.poles.resize(1);
        PoleShade at;
        at.pole = PoleIx(0);
        at.best = 0;
        HeadAnswer answer;
        answer.head = "M";
        answer.eligible = true;
        answer.battery_years = 8;
        at.heads.push_back(answer);
        shade.poles.push_back(at);
    }

    [[nodiscard]] MoneyInput input() const { return {city, catalog, prices, plan, shade}; }
    void set_price(const std::string& item, double base) {
        std::vector<PriceRow> rows = prices.rows();
        for (PriceRow& row : rows)
            if (row.item == item) row.base = base;
        prices = PriceBook(rows);
    }
    [[nodiscard]] OptionCost option(Choice choice, int year = 2030, std::string_view head = {}) const {
        return pole_option(input(), PoleIx(0), choice, year, head);
    }
};

/// Sum of the amounts of the lines with these words [dollars].
inline double sum_of(const std::vector<CashLine>& lines, std::string_view what) {
    Cents sum = 0;
    for (const CashLine& line : lines)
        if (line.what == what) sum += line.amount;
    return to_dollars(sum);
}

} // namespace unstring
