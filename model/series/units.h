#pragma once
// Regulated-output (RO) transformers: which unit carries a string, and which of a pool would fit it.

#include <optional>
#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/series/string_loop.h"

namespace unstring {

/// Lower end of a unit's range where its row gives none.
inline constexpr double kUsualMinFrac = 0.25;

struct UnitNeed { ///< what a string asks of a unit
    double current_a = 6.6;
    double load_kva = 0;
    double cable_kv = 5;
    std::optional<double> primary_v; ///< of the unit that feeds it today; none = cannot be compared
    std::optional<Mount> mount;      ///< likewise
};

struct UnitFit {
    TransformerIx unit;
    double tap = 1;          ///< the smallest that carries the load
    double loading_frac = 0; ///< load over rating x tap
};

struct OpenVolts {
    double volts = 0;
    bool is_estimate = true; ///< not from a nameplate: 1.4 x rated volts, the top of the usual range
};

/// The unit in service that feeds the string today, the first of them by row; not valid where there is none.
[[nodiscard]] TransformerIx unit_today(const City& city, StringIx string);

/// Rating that one loop may take: half of it for a unit that feeds two strings.
[[nodiscard]] double loop_rating_kw(const Transformer& unit);
[[nodiscard]] double min_frac_of(const Transformer& unit);
/// The smallest tap whose share of the rating carries the load, 1 where none does. No file says which tap is
/// in use: this one is taken, today and later.
[[nodiscard]] double tap_for(const Transformer& unit, double load_kva);
/// Open-circuit volts of one loop at the string's current.
[[nodiscard]] OpenVolts open_volts(const Transformer& unit, double current_a);

/// What a string asks for a load; primary volts and mounting are those of the unit that feeds it today.
[[nodiscard]] UnitNeed unit_need(const City& city, const StringLoop& loop, double load_kva);

/// Why a unit cannot carry the string, in words with both numbers ("primary 2400 V, need 4160 V"); empty = it
/// can. Hard match: output current, primary volts, mounting; load within rating x tap; rated volts at the
/// load and nameplate open-circuit volts within the cable's class; the lower end of the range for static
/// units. A figure that the unit's row lacks and the string asks for is a refusal too. An estimated open
/// voltage refuses nothing: vet warns of it.
[[nodiscard]] std::string why_unit_refused(const Transformer& unit, const UnitNeed& need);

/// The units of a pool that fit, smallest rating x tap first, then the place in the city's table. The pool
/// may hold the unit in service; a unit set aside or scrapped never fits.
[[nodiscard]] std::vector<UnitFit> units_that_fit(const City& city, const std::vector<TransformerIx>& pool,
                                                  const UnitNeed& need);

/// A spare that was never tested, or not in the five years before `year`; year 0 judges the blank only.
[[nodiscard]] bool is_untested(const Transformer& unit, int year);

} // namespace unstring
