#include "geo/exports/plan_layers.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>

#include <catch2/catch.hpp>
#include <gdal_priv.h>
#include <ogrsf_frmts.h>
#include <unistd.h>

using namespace unstring;

namespace {

struct LayersCase {
    City city;
    Plan plan;
    DecideResult decide;
    PhaseResult phase;

    LayersCase() {
        city.crs = "EPSG:32609";
        SeriesString string;
        string.id = "S-01";
        string.station = MapPoint{400000, 3760000};
        city.strings.push_back(string);
        for (int i = 0; i < 3; ++i) {
            Pole pole;
            pole.id = "01-20" + std::to_string(i);
            pole.string = StringIx(0);
            pole.order = i + 1;
            pole.has_place = true;
            pole.place = {400000 + 40.0 * i, 3760010};
            pole.street = i == 0 ? "\xD7\xA8\xD7\x97" : "Tide Lane";
            city.poles.push_back(pole);
        }
        ServicePoint service;
        service.id = "SV-1";
        city.services.push_back(service);
        plan.poles.resize(3);
        plan.poles[0].choice = Choice::rewire;
        plan.poles[1].choice = Choice::solar;
        plan.poles[1].head = "SOL-M";
        phase.pole_year = {2028, 2029, 0};
        CircuitSpan span;
        span.pole = PoleIx(0);
        span.service = ServiceIx(0);
        span.length_m = 12.5;
        span.line = {{400000, 3760000}, {400000, 3760010}};
        span.poles_beyond = {PoleIx(0)};
        decide.spans.push_back(span);
        PoleDecision decision;
        decision.pole = PoleIx(0);
        decision.volts = 236.5;
        decision.options[1].cost = 8123.45;
        decision.options[2].possible = false;
        decide.poles.push_back(decision);
        StringYear year;
        year.string = StringIx(0);
        year.year = 2028;
        year.lamps = 2;
        phase.string_years.push_back(year);
    }
    [[nodiscard]] Expected<std::vector<std::string>> write(const std::string& folder) const {
        return export_layers(folder, city, plan, decide, phase);
    }
};

std::string folder(const char* name) {
    const auto path =
        std::filesystem::temp_directory_path() / ("unstring-layers-" + std::to_string(getpid())) / name;
    std::filesystem::create_directories(path);
    return path;
}

GDALDatasetUniquePtr opened(const std::string& path) {
    return GDALDatasetUniquePtr(GDALDataset::Open(path.c_str(), GDAL_OF_VECTOR));
}

OGRFeatureUniquePtr feature_with(OGRLayer& layer, const char* field, const std::string& value) {
    layer.ResetReading();
    for (OGRFeatureUniquePtr feature(layer.GetNextFeature()); feature != nullptr;
         feature.reset(layer.GetNextFeature()))
        if (value == feature->GetFieldAsString(field)) return feature;
    return nullptr;
}

bool is_blank(const OGRFeature& feature, const char* field) {
    return feature.IsFieldSetAndNotNull(feature.GetFieldIndex(field)) == 0;
}

} // namespace

TEST_CASE("plan layers: what is written is read back by GDAL: choice, year, place, costs, blanks where "
          "nothing is known") {
    const auto files = LayersCase().write(folder("read"));
    REQUIRE(files.has_value());
    REQUIRE(files->size() == 1);
    const auto file = opened(files->front());
    REQUIRE(file != nullptr);
    OGRLayer* poles = file->GetLayerByName("poles");
    REQUIRE(poles != nullptr);
    CHECK(poles->GetFeatureCount() == 3);
    const auto first = feature_with(*poles, "pole_id", "01-200");
    REQUIRE(first != nullptr);
    CHECK(std::string(first->GetFieldAsString("choice")) == "rewire");
    CHECK(first->GetFieldAsInteger("year") == 2028);
    CHECK(first->GetFieldAsDouble("planned_v") == 236.5);
    CHECK(first->GetFieldAsDouble("cost_rewire") == 8123.45);
    CHECK(is_blank(*first, "cost_solar"));
    CHECK(std::string(first->GetFieldAsString("street")) == "\xD7\xA8\xD7\x97");
    CHECK(first->GetGeometryRef()->toPoint()->getX() == 400000);
    CHECK(first->GetGeometryRef()->toPoint()->getY() == 3760010);
    CHECK(is_blank(*feature_with(*poles, "pole_id", "01-202"), "year"));
    REQUIRE(poles->GetSpatialRef() != nullptr);
    CHECK(std::string(poles->GetSpatialRef()->GetAuthorityCode(nullptr)) == "32609");
}

TEST_CASE(
    "plan layers: spans carry the year of the first pole beyond, strings end only when every lamp has left") {
    LayersCase test;
    const auto files = test.write(folder("spans"));
    REQUIRE(files.has_value());
    {
        const auto file = opened(files->front());
        const auto span = feature_with(*file->GetLayerByName("spans"), "service_id", "SV-1");
        REQUIRE(span != nullptr);
        CHECK(span->GetFieldAsInteger("year") == 2028);
        CHECK(span->GetFieldAsDouble("length_m") == 12.5);
        CHECK(span->GetGeometryRef()->toLineString()->getNumPoints() == 2);
        const auto string = feature_with(*file->GetLayerByName("strings"), "string_id", "S-01");
        CHECK(is_blank(*string, "last_year"));
        CHECK(string->GetGeometryRef()->toLineString()->getNumPoints() == 5);
        CHECK(file->GetLayerByName("string_years")->GetFeatureCount() == 1);
    }
    test.phase.pole_year[2] = 2031;
    REQUIRE(test.write(folder("spans")).has_value());
    const auto file = opened(files->front());
    CHECK(
        feature_with(*file->GetLayerByName("strings"), "string_id", "S-01")->GetFieldAsInteger("last_year") ==
        2031);
}

TEST_CASE("plan layers: with SOURCE_DATE_EPOCH set the same plan gives the same bytes") {
    setenv("SOURCE_DATE_EPOCH", "1767225600", 1);
    const auto bytes = [](const char* name) {
        const auto files = LayersCase().write(folder(name));
        REQUIRE(files.has_value());
        std::stringstream content;
        content << std::ifstream(files->front(), std::ios::binary).rdbuf();
        return content.str();
    };
    const std::string first = bytes("one");
    const std::string second = bytes("two");
    unsetenv("SOURCE_DATE_EPOCH");
    CHECK(first.size() > 10000);
    CHECK(first == second);
}

TEST_CASE("plan layers: a folder that is not there is a fault, and no part of a file is left") {
    const auto files = LayersCase().write("/no/such/folder");
    REQUIRE_FALSE(files.has_value());
    CHECK(files.error().code == FaultCode::write_failed);
    LayersCase odd;
    odd.city.crs = "EPSG:999999";
    const std::string at = folder("odd");
    CHECK_FALSE(odd.write(at).has_value());
    CHECK(std::filesystem::is_empty(at));
}
