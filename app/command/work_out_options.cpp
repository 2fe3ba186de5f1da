#include "app/command/work_out_options.h"

#include <cmath>
#include <cstdlib>

#include <fmt/format.h>

namespace unstring {
namespace {

std::optional<double> read_whole(const std::string& text) {
    char* end = nullptr;
    const double value = std::strtod(text.c_str(), &end);
    if (text.empty() || end != text.c_str() + text.size() || !std::isfinite(value)) return std::nullopt;
    return value;
}

} // namespace

Expected<std::vector<double>> read_list(const std::string& option, const std::string& text, std::size_t least,
                                        std::size_t most, const std::string& wanted) {
    const Fault fault{
        FaultCode::bad_usage, {}, 0, option, text, wanted, "numbers with commas between, no blanks"};
    std::vector<double> values;
    for (std::size_t from = 0; from <= text.size();) {
        const std::size_t comma = std::min(text.find(',', from), text.size());
        const auto value = read_whole(text.substr(from, comma - from));
        if (!value) return tl::unexpected(fault);
        values.push_back(*value);
        from = comma + 1;
    }
    if (values.size() < least || values.size() > most) return tl::unexpected(fault);
    return values;
}

std::optional<Fault> out_of_range(const std::string& option, double value, double low, double high,
                                  const std::string& remedy) {
    if (value >= low && value <= high) return std::nullopt;
    return Fault{FaultCode::bad_usage,
                 {},
                 0,
                 option,
                 fmt::format("{}", value),
                 fmt::format("{} to {}", low, high),
                 remedy};
}

} // namespace unstring
