#pragma once
// Where a command's answer goes: with --json one object on standard output and text on standard error;
// without it text on standard output, progress on standard error. Ctrl-C asks the running step to stop.

#include <string>

#include <nlohmann/json.hpp>

#include "model/fault.h"
#include "model/progress.h"

namespace unstring {

class Console {
public:
    explicit Console(bool is_json) : is_json_(is_json) {}
    [[nodiscard]] bool is_json() const { return is_json_; }

    void say(const std::string& text) const;               ///< a line for people
    void answer(const nlohmann::ordered_json& json) const; ///< printed only with --json
    /// Says the fault, in both forms. @return its exit status
    [[nodiscard]] int fail(const Fault& fault) const;
    /// Progress of a step, as whole tenths on standard error when that is a terminal.
    [[nodiscard]] Progress progress(std::string what) const;

private:
    bool is_json_;
};

} // namespace unstring
