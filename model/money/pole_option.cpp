#include "model/money/pole_option.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/money/new_light.h"
#include "model/money/works.h"

namespace unstring {
namespace {

struct Years {
    int first = 0, last = 0; ///< of the horizon, calendar
};

Years horizon_of(const Plan& plan) {
    return {plan.settings.first_year, plan.settings.first_year + plan.settings.horizon_years - 1};
}

void add_energy(const MoneyInput& input, int year, double watts, std::vector<CashLine>& lines) {
    const double flat = input.prices.at("energy_flat", year);
    if (flat > 0) {
        lines.push_back(cash_line(input.plan, "energy, flat", year, 1, flat, Purse::operating));
        return;
    }
    const double kwh = watts / 1000 * input.prices.at("burn_hours", year);
    lines.push_back(cash_line(input.plan, "energy, kWh", year, kwh, input.prices.at("energy_kwh", year),
                              Purse::operating));
}

/// Lamp energy, rising upkeep and the expected price of an emergency in the years from..to.
void add_keep_years(const MoneyInput& input, const Pole& pole, const Head* head, int from, int to,
                    std::vector<CashLine>& lines) {
    const PriceBook& prices = input.prices;
    const double watts = lamp_watts(input.catalog, pole);
    const int first = input.plan.settings.first_year;
    for (int year = from; year <= to; ++year) {
        add_energy(input, year, watts, lines);
        const double risen = std::pow(1 + prices.at("upkeep_series_rise_frac", year), year - first);
        lines.push_back(cash_line(input.plan, "series upkeep", year, risen, prices.at("upkeep_series", year),
                                  Purse::operating));
        const double emergency =
            prices.at("emergency_factor", year) * conversion_price(input, pole, head, year);
        lines.push_back(cash_line(input.plan, "emergency conversion, chance", year,
                                  prices.at("series_fail_frac", year), emergency, Purse::operating));
    }
}

/// Theft, damage and knock-downs of the light itself; the pole is lost under every choice and left out.
void add_losses(const MoneyInput& input, int year, std::string_view item, std::vector<CashLine>& lines) {
    const double share = input.prices.at("theft_frac", year) + input.prices.at("knockdown_frac", year);
    lines.push_back(
        cash_line(input.plan, "theft, damage", year, share, input.prices.at(item, year), Purse::operating));
}

/// Straight-line value left at the horizon of something bought in `bought`; never below nothing.
void add_residual(const MoneyInput& input, const char* what, double quantity, std::string_view item,
                  int bought, double life_yr, std::vector<CashLine>& lines) {
    const int last = horizon_of(input.plan).last;
    const double left = bought > last ? 0 : quantity * (1 - (last - bought) / life_yr);
    if (left <= 0) return;
    lines.push_back(
        cash_line(input.plan, what, last, -left, input.prices.at(item, bought), Purse::operating));
}

void add_rewire_running(const MoneyInput& input, const Pole& pole, int from, std::vector<CashLine>& lines) {
    const PriceBook& prices = input.prices;
    const NewLight light = new_light(input.catalog, pole);
    const int last = horizon_of(input.plan).last;
    const double life_yr = std::max(1.0, prices.at("led_life", from));
    int bought = from;
    double ends = from + life_yr;
    for (int year = from; year <= last; ++year) {
        if (year >= ends && year < last) {
            lines.push_back(cash_line(input.plan, "LED luminaire renewed", year, 1,
                                      prices.at(light.price_item, year), Purse::operating));
            bought = year;
            ends += life_yr;
        }
        add_energy(input, year, light.led_w, lines);
        lines.push_back(
            cash_line(input.plan, "LED upkeep", year, 1, prices.at("upkeep_led", year), Purse::operating));
        add_losses(input, year, light.price_item, lines);
    }
    add_residual(input, "LED luminaire, value left", 1, light.price_item, bought, life_yr, lines);
}

/// Renewals where the simulated battery and the head end, each at the end of the year in which it does.
void add_solar_running(const MoneyInput& input, const Pole& pole, const Head& head, double battery_years,
                       int from, std::vector<CashLine>& lines) {
    const PriceBook& prices = input.prices;
    const int last = horizon_of(input.plan).last;
    const double life_yr = std::max(1.0, head.life_yr);
    const double battery_yr = std::max(1.0, battery_years);
    const std::string_view battery_item =
        find_price_item(head.battery_item) != nullptr ? std::string_view(head.battery_item) : "battery";
    int bought = from;
    double head_ends = from + life_yr, battery_ends = from + battery_yr;
    int battery_bought = 0;
    for (int year = from; year <= last; ++year) {
        if (year >= head_ends && year < last) {
            lines.push_back(cash_line(input.plan, "solar head renewed", year, 1,
                                      prices.at(head.price_item, year), Purse::operating));
            bought = year;
            battery_bought = 0;
            head_ends += life_yr;
            battery_ends = year + battery_yr;
        } else if (year >= battery_ends && year < last) {
            lines.push_back(cash_line(input.plan, "battery renewed, old one disposed of", year, 1,
                                      prices.at(battery_item, year) + prices.at("battery_disposal", year),
                                      Purse::operating));
            battery_bought = year;
            battery_ends += battery_yr;
        }
        lines.push_back(cash_line(input.plan, "solar upkeep", year, 1, prices.at("upkeep_solar", year),
                                  Purse::operating));
        add_losses(input, year, head.price_item, lines);
    }
    add_residual(input, "solar head, value left", 1, head.price_item, bought, life_yr, lines);
    if (battery_bought != 0)
        add_residual(input, "battery, value left", 1, battery_item, battery_bought, battery_yr, lines);
    if (!pole.epa_allow_m2)
        add_residual(input, "new pole, value left", prices.at("pole_fail_frac", from), "pole_new", from,
                     prices.at("pole_life", from), lines);
}

const HeadAnswer* answer_of(const MoneyInput& input, PoleIx pole, std::string_view head) {
    const PoleShade* shade = input.shade.find(pole);
    if (shade == nullptr) return nullptr;
    if (head.empty()) return shade->best < 0 ? nullptr : &shade->heads[static_cast<std::size_t>(shade->best)];
    const auto at = std::find_if(shade->heads.begin(), shade->heads.end(),
                                 [&](const HeadAnswer& each) { return each.head == head; });
    return at == shade->heads.end() ? nullptr : &*at;
}

std::string solar_stop(const Pole& pole, const HeadAnswer* answer, const Head* head) {
    if (pole.solar_ok == false) return "solar_ok is no in the pole file";
    if (pole.critical && pole.solar_ok != true) return "critical pole: solar only where solar_ok says yes";
    if (answer == nullptr) return "no solar head has been worked out for this pole";
    if (head == nullptr) return fmt::format("head {} is not in the catalogue", answer->head);
    if (find_price_item(head->price_item) == nullptr)
        return fmt::format("head {} names the price item \"{}\", which the price book does not know",
                           head->head, head->price_item);
    if (!answer->eligible) return answer->why;
    if (pole.need_lm && head->lumens < *pole.need_lm)
        return fmt::format("the road needs {:.0f} lm, head {} gives {:.0f}", *pole.need_lm, head->head,
                           head->lumens);
    if (pole.epa_allow_m2 && head->epa_m2 > *pole.epa_allow_m2)
        return fmt::format("wind area {:.2f} m2 of head {}, the pole is allowed {:.2f}", head->epa_m2,
                           head->head, *pole.epa_allow_m2);
    return {};
}

OptionCost finished(std::string stopped_by, std::vector<CashLine> lines) {
    OptionCost option;
    option.possible = stopped_by.empty();
    option.stopped_by = std::move(stopped_by);
    option.cost = to_dollars(to_cents(present_value(lines)));
    option.lines = std::move(lines);
    return option;
}

} // namespace

OptionCost pole_option(const MoneyInput& input, PoleIx pole_ix, Choice choice, int year,
                       std::string_view head_name) {
    const Pole& pole = input.city.poles[pole_ix.place()];
    const Years horizon = horizon_of(input.plan);
    const HeadAnswer* best = answer_of(input, pole_ix, {});
    const Head* best_head = best == nullptr ? nullptr : find_head(input.catalog, best->head);
    // What an emergency, or the conversion still owed, would put there.
    const Head* fallback = solar_stop(pole, best, best_head).empty() ? best_head : nullptr;

    std::vector<CashLine> lines;
    if (choice != Choice::rewire && choice != Choice::solar) {
        add_keep_years(input, pole, fallback, horizon.first, horizon.last, lines);
        lines.push_back(cash_line(input.plan, "conversion still owed", horizon.last, 1,
                                  conversion_price(input, pole, fallback, horizon.last), Purse::operating));
        return finished({}, std::move(lines));
    }
    const int from = std::max(year, horizon.first);
    add_keep_years(input, pole, fallback, horizon.first, std::min(from - 1, horizon.last), lines);
    if (choice == Choice::rewire) {
        for (CashLine& line : rewire_works(input, pole, from)) lines.push_back(std::move(line));
        add_rewire_running(input, pole, from, lines);
        return finished({}, std::move(lines));
    }
    const HeadAnswer* answer = head_name.empty() ? best : answer_of(input, pole_ix, head_name);
    const Head* head = answer == nullptr ? nullptr : find_head(input.catalog, answer->head);
    std::string stopped_by = solar_stop(pole, answer, head);
    if (head == nullptr || find_price_item(head->price_item) == nullptr)
        return finished(std::move(stopped_by), {});
    for (CashLine& line : solar_works(input, pole, *head, from)) lines.push_back(std::move(line));
    add_solar_running(input, pole, *head, answer->battery_years, from, lines);
    return finished(std::move(stopped_by), std::move(lines));
}

} // namespace unstring
