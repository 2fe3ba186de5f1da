#pragma once
// Doubtful data: a finding never stops the step that makes it; an error stops the next one.

#include <string>
#include <vector>

namespace unstring {

enum class Severity { error, warning, notice };

struct Finding {
    std::string code; ///< stable, from the closed list of the contract ("pole-id-twice")
    Severity severity = Severity::warning;
    std::string file;
    long row = 0;       ///< line in the file, 1 = its first line; 0 = none
    std::string record; ///< id of the pole, string, transformer, service; or "year 2029"
    std::string found;
    std::string wanted;
    std::string remedy;
    std::string table; ///< table of the record ("poles"), so that it can be set aside; may be empty
};

/// The severity that the contract gives a code ("load-over" is an error).
[[nodiscard]] Severity severity_of(const std::string& code);
[[nodiscard]] const char* severity_text(Severity severity);
/// A finding with the severity of its code.
[[nodiscard]] Finding make_finding(std::string code, std::string file, long row, std::string record,
                                   std::string found, std::string wanted, std::string remedy,
                                   std::string table = {});

} // namespace unstring
