#include "model/sun/horizon_scan.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace unstring {
namespace {

constexpr double kUnknown = std::numeric_limits<double>::quiet_NaN();

/// Place in cells: 0,0 is the centre of the north-west cell.
double bilinear_m(const HeightWindow& window, double column, double row) {
    const double last_column = static_cast<double>(window.columns) - 1.0;
    const double last_row = static_cast<double>(window.rows) - 1.0;
    if (!(column >= 0 && row >= 0 && column <= last_column && row <= last_row)) return kUnknown;
    const double west = std::min(std::floor(column), std::max(0.0, last_column - 1.0));
    const double north = std::min(std::floor(row), std::max(0.0, last_row - 1.0));
    const double right = column - west;
    const double down = row - north;
    const auto at = static_cast<std::size_t>(north) * window.columns + static_cast<std::size_t>(west);
    const std::size_t east = window.columns > 1 ? 1 : 0;
    const std::size_t south = window.rows > 1 ? window.columns : 0;
    const float* cell = window.height_m.data() + at;
    // A neighbour that has no weight must not make the place unknown.
    const auto mix = [](double a, double b, double share) {
        return share == 0 ? a : share == 1 ? b : a + (b - a) * share;
    };
    return mix(mix(cell[0], cell[east], right), mix(cell[south], cell[south + east], right), down);
}

/// So that a march due east along a row of cell centres stays on that row.
double exact_at_right_angles(double value) { return std::abs(value) < 1e-12 ? 0.0 : value; }

} // namespace

double height_at_m(const HeightWindow& window, MapPoint place) {
    return bilinear_m(window, (place.x_m - window.west_m) / window.cell_m - 0.5,
                      (window.north_m - place.y_m) / window.cell_m - 0.5);
}

WindowBounds bounds_of(const HeightWindow& window) {
    WindowBounds bounds{0, false};
    for (const float height_m : window.height_m) {
        bounds.has_unknown = bounds.has_unknown || std::isnan(height_m);
        if (static_cast<double>(height_m) > bounds.highest_m)
            bounds.highest_m = static_cast<double>(height_m);
    }
    return bounds;
}

ScannedHorizon scan_horizon(const HeightWindow& window, const WindowBounds& bounds, MapPoint place,
                            double panel_m, double reach_m, int directions) {
    ScannedHorizon found;
    found.height_deg.reserve(static_cast<std::size_t>(directions));
    const double column = (place.x_m - window.west_m) / window.cell_m - 0.5;
    const double row = (window.north_m - place.y_m) / window.cell_m - 0.5;
    constexpr int kStepsACell = 4;
    const int steps = static_cast<int>(std::floor(kStepsACell * reach_m / window.cell_m + 1e-9));
    const double most_cells = (bounds.highest_m - panel_m) / window.cell_m; // above the panel
    for (int direction = 0; direction < directions; ++direction) {
        const double azimuth_deg = 360.0 * direction / directions;
        const double east = exact_at_right_angles(std::sin(azimuth_deg * kRadPerDeg));
        const double north = exact_at_right_angles(std::cos(azimuth_deg * kRadPerDeg));
        double steepest = 0; // tangent
        bool is_known = true;
        for (int step = kStepsACell; step <= steps; ++step) {
            const double cells = static_cast<double>(step) / kStepsACell;
            if (!bounds.has_unknown && steepest * cells >= most_cells) break;
            const double height_m = bilinear_m(window, column + cells * east, row - cells * north);
            if (std::isnan(height_m)) {
                is_known = false;
                continue;
            }
            steepest = std::max(steepest, (height_m - panel_m) / (cells * window.cell_m));
        }
        found.height_deg.push_back(static_cast<float>(std::atan(steepest) / kRadPerDeg));
        if (!is_known) found.unknown_deg.push_back(static_cast<float>(azimuth_deg));
    }
    return found;
}

} // namespace unstring
