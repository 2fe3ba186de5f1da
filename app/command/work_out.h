#pragma once
// `unstring work-out`: one calculation by itself, its inputs and steps shown. Each topic has a file
// work_out_<topic>.cpp that adds its subcommand and, when it runs, fills the answer.

#include <optional>
#include <string>

#include <CLI/CLI.hpp>
#include <nlohmann/json.hpp>

#include "model/fault.h"

namespace unstring {

struct WorkOutAnswer {
    nlohmann::ordered_json json; ///< the keys of the contract
    std::string steps_text;      ///< inputs, steps with their numbers, source of the method; for people
    std::optional<Fault> fault;  ///< set instead of the two above when the input is bad
};

/// Reads a JSON input file; a fault names the file, and the place where it stops being JSON.
[[nodiscard]] Expected<nlohmann::json> read_json_file(const std::string& path);

} // namespace unstring
