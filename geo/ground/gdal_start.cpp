#include "geo/ground/gdal_start.h"

#include <array>
#include <mutex>

#include <cpl_conv.h>
#include <cpl_error.h>
#include <gdal.h>

namespace unstring {
namespace {

void open_once() {
    CPLSetErrorHandler(CPLQuietErrorHandler); // errors are asked for where they matter, never printed
    // Set before the drivers register: what could reach a network or run another program is not even there.
    CPLSetConfigOption("GDAL_SKIP",
                       "HTTP,WMS,WMTS,WCS,DAAS,PLMOSAIC,STACIT,STACTA,EEDAI,NGW,OGCAPI,VRT,DERIVED,PDF");
    CPLSetConfigOption(
        "OGR_SKIP",
        "WFS,OAPIF,CSW,Elastic,Carto,AmigoCloud,NGW,EEDA,PLSCENES,ODBC,PostgreSQL,MySQL,MSSQLSpatial");
    CPLSetConfigOption("CPL_CURL_ENABLE_VSIMEM", "NO");
    CPLSetConfigOption("GDAL_HTTP_MAX_RETRY", "0");
    CPLSetConfigOption("GDAL_PAM_ENABLED", "NO");
    CPLSetConfigOption("GML_DOWNLOAD_SCHEMA", "NO");
    CPLSetConfigOption("GML_SKIP_RESOLVE_ELEMS", "ALL");
    CPLSetConfigOption("OGR_SQLITE_LOAD_EXTENSIONS", "");
    CPLSetConfigOption("OGR_GEOJSON_MAX_OBJ_SIZE", "200");
    CPLSetConfigOption("OGR_XLSX_HEADERS", "FORCE"); // the first row names the columns, as in CSV
    CPLSetConfigOption("OGR_ODS_HEADERS", "FORCE");
    CPLSetConfigOption("PROJ_NETWORK", "OFF");
    GDALAllRegister();
}

} // namespace

void start_gdal() {
    static std::once_flag once;
    std::call_once(once, open_once);
}

const char* const* raster_drivers() {
    static constexpr std::array<const char*, 6> kDrivers = {"GTiff", "AAIGrid", "HFA",
                                                            "EHdr",  "ENVI",    nullptr};
    return kDrivers.data();
}

const char* const* vector_drivers() {
    static constexpr std::array<const char*, 13> kDrivers = {
        "GPKG",         "ESRI Shapefile", "GeoJSON", "GeoJSONSeq", "FlatGeobuf", "LIBKML", "GML",
        "MapInfo File", "OpenFileGDB",    "GPX",     "XLSX",       "ODS",        nullptr};
    return kDrivers.data();
}

} // namespace unstring
