#include "app/window/scene.h"

#include <algorithm>

namespace unstring {

void MapBounds::add(MapPoint point) {
    if (is_empty) {
        west_m = east_m = point.x_m, south_m = north_m = point.y_m;
        is_empty = false;
        return;
    }
    west_m = std::min(west_m, point.x_m), east_m = std::max(east_m, point.x_m);
    south_m = std::min(south_m, point.y_m), north_m = std::max(north_m, point.y_m);
}

std::shared_ptr<const Scene> make_scene(std::shared_ptr<const ProjectView> view) {
    auto scene = std::make_shared<Scene>();
    scene->view = std::move(view);
    const ProjectView& project = *scene->view;
    scene->wired = project.vet ? with_wiring(project.city, project.vet->strings) : project.city;
    scene->loops = string_loops(scene->wired, project.catalog);
    scene->position.assign(project.city.poles.size(), 0);
    for (std::size_t s = 0; s < scene->loops.size(); ++s) {
        const StringLoop& loop = scene->loops[s];
        for (std::size_t i = 0; i < loop.lamps.size(); ++i)
            scene->position[loop.lamps[i].place()] = int(i) + 1;
        if (!loop.lamps.empty()) scene->series.emplace_back(s);
    }
    std::sort(scene->series.begin(), scene->series.end(), [&project](StringIx a, StringIx b) {
        return project.city.strings[a.place()].id < project.city.strings[b.place()].id;
    });
    std::vector<PickGrid::Place> places;
    for (std::size_t i = 0; i < project.city.poles.size(); ++i) {
        const Pole& pole = project.city.poles[i];
        if (!pole.has_place) continue;
        places.push_back({pole.place, std::uint32_t(i)});
        scene->bounds.add(pole.place);
    }
    scene->grid = PickGrid(std::move(places));
    return scene;
}

const StringYear* string_year(const PhaseResult* phase, StringIx string, int year) {
    if (phase == nullptr) return nullptr;
    for (const StringYear& state : phase->string_years)
        if (state.string == string && state.year == year) return &state;
    return nullptr;
}

} // namespace unstring
