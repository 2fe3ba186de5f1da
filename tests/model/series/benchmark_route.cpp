// TSPLIB (Reinelt 1991), rounded Euclidean distances: optimal tours as published; open paths from city 1
// proved.

#include <cmath>
#include <fstream>
#include <sstream>
#include <string>

#include <catch2/catch.hpp>

#include "model/series/route.h"

namespace unstring {
namespace {

DistanceTable rounded_distances(const std::string& name) {
    std::ifstream file(std::string(UNSTRING_BENCHMARKS) + "/tsp/" + name + ".tsp");
    REQUIRE(file.good());
    std::string line;
    while (std::getline(file, line) && !line.starts_with("NODE_COORD_SECTION")) {
    }
    std::vector<MapPoint> stops;
    while (std::getline(file, line) && !line.starts_with("EOF")) {
        std::istringstream fields(line);
        int id = 0;
        MapPoint stop;
        if (fields >> id >> stop.x_m >> stop.y_m) stops.push_back(stop);
    }
    DistanceTable distances(stops.size());
    for (std::size_t a = 0; a < stops.size(); ++a)
        for (std::size_t b = 0; b < a; ++b)
            distances.set(a, b, std::floor(distance_m(stops[a], stops[b]) + 0.5));
    return distances;
}

struct Known {
    const char* name;
    double optimum, within;
};

} // namespace

TEST_CASE("route: published optimal tours are found, to the unit or within what is allowed") {
    for (const Known& known : {Known{"berlin52", 7542, 0},
                               {"eil51", 426, 0},
                               {"st70", 675, 0},
                               {"ch130", 6110, 0.01},
                               {"lin105", 14379, 0.01}}) {
        const double length = closed_route(rounded_distances(known.name)).length_m;
        CAPTURE(known.name, length);
        CHECK(length >= known.optimum);
        CHECK(length <= known.optimum * (1 + known.within));
    }
}

TEST_CASE("route: the proved open paths from city 1 are found") {
    CHECK(open_route(rounded_distances("berlin52")).length_m == 7302);
    CHECK(open_route(rounded_distances("eil51")).length_m == 411);
}

} // namespace unstring
