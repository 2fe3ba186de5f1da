#pragma once
// What the work at one pole costs when it is done, and what a conversion would cost there at all. Parts of
// pole_option.

#include <vector>

#include "model/money/pole_option.h"

namespace unstring {

/// Capital lines of a rewire at the pole in `year`: luminaire, base, removal, traffic share, make-ready,
/// design share.
[[nodiscard]] std::vector<CashLine> rewire_works(const MoneyInput& input, const Pole& pole, int year);

/// Capital lines of a solar head in `year`: head, removal, traffic share, the pole's expected cost where its
/// strength is unknown, make-ready, design share. The head's price item must be in the closed list.
[[nodiscard]] std::vector<CashLine> solar_works(const MoneyInput& input, const Pole& pole, const Head& head,
                                                int year);

/// Chance that the old duct of the span leading to the pole is sound, by its state in the price book.
[[nodiscard]] double duct_sound_frac(const PriceBook& prices, Duct duct, int year);

/// Dollars that one conversion of this pole by itself would cost in `year`: solar where the head is given,
/// else a rewire with a span of its own of the book's typical length, its old duct at the expected price;
/// whichever is cheaper.
/// @param head  null = solar is not possible here
[[nodiscard]] double conversion_price(const MoneyInput& input, const Pole& pole, const Head* head, int year);

} // namespace unstring
