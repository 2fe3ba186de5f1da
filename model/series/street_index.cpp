#include "model/series/street_index.h"

#include <algorithm>
#include <cmath>

namespace unstring {
namespace {

constexpr double kCell_m = 100;
constexpr double kLongest_m = 5000; // a piece or line beyond this is no street of a city

std::int64_t cell_of(double m) { return static_cast<std::int64_t>(std::floor(m / kCell_m)); }
std::int64_t key_of(std::int64_t x, std::int64_t y) { return x * 0x100000000LL + (y & 0xffffffffLL); }

template <class Visit>
void for_cells(MapPoint a, MapPoint b, Visit visit) {
    if (!(distance_m(a, b) < kLongest_m)) return;
    const auto [x0, x1] = std::minmax({cell_of(a.x_m), cell_of(b.x_m)});
    const auto [y0, y1] = std::minmax({cell_of(a.y_m), cell_of(b.y_m)});
    for (std::int64_t x = x0; x <= x1; ++x)
        for (std::int64_t y = y0; y <= y1; ++y) visit(key_of(x, y));
}

/// > 0: c lies left of a -> b.
double side(MapPoint a, MapPoint b, MapPoint c) {
    return (b.x_m - a.x_m) * (c.y_m - a.y_m) - (b.y_m - a.y_m) * (c.x_m - a.x_m);
}

bool crosses(MapPoint a, MapPoint b, MapPoint c, MapPoint d) {
    return side(a, b, c) * side(a, b, d) <= 0 && side(c, d, a) * side(c, d, b) < 0;
}

} // namespace

StreetIndex::StreetIndex(const std::vector<Street>& streets) {
    for (const Street& street : streets)
        for (std::size_t i = 1; i < street.line.size(); ++i) {
            const auto place = static_cast<std::uint32_t>(pieces_.size());
            pieces_.push_back({street.line[i - 1], street.line[i]});
            for_cells(street.line[i - 1], street.line[i],
                      [&](std::int64_t key) { by_cell_[key].push_back(place); });
        }
}

int StreetIndex::crossings(MapPoint a, MapPoint b) const {
    std::vector<std::uint32_t> near;
    for_cells(a, b, [&](std::int64_t key) {
        if (const auto at = by_cell_.find(key); at != by_cell_.end())
            near.insert(near.end(), at->second.begin(), at->second.end());
    });
    std::sort(near.begin(), near.end());
    near.erase(std::unique(near.begin(), near.end()), near.end());
    return static_cast<int>(std::count_if(near.begin(), near.end(), [&](std::uint32_t place) {
        return crosses(a, b, pieces_[place].a, pieces_[place].b);
    }));
}

} // namespace unstring
