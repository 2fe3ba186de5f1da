#pragma once
// The canopy as a pale wash: where the height raster stands over two metres, read once in a working thread.

#include <QImage>
#include <QRectF>

#include <atomic>
#include <string>

#include "app/window/scene.h"

namespace unstring {

struct CanopyTint {
    QImage cover; ///< alpha only: 255 under a crown
    double west_m = 0, north_m = 0, cell_m = 1;
    [[nodiscard]] bool is_empty() const { return cover.isNull(); }
};

/// Reads the raster over the bounds, widened by 60 m, at most 3000 cells a side. Empty when it cannot be
/// read.
[[nodiscard]] CanopyTint read_canopy_tint(const std::string& raster, const MapBounds& bounds,
                                          const std::atomic<bool>& cancel);

} // namespace unstring
