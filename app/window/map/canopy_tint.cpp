#include "app/window/map/canopy_tint.h"

#include <algorithm>
#include <cmath>

#include "geo/ground/height_raster.h"

namespace unstring {
namespace {

constexpr double kCrown_m = 2.0;   // lower growth shades no panel
constexpr double kMargin_m = 60.0; // the reach of a pole's horizon
constexpr int kMostCells = 3000;
constexpr double kTileReach_m = 128.0;

// One window's cells onto the picture: a picture cell is covered when any raster cell in it is.
void paint_window(const HeightWindow& window, CanopyTint& tint) {
    for (std::size_t r = 0; r < window.rows; ++r) {
        const double y_m = window.north_m - (double(r) + 0.5) * window.cell_m;
        const int line = int(std::floor((tint.north_m - y_m) / tint.cell_m));
        if (line < 0 || line >= tint.cover.height()) continue;
        uchar* bytes = tint.cover.scanLine(line);
        for (std::size_t c = 0; c < window.columns; ++c) {
            if (!(window.height_m[r * window.columns + c] > float(kCrown_m))) continue;
            const int column = int(
                std::floor((window.west_m + (double(c) + 0.5) * window.cell_m - tint.west_m) / tint.cell_m));
            if (column >= 0 && column < tint.cover.width()) bytes[column] = 255;
        }
    }
}

} // namespace

CanopyTint read_canopy_tint(const std::string& raster, const MapBounds& bounds,
                            const std::atomic<bool>& cancel) {
    if (raster.empty() || bounds.is_empty) return {};
    auto source = open_height_raster(raster);
    if (!source) return {};
    const double wide_m = bounds.east_m - bounds.west_m + 2 * kMargin_m,
                 high_m = bounds.north_m - bounds.south_m + 2 * kMargin_m;
    CanopyTint tint;
    tint.west_m = bounds.west_m - kMargin_m;
    tint.north_m = bounds.north_m + kMargin_m;
    tint.cell_m = std::max({(*source)->cell_m(), 0.5, std::max(wide_m, high_m) / kMostCells});
    tint.cover = QImage(int(wide_m / tint.cell_m) + 1, int(high_m / tint.cell_m) + 1, QImage::Format_Alpha8);
    tint.cover.fill(0);
    for (double y_m = tint.north_m - kTileReach_m; y_m > tint.north_m - high_m - kTileReach_m;
         y_m -= 2 * kTileReach_m) {
        for (double x_m = tint.west_m + kTileReach_m; x_m < tint.west_m + wide_m + kTileReach_m;
             x_m += 2 * kTileReach_m) {
            if (cancel.load(std::memory_order_relaxed)) return {};
            const auto window = (*source)->window({x_m, y_m}, kTileReach_m);
            if (!window) return {};
            paint_window(*window, tint);
        }
    }
    return tint;
}

} // namespace unstring
