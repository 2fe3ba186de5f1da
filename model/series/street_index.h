#pragma once
// How many carriageways a straight line crosses: street centre lines, found again by a grid of cells.

#include <cstdint>
#include <unordered_map>
#include <vector>

#include "model/city/city.h"

namespace unstring {

class StreetIndex {
public:
    explicit StreetIndex(const std::vector<Street>& streets);
    /// Centre-line pieces that the line from a to b crosses; touching with an end counts. Meant for lines to
    /// some 500 m.
    [[nodiscard]] int crossings(MapPoint a, MapPoint b) const;

private:
    struct Piece {
        MapPoint a, b;
    };
    std::vector<Piece> pieces_;
    std::unordered_map<std::int64_t, std::vector<std::uint32_t>> by_cell_;
};

} // namespace unstring
