#pragma once
// A failed operation: what went wrong, where, and what to do. Doubtful data is a Finding, not a Fault.

#include <cstdint>
#include <string>
#include <string_view>

#include <tl/expected.hpp>

namespace unstring {

enum class FaultCode {
    bad_usage,        ///< an argument that cannot be
    file_missing,     ///< no such file, or it cannot be read
    file_broken,      ///< the file is not what it should be
    file_newer,       ///< written by a newer version
    file_busy,        ///< another process is writing
    write_failed,     ///< disk full, no permission
    value_unreadable, ///< a field that cannot be read
    value_unknown,    ///< a field with a value that is not in its list
    column_missing,   ///< a column that is needed
    crs_unknown,      ///< coordinates without a coordinate system
    not_ready,        ///< an earlier step has not been run, or is stopped by findings
    no_solution,      ///< a solver proved that there is no answer
    cancelled,        ///< the user stopped it
};

/// The code as it stands in the `--json` answer, e.g. "file-missing".
[[nodiscard]] std::string_view fault_code_text(FaultCode code);
/// Exit status by the contract: 1 not ready, 2 usage, 3 bad input, 4 busy, 130 cancelled.
[[nodiscard]] int fault_exit_code(FaultCode code);

struct Fault {
    FaultCode code = FaultCode::file_broken;
    std::string file;  ///< path, empty where there is none
    long row = 0;      ///< 1 = first line of the file, 0 = none
    std::string field; ///< column, key or option
    std::string found;
    std::string wanted;
    std::string remedy;
};

/// One line for people: file, row, field, what was found, what was wanted, what to do.
[[nodiscard]] std::string fault_text(const Fault& fault);

template <class T>
using Expected = tl::expected<T, Fault>;

} // namespace unstring
