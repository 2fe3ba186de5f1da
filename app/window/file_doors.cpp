#include "app/window/file_doors.h"

#include "app/steps/gather.h"

namespace unstring {

Doors file_doors(std::shared_ptr<Printer> printer) {
    Doors doors;
    doors.open = [printer](const std::string& path) -> Expected<ProjectLink> {
        auto project = OpenProject::open(path);
        if (!project) return tl::make_unexpected(project.error());
        return link_to(std::shared_ptr<OpenProject>(std::move(*project)), printer);
    };
    doors.gather = [](const GatherWish& wish,
                      const Progress& progress) -> Expected<std::vector<std::string>> {
        auto report = gather_project(wish.project_path, wish.files, progress);
        if (!report) return tl::make_unexpected(report.error());
        return std::move(report->notes);
    };
    return doors;
}

} // namespace unstring
