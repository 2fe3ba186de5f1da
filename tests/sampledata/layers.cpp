#include <algorithm>
#include <memory>
#include <vector>

#include <catch2/catch.hpp>
#include <gdal_priv.h>
#include <ogrsf_frmts.h>

#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;

namespace {

struct Closer {
    void operator()(GDALDataset* set) const { GDALClose(set); }
};

std::unique_ptr<GDALDataset, Closer> open(const std::string& file, unsigned kind) {
    GDALAllRegister();
    return std::unique_ptr<GDALDataset, Closer>(static_cast<GDALDataset*>(
        GDALOpenEx(committed(file).c_str(), kind | GDAL_OF_READONLY, nullptr, nullptr, nullptr)));
}

std::string epsg_of(const OGRSpatialReference* crs) {
    const char* code = crs == nullptr ? nullptr : crs->GetAuthorityCode(nullptr);
    return code == nullptr ? "" : code;
}

} // namespace

TEST_CASE(
    "Quillhaven's canopy: cells of 0.5 m, plausible crowns, shade over some poles and none over others") {
    const auto raster = open("canopy.tif", GDAL_OF_RASTER);
    REQUIRE(raster);
    double transform[6];
    REQUIRE(raster->GetGeoTransform(transform) == CE_None);
    CHECK(transform[1] == 0.5);
    CHECK(transform[5] == -0.5);
    CHECK(epsg_of(raster->GetSpatialRef()) == "32609");
    const int columns = raster->GetRasterXSize(), rows = raster->GetRasterYSize();
    std::vector<unsigned char> cells(static_cast<std::size_t>(columns) * static_cast<std::size_t>(rows));
    REQUIRE(raster->GetRasterBand(1)->RasterIO(GF_Read, 0, 0, columns, rows, cells.data(), columns, rows,
                                               GDT_Byte, 0, 0, nullptr) == CE_None);
    CHECK(*std::max_element(cells.begin(), cells.end()) <= 20);
    CHECK(*std::max_element(cells.begin(), cells.end()) >= 12);
    int under = 0, all = 0;
    for (const Row& pole : read_csv(committed("poles.csv"))) {
        const auto column = static_cast<long>((number(pole, "easting") - transform[0]) / 0.5);
        const auto row = static_cast<long>((transform[3] - number(pole, "northing")) / 0.5);
        REQUIRE((column > 200 && column < columns - 200 && row > 200 &&
                 row < rows - 200)); // 100 m of ground around each
        ++all;
        under += cells[static_cast<std::size_t>(row * columns + column)] > number(pole, "mount_m");
    }
    CHECK(under > all / 50);
    CHECK(under < all / 4);
}

TEST_CASE("Quillhaven's streets: every street that a pole names, with class, surface and width") {
    const auto file = open("streets.gpkg", GDAL_OF_VECTOR);
    REQUIRE(file);
    OGRLayer* layer = file->GetLayerByName("streets");
    REQUIRE(layer != nullptr);
    CHECK(epsg_of(layer->GetSpatialRef()) == "32609");
    std::vector<std::string> names, surfaces;
    for (const auto& feature : *layer) {
        names.push_back(feature->GetFieldAsString("street"));
        surfaces.push_back(feature->GetFieldAsString("surface"));
        CHECK(feature->GetFieldAsDouble("width_m") >= 9);
        CHECK(feature->GetGeometryRef()->getGeometryType() == wkbLineString);
    }
    for (const Row& pole : read_csv(committed("poles.csv")))
        REQUIRE(std::find(names.begin(), names.end(), pole.at("street")) != names.end());
    CHECK(std::count(surfaces.begin(), surfaces.end(), "paved") > 20);
    CHECK(std::count(surfaces.begin(), surfaces.end(), "verge") > 20);
}

TEST_CASE("Quillhaven's buildings: valid polygons with heights, none on a pole") {
    const auto file = open("buildings.gpkg", GDAL_OF_VECTOR);
    REQUIRE(file);
    OGRLayer* layer = file->GetLayerByName("buildings");
    REQUIRE(layer != nullptr);
    CHECK(layer->GetFeatureCount() > 800);
    for (const auto& feature : *layer) {
        const double height_m = feature->GetFieldAsDouble("height_m");
        REQUIRE((height_m >= 4 && height_m <= 25));
        REQUIRE(feature->GetGeometryRef()->IsValid());
    }
    for (const Row& pole : read_csv(committed("poles.csv"))) {
        const OGRPoint place(number(pole, "easting"), number(pole, "northing"));
        layer->SetSpatialFilterRect(place.getX(), place.getY(), place.getX(), place.getY());
        layer->ResetReading();
        for (const auto& feature : *layer) REQUIRE(!feature->GetGeometryRef()->Contains(&place));
    }
}
