#pragma once
// Options of the work-out topics that need reading of their own.

#include <optional>
#include <string>
#include <vector>

#include "model/fault.h"

namespace unstring {

/// "39.74,-105.18,1830": so many numbers with commas between. @fault bad_usage, naming the option
[[nodiscard]] Expected<std::vector<double>> read_list(const std::string& option, const std::string& text,
                                                      std::size_t least, std::size_t most,
                                                      const std::string& wanted);

/// A fault when a value is not a number from low to high.
[[nodiscard]] std::optional<Fault> out_of_range(const std::string& option, double value, double low,
                                                double high, const std::string& remedy);

} // namespace unstring
