#pragma once
// Money and crew hours of a plan: every cash line into the year and purse where it falls.

#include "model/phase/phase_cash.h"
#include "model/phase/phase_facts.h"
#include "model/phase/phase_result.h"

namespace unstring {

/// One string's own cash by year, to the ledger's end: what string_lines is asked.
[[nodiscard]] std::vector<StringYearCash> string_cash(const PhaseFacts& facts, std::size_t string);

/// Fills ledger, cost and, with `with_lines`, every line. What a pole costs that is kept or not reached is
/// its keep cost.
void fill_ledger(const PhaseFacts& facts, CashBook& book, bool with_lines, PhaseResult& result);

/// Crew-hours by year of the plan, place 0 = first_year.
[[nodiscard]] std::vector<CrewHours> hours_of(const PhaseFacts& facts);

/// Crew-hours of one span, and of a circuit's connection, built in `year`.
[[nodiscard]] CrewHours span_crew_hours(const City& city, const PriceBook& prices, const CircuitSpan& span,
                                        int year);
[[nodiscard]] CrewHours connection_crew_hours(const City& city, const PriceBook& prices, ServiceIx service,
                                              int year);

} // namespace unstring
