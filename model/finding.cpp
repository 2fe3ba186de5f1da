#include "model/finding.h"

#include <algorithm>
#include <array>
#include <string_view>
#include <utility>

namespace unstring {
namespace {

constexpr std::array<std::string_view, 17> kErrors = {
    "row-broken",    "number-unreadable", "column-missing", "pole-id-twice",     "place-missing",
    "place-swapped", "string-unknown",    "current-mixed",  "transformer-twice", "order-twice",
    "load-over",     "volts-over",        "no-way",         "unit-twice",        "duct-live",
    "control-lost",  "critical-dark"};
constexpr std::array<std::string_view, 5> kNotices = {"unit-guessed", "order-inferred", "cutback-unconfirmed",
                                                      "untested-spare", "encoding-guessed"};

} // namespace

Severity severity_of(const std::string& code) {
    if (std::find(kErrors.begin(), kErrors.end(), code) != kErrors.end()) return Severity::error;
    if (std::find(kNotices.begin(), kNotices.end(), code) != kNotices.end()) return Severity::notice;
    return Severity::warning;
}

const char* severity_text(Severity severity) {
    switch (severity) {
    case Severity::error:
        return "error";
    case Severity::warning:
        return "warning";
    case Severity::notice:
        return "notice";
    }
    return "warning";
}

Finding make_finding(std::string code, std::string file, long row, std::string record, std::string found,
                     std::string wanted, std::string remedy, std::string table) {
    const Severity severity = severity_of(code);
    return {std::move(code),   severity,          std::move(file), row, std::move(record), std::move(found),
            std::move(wanted), std::move(remedy), std::move(table)};
}

} // namespace unstring
