#include "model/orders/switch_on.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/quantities.h"
#include "model/sun/daily_sun.h"

namespace unstring {

double switch_on_h(double lat_deg, int month, double switch_deg) {
    int middle = 15;
    for (int before = 1; before < month; ++before) middle += days_in_month(before);
    const double declination = cooper_declination_deg(middle) * kRadPerDeg, lat = lat_deg * kRadPerDeg;
    const double cosine = (std::sin(switch_deg * kRadPerDeg) - std::sin(lat) * std::sin(declination)) /
                          (std::cos(lat) * std::cos(declination));
    return 12 + std::acos(std::clamp(cosine, -1.0, 1.0)) / kRadPerDeg / 15;
}

std::array<double, 12> switch_on_year_h(double lat_deg) {
    std::array<double, 12> hours{};
    for (int month = 1; month <= 12; ++month)
        hours[static_cast<std::size_t>(month - 1)] = switch_on_h(lat_deg, month);
    return hours;
}

std::string clock_text(double hours) {
    const int minutes = static_cast<int>(std::lround(hours * 60));
    return fmt::format("{:02}:{:02}", minutes / 60, minutes % 60);
}

} // namespace unstring
