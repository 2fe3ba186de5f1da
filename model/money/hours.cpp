#include "model/money/hours.h"

#include <cmath>

namespace unstring {
namespace {

/// Crew-days of `quantity` at an item's pace.
double days(const PriceBook& prices, double quantity, std::string_view pace, int year) {
    return quantity <= 0 ? 0 : quantity / prices.at(pace, year);
}

double hours_of(const PriceBook& prices, double crew_days, std::string_view crew, int year) {
    return crew_days * prices.at(crew, year) * prices.at("day_hours", year);
}

} // namespace

TaskHours& TaskHours::operator+=(const TaskHours& other) {
    line += other.line;
    civil += other.civil;
    lighting += other.lighting;
    electric += other.electric;
    return *this;
}

TaskHours pole_hours(const PriceBook& prices, const Pole& pole, Choice choice, int year) {
    TaskHours hours;
    if (choice == Choice::rewire) {
        hours.lighting = hours_of(prices, days(prices, 1, "pace_led_head", year), "crew_lighting", year);
        hours.electric = hours_of(prices, days(prices, 1, "pace_pole_base", year), "crew_electric", year);
    } else if (choice == Choice::solar) {
        double lighting_days = days(prices, 1, "pace_solar_head", year);
        if (!pole.epa_allow_m2) {
            lighting_days += days(prices, 1, "pace_survey", year);
            const double footings = days(prices, prices.at("pole_fail_frac", year), "pace_pole_new", year);
            hours.civil = hours_of(prices, footings, "crew_civil", year);
        }
        hours.lighting = hours_of(prices, lighting_days, "crew_lighting", year);
    }
    return hours;
}

TaskHours span_hours(const PriceBook& prices, SpanWork work, double length_m, int year, double sound_frac,
                     Surface surface) {
    TaskHours hours;
    const auto civil = [&](double quantity, std::string_view pace) {
        hours.civil += hours_of(prices, days(prices, quantity, pace, year), "crew_civil", year);
    };
    const auto electric = [&](double quantity, std::string_view pace) {
        hours.electric += hours_of(prices, days(prices, quantity, pace, year), "crew_electric", year);
    };
    switch (work) {
    case SpanWork::trench_verge:
        civil(length_m, "pace_trench_soft");
        break;
    case SpanWork::trench_paved:
        civil(length_m, "pace_trench_paved");
        break;
    case SpanWork::bore:
        civil(length_m, "pace_bore");
        break;
    case SpanWork::conduit:
        civil(length_m, "pace_duct_prove");
        civil((1 - sound_frac) * length_m,
              surface == Surface::paved ? "pace_trench_paved" : "pace_trench_soft");
        break;
    case SpanWork::aerial:
        electric(length_m, "pace_aerial");
        return hours;
    case SpanWork::tap:
        electric(1, "pace_tap");
        return hours;
    case SpanWork::service:
        electric(1, "pace_service");
        return hours;
    case SpanWork::circuit_end:
        electric(1, "pace_circuit_end");
        return hours;
    }
    electric(length_m, "pace_pull");
    return hours;
}

TaskHours string_hours(const PriceBook& prices, int jumpers, int splices, int swaps, int year) {
    const double work_days = days(prices, jumpers, "pace_jumper", year) +
                             days(prices, splices, "pace_splice", year) +
                             days(prices, swaps, "pace_swap", year);
    TaskHours hours;
    hours.line = hours_of(prices, work_days, "crew_line", year);
    // A hair off, so that 8 jumpers at 8 a day and 4 splices at 4 stay two days.
    const double days_begun = std::ceil(work_days - 1e-9);
    hours.line += days_begun * prices.at("clearance_hours", year) * prices.at("crew_line", year);
    return hours;
}

} // namespace unstring
