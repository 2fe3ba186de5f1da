#include "model/money/works.h"

#include <algorithm>
#include <array>

#include "model/money/new_light.h"

namespace unstring {
namespace {

class Works {
public:
    Works(const MoneyInput& input, int year) : input_(input), year_(year) {}

    void add(const char* what, double quantity, std::string_view item) {
        lines_.push_back(cash_line(input_.plan, what, year_, quantity, at(item), Purse::capital));
    }
    double at(std::string_view item) const { return input_.prices.at(item, year_); }

    void add_traffic(const Pole& pole, double days) {
        constexpr std::array<const char*, 3> kItems = {"traffic_local", "traffic_collector",
                                                       "traffic_arterial"};
        add("traffic control, share of a day", days, kItems[static_cast<std::size_t>(road_class_of(pole))]);
    }

    std::vector<CashLine> with_design() {
        Cents sum = 0;
        for (const CashLine& line : lines_) sum += line.amount;
        lines_.push_back(cash_line(input_.plan, "design and supervision", year_, at("design_frac"),
                                   to_dollars(sum), Purse::capital));
        return std::move(lines_);
    }

private:
    const MoneyInput& input_;
    int year_;
    std::vector<CashLine> lines_;
};

double sum_dollars(const std::vector<CashLine>& lines) {
    Cents sum = 0;
    for (const CashLine& line : lines) sum += line.amount;
    return to_dollars(sum);
}

/// Own span of the typical length, the duct at its expected price: p x pull + (1 - p) x dig.
double own_span_price(const MoneyInput& input, const Pole& pole, int year) {
    const PriceBook& prices = input.prices;
    const bool is_paved = surface_at(input.city, pole) == Surface::paved;
    const double dig =
        prices.at(is_paved ? "trench_paved" : "trench_soft", year) + prices.at(wire_item(8), year);
    const double sound = duct_sound_frac(prices, pole.duct, year);
    const double per_m = sound * prices.at("pull", year) + (1 - sound) * dig;
    return prices.at("span_typical", year) * per_m * (1 + prices.at("design_frac", year));
}

} // namespace

std::vector<CashLine> rewire_works(const MoneyInput& input, const Pole& pole, int year) {
    Works works(input, year);
    works.add("LED luminaire", 1, new_light(input.catalog, pole).price_item);
    works.add("pole base work", 1, "pole_base");
    works.add("old luminaire taken off", 1, "head_removal");
    works.add_traffic(pole, 1 / works.at("pace_led_head") + 1 / works.at("pace_pole_base"));
    if (pole.owner != Owner::city) works.add("make-ready at another owner's pole", 1, "make_ready");
    return works.with_design();
}

std::vector<CashLine> solar_works(const MoneyInput& input, const Pole& pole, const Head& head, int year) {
    Works works(input, year);
    works.add("solar head", 1, head.price_item);
    works.add("old luminaire taken off", 1, "head_removal");
    works.add_traffic(pole, 1 / works.at("pace_solar_head"));
    if (!pole.epa_allow_m2) {
        works.add("pole inspection", 1, "pole_inspect");
        works.add("new pole, chance that it is needed", works.at("pole_fail_frac"), "pole_new");
    }
    if (pole.owner != Owner::city) works.add("make-ready at another owner's pole", 1, "make_ready");
    return works.with_design();
}

double duct_sound_frac(const PriceBook& prices, Duct duct, int year) {
    switch (duct) {
    case Duct::proven:
        return prices.at("duct_sound_proven", year);
    case Duct::inspected:
        return prices.at("duct_sound_inspected", year);
    case Duct::assumed:
        return prices.at("duct_sound_assumed", year);
    case Duct::unknown:
        return prices.at("duct_sound_unknown", year);
    case Duct::bad:
        return prices.at("duct_sound_bad", year);
    case Duct::direct_buried:
        return prices.at("duct_sound_direct_buried", year);
    }
    return 0;
}

double conversion_price(const MoneyInput& input, const Pole& pole, const Head* head, int year) {
    const double rewire = sum_dollars(rewire_works(input, pole, year)) + own_span_price(input, pole, year);
    if (head == nullptr) return rewire;
    return std::min(rewire, sum_dollars(solar_works(input, pole, *head, year)));
}

} // namespace unstring
