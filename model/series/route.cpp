#include "model/series/route.h"

#include <algorithm>

#include "model/series/route_search.h"

namespace unstring {
namespace {

Route route_of(const DistanceTable& distances, std::vector<int> order, bool is_closed) {
    Route route{std::move(order), 0};
    const auto stop = [&](std::size_t i) { return static_cast<std::size_t>(route.order[i]); };
    for (std::size_t i = 1; i < route.order.size(); ++i) route.length_m += distances(stop(i - 1), stop(i));
    if (is_closed && !route.order.empty()) route.length_m += distances(stop(route.order.size() - 1), stop(0));
    return route;
}

/// The table with one stop more: at no distance from any, and held to stop 0 by a distance that no tour gives
/// up.
DistanceTable with_anywhere(const DistanceTable& distances) {
    const std::size_t n = distances.stops();
    DistanceTable wider(n + 1);
    double longest_m = 0;
    for (std::size_t a = 0; a < n; ++a)
        for (std::size_t b = 0; b < a; ++b) {
            wider.set(a, b, distances(a, b));
            longest_m = std::max(longest_m, distances(a, b));
        }
    wider.set(n, 0, -10 * longest_m - 1);
    return wider;
}

} // namespace

DistanceTable straight_distances(std::span<const MapPoint> stops) {
    DistanceTable distances(stops.size());
    for (std::size_t a = 0; a < stops.size(); ++a)
        for (std::size_t b = 0; b < a; ++b) distances.set(a, b, distance_m(stops[a], stops[b]));
    return distances;
}

Route closed_route(const DistanceTable& distances, const RouteEffort& effort) {
    if (distances.stops() == 0) return {};
    if (distances.stops() <= kExactStops) return route_of(distances, exact_order(distances, true), true);
    return route_of(distances, searched_tour(distances, effort), true);
}

Route open_route(const DistanceTable& distances, const RouteEffort& effort) {
    if (distances.stops() == 0) return {};
    if (distances.stops() <= kExactStops) return route_of(distances, exact_order(distances, false), false);
    std::vector<int> tour = searched_tour(with_anywhere(distances), effort);
    const int anywhere = static_cast<int>(distances.stops());
    if (tour[1] == anywhere) std::reverse(tour.begin() + 1, tour.end());
    tour.erase(std::find(tour.begin(), tour.end(), anywhere));
    return route_of(distances, std::move(tour), false);
}

} // namespace unstring
