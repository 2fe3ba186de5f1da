#pragma once
// What vet answers: findings, wiring order settled, and each string as it stands today.

#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/city/city.h"
#include "model/finding.h"
#include "model/series/string_loop.h"
#include "model/series/verdict.h"

namespace unstring {

struct VetString {
    StringIx string;
    int lamps = 0;
    OrderFrom order = OrderFrom::given;
    double order_confidence_frac = 1;
    std::vector<PoleIx> wiring; ///< lamps in the order that was settled
    double load_kw = 0, load_kva = 0, volts = 0, cable_m = 0;
    TransformerIx transformer;
    double tap = 1, loading_frac = 0;
    Verdict verdict = Verdict::none;
};

struct VetResult {
    std::vector<Finding> findings;
    std::vector<VetString> strings; ///< series strings only, in the order of the city
};

/// Never fails because of data.
[[nodiscard]] VetResult vet_city(const City& city, const Catalog& catalog);

/// The city with the wiring order that vet settled written into Pole::order; every later step takes this one.
[[nodiscard]] City with_wiring(City city, const std::vector<VetString>& strings);

/// The city with set_aside on every record that an error finding names (and on every pole of a string set
/// aside).
[[nodiscard]] City set_aside_errors(City city, const std::vector<Finding>& findings);

} // namespace unstring
