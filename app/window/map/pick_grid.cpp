#include "app/window/map/pick_grid.h"

#include <algorithm>
#include <cmath>

namespace unstring {

PickGrid::PickGrid(std::vector<Place> places) {
    if (places.empty()) return;
    MapPoint high = places.front().at;
    low_ = high;
    for (const Place& place : places) {
        low_ = {std::min(low_.x_m, place.at.x_m), std::min(low_.y_m, place.at.y_m)};
        high = {std::max(high.x_m, place.at.x_m), std::max(high.y_m, place.at.y_m)};
    }
    // About two records a cell; never more cells a side than 4 000, however long and thin the city is.
    const double area_m2 = std::max(1.0, (high.x_m - low_.x_m) * (high.y_m - low_.y_m));
    const double longest_m = std::max(high.x_m - low_.x_m, high.y_m - low_.y_m);
    cell_m_ = std::max({1.0, std::sqrt(2.0 * area_m2 / double(places.size())), longest_m / 4000.0});
    columns_ = long((high.x_m - low_.x_m) / cell_m_) + 1;
    rows_ = long((high.y_m - low_.y_m) / cell_m_) + 1;
    const auto cell_of = [this](const Place& place) {
        return std::size_t(row(place.at.y_m) * columns_ + column(place.at.x_m));
    };
    start_.assign(std::size_t(columns_ * rows_) + 1, 0);
    for (const Place& place : places) ++start_[cell_of(place) + 1];
    for (std::size_t i = 1; i < start_.size(); ++i) start_[i] += start_[i - 1];
    places_.resize(places.size());
    std::vector<std::uint32_t> next(start_.begin(), start_.end() - 1);
    for (const Place& place : places) places_[next[cell_of(place)]++] = place;
}

long PickGrid::column(double x_m) const {
    return std::clamp(long(std::floor((x_m - low_.x_m) / cell_m_)), 0L, columns_ - 1);
}
long PickGrid::row(double y_m) const {
    return std::clamp(long(std::floor((y_m - low_.y_m) / cell_m_)), 0L, rows_ - 1);
}

void PickGrid::in_rectangle(MapPoint low, MapPoint high,
                            const std::function<void(const Place&)>& visit) const {
    if (places_.empty()) return;
    for (long r = row(low.y_m); r <= row(high.y_m); ++r) {
        const auto first = std::size_t(r * columns_ + column(low.x_m)),
                   last = std::size_t(r * columns_ + column(high.x_m));
        for (std::uint32_t i = start_[first]; i < start_[last + 1]; ++i) {
            const MapPoint at = places_[i].at;
            if (at.x_m >= low.x_m && at.x_m <= high.x_m && at.y_m >= low.y_m && at.y_m <= high.y_m)
                visit(places_[i]);
        }
    }
}

std::optional<std::uint32_t> PickGrid::nearest(MapPoint at, double reach_m) const {
    std::optional<std::uint32_t> best;
    double best_m = reach_m;
    in_rectangle({at.x_m - reach_m, at.y_m - reach_m}, {at.x_m + reach_m, at.y_m + reach_m},
                 [&](const Place& place) {
                     const double far_m = distance_m(at, place.at);
                     if (far_m > best_m || (far_m == best_m && best && *best < place.record)) return;
                     best_m = far_m;
                     best = place.record;
                 });
    return best;
}

} // namespace unstring
