#pragma once
// Crew-hours of the work, by the paces and crew sizes of the price book: crew-days x people x hours of a day.

#include "model/catalog/prices.h"
#include "model/city/city.h"
#include "model/plan/plan.h"

namespace unstring {

struct TaskHours {
    double line = 0, civil = 0, lighting = 0, electric = 0;
    TaskHours& operator+=(const TaskHours& other);
};

/// Work at the pole itself. Rewire: the luminaire (lighting crew) and the base (electricians). Solar: the
/// head, and where the pole's strength is unknown its inspection and the chance of a new footing. Keep and
/// undecided: none.
[[nodiscard]] TaskHours pole_hours(const PriceBook& prices, const Pole& pole, Choice choice, int year);

enum class SpanWork { trench_verge, trench_paved, bore, conduit, aerial, tap, service, circuit_end };

/// Work of one span of a lighting circuit, wire included. @param length_m  read where the work goes by length
/// @param sound_frac  conduit only: the chance that the duct is sound; else it is dug as verge or pavement
[[nodiscard]] TaskHours span_hours(const PriceBook& prices, SpanWork work, double length_m, int year,
                                   double sound_frac = 1, Surface surface = Surface::verge);

/// Line crew's work at one string in one year: jumpers, splices and swaps by their paces, and for each day
/// begun the wait for the switching clearance.
[[nodiscard]] TaskHours string_hours(const PriceBook& prices, int jumpers, int splices, int swaps, int year);

} // namespace unstring
