#include "model/orders/approach.h"

#include <array>
#include <utility>

#include <fmt/format.h>

namespace unstring {

double approach_distance_m(double volts) {
    constexpr std::array<std::pair<double, double>, 5> kRows = {
        {{300, 0}, {750, 0.33}, {5000, 0.63}, {15000, 0.68}, {36000, 0.89}}};
    for (const auto& [up_to_v, distance_m] : kRows)
        if (volts <= up_to_v) return distance_m;
    return -1;
}

std::string glove_class(double volts) {
    constexpr std::array<std::pair<double, const char*>, 6> kRows = {
        {{500, "00"}, {1000, "0"}, {7500, "1"}, {17000, "2"}, {26500, "3"}, {36000, "4"}}};
    for (const auto& [up_to_v, name] : kRows)
        if (volts <= up_to_v) return name;
    return "beyond class 4";
}

std::string approach_text(double volts) {
    const double distance_m = approach_distance_m(volts);
    const std::string distance = distance_m < 0    ? "ask the owner"
                                 : distance_m == 0 ? "no contact"
                                                   : fmt::format("{:.2f} m", distance_m);
    return fmt::format("{}, glove class {}", distance, glove_class(volts));
}

} // namespace unstring
