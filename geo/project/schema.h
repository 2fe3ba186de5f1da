#pragma once
// The tables of a project file: a valid GeoPackage with Unstring's own tables in it, its version, and the one
// path by which an old file becomes a new one. Source: OGC 12-128r18 (GeoPackage 1.3).

#include <memory>
#include <string>

#include "geo/project/database.h"

namespace unstring {

inline constexpr int kProjectVersion = 2;

/// GeoPackage's own tables, and ours, in an empty database. @param crs "EPSG:n"; empty = undefined Cartesian
void create_schema(Database& database, const std::string& crs, const std::string& crs_wkt);

/// The coordinate system that layers made from now on are in.
void set_project_crs(Database& database, const std::string& crs, const std::string& crs_wkt);

/// Version of the project's own tables. @fault file_missing, file_broken (not a project), file_newer (by
/// name)
Expected<int> check_version(const std::string& path);

/// A file of a version before ours is brought up in a copy, which then takes its name; the old one stays as
/// PATH.before-<version>. @fault file_broken (not a project), file_newer (by name), write_failed
Expected<void> bring_up_to_date(const std::string& path);

/// Refuses a file that holds triggers or views that are not ours to the letter: they would run while we
/// write. After it the schema is trusted.
Expected<void> check_schema(Database& database, const std::string& path);

/// Number in the gpkg_spatial_ref_sys table of the project's coordinate system, -1 = undefined.
[[nodiscard]] int srs_id_of(Database& database);

struct Layer {
    std::string table;
    std::string geometry; ///< "POINT", "LINESTRING", "POLYGON"; empty = a table without places
    std::string columns;  ///< "pole_id TEXT, .."
    std::string what;     ///< in words, for other programs
};

/// Makes the layer anew and empty (an old one is dropped), registered in gpkg_contents and
/// gpkg_geometry_columns.
void make_layer(Database& database, const Layer& layer);
/// Builds the R-tree of a filled layer, its triggers, and the extent in gpkg_contents.
void finish_layer(Database& database, const std::string& table);

[[nodiscard]] std::string meta_value(Database& database, const std::string& key);
void set_meta_value(Database& database, const std::string& key, const std::string& value);

} // namespace unstring
