#pragma once
// What the window works out once for each view: loops, bounds, a grid to find poles by place, summaries by
// string.

#include <QString>

#include <memory>
#include <vector>

#include "app/steps/open_project.h"
#include "app/window/map/pick_grid.h"
#include "model/series/string_loop.h"

namespace unstring {

struct MapBounds {
    double west_m = 0, south_m = 0, east_m = 0, north_m = 0;
    bool is_empty = true;
    void add(MapPoint point);
};

struct Scene {
    std::shared_ptr<const ProjectView> view; ///< keeps the catalogue that the loops point into
    City wired;                              ///< the city with the wiring order that vet settled
    std::vector<StringLoop> loops;           ///< one per string; empty for parallel circuits
    std::vector<int> position;               ///< per pole: place in its loop, 1..n; 0 = none
    std::vector<StringIx> series;            ///< the series strings with lamps, by id
    PickGrid grid;
    MapBounds bounds;
};

[[nodiscard]] std::shared_ptr<const Scene> make_scene(std::shared_ptr<const ProjectView> view);

/// State of a string at a year's end; null where phase has none.
[[nodiscard]] const StringYear* string_year(const PhaseResult* phase, StringIx string, int year);

} // namespace unstring
