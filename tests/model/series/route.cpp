#include "model/series/route.h"

#include <algorithm>
#include <numeric>
#include <random>

#include <catch2/catch.hpp>

namespace unstring {
namespace {

std::vector<MapPoint> random_stops(int n, unsigned seed) {
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> metres(0, 1000);
    std::vector<MapPoint> stops;
    for (int i = 0; i < n; ++i) {
        const double x_m = metres(random);
        stops.push_back({x_m, metres(random)});
    }
    return stops;
}

double by_permutations_m(const DistanceTable& distances, bool is_closed) {
    std::vector<std::size_t> order(distances.stops() - 1);
    std::iota(order.begin(), order.end(), 1);
    double shortest_m = 1e300;
    do {
        double metres = 0;
        std::size_t here = 0;
        for (const std::size_t stop : order) {
            metres += distances(here, stop);
            here = stop;
        }
        shortest_m = std::min(shortest_m, metres + (is_closed ? distances(here, 0) : 0));
    } while (std::next_permutation(order.begin(), order.end()));
    return shortest_m;
}

void check_is_route(const Route& route, std::size_t stops) {
    REQUIRE(route.order.size() == stops);
    REQUIRE(route.order.front() == 0);
    std::vector<int> sorted = route.order;
    std::sort(sorted.begin(), sorted.end());
    for (std::size_t i = 0; i < sorted.size(); ++i) REQUIRE(sorted[i] == static_cast<int>(i));
}

} // namespace

TEST_CASE("route: up to 8 stops equal the best of all permutations, open and closed") {
    const unsigned seed = 99;
    INFO("seed " << seed);
    for (unsigned round = 0; round < 20; ++round)
        for (int n = 1; n <= 8; ++n) {
            const DistanceTable distances = straight_distances(random_stops(n, seed + round));
            CAPTURE(round, n);
            REQUIRE(closed_route(distances).length_m == Approx(by_permutations_m(distances, true)));
            REQUIRE(open_route(distances).length_m == Approx(by_permutations_m(distances, false)));
        }
}

TEST_CASE("route: stops on a circle are visited around it") {
    std::vector<MapPoint> stops;
    for (int i = 0; i < 60; ++i) {
        const double angle = 2 * std::numbers::pi * (i * 7 % 60) / 60;
        stops.push_back({100 * std::cos(angle), 100 * std::sin(angle)});
    }
    const double chord_m = 2 * 100 * std::sin(std::numbers::pi / 60);
    const Route closed = closed_route(straight_distances(stops));
    check_is_route(closed, 60);
    CHECK(closed.length_m == Approx(60 * chord_m));
    const Route open = open_route(straight_distances(stops));
    check_is_route(open, 60);
    CHECK(open.length_m == Approx(59 * chord_m));
}

TEST_CASE("route: every stop once and the length that its order has, also with stops at one place") {
    for (const int n : {0, 1, 2, 3, 12, 13, 14, 40}) {
        std::vector<MapPoint> stops = random_stops(n, 5);
        for (std::size_t i = 3; i < stops.size(); i += 3) stops[i] = stops[i - 1];
        for (const bool is_closed : {true, false}) {
            const DistanceTable distances = straight_distances(stops);
            const Route route = is_closed ? closed_route(distances) : open_route(distances);
            CAPTURE(n, is_closed);
            if (n == 0) {
                CHECK(route.order.empty());
                continue;
            }
            check_is_route(route, static_cast<std::size_t>(n));
            double metres = 0;
            for (std::size_t i = 1; i < route.order.size(); ++i)
                metres += distances(static_cast<std::size_t>(route.order[i - 1]),
                                    static_cast<std::size_t>(route.order[i]));
            if (is_closed) metres += distances(static_cast<std::size_t>(route.order.back()), 0);
            CHECK(route.length_m == Approx(metres));
        }
    }
}

TEST_CASE("route: the search of many stops finds what the exact programme proves for 12") {
    int found = 0;
    for (unsigned round = 0; round < 20; ++round) {
        std::vector<MapPoint> stops = random_stops(12, 1000 + round);
        const double proved_m = closed_route(straight_distances(stops)).length_m;
        stops.push_back(
            stops.front()); // a thirteenth at the first one's place: the same length, the other search
        const double searched_m = closed_route(straight_distances(stops)).length_m;
        CHECK(searched_m >= proved_m - 1e-6);
        found += searched_m <= proved_m + 1e-6 ? 1 : 0;
    }
    CHECK(found == 20);
}

TEST_CASE("route: asked twice it answers the same") {
    const DistanceTable distances = straight_distances(random_stops(70, 3));
    CHECK(open_route(distances).order == open_route(distances).order);
}

} // namespace unstring
