#pragma once
// Looking findings up by code and record.

#include <algorithm>
#include <string>
#include <string_view>
#include <vector>

#include "model/finding.h"

namespace unstring::for_tests {

inline long count_of(const std::vector<Finding>& findings, std::string_view code) {
    return std::count_if(findings.begin(), findings.end(),
                         [&](const Finding& finding) { return finding.code == code; });
}

/// The one finding of that code on that record; an empty one where there is none.
inline Finding finding_of(const std::vector<Finding>& findings, std::string_view code,
                          std::string_view record) {
    for (const Finding& finding : findings)
        if (finding.code == code && finding.record == record) return finding;
    return {};
}

inline long errors_in(const std::vector<Finding>& findings) {
    return std::count_if(findings.begin(), findings.end(),
                         [](const Finding& finding) { return finding.severity == Severity::error; });
}

inline std::string codes_in(const std::vector<Finding>& findings) {
    std::string codes;
    for (const Finding& finding : findings) codes += finding.code + " " + finding.record + "\n";
    return codes;
}

} // namespace unstring::for_tests
