#pragma once
// The steps' answers in words and columns, for people at a terminal.

#include <string>

#include "app/steps/gather.h"
#include "app/steps/open_project.h"

namespace unstring {

[[nodiscard]] std::string findings_text(const std::vector<Finding>& findings);
[[nodiscard]] std::string gather_text(const GatherReport& report);
[[nodiscard]] std::string vet_text(const ProjectView& view);
[[nodiscard]] std::string shade_text(const ProjectView& view);
[[nodiscard]] std::string decide_text(const ProjectView& view);
[[nodiscard]] std::string phase_text(const ProjectView& view);
/// The whole plan on one page: counts, cost, bound, years.
[[nodiscard]] std::string summary_text(const ProjectView& view);
[[nodiscard]] std::string hand_out_text(const HandOutReport& report);
[[nodiscard]] std::string why_text(const ProjectView& view, PoleIx pole);

} // namespace unstring
