#pragma once
// A project file of the small city, made the way gather makes one.

#include <memory>

#include <catch2/catch.hpp>

#include "geo/project/schema.h"
#include "tests/geo/project/sample_tables.h"

namespace unstring::tests {

inline std::unique_ptr<Database> make_project(const std::string& path,
                                              const CityTables& tables = sample_tables()) {
    auto database = Database::open(path, Database::Access::create);
    REQUIRE(database);
    const auto written = (*database)->transaction([&] {
        create_schema(**database, tables.city.crs, "");
        write_city_tables(**database, tables);
    });
    REQUIRE(written);
    REQUIRE(check_schema(**database, path));
    return std::move(*database);
}

} // namespace unstring::tests
