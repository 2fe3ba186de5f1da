#include "model/solar/panel_bearing.h"

#include <algorithm>
#include <cmath>
#include <optional>

namespace unstring {
namespace {

MapPoint nearest_on(MapPoint a, MapPoint b, MapPoint place) {
    const double along_x = b.x_m - a.x_m;
    const double along_y = b.y_m - a.y_m;
    const double length2 = along_x * along_x + along_y * along_y;
    if (length2 == 0) return a;
    const double share =
        std::clamp(((place.x_m - a.x_m) * along_x + (place.y_m - a.y_m) * along_y) / length2, 0.0, 1.0);
    return {a.x_m + share * along_x, a.y_m + share * along_y};
}

/// Towards the nearest street line; nothing when none is near, or when the pole stands on it.
std::optional<double> street_bearing_deg(const City& city, MapPoint place) {
    double nearest_m = kStreetNear_m;
    std::optional<double> found;
    for (const Street& street : city.streets)
        for (std::size_t i = 0; i + 1 < street.line.size(); ++i) {
            const MapPoint point = nearest_on(street.line[i], street.line[i + 1], place);
            const double away_m = distance_m(point, place);
            if (away_m >= nearest_m || away_m < 0.01) continue;
            nearest_m = away_m;
            found = bearing_deg(place, point);
        }
    return found;
}

double turned(double deg) {
    const double rest = std::fmod(deg, 360.0);
    return rest < 0 ? rest + 360.0 : rest;
}

} // namespace

PanelBearing arm_bearing(const City& city, const Pole& pole) {
    if (pole.arm_deg) return {turned(*pole.arm_deg), "file"};
    if (const auto street = street_bearing_deg(city, pole.place)) return {turned(*street), "street"};
    const bool is_south = city.centre.lat_deg < 0;
    return {turned((is_south ? 0.0 : 180.0) - city.convergence_deg), is_south ? "north" : "south"};
}

PanelBearing panel_bearing(const PanelBearing& arm, double turn_deg) {
    const bool has_arm = arm.from == "file" || arm.from == "street";
    return {has_arm ? turned(arm.bearing_deg + turn_deg) : arm.bearing_deg, arm.from};
}

} // namespace unstring
