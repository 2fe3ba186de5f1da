#pragma once
// The words of steps and cautions. Each list keeps its order; {..} stands for what the order fills in. The
// owner's own switching procedure goes before them.

#include <string>
#include <vector>

#include "model/orders/work_order.h"

namespace unstring {

struct SeriesWords { ///< what the line order's steps name
    std::string string_id, unit_id, cutbacks, swap, open_kv, approach;
    std::string band = "6.40-6.70 A";
    double change_v = 0, lamp_v = 0;
    bool retires = false; ///< the last lamp leaves: nothing is re-energised
    bool is_two_loop = false;
    bool is_oil_suspect = false;
    std::string controls; ///< strings that this one switches, empty = none
};

/// Work on a series string, in the order that keeps people alive.
/// Source: 29 CFR 1910.269 (m)(3), (n), (t)(5), (e)(7), (w)(3), (w)(6), (w)(7); 29 CFR 1926 subpart V.
[[nodiscard]] std::vector<OrderStep> series_steps(const SeriesWords& words);
[[nodiscard]] std::vector<OrderStep> civil_steps(bool reuses_duct, bool sets_poles);
[[nodiscard]] std::vector<OrderStep> electric_steps(const std::string& last_pole, double planned_v);
[[nodiscard]] std::vector<OrderStep> lighting_steps(bool hangs_solar, bool hangs_led);

/// What stands on every order, then what this crew's work adds.
[[nodiscard]] std::vector<std::string> cautions_for(Crew crew, bool is_two_loop, bool has_live_base);

inline constexpr const char* kLiveBase = "live series cable in base: line crew opens";

} // namespace unstring
