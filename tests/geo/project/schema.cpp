#include "geo/project/schema.h"

#include <filesystem>
#include <fstream>

#include <catch2/catch.hpp>
#include <gdal_priv.h>
#include <ogrsf_frmts.h>

#include "geo/project/geometry_blob.h"
#include "geo/project/plan_tables.h"
#include "tests/geo/project/project_case.h"

using namespace unstring;
using namespace unstring::tests;

TEST_CASE("schema: layers open in another library that reads GeoPackage, with count, extent, system and "
          "spatial index") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    make_project(path)->close_to_one_file();
    GDALAllRegister();
    GDALDatasetUniquePtr file(GDALDataset::Open(path.c_str(), GDAL_OF_VECTOR | GDAL_OF_READONLY));
    REQUIRE(file);
    OGRLayer* poles = file->GetLayerByName("poles");
    REQUIRE(poles != nullptr);
    CHECK(poles->GetFeatureCount() == 5);
    CHECK(poles->TestCapability(OLCFastSpatialFilter));
    OGREnvelope box;
    REQUIRE(poles->GetExtent(&box) == OGRERR_NONE);
    CHECK(box.MinX == 400000.0);
    CHECK(box.MaxX == 400120.0);
    poles->SetSpatialFilterRect(400055, 3761990, 400065, 3762010);
    CHECK(poles->GetFeatureCount() == 1);
    REQUIRE(file->GetLayerByName("streets") != nullptr);
    CHECK(file->GetLayerByName("streets")->GetGeomType() == wkbLineString);
    CHECK(file->GetLayerByName("transformers")->GetFeatureCount() == 1);
}

TEST_CASE("schema: what the standard asks of contents, geometry columns and R-tree holds") {
    const TempFolder folder;
    const auto db = make_project(folder.file("p.gpkg"));
    CHECK(db->integer("PRAGMA application_id") == 0x47504B47);
    CHECK(db->integer("PRAGMA user_version") == 10300);
    CHECK(db->text("PRAGMA integrity_check") == "ok");
    CHECK(db->integer("SELECT count(*) FROM pragma_foreign_key_check") == 0);
    CHECK(db->integer("SELECT count(*) FROM gpkg_contents c WHERE c.data_type='features' AND NOT EXISTS "
                      "(SELECT 1 FROM gpkg_geometry_columns g WHERE g.table_name=c.table_name)") == 0);
    CHECK(db->integer("SELECT count(*) FROM gpkg_contents c WHERE NOT EXISTS (SELECT 1 FROM sqlite_master m "
                      "WHERE m.name=c.table_name)") == 0);
    CHECK(db->integer("SELECT count(*) FROM gpkg_extensions WHERE extension_name='gpkg_rtree_index'") == 6);
    CHECK(db->integer("SELECT count(*) FROM rtree_poles_geom") == 4); // the fifth has no place
    CHECK(db->integer("SELECT count(*) FROM sqlite_master WHERE type='trigger' AND tbl_name='poles'") == 6);
}

TEST_CASE("schema: the R-tree follows an edit made through SQL, as another program would make it") {
    const TempFolder folder;
    const auto db = make_project(folder.file("p.gpkg"));
    auto update = db->prepare("UPDATE poles SET geom=?1 WHERE pole_id='01-000'");
    update.bind(1, point_blob({400500, 3762500}, 32609)).run();
    CHECK(db->integer("SELECT count(*) FROM rtree_poles_geom WHERE minx > 400400") == 1);
    db->run("DELETE FROM poles WHERE pole_id='01-000'");
    CHECK(db->integer("SELECT count(*) FROM rtree_poles_geom") == 3);
    INFO((db->is_failed() ? db->failure()->found : ""));
    CHECK_FALSE(db->is_failed());
}

TEST_CASE("schema: a file of a newer version is refused by name and not touched") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    const auto db = make_project(path);
    set_meta_value(*db, "version", "99");
    db->close_to_one_file();
    const auto before = std::filesystem::last_write_time(path);
    const auto answer = bring_up_to_date(path);
    REQUIRE_FALSE(answer);
    CHECK(answer.error().code == FaultCode::file_newer);
    CHECK(answer.error().found == "99");
    CHECK(std::filesystem::last_write_time(path) == before);
}

TEST_CASE("schema: a file of version 1 is brought up in a copy, and the old one stays beside it") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    {
        const auto db = make_project(path);
        db->run("DROP INDEX edits_by_plan");
        set_meta_value(*db, "version", "1");
        db->close_to_one_file();
    }
    REQUIRE(bring_up_to_date(path));
    CHECK(check_version(path) == kProjectVersion);
    const auto db = Database::open(path, Database::Access::read);
    REQUIRE(db);
    CHECK((*db)->integer("SELECT count(*) FROM sqlite_master WHERE name='edits_by_plan'") == 1);
    CHECK(read_city_tables(**db).city.poles.size() == 5);
    CHECK(check_version(path + ".before-2") == 1);
}

TEST_CASE("schema: a file that is no project is refused with what to do, whatever it is") {
    const TempFolder folder;
    const std::string text = folder.file("notes.txt");
    std::ofstream(text) << "pole_id,easting\n";
    CHECK(check_version(text).error().code == FaultCode::file_broken);
    std::ofstream(folder.file("empty.gpkg")).flush();
    CHECK(check_version(folder.file("empty.gpkg")).error().code == FaultCode::file_broken);
    CHECK(check_version(folder.file("none.gpkg")).error().code == FaultCode::file_missing);
}

TEST_CASE("schema: a project with a foreign trigger is refused before it could run") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    const auto db = make_project(path);
    db->run("CREATE TRIGGER surprise AFTER INSERT ON edits BEGIN DELETE FROM poles; END");
    const auto answer = check_schema(*db, path);
    REQUIRE_FALSE(answer);
    CHECK(answer.error().found.find("surprise") != std::string::npos);
    db->run("DROP TRIGGER surprise");
    CHECK(check_schema(*db, path));
    db->run("DROP TRIGGER rtree_poles_geom_insert; CREATE TRIGGER rtree_poles_geom_insert AFTER INSERT ON "
            "poles BEGIN DELETE FROM edits; END");
    CHECK_FALSE(check_schema(*db, path));
}
