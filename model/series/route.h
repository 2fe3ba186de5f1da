#pragma once
// The shortest route over stops: a crew's day from its depot, or the closed way of a cable. Comes in:
// distances. Goes out: the order of the stops.

#include <cstdint>
#include <span>
#include <vector>

#include "model/quantities.h"

namespace unstring {

class DistanceTable { ///< symmetric, 0 on the diagonal
public:
    explicit DistanceTable(std::size_t stops) : stops_(stops), m_(stops * stops, 0) {}
    [[nodiscard]] std::size_t stops() const { return stops_; }
    [[nodiscard]] double operator()(std::size_t a, std::size_t b) const { return m_[a * stops_ + b]; }
    void set(std::size_t a, std::size_t b, double metres) {
        m_[a * stops_ + b] = m_[b * stops_ + a] = metres;
    }

private:
    std::size_t stops_;
    std::vector<double> m_;
};

[[nodiscard]] DistanceTable straight_distances(std::span<const MapPoint> stops);

struct Route {
    std::vector<int> order; ///< every stop once, stop 0 first
    double length_m = 0;    ///< the way back to stop 0 included where the route is closed
};

struct RouteEffort {
    int rounds = -1; ///< of the iterated search; -1 = 200 a stop, at most 30 000
    std::uint64_t seed = 1;
};

inline constexpr std::size_t kExactStops = 12;

/// Shortest closed route. Up to 12 stops exact (Held and Karp's dynamic programme), else 2-opt and Or-opt on
/// neighbour lists, iterated with local double bridges. The same answer on every machine.
[[nodiscard]] Route closed_route(const DistanceTable& distances, const RouteEffort& effort = {});

/// Shortest route that starts at stop 0 and ends anywhere: the closed route with one more stop, at no
/// distance from any.
[[nodiscard]] Route open_route(const DistanceTable& distances, const RouteEffort& effort = {});

} // namespace unstring
