#include "model/vet/wiring_order.h"

#include <algorithm>
#include <random>
#include <set>
#include <utility>

#include "model/series/route.h"
#include "model/vet/natural_id.h"
#include "model/vet/wiring_insert.h"

namespace unstring {
namespace {

constexpr double kPerCrossing_m = 15;
constexpr double kShake_frac = 0.1;
constexpr int kShakes = 8;
constexpr double kNumbersAsShort = 1.02; // of the shortest route found
constexpr double kLongestChecked_m =
    300; // pairs farther apart are no neighbours: their crossings are not counted

struct Stops {                ///< 0 = the station, then lamps that have a place
    bool has_station = false; ///< else stop 0 lies at no distance from any and the loop is closed without it
    std::vector<MapPoint> places;
    std::vector<PoleIx> lamps;
    std::vector<std::optional<int>> numbers;
    std::vector<PoleIx> without_place;
};

bool has_number(const Pole& pole) { return pole.order.has_value() && !pole.order_is_inferred; }

Stops stops_of(const City& city, const Extent& extent, StringIx string, const std::vector<PoleIx>& lamps) {
    Stops stops;
    stops.places.emplace_back();
    stops.lamps.emplace_back();
    stops.numbers.emplace_back();
    for (const PoleIx lamp : lamps) {
        const Pole& pole = city.poles[lamp.place()];
        if (!pole.has_place || !is_believed(extent, pole.place)) {
            stops.without_place.push_back(lamp);
            continue;
        }
        stops.places.push_back(pole.place);
        stops.lamps.push_back(lamp);
        stops.numbers.push_back(has_number(pole) ? pole.order : std::nullopt);
    }
    const auto& station = city.strings[string.place()].station;
    stops.has_station = station && is_believed(extent, *station);
    if (stops.has_station) stops.places[0] = *station;
    return stops;
}

DistanceTable street_distances(const Stops& stops, const StreetIndex& streets) {
    DistanceTable distances = straight_distances(stops.places);
    for (std::size_t a = 0; a < stops.places.size(); ++a)
        for (std::size_t b = 0; b < a; ++b) {
            if (b == 0 && !stops.has_station) distances.set(a, b, 0);
            if (distances(a, b) > kLongestChecked_m || (b == 0 && !stops.has_station)) continue;
            distances.set(
                a, b, distances(a, b) + kPerCrossing_m * streets.crossings(stops.places[a], stops.places[b]));
        }
    return distances;
}

double length_m(const DistanceTable& distances, const Stops& stops, const std::vector<int>& order) {
    const auto between_m = [&](int a, int b) {
        return distances(static_cast<std::size_t>(a), static_cast<std::size_t>(b));
    };
    double metres =
        stops.has_station ? between_m(order.back(), order.front()) : between_m(order.back(), order[1]);
    for (std::size_t i = 1; i < order.size(); ++i) metres += between_m(order[i - 1], order[i]);
    return metres;
}

std::vector<int> order_by_pole_numbers(const City& city, const Stops& stops) {
    std::vector<int> order;
    for (std::size_t i = 0; i < stops.lamps.size(); ++i) order.push_back(static_cast<int>(i));
    std::sort(order.begin() + 1, order.end(), [&](int a, int b) {
        return is_before_by_number(city.poles[stops.lamps[static_cast<std::size_t>(a)].place()].id,
                                   city.poles[stops.lamps[static_cast<std::size_t>(b)].place()].id);
    });
    return order;
}

RouteEffort effort_for(std::size_t stops) {
    RouteEffort effort;
    effort.rounds = 4 * static_cast<int>(stops);
    return effort;
}

/// The closed route over the lamps alone, opened at its longest leg.
std::vector<int> order_without_station(const DistanceTable& distances) {
    const std::size_t lamps = distances.stops() - 1;
    DistanceTable own(lamps);
    for (std::size_t a = 0; a < lamps; ++a)
        for (std::size_t b = 0; b < a; ++b) own.set(a, b, distances(a + 1, b + 1));
    std::vector<int> order = closed_route(own, effort_for(lamps)).order;
    const auto leg_m = [&](std::size_t i) {
        return own(static_cast<std::size_t>(order[i]), static_cast<std::size_t>(order[(i + 1) % lamps]));
    };
    std::size_t longest = 0;
    for (std::size_t i = 1; i < lamps; ++i)
        if (leg_m(i) > leg_m(longest)) longest = i;
    std::rotate(order.begin(), order.begin() + static_cast<long>((longest + 1) % lamps), order.end());
    for (int& stop : order) ++stop;
    order.insert(order.begin(), 0);
    return order;
}

std::vector<int> order_on(const DistanceTable& distances, const Stops& stops, bool any_number) {
    if (any_number) return insert_unnumbered(distances, stops.numbers);
    if (!stops.has_station) return order_without_station(distances);
    return closed_route(distances, effort_for(distances.stops())).order;
}

std::set<std::pair<int, int>> neighbour_pairs(const std::vector<int>& order) {
    std::set<std::pair<int, int>> pairs;
    for (std::size_t i = 0; i < order.size(); ++i)
        pairs.insert(std::minmax({order[i], order[(i + 1) % order.size()]}));
    return pairs;
}

DistanceTable shaken(const DistanceTable& distances, std::mt19937_64& random) {
    DistanceTable out(distances.stops());
    for (std::size_t a = 0; a < distances.stops(); ++a)
        for (std::size_t b = 0; b < a; ++b) {
            const double unit = static_cast<double>(random() >> 11) * 0x1p-53;
            out.set(a, b, distances(a, b) * (1 + kShake_frac * (2 * unit - 1)));
        }
    return out;
}

double confidence_of(const DistanceTable& distances, const Stops& stops, bool any_number,
                     const std::vector<int>& order) {
    const auto pairs = neighbour_pairs(order);
    std::mt19937_64 random(stops.lamps.size());
    double stayed = 0;
    for (int k = 0; k < kShakes; ++k)
        for (const auto& pair : neighbour_pairs(order_on(shaken(distances, random), stops, any_number)))
            stayed += pairs.contains(pair) ? 1 : 0;
    return stayed / (kShakes * static_cast<double>(pairs.size()));
}

/// Of the two ways round, the one whose first lamp lies nearer the station.
void turn_to_nearer(const DistanceTable& distances, std::vector<int>& order) {
    if (distances(0, static_cast<std::size_t>(order.back())) <
        distances(0, static_cast<std::size_t>(order[1])))
        std::reverse(order.begin() + 1, order.end());
}

} // namespace

SettledOrder settle_order(const City& city, const Extent& extent, const StreetIndex& streets, StringIx string,
                          const std::vector<PoleIx>& lamps) {
    SettledOrder settled{OrderFrom::given, 1, lamps};
    const auto numbered = std::count_if(lamps.begin(), lamps.end(),
                                        [&](PoleIx lamp) { return has_number(city.poles[lamp.place()]); });
    if (numbered == static_cast<long>(lamps.size())) return settled;
    const bool any_number = numbered > 0;
    settled.from = any_number ? OrderFrom::partial : OrderFrom::inferred;

    const Stops stops = stops_of(city, extent, string, lamps);
    if (stops.lamps.size() > 1) {
        const DistanceTable distances = street_distances(stops, streets);
        std::vector<int> order = order_on(distances, stops, any_number);
        if (!any_number) {
            std::vector<int> by_number = order_by_pole_numbers(city, stops);
            if (length_m(distances, stops, by_number) <= kNumbersAsShort * length_m(distances, stops, order))
                order = std::move(by_number);
            else
                turn_to_nearer(distances, order);
        }
        settled.confidence_frac = confidence_of(distances, stops, any_number, order);
        settled.wiring.clear();
        for (std::size_t i = 1; i < order.size(); ++i)
            settled.wiring.push_back(stops.lamps[static_cast<std::size_t>(order[i])]);
    } else {
        settled.wiring.clear();
    }
    settled.wiring.insert(settled.wiring.end(), stops.without_place.begin(), stops.without_place.end());
    return settled;
}

} // namespace unstring
