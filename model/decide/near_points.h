#pragma once
// Points by cell, to find what lies near.

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <unordered_map>
#include <vector>

#include "model/quantities.h"

namespace unstring {

class NearPoints {
public:
    explicit NearPoints(double cell_m) : cell_m_(cell_m) {}

    void add(MapPoint place, int name) {
        cells_[key(column(place.x_m), column(place.y_m))].push_back({place, name});
    }
    /// Adds the name to every cell that the box around a segment touches.
    void add_segment(MapPoint a, MapPoint b, int name) {
        for (std::int64_t i = column(std::min(a.x_m, b.x_m)); i <= column(std::max(a.x_m, b.x_m)); ++i)
            for (std::int64_t j = column(std::min(a.y_m, b.y_m)); j <= column(std::max(a.y_m, b.y_m)); ++j)
                cells_[key(i, j)].push_back({a, name});
    }
    /// Calls `visit(name, place)` for everything in the cells within `reach_m`; further ones and repeats may
    /// be among them.
    template <class Visit>
    void visit_near(MapPoint place, double reach_m, Visit visit) const {
        for (std::int64_t i = column(place.x_m - reach_m); i <= column(place.x_m + reach_m); ++i)
            for (std::int64_t j = column(place.y_m - reach_m); j <= column(place.y_m + reach_m); ++j) {
                const auto found = cells_.find(key(i, j));
                if (found == cells_.end()) continue;
                for (const Entry& entry : found->second) visit(entry.name, entry.place);
            }
    }

private:
    struct Entry {
        MapPoint place;
        int name = 0;
    };
    [[nodiscard]] std::int64_t column(double metres) const {
        return static_cast<std::int64_t>(std::floor(metres / cell_m_));
    }
    [[nodiscard]] static std::uint64_t key(std::int64_t i, std::int64_t j) {
        return static_cast<std::uint64_t>(i) * 0x9E3779B97F4A7C15ULL + static_cast<std::uint64_t>(j);
    }
    double cell_m_;
    std::unordered_map<std::uint64_t, std::vector<Entry>> cells_;
};

} // namespace unstring
