#pragma once
// What the window asks of an open project, as callbacks: the window can stand on made-up data in tests.

#include <functional>
#include <memory>
#include <string>
#include <vector>

#include "app/steps/open_project.h"

namespace unstring {

struct ProjectLink {
    std::function<std::shared_ptr<const ProjectView>()> view;
    std::function<Expected<Change>(const Plan& next, const std::string& label)> edit;
    std::function<Expected<std::optional<Change>>()> undo, redo;
    std::function<Expected<std::vector<EditLine>>(const std::string& pole_id, int at_most)> history;
    std::function<PhaseResult(const Plan& next)> preview;
    /// Called from a working thread.
    std::function<Expected<void>(Step step, const Progress& progress)> run_step;
    /// vet, with the records of its errors set aside. Called from a working thread.
    std::function<Expected<void>(const Progress& progress)> set_aside;
    std::function<Expected<std::vector<std::string>>(const HandOutOptions& options, const Progress& progress)>
        hand_out;
};

/// The callbacks of a real project, which they keep open as long as one of them is alive.
/// @param printer  puts the orders on paper; null = tables and layers only
[[nodiscard]] ProjectLink link_to(std::shared_ptr<OpenProject> project, std::shared_ptr<Printer> printer);

} // namespace unstring
