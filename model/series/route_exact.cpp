#include "model/series/route_search.h"

#include <algorithm>
#include <limits>

namespace unstring {

// Held and Karp 1962: shortest_m[set][last] = shortest way from stop 0 over the set (of stops 1..n-1), ending
// at `last`.
std::vector<int> exact_order(const DistanceTable& distances, bool is_closed) {
    const std::size_t others = distances.stops() - 1;
    if (others == 0) return {0};
    const std::size_t sets = std::size_t{1} << others;
    std::vector<double> shortest_m(sets * others, std::numeric_limits<double>::infinity());
    std::vector<int> before(sets * others, -1);
    for (std::size_t i = 0; i < others; ++i)
        shortest_m[(std::size_t{1} << i) * others + i] = distances(0, i + 1);
    for (std::size_t set = 1; set < sets; ++set)
        for (std::size_t last = 0; last < others; ++last) {
            const double here_m = shortest_m[set * others + last];
            if (here_m == std::numeric_limits<double>::infinity()) continue;
            for (std::size_t next = 0; next < others; ++next) {
                if ((set >> next & 1U) != 0) continue;
                const std::size_t to = (set | std::size_t{1} << next) * others + next;
                const double there_m = here_m + distances(last + 1, next + 1);
                if (there_m >= shortest_m[to]) continue;
                shortest_m[to] = there_m;
                before[to] = static_cast<int>(last);
            }
        }

    std::size_t set = sets - 1, last = 0;
    const auto whole_m = [&](std::size_t stop) {
        return shortest_m[set * others + stop] + (is_closed ? distances(stop + 1, 0) : 0);
    };
    for (std::size_t stop = 1; stop < others; ++stop)
        if (whole_m(stop) < whole_m(last)) last = stop;
    std::vector<int> order;
    for (int at = static_cast<int>(last); at >= 0;) {
        const auto place = static_cast<std::size_t>(at);
        order.push_back(at + 1);
        at = before[set * others + place];
        set &= ~(std::size_t{1} << place);
    }
    order.push_back(0);
    std::reverse(order.begin(), order.end());
    return order;
}

} // namespace unstring
