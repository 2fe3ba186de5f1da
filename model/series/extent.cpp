#include "model/series/extent.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace unstring {
namespace {

constexpr std::size_t kFewestPlaces = 4;
constexpr double kReachInMedians = 5;
constexpr double kLeastReach_m = 3000;

bool is_finite(MapPoint place) { return std::isfinite(place.x_m) && std::isfinite(place.y_m); }

double median(std::vector<double>& values) {
    const auto middle = values.begin() + static_cast<long>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    return *middle;
}

} // namespace

Extent extent_of(const City& city) {
    std::vector<double> x_m, y_m, away_m;
    for (const Pole& pole : city.poles) {
        if (!pole.has_place || !is_finite(pole.place)) continue;
        x_m.push_back(pole.place.x_m);
        y_m.push_back(pole.place.y_m);
    }
    if (x_m.size() < kFewestPlaces) return {};
    Extent extent{{median(x_m), median(y_m)}, 0};
    for (const Pole& pole : city.poles)
        if (pole.has_place && is_finite(pole.place)) away_m.push_back(distance_m(pole.place, extent.centre));
    extent.reach_m = std::max(kLeastReach_m, kReachInMedians * median(away_m));
    return extent;
}

bool is_believed(const Extent& extent, MapPoint place) {
    return is_finite(place) && (extent.reach_m == 0 || distance_m(place, extent.centre) <= extent.reach_m);
}

bool is_swapped(const Extent& extent, MapPoint place) {
    return is_finite(place) && !is_believed(extent, place) && is_believed(extent, {place.y_m, place.x_m});
}

} // namespace unstring
