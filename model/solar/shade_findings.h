#pragma once
// What the shade step has to say about the records.

#include <vector>

#include "model/city/city.h"
#include "model/finding.h"
#include "model/solar/shade.h"

namespace unstring {

/// sky-unknown: poles under a sky that no file describes; one finding for all where that is every pole of the
/// city. attachments: poles with a head that could be used and something else on the pole that takes wind
/// too.
[[nodiscard]] std::vector<Finding> shade_findings(const City& city, const ShadeResult& shade);

} // namespace unstring
