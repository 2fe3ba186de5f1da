#pragma once
// The weather of a mean year, by month.

#include <array>

namespace unstring {

struct Climate {
    std::array<double, 12> ghi_kwh_m2_day{}; ///< global horizontal irradiation, mean day of the month
    std::array<double, 12> temp_c{};
    std::array<double, 12> albedo{};
};

} // namespace unstring
