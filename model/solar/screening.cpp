#include "model/solar/screening.h"

#include <algorithm>

#include <fmt/format.h>

namespace unstring {

std::string what_stops(const Pole& pole, const Head& head) {
    if (pole.solar_ok && !*pole.solar_ok) return "solar_ok is no at this pole";
    if (pole.critical && !pole.solar_ok) return "critical pole: solar only where solar_ok is yes";
    if (pole.need_lm && head.lumens < *pole.need_lm)
        return fmt::format("{:.0f} lm are needed, the head gives {:.0f} lm", *pole.need_lm, head.lumens);
    if (pole.epa_allow_m2 && head.epa_m2 > *pole.epa_allow_m2)
        return fmt::format("the pole allows {:.2f} m2 of wind area, the head has {:.2f} m2",
                           *pole.epa_allow_m2, head.epa_m2);
    return {};
}

double goal_of(const Pole& pole, double nights_goal) {
    return pole.critical ? std::min(nights_goal, kCriticalGoal) : nights_goal;
}

} // namespace unstring
