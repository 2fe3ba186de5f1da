#pragma once
// The steps' answers as JSON, key by key as the contract promises them.

#include <nlohmann/json.hpp>

#include "app/steps/gather.h"
#include "app/steps/open_project.h"

namespace unstring {

using Json = nlohmann::ordered_json;

[[nodiscard]] Json findings_json(const std::vector<Finding>& findings);
[[nodiscard]] Json gather_json(const GatherReport& report);
[[nodiscard]] Json vet_json(const ProjectView& view);
[[nodiscard]] Json shade_json(const ProjectView& view, bool per_pole);
[[nodiscard]] Json decide_json(const ProjectView& view);
[[nodiscard]] Json phase_json(const ProjectView& view);
[[nodiscard]] Json hand_out_json(const HandOutReport& report);
/// @param pole  a pole of the view's city
[[nodiscard]] Json why_json(const ProjectView& view, PoleIx pole);

/// How many findings are errors.
[[nodiscard]] int count_errors(const std::vector<Finding>& findings);
/// What vet counts and lists: gather's findings (its errors only until they were set aside) and vet's own.
[[nodiscard]] std::vector<Finding> vetted_findings(const ProjectView& view);
/// Poles that no step plans on: set aside, or on a string that is, and rows that could not be read.
[[nodiscard]] int poles_set_aside(const ProjectView& view);

} // namespace unstring
