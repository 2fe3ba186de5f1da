#pragma once
// The text files beside this header, carried inside the program.

#include <string_view>

namespace unstring {

/// The content of one file of resources/, by its name ("prices.csv"); empty when there is none of that name.
[[nodiscard]] std::string_view resource(std::string_view name);

} // namespace unstring
