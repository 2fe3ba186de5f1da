#include "sampledata/layers.h"

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <memory>

#include <cpl_conv.h>
#include <gdal_priv.h>
#include <ogrsf_frmts.h>

#include "sampledata/ground.h"

namespace unstring::sample {
namespace {

constexpr int kEpsg = 32609;
constexpr double kMostCells = 2e8;
constexpr int kBandRows = 256; // rows of one row of TIFF tiles

struct Closer {
    void operator()(GDALDataset* set) const { GDALClose(set); }
};
using DataSet = std::unique_ptr<GDALDataset, Closer>;

Fault not_written(const std::string& path) {
    return {
        FaultCode::write_failed,          path, 0, "", CPLGetLastErrorMsg(), "room and permission to write",
        "choose another folder with --to"};
}

OGRSpatialReference plan_crs() {
    OGRSpatialReference crs;
    crs.importFromEPSG(kEpsg);
    crs.SetAxisMappingStrategy(OAMS_TRADITIONAL_GIS_ORDER);
    return crs;
}

DataSet new_package(const std::string& path) {
    std::filesystem::remove(path);
    // GeoPackage notes when it was written; a fixed date keeps the file the same.
    CPLSetThreadLocalConfigOption("OGR_CURRENT_DATE", "2026-01-01T00:00:00.000Z");
    GDALDriver* driver = GetGDALDriverManager()->GetDriverByName("GPKG");
    DataSet set(driver == nullptr ? nullptr : driver->Create(path.c_str(), 0, 0, 0, GDT_Unknown, nullptr));
    if (set) set->StartTransaction();
    return set;
}

template <class Geometry>
Geometry geometry_of(const std::vector<MapPoint>& points) {
    Geometry line;
    for (const MapPoint point : points)
        line.addPoint(std::round(point.x_m * 100) / 100, std::round(point.y_m * 100) / 100);
    return line;
}

void add_field(OGRLayer& layer, const char* name, OGRFieldType type) {
    OGRFieldDefn field(name, type);
    layer.CreateField(&field);
}

bool add_street(OGRLayer& layer, const Town& town, const Block& block) {
    const Road road = road_of(town, block);
    OGRFeature feature(layer.GetLayerDefn());
    feature.SetField("street", road.name.c_str());
    feature.SetField("road_class", text_of(road.road_class));
    feature.SetField("surface", road.is_paved ? "paved" : "verge");
    feature.SetField("width_m", road.width_m);
    if (road.repave_year != 0) feature.SetField("repave_year", road.repave_year);
    const auto line = geometry_of<OGRLineString>({place_of(town, block.from), place_of(town, block.to)});
    feature.SetGeometry(&line);
    return layer.CreateFeature(&feature) == OGRERR_NONE;
}

template <class Visit>
void each_corner(const Town& town, Visit visit) {
    for (int row = 0; row < town.tiles_y * kRows; ++row)
        for (int column = 0; column < town.tiles_x * kColumns; ++column) visit(Corner{column, row});
}

Expected<void> write_streets(const std::string& path, const Town& town) {
    const DataSet set = new_package(path);
    OGRSpatialReference crs = plan_crs();
    OGRLayer* layer = set ? set->CreateLayer("streets", &crs, wkbLineString, nullptr) : nullptr;
    if (layer == nullptr) return tl::unexpected(not_written(path));
    for (const char* name : {"street", "road_class", "surface"}) add_field(*layer, name, OFTString);
    add_field(*layer, "width_m", OFTReal);
    add_field(*layer, "repave_year", OFTInteger);
    bool is_good = true;
    each_corner(town, [&](Corner corner) {
        for (const Block& block : blocks_from(town, corner))
            is_good = add_street(*layer, town, block) && is_good;
    });
    if (!is_good || set->CommitTransaction() != OGRERR_NONE) return tl::unexpected(not_written(path));
    return {};
}

Expected<void> write_buildings(const std::string& path, const std::vector<Building>& buildings) {
    const DataSet set = new_package(path);
    OGRSpatialReference crs = plan_crs();
    OGRLayer* layer = set ? set->CreateLayer("buildings", &crs, wkbPolygon, nullptr) : nullptr;
    if (layer == nullptr) return tl::unexpected(not_written(path));
    add_field(*layer, "height_m", OFTReal);
    for (const Building& building : buildings) {
        OGRFeature feature(layer->GetLayerDefn());
        feature.SetField("height_m", building.height_m);
        OGRPolygon polygon;
        auto ring = geometry_of<OGRLinearRing>(building.ring);
        polygon.addRing(&ring);
        feature.SetGeometry(&polygon);
        if (layer->CreateFeature(&feature) != OGRERR_NONE) return tl::unexpected(not_written(path));
    }
    if (set->CommitTransaction() != OGRERR_NONE) return tl::unexpected(not_written(path));
    return {};
}

DataSet new_raster(const std::string& path, const Box& box, double cell_m, int columns, int rows) {
    char** options = nullptr;
    for (const char* option :
         {"COMPRESS=DEFLATE", "ZLEVEL=9", "PREDICTOR=2", "TILED=YES", "SPARSE_OK=TRUE", "BIGTIFF=IF_SAFER"})
        options = CSLAddString(options, option);
    GDALDriver* driver = GetGDALDriverManager()->GetDriverByName("GTiff");
    DataSet set(driver == nullptr ? nullptr
                                  : driver->Create(path.c_str(), columns, rows, 1, GDT_Byte, options));
    CSLDestroy(options);
    if (!set) return set;
    double transform[6] = {box.west_m, cell_m, 0, box.north_m, 0, -cell_m};
    set->SetGeoTransform(transform);
    const OGRSpatialReference crs = plan_crs();
    set->SetSpatialRef(&crs);
    return set;
}

// Trees by the band of raster rows that their crowns reach.
std::vector<std::vector<const Tree*>> trees_by_band(const std::vector<Tree>& trees, const Box& box,
                                                    double band_m, std::size_t bands) {
    std::vector<std::vector<const Tree*>> by_band(bands);
    for (const Tree& tree : trees) {
        const double first = (box.north_m - tree.place.y_m - tree.crown_m) / band_m;
        const double last = (box.north_m - tree.place.y_m + tree.crown_m) / band_m;
        for (auto band = static_cast<std::size_t>(std::max(0.0, first));
             band < bands && static_cast<double>(band) <= last; ++band)
            by_band[band].push_back(&tree);
    }
    return by_band;
}

Expected<void> write_canopy(const std::string& path, const Town& town, const std::vector<Tree>& trees) {
    const Box box = extent_of(town);
    const double wide_m = box.east_m - box.west_m, high_m = box.north_m - box.south_m;
    double cell_m = 0.5;
    while (wide_m / cell_m * (high_m / cell_m) > kMostCells) cell_m *= 2;
    const int columns = static_cast<int>(std::ceil(wide_m / cell_m)),
              rows = static_cast<int>(std::ceil(high_m / cell_m));
    const DataSet set = new_raster(path, box, cell_m, columns, rows);
    if (!set) return tl::unexpected(not_written(path));
    const auto bands = static_cast<std::size_t>((rows + kBandRows - 1) / kBandRows);
    const auto by_band = trees_by_band(trees, box, kBandRows * cell_m, bands);
    std::vector<unsigned char> line(static_cast<std::size_t>(columns)), block;
    for (std::size_t band = 0; band < bands; ++band) {
        const int first = static_cast<int>(band) * kBandRows, count = std::min(kBandRows, rows - first);
        block.clear();
        for (int row = first; row < first + count; ++row) {
            crown_row(by_band[band], box.west_m, box.north_m - (row + 0.5) * cell_m, cell_m, line);
            block.insert(block.end(), line.begin(), line.end());
        }
        if (set->GetRasterBand(1)->RasterIO(GF_Write, 0, first, columns, count, block.data(), columns, count,
                                            GDT_Byte, 0, 0, nullptr) != CE_None)
            return tl::unexpected(not_written(path));
    }
    return {};
}

} // namespace

Expected<void> write_layers(const std::string& folder, const Town& town) {
    GDALAllRegister();
    Ground ground;
    each_corner(town, [&](Corner corner) { add_cell(town, corner, ground); });
    if (auto written = write_streets(folder + "/streets.gpkg", town); !written) return written;
    if (auto written = write_buildings(folder + "/buildings.gpkg", ground.buildings); !written)
        return written;
    return write_canopy(folder + "/canopy.tif", town, ground.trees);
}

} // namespace unstring::sample
