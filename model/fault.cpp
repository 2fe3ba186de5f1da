#include "model/fault.h"

#include <fmt/format.h>

namespace unstring {

std::string_view fault_code_text(FaultCode code) {
    switch (code) {
    case FaultCode::bad_usage:
        return "bad-usage";
    case FaultCode::file_missing:
        return "file-missing";
    case FaultCode::file_broken:
        return "file-broken";
    case FaultCode::file_newer:
        return "file-newer";
    case FaultCode::file_busy:
        return "file-busy";
    case FaultCode::write_failed:
        return "write-failed";
    case FaultCode::value_unreadable:
        return "value-unreadable";
    case FaultCode::value_unknown:
        return "value-unknown";
    case FaultCode::column_missing:
        return "column-missing";
    case FaultCode::crs_unknown:
        return "crs-unknown";
    case FaultCode::not_ready:
        return "not-ready";
    case FaultCode::no_solution:
        return "no-solution";
    case FaultCode::cancelled:
        return "cancelled";
    }
    return "unknown";
}

int fault_exit_code(FaultCode code) {
    switch (code) {
    case FaultCode::not_ready:
    case FaultCode::no_solution:
        return 1;
    case FaultCode::bad_usage:
        return 2;
    case FaultCode::file_busy:
        return 4;
    case FaultCode::cancelled:
        return 130;
    default:
        return 3;
    }
}

std::string fault_text(const Fault& fault) {
    std::string text = fault.file;
    if (fault.row > 0) text += fmt::format("{}row {}", text.empty() ? "" : ", ", fault.row);
    if (!fault.field.empty()) text += fmt::format("{}{}", text.empty() ? "" : ", ", fault.field);
    if (!text.empty()) text += ": ";
    if (!fault.found.empty()) text += fmt::format("found {}", fault.found);
    if (!fault.wanted.empty())
        text += fmt::format("{}wanted {}", fault.found.empty() ? "" : "; ", fault.wanted);
    if (!fault.remedy.empty()) text += fmt::format(". {}", fault.remedy);
    return text;
}

} // namespace unstring
