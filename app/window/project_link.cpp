#include "app/window/project_link.h"

#include <stdexcept>

#include "app/steps/printer.h"

namespace unstring {
namespace {

Expected<void> run_step(OpenProject& project, Step step, const Progress& progress) {
    switch (step) {
    case Step::vet:
        return project.run_vet(false, progress);
    case Step::shade:
        return project.run_shade({}, progress);
    case Step::decide:
        return project.run_decide({}, progress);
    case Step::phase:
        return project.run_phase({}, progress);
    case Step::gather:
    case Step::hand_out:
        break;
    }
    throw std::logic_error("gather and hand out ask for files first");
}

} // namespace

ProjectLink link_to(std::shared_ptr<OpenProject> project, std::shared_ptr<Printer> printer) {
    ProjectLink link;
    link.view = [project] { return project->view(); };
    link.edit = [project](const Plan& next, const std::string& label) { return project->edit(next, label); };
    link.undo = [project] { return project->undo(); };
    link.redo = [project] { return project->redo(); };
    link.history = [project](const std::string& pole_id, int at_most) {
        return project->history(pole_id, at_most);
    };
    link.preview = [project](const Plan& next) { return project->preview(next); };
    link.run_step = [project](Step step, const Progress& progress) {
        return run_step(*project, step, progress);
    };
    link.set_aside = [project](const Progress& progress) { return project->run_vet(true, progress); };
    link.hand_out = [project, printer](const HandOutOptions& options,
                                       const Progress& progress) -> Expected<std::vector<std::string>> {
        auto report = project->run_hand_out(options, printer.get(), progress);
        if (!report) return tl::make_unexpected(report.error());
        return std::move(report->files);
    };
    return link;
}

} // namespace unstring
