#include "model/money/pole_option.h"

namespace unstring {
namespace {

/// What the station and its loop burn while they serve; nothing is billed where the city pays a flat charge
/// per lamp.
void add_running(const MoneyInput& input, const StringYearCash& each, std::vector<CashLine>& lines) {
    const PriceBook& prices = input.prices;
    const auto add = [&](const char* what, double quantity, std::string_view item) {
        lines.push_back(
            cash_line(input.plan, what, each.year, quantity, prices.at(item, each.year), Purse::operating));
    };
    if (prices.at("energy_flat", each.year) <= 0) {
        const double hours = prices.at("burn_hours", each.year);
        const double unit_kw = prices.at("unit_loss_frac", each.year) * each.unit_rated_kw;
        if (unit_kw > 0) add("transformer loss, kWh", unit_kw * hours, "energy_kwh");
        if (each.cable_kw > 0) add("loop cable loss, kWh", each.cable_kw * hours, "energy_kwh");
    }
    if (each.unit_rated_kw > 0) add("station upkeep", 1, "upkeep_station");
}

void add_works(const MoneyInput& input, const StringYearCash& each, std::vector<CashLine>& lines) {
    const PriceBook& prices = input.prices;
    Cents works = 0;
    const auto add = [&](const char* what, double quantity, std::string_view item) {
        if (quantity <= 0) return;
        lines.push_back(
            cash_line(input.plan, what, each.year, quantity, prices.at(item, each.year), Purse::capital));
        works += lines.back().amount;
    };
    add("mobilisation", each.has_work ? 1 : 0, "mobilisation");
    works = 0; // design is a part of the works, not of the way there
    add("jumper at a pole base", each.jumpers, "jumper");
    add("series cable splice", each.splices, "splice_5kv");
    add("series cable, m", each.new_cable_m, "cable_5kv");
    add("transformer swap", each.swaps_unit ? 1 : 0, "swap");
    add("transformer removal", each.retires ? 1 : 0, each.oil_suspect ? "unit_remove_pcb" : "unit_remove");
    if (works > 0)
        lines.push_back(cash_line(input.plan, "design and supervision", each.year,
                                  prices.at("design_frac", each.year), to_dollars(works), Purse::capital));
}

} // namespace

std::vector<CashLine> string_lines(const MoneyInput& input, StringIx /*string*/,
                                   const std::vector<StringYearCash>& years) {
    std::vector<CashLine> lines;
    const int last = input.plan.settings.first_year + input.plan.settings.horizon_years - 1;
    bool is_retired = false;
    for (const StringYearCash& each : years) {
        if (each.year < input.plan.settings.first_year || each.year > last) continue;
        is_retired =
            is_retired || each.retires; // as at a pole: work in year t ends the old cost with year t - 1
        if (!is_retired) add_running(input, each, lines);
        add_works(input, each, lines);
    }
    return lines;
}

} // namespace unstring
