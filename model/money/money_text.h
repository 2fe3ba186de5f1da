#pragma once
// Money in words and columns, the same on screen, paper and terminal.

#include <string>

namespace unstring {

/// "1,234,567", or with cents "1,234,567.00"; halves away from zero.
[[nodiscard]] std::string amount_text(double dollars, bool with_cents = false);
/// The same with its sign: "$1,234,567", "-$40".
[[nodiscard]] std::string dollars_text(double dollars, bool with_cents = false);

} // namespace unstring
