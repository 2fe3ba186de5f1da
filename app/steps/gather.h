#pragma once
// gather: a city's files into one project file, new or already there.

#include <map>
#include <string>
#include <vector>

#include "geo/imports/gathered.h"
#include "model/fault.h"
#include "model/progress.h"

namespace unstring {

struct GatherReport {
    int poles = 0, strings = 0, series_poles = 0, transformers = 0, services = 0;
    std::string crs, crs_from;
    std::map<std::string, RowCount> rows;
    std::vector<Finding> findings;
    std::vector<std::string> notes;
};

/// Creates the project where there is none, else adds or replaces the tables whose files are given. Marks
/// become one edit of the plan. A project is whole before it has its name; a failed or cancelled run leaves
/// an old one as it was.
/// @fault bad_usage (nothing to do), file_busy, and what reading reports
[[nodiscard]] Expected<GatherReport> gather_project(const std::string& path, const GatherFiles& files,
                                                    const Progress& progress);

} // namespace unstring
