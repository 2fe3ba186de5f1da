#include "geo/ground/raster_file.h"

#include <array>
#include <cmath>
#include <filesystem>
#include <system_error>
#include <utility>

#include <cpl_conv.h>
#include <fmt/format.h>
#include <gdal_priv.h>
#include <ogr_spatialref.h>

#include "geo/ground/gdal_start.h"

namespace unstring {
namespace {

constexpr double kSquareTolerance = 1e-6;

Fault broken(const std::string& path, std::string found, std::string wanted, std::string remedy) {
    return {FaultCode::file_broken, path, 0, {}, std::move(found), std::move(wanted), std::move(remedy)};
}

std::string crs_text(const OGRSpatialReference* system) {
    if (system == nullptr || system->IsLocal()) return {};
    const char* authority = system->GetAuthorityName(nullptr);
    const char* code = system->GetAuthorityCode(nullptr);
    if (authority != nullptr && code != nullptr && std::string(authority) == "EPSG")
        return fmt::format("EPSG:{}", code);
    char* wkt = nullptr;
    const char* options[] = {"FORMAT=WKT2_2019", nullptr};
    const bool is_written = system->exportToWkt(&wkt, options) == OGRERR_NONE;
    std::string text = is_written && wkt != nullptr ? wkt : "";
    CPLFree(wkt);
    return text;
}

} // namespace

void RasterEnd::operator()(GDALDataset* dataset) const { GDALClose(dataset); }

Expected<RasterFile> open_raster_file(const std::string& path) {
    std::error_code error;
    const bool is_outside = path.starts_with("/vsi") || path.find("://") != std::string::npos;
    if (is_outside || !std::filesystem::is_regular_file(path, error))
        return tl::unexpected(Fault{FaultCode::file_missing,
                                    path,
                                    0,
                                    {},
                                    is_outside ? "a network or archive path" : "no ordinary file",
                                    "a raster file on this machine",
                                    "check the path"});
    start_gdal();
    RasterFile raster(static_cast<GDALDataset*>(
        GDALOpenEx(path.c_str(), GDAL_OF_RASTER | GDAL_OF_READONLY, raster_drivers(), nullptr, nullptr)));
    if (!raster || raster->GetRasterCount() < 1)
        return tl::unexpected(broken(path, "no raster that can be read",
                                     "GeoTIFF, ASCII grid, HFA, EHdr or ENVI",
                                     "export the raster as GeoTIFF"));
    return raster;
}

Expected<RasterFacts> raster_facts(GDALDataset& raster, const std::string& path) {
    std::array<double, 6> to_ground{};
    if (raster.GetGeoTransform(to_ground.data()) != CE_None)
        return tl::unexpected(Fault{FaultCode::crs_unknown,
                                    path,
                                    0,
                                    {},
                                    "a raster that is not georeferenced",
                                    "a raster with its place on the ground",
                                    "export it with its world file or as GeoTIFF"});
    const double cell = to_ground[1];
    const bool is_north_up = to_ground[2] == 0 && to_ground[4] == 0 && to_ground[5] < 0 && cell > 0;
    if (!is_north_up || std::abs(to_ground[5] + cell) > kSquareTolerance * cell)
        return tl::unexpected(broken(
            path,
            fmt::format("cells of {} by {}, {}", cell, to_ground[5], is_north_up ? "north up" : "turned"),
            "square cells, north up", "warp it with gdalwarp -tr"));
    return RasterFacts{crs_text(raster.GetSpatialRef()),
                       to_ground[0],
                       to_ground[3],
                       cell,
                       static_cast<std::size_t>(raster.GetRasterXSize()),
                       static_cast<std::size_t>(raster.GetRasterYSize())};
}

Expected<RasterFacts> raster_facts(const std::string& path) {
    const auto raster = open_raster_file(path);
    if (!raster) return tl::unexpected(raster.error());
    return raster_facts(**raster, path);
}

} // namespace unstring
