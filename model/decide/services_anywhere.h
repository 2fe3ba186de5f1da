#pragma once
// Candidate services where no row of the file proposes one.

#include "model/city/city.h"

namespace unstring {

/// The city with a candidate service at candidate poles, none closer than 150 m to another source or
/// candidate (an assumption of the method); ids "anywhere-<pole id>", 240 V, 25 kVA free, 26 weeks
/// (assumptions). Same city, same answer: a city that has them already stays as it is.
[[nodiscard]] City with_services_anywhere(City city);

} // namespace unstring
