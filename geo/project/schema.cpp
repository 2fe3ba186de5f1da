#include "geo/project/schema.h"

#include <cstdlib>
#include <filesystem>
#include <set>
#include <vector>

#include <fmt/format.h>

namespace unstring {
namespace {

constexpr int kGeoPackageId = 0x47504B47; // "GPKG"

constexpr const char* kGeoPackageTables = R"(
CREATE TABLE gpkg_spatial_ref_sys (srs_name TEXT NOT NULL, srs_id INTEGER NOT NULL PRIMARY KEY, organization TEXT NOT NULL,
  organization_coordsys_id INTEGER NOT NULL, definition TEXT NOT NULL, description TEXT);
CREATE TABLE gpkg_contents (table_name TEXT NOT NULL PRIMARY KEY, data_type TEXT NOT NULL, identifier TEXT UNIQUE,
  description TEXT DEFAULT '', last_change DATETIME NOT NULL DEFAULT (strftime('%Y-%m-%dT%H:%M:%fZ','now')),
  min_x DOUBLE, min_y DOUBLE, max_x DOUBLE, max_y DOUBLE, srs_id INTEGER,
  CONSTRAINT fk_gc_r_srs_id FOREIGN KEY (srs_id) REFERENCES gpkg_spatial_ref_sys(srs_id));
CREATE TABLE gpkg_geometry_columns (table_name TEXT NOT NULL, column_name TEXT NOT NULL, geometry_type_name TEXT NOT NULL,
  srs_id INTEGER NOT NULL, z TINYINT NOT NULL, m TINYINT NOT NULL,
  CONSTRAINT pk_geom_cols PRIMARY KEY (table_name, column_name), CONSTRAINT uk_gc_table_name UNIQUE (table_name),
  CONSTRAINT fk_gc_tn FOREIGN KEY (table_name) REFERENCES gpkg_contents(table_name),
  CONSTRAINT fk_gc_srs FOREIGN KEY (srs_id) REFERENCES gpkg_spatial_ref_sys (srs_id));
CREATE TABLE gpkg_extensions (table_name TEXT, column_name TEXT, extension_name TEXT NOT NULL, definition TEXT NOT NULL,
  scope TEXT NOT NULL, CONSTRAINT ge_tce UNIQUE (table_name, column_name, extension_name));
INSERT INTO gpkg_spatial_ref_sys VALUES
  ('Undefined Cartesian', -1, 'NONE', -1, 'undefined', 'undefined Cartesian coordinate reference system'),
  ('Undefined geographic', 0, 'NONE', 0, 'undefined', 'undefined geographic coordinate reference system'),
  ('WGS 84', 4326, 'EPSG', 4326, 'GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563,AUTHORITY["EPSG","7030"]],AUTHORITY["EPSG","6326"]],PRIMEM["Greenwich",0,AUTHORITY["EPSG","8901"]],UNIT["degree",0.0174532925199433,AUTHORITY["EPSG","9122"]],AUTHORITY["EPSG","4326"]]', 'longitude and latitude');
)";

// Version 1 of our own tables; later versions are steps of kMigrations.
constexpr const char* kOwnTables = R"(
CREATE TABLE unstring_meta (key TEXT PRIMARY KEY, value TEXT NOT NULL);
CREATE TABLE edits (id INTEGER PRIMARY KEY AUTOINCREMENT, at TEXT NOT NULL, who TEXT NOT NULL, plan TEXT NOT NULL,
  label TEXT NOT NULL, rows_json TEXT NOT NULL, undoes INTEGER);
CREATE TABLE plans (id TEXT PRIMARY KEY, first_year INTEGER, years INTEGER, horizon_years INTEGER, rate REAL, policy TEXT,
  must_stay TEXT, nights_goal REAL, decide_year INTEGER, services_anywhere INTEGER, block_poles INTEGER);
CREATE TABLE plan_poles (plan TEXT NOT NULL, id TEXT NOT NULL, choice TEXT, head TEXT, year INTEGER, year_by TEXT,
  year_locked INTEGER, mark TEXT, choice_lock TEXT, who TEXT, note TEXT, PRIMARY KEY (plan, id));
CREATE TABLE plan_units (plan TEXT NOT NULL, id TEXT NOT NULL, transformer_id TEXT, tap REAL, PRIMARY KEY (plan, id));
CREATE TABLE step_runs (step TEXT NOT NULL, plan TEXT NOT NULL, input_hash TEXT NOT NULL, at TEXT NOT NULL,
  result_json TEXT NOT NULL, PRIMARY KEY (step, plan));
CREATE TABLE findings (id INTEGER PRIMARY KEY, step TEXT NOT NULL, plan TEXT NOT NULL, code TEXT NOT NULL, severity TEXT NOT NULL,
  file TEXT, row INTEGER, record TEXT, found TEXT, wanted TEXT, remedy TEXT, record_table TEXT);
CREATE TABLE catalogue (kind TEXT NOT NULL, place INTEGER NOT NULL, json TEXT NOT NULL, PRIMARY KEY (kind, place));
CREATE TABLE climate (month INTEGER PRIMARY KEY, ghi_kwh_m2_day REAL NOT NULL, temp_c REAL NOT NULL, albedo REAL NOT NULL);
CREATE TABLE row_counts (name TEXT PRIMARY KEY, read INTEGER NOT NULL, kept INTEGER NOT NULL, set_aside INTEGER NOT NULL);
CREATE TABLE pole_skies (pole_id TEXT NOT NULL, place INTEGER PRIMARY KEY, json TEXT NOT NULL, canopy BLOB, solid BLOB, unknown BLOB);
CREATE TABLE pole_decisions (plan TEXT NOT NULL, place INTEGER NOT NULL, pole_id TEXT NOT NULL, json TEXT NOT NULL,
  PRIMARY KEY (plan, place));
)";

struct Migration {
    int to;
    const char* sql;
};

// Numbered steps; a new file takes them all, an old one those above its own version.
constexpr Migration kMigrations[] = {
    {2, "CREATE INDEX edits_by_plan ON edits(plan, id);"},
};

void migrate(Database& database, int from) {
    for (const Migration& step : kMigrations)
        if (step.to > from) database.run(step.sql);
    set_meta_value(database, "version", std::to_string(kProjectVersion));
}

Fault not_a_project(const std::string& path, std::string found) {
    return {FaultCode::file_broken,
            path,
            0,
            "",
            std::move(found),
            "a project that `unstring gather` made",
            "Gather your files into a new project; this file was not touched"};
}

// The R-tree's triggers, to the letter of the standard's extension (annex F.3).
std::string rtree_triggers(const std::string& t) {
    return fmt::format(R"(
CREATE TRIGGER "rtree_{0}_geom_insert" AFTER INSERT ON "{0}" WHEN (new."geom" NOT NULL AND NOT ST_IsEmpty(NEW."geom"))
 BEGIN INSERT OR REPLACE INTO "rtree_{0}_geom" VALUES (NEW."fid", ST_MinX(NEW."geom"), ST_MaxX(NEW."geom"), ST_MinY(NEW."geom"), ST_MaxY(NEW."geom")); END;
CREATE TRIGGER "rtree_{0}_geom_update1" AFTER UPDATE OF "geom" ON "{0}" WHEN OLD."fid" = NEW."fid" AND (NEW."geom" NOTNULL AND NOT ST_IsEmpty(NEW."geom"))
 BEGIN INSERT OR REPLACE INTO "rtree_{0}_geom" VALUES (NEW."fid", ST_MinX(NEW."geom"), ST_MaxX(NEW."geom"), ST_MinY(NEW."geom"), ST_MaxY(NEW."geom")); END;
CREATE TRIGGER "rtree_{0}_geom_update2" AFTER UPDATE OF "geom" ON "{0}" WHEN OLD."fid" = NEW."fid" AND (NEW."geom" ISNULL OR ST_IsEmpty(NEW."geom"))
 BEGIN DELETE FROM "rtree_{0}_geom" WHERE id = OLD."fid"; END;
CREATE TRIGGER "rtree_{0}_geom_update3" AFTER UPDATE ON "{0}" WHEN OLD."fid" != NEW."fid" AND (NEW."geom" NOTNULL AND NOT ST_IsEmpty(NEW."geom"))
 BEGIN DELETE FROM "rtree_{0}_geom" WHERE id = OLD."fid";
  INSERT OR REPLACE INTO "rtree_{0}_geom" VALUES (NEW."fid", ST_MinX(NEW."geom"), ST_MaxX(NEW."geom"), ST_MinY(NEW."geom"), ST_MaxY(NEW."geom")); END;
CREATE TRIGGER "rtree_{0}_geom_update4" AFTER UPDATE ON "{0}" WHEN OLD."fid" != NEW."fid" AND (NEW."geom" ISNULL OR ST_IsEmpty(NEW."geom"))
 BEGIN DELETE FROM "rtree_{0}_geom" WHERE id IN (OLD."fid", NEW."fid"); END;
CREATE TRIGGER "rtree_{0}_geom_delete" AFTER DELETE ON "{0}" WHEN old."geom" NOT NULL
 BEGIN DELETE FROM "rtree_{0}_geom" WHERE id = OLD."fid"; END;
)",
                       t);
}

} // namespace

void create_schema(Database& database, const std::string& crs, const std::string& crs_wkt) {
    database.run(fmt::format("PRAGMA application_id={}; PRAGMA user_version=10300", kGeoPackageId));
    database.run(kGeoPackageTables);
    database.run(kOwnTables);
    set_project_crs(database, crs, crs_wkt);
    migrate(database, 1);
}

void set_project_crs(Database& database, const std::string& crs, const std::string& crs_wkt) {
    int srs_id = -1;
    if (crs.starts_with("EPSG:")) {
        srs_id = std::atoi(crs.c_str() + 5);
        Statement insert = database.prepare(
            "INSERT OR IGNORE INTO gpkg_spatial_ref_sys VALUES (?1, ?2, 'EPSG', ?2, ?3, '')");
        insert.bind(1, std::string_view(crs))
            .bind(2, std::int64_t{srs_id})
            .bind(3, std::string_view(crs_wkt.empty() ? "undefined" : crs_wkt));
        insert.run();
    }
    set_meta_value(database, "srs_id", std::to_string(srs_id));
}

Expected<int> check_version(const std::string& path) {
    std::error_code ignored;
    if (!std::filesystem::is_regular_file(path, ignored))
        return tl::make_unexpected(
            Fault{FaultCode::file_missing, path, 0, "", "no such file", "a project file",
                  "Make one with: unstring gather " + path + " --poles poles.csv --circuits circuits.csv"});
    auto database = Database::open(path, Database::Access::read);
    if (!database) return tl::make_unexpected(database.error());
    if (!(*database)->has_table("unstring_meta")) {
        const auto failure = (*database)->failure();
        return tl::make_unexpected(failure ? *failure
                                           : not_a_project(path, "a file without Unstring's tables"));
    }
    const int version = std::atoi(meta_value(**database, "version").c_str());
    if (version > kProjectVersion)
        return tl::make_unexpected(
            Fault{FaultCode::file_newer, path, 0, "version", std::to_string(version),
                  fmt::format("at most {}", kProjectVersion),
                  "A newer Unstring wrote this file; open it with that one. It was not touched"});
    if (version < 1) return tl::make_unexpected(not_a_project(path, "no version"));
    return version;
}

Expected<void> bring_up_to_date(const std::string& path) {
    const auto known = check_version(path);
    if (!known) return tl::make_unexpected(known.error());
    const int version = *known;
    if (version == kProjectVersion) return {};
    std::error_code ignored;
    const std::string copy = path + ".upgrade";
    std::filesystem::remove(copy, ignored);
    {
        auto source = Database::open(path, Database::Access::write);
        if (!source) return tl::make_unexpected(source.error());
        if (auto copied = (*source)->copy_to(copy); !copied) return copied;
        (*source)->close_to_one_file();
    }
    {
        auto target = Database::open(copy, Database::Access::write);
        if (!target) return tl::make_unexpected(target.error());
        auto done = (*target)->transaction([&] { migrate(**target, version); });
        if (!done) return done;
        if ((*target)->text("PRAGMA integrity_check") != "ok")
            return tl::make_unexpected(not_a_project(path, "a damaged file"));
        (*target)->close_to_one_file();
    }
    std::filesystem::rename(path, fmt::format("{}.before-{}", path, kProjectVersion), ignored);
    std::error_code failed;
    std::filesystem::rename(copy, path, failed);
    if (failed)
        return tl::make_unexpected(
            Fault{FaultCode::write_failed, path, 0, "", failed.message(), "", "Rename " + copy + " by hand"});
    return {};
}

Expected<void> check_schema(Database& database, const std::string& path) {
    std::set<std::string> ours;
    Statement layers = database.prepare("SELECT table_name FROM gpkg_geometry_columns");
    while (layers.step()) {
        if (layers.text(0).find_first_of("\"'") != std::string::npos) continue;
        const std::string triggers = rtree_triggers(layers.text(0));
        for (std::size_t from = triggers.find("CREATE"); from != std::string::npos;) {
            const std::size_t end = triggers.find("END;", from);
            ours.insert(triggers.substr(from, end + 3 - from));
            from = triggers.find("CREATE", end);
        }
    }
    Statement rows =
        database.prepare("SELECT type, name, sql FROM sqlite_master WHERE type IN ('trigger','view')");
    while (rows.step())
        if (ours.count(rows.text(2)) == 0)
            return tl::make_unexpected(Fault{
                FaultCode::file_broken, path, 0, "", fmt::format("the {} \"{}\"", rows.text(0), rows.text(1)),
                "a project without foreign triggers and views",
                "Another program added it; drop it there, or take a copy from before"});
    if (database.failure()) return tl::make_unexpected(*database.failure());
    database.trust_schema();
    return {};
}

int srs_id_of(Database& database) { return std::atoi(meta_value(database, "srs_id").c_str()); }

void make_layer(Database& database, const Layer& layer) {
    const std::string& t = layer.table;
    database.run(fmt::format("DROP TABLE IF EXISTS \"rtree_{0}_geom\"; DROP TABLE IF EXISTS \"{0}\";"
                             "DELETE FROM gpkg_geometry_columns WHERE table_name='{0}';"
                             "DELETE FROM gpkg_extensions WHERE table_name='{0}'; DELETE FROM gpkg_contents "
                             "WHERE table_name='{0}'",
                             t));
    const bool has_place = !layer.geometry.empty();
    database.run(fmt::format("CREATE TABLE \"{}\" (fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL{}{}, {})",
                             t, has_place ? ", geom " : "", layer.geometry, layer.columns));
    Statement contents = database.prepare("INSERT INTO gpkg_contents(table_name, data_type, identifier, "
                                          "description, srs_id) VALUES (?1,?2,?1,?3,?4)");
    contents.bind(1, std::string_view(t))
        .bind(2, std::string_view(has_place ? "features" : "attributes"))
        .bind(3, std::string_view(layer.what));
    if (has_place) contents.bind(4, std::int64_t{srs_id_of(database)});
    contents.run();
    if (!has_place) return;
    database.run(fmt::format("INSERT INTO gpkg_geometry_columns VALUES ('{}','geom','{}',{},0,0)", t,
                             layer.geometry, srs_id_of(database)));
}

void finish_layer(Database& database, const std::string& t) {
    database.run(fmt::format(
        "CREATE VIRTUAL TABLE \"rtree_{0}_geom\" USING rtree(id, minx, maxx, miny, maxy);"
        "INSERT INTO \"rtree_{0}_geom\" SELECT fid, ST_MinX(geom), ST_MaxX(geom), ST_MinY(geom), "
        "ST_MaxY(geom)"
        "  FROM \"{0}\" WHERE geom NOT NULL AND NOT ST_IsEmpty(geom);"
        "INSERT INTO gpkg_extensions VALUES "
        "('{0}','geom','gpkg_rtree_index','http://www.geopackage.org/spec120/#extension_rtree','write-only');"
        "UPDATE gpkg_contents SET last_change=strftime('%Y-%m-%dT%H:%M:%fZ','now'),"
        "  min_x=(SELECT min(ST_MinX(geom)) FROM \"{0}\"), max_x=(SELECT max(ST_MaxX(geom)) FROM \"{0}\"),"
        "  min_y=(SELECT min(ST_MinY(geom)) FROM \"{0}\"), max_y=(SELECT max(ST_MaxY(geom)) FROM \"{0}\")"
        "  WHERE table_name='{0}'",
        t));
    database.run(rtree_triggers(t));
}

std::string meta_value(Database& database, const std::string& key) {
    Statement select = database.prepare("SELECT value FROM unstring_meta WHERE key=?1");
    select.bind(1, std::string_view(key));
    return select.step() ? select.text(0) : std::string();
}

void set_meta_value(Database& database, const std::string& key, const std::string& value) {
    Statement insert = database.prepare("INSERT OR REPLACE INTO unstring_meta VALUES (?1, ?2)");
    insert.bind(1, std::string_view(key)).bind(2, std::string_view(value));
    insert.run();
}

} // namespace unstring
