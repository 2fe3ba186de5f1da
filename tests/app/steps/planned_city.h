#pragma once
// A small made city in a project, all steps run.

#include <fstream>
#include <memory>

#include <catch2/catch.hpp>

#include "app/steps/gather.h"
#include "app/steps/open_project.h"
#include "tests/support/program.h"

namespace unstring::tests {

struct PlannedCity {
    TempFolder folder;
    std::string project = folder.file("p.gpkg"), city = folder.file("city");

    explicit PlannedCity(int poles = 150) {
        REQUIRE(run_file(UNSTRING_CITY_MAKER, {"--size", std::to_string(poles), "--seed", "5", "--to", city})
                    .status == 0);
    }
    [[nodiscard]] GatherFiles files() const {
        GatherFiles f;
        f.poles = city + "/poles.csv";
        f.circuits = city + "/circuits.csv";
        f.transformers = city + "/transformers.csv";
        f.services = city + "/services.csv";
        f.streets = city + "/streets.gpkg";
        f.canopy = city + "/canopy.tif";
        f.obstacles = city + "/buildings.gpkg";
        f.climate = city + "/climate.csv";
        f.prices = city + "/prices.csv";
        f.budget = city + "/budget.csv";
        f.cutbacks = city + "/cutbacks.csv";
        return f;
    }
    void gather(const GatherFiles& f) const {
        const auto report = gather_project(project, f, {});
        INFO((report ? "" : fault_text(report.error())));
        REQUIRE(report);
    }
    [[nodiscard]] std::unique_ptr<OpenProject> open() const {
        auto opened = OpenProject::open(project);
        INFO((opened ? "" : fault_text(opened.error())));
        REQUIRE(opened);
        return std::move(*opened);
    }
    /// Gathers and runs vet, shade, decide, phase.
    [[nodiscard]] std::unique_ptr<OpenProject> planned() const {
        gather(files());
        auto opened = open();
        REQUIRE(opened->run_vet(true, {}));
        REQUIRE(opened->run_shade({}, {}));
        REQUIRE(opened->run_decide({}, {}));
        REQUIRE(opened->run_phase({}, {}));
        return opened;
    }
};

inline StepStanding standing(const OpenProject& project, Step step) {
    return project.view()->steps[static_cast<std::size_t>(step)].standing;
}

} // namespace unstring::tests
