#pragma once
// Ids as people read them: "P-017", "p17" and "P 17" are one; 2 comes before 10.

#include <string>
#include <string_view>
#include <vector>

namespace unstring {

/// The id's runs of letters and digits, lower case, without leading zeros: "P-017b" -> p, 17, b.
[[nodiscard]] std::vector<std::string> id_parts(std::string_view id);

/// id_parts with a dot between: equal for ids that differ only in case, blanks, signs and leading zeros.
[[nodiscard]] std::string squeezed_id(std::string_view id);

/// Order of the parts, digits as numbers.
[[nodiscard]] bool is_before_by_number(std::string_view a, std::string_view b);

} // namespace unstring
