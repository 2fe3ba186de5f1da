#pragma once
// Finds records by place: a plain grid in cell order, built once a view.

#include <cstdint>
#include <functional>
#include <optional>
#include <vector>

#include "model/quantities.h"

namespace unstring {

class PickGrid {
public:
    struct Place {
        MapPoint at;
        std::uint32_t record = 0;
    };

    PickGrid() = default;
    explicit PickGrid(std::vector<Place> places);

    /// The nearest record within reach_m; ties go to the smaller record.
    [[nodiscard]] std::optional<std::uint32_t> nearest(MapPoint at, double reach_m) const;
    /// Calls `visit` for every record in a rectangle, borders included, in cell order.
    void in_rectangle(MapPoint low, MapPoint high, const std::function<void(const Place&)>& visit) const;
    [[nodiscard]] std::size_t size() const { return places_.size(); }

private:
    [[nodiscard]] long column(double x_m) const;
    [[nodiscard]] long row(double y_m) const;

    std::vector<Place> places_;        ///< sorted by cell
    std::vector<std::uint32_t> start_; ///< first place of each cell, one more at the end
    MapPoint low_;
    double cell_m_ = 1;
    long columns_ = 0, rows_ = 0;
};

} // namespace unstring
