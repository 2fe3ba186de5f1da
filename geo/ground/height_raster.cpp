#include "geo/ground/height_raster.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <string_view>
#include <utility>

#include <fmt/format.h>
#include <gdal_priv.h>

#include "geo/ground/crs.h"
#include "geo/ground/raster_file.h"

namespace unstring {
namespace {

constexpr double kMaxCellsAWindow = 64e6;
constexpr float kNoHeight = std::numeric_limits<float>::quiet_NaN();

/// Heights are taken as metres unless the band says feet.
double metres_per_unit(const GDALRasterBand& band) {
    const std::string_view unit = const_cast<GDALRasterBand&>(band).GetUnitType();
    if (unit == "ft" || unit == "foot" || unit == "feet") return kMetresPerFoot;
    if (unit == "ftUS" || unit == "US survey foot" || unit == "us-ft") return kMetresPerSurveyFoot;
    return 1;
}

class HeightRaster : public HeightSource {
public:
    HeightRaster(RasterFile file, RasterFacts facts, std::string path)
        : file_(std::move(file)), facts_(std::move(facts)), path_(std::move(path)),
          band_(file_->GetRasterBand(1)) {
        int has_nodata = 0;
        nodata_ = band_->GetNoDataValue(&has_nodata);
        has_nodata_ = has_nodata != 0;
        int has_factor = 0, has_offset = 0;
        const double factor = band_->GetScale(&has_factor);
        const double offset = band_->GetOffset(&has_offset);
        factor_ = (has_factor != 0 ? factor : 1) * metres_per_unit(*band_);
        offset_ = (has_offset != 0 ? offset : 0) * metres_per_unit(*band_);
    }

    [[nodiscard]] double cell_m() const override { return facts_.cell_m; }

    [[nodiscard]] Expected<HeightWindow> window(MapPoint centre, double reach_m) override {
        // Cell (c, r) has its centre at west + (c + .5) cell, north - (r + .5) cell; cells beyond the edge
        // stay NaN.
        const double cell = facts_.cell_m;
        const double first_column = std::ceil((centre.x_m - reach_m - facts_.west_m) / cell - 0.5);
        const double last_column = std::floor((centre.x_m + reach_m - facts_.west_m) / cell - 0.5);
        const double first_row = std::ceil((facts_.north_m - centre.y_m - reach_m) / cell - 0.5);
        const double last_row = std::floor((facts_.north_m - centre.y_m + reach_m) / cell - 0.5);
        const double columns = last_column - first_column + 1, rows = last_row - first_row + 1;
        if (!(columns >= 0 && rows >= 0 && columns * rows <= kMaxCellsAWindow))
            return tl::unexpected(Fault{FaultCode::bad_usage,
                                        path_,
                                        0,
                                        {},
                                        fmt::format("a window of {:.0f} by {:.0f} cells", columns, rows),
                                        "a smaller reach",
                                        {}});
        HeightWindow window;
        window.cell_m = cell;
        window.west_m = facts_.west_m + first_column * cell;
        window.north_m = facts_.north_m - first_row * cell;
        window.columns = static_cast<std::size_t>(columns);
        window.rows = static_cast<std::size_t>(rows);
        window.height_m.assign(window.columns * window.rows, kNoHeight);
        if (auto done = fill(window, first_column, first_row); !done) return tl::unexpected(done.error());
        return window;
    }

private:
    /// Reads the part of the window that lies on the raster.
    Expected<void> fill(HeightWindow& window, double first_column, double first_row) {
        const auto clamp = [](double value, std::size_t most) {
            return std::clamp(value, 0.0, static_cast<double>(most));
        };
        const auto west = static_cast<std::size_t>(clamp(first_column, facts_.columns));
        const auto east = static_cast<std::size_t>(
            clamp(first_column + static_cast<double>(window.columns), facts_.columns));
        const auto north = static_cast<std::size_t>(clamp(first_row, facts_.rows));
        const auto south =
            static_cast<std::size_t>(clamp(first_row + static_cast<double>(window.rows), facts_.rows));
        if (west >= east || north >= south) return {};
        const auto to_column = static_cast<std::size_t>(static_cast<double>(west) - first_column);
        const auto to_row = static_cast<std::size_t>(static_cast<double>(north) - first_row);
        float* to = window.height_m.data() + to_row * window.columns + to_column;
        const int width = static_cast<int>(east - west), height = static_cast<int>(south - north);
        if (band_->RasterIO(GF_Read, static_cast<int>(west), static_cast<int>(north), width, height, to,
                            width, height, GDT_Float32, 0,
                            static_cast<GSpacing>(window.columns * sizeof(float)), nullptr) != CE_None)
            return tl::unexpected(Fault{FaultCode::file_broken,
                                        path_,
                                        0,
                                        {},
                                        "cells that cannot be read",
                                        "a whole raster",
                                        "export the raster again"});
        for (int row = 0; row < height; ++row)
            for (int column = 0; column < width; ++column)
                settle(to[static_cast<std::size_t>(row) * window.columns + static_cast<std::size_t>(column)]);
        return {};
    }

    void settle(float& value) const {
        if (!std::isfinite(value) || (has_nodata_ && value == static_cast<float>(nodata_)))
            value = kNoHeight;
        else
            value = static_cast<float>(value * factor_ + offset_);
    }

    RasterFile file_;
    RasterFacts facts_;
    std::string path_;
    GDALRasterBand* band_;
    double nodata_ = 0, factor_ = 1, offset_ = 0;
    bool has_nodata_ = false;
};

} // namespace

Expected<std::unique_ptr<HeightSource>> open_height_raster(const std::string& path) {
    auto file = open_raster_file(path);
    if (!file) return tl::unexpected(file.error());
    auto facts = raster_facts(**file, path);
    if (!facts) return tl::unexpected(facts.error());
    if (!facts->crs.empty()) {
        const auto crs = crs_facts(facts->crs);
        if (crs && (crs->is_geographic || crs->unit_m != 1.0))
            return tl::unexpected(Fault{FaultCode::crs_unknown,
                                        path,
                                        0,
                                        {},
                                        fmt::format("{}, not in metres", crs->name),
                                        "a raster in metres",
                                        "warp it with gdalwarp -t_srs and the project's EPSG code"});
    }
    return std::make_unique<HeightRaster>(std::move(*file), std::move(*facts), path);
}

} // namespace unstring
