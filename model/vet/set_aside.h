#pragma once
// Which record a finding names, and whether it is set aside.

#include "model/city/city.h"
#include "model/finding.h"

namespace unstring {

/// The record that the finding names is in the city and set aside (by itself, or with its string): the finding no longer
/// stops the next step. False for a finding that names no record of the city.
[[nodiscard]] bool is_set_aside(const City& city, const Finding& finding);

}  // namespace unstring
