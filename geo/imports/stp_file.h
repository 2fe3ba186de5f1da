#pragma once
// Reads Steiner problems in the STP format of SteinLib: graph and terminals; the other sections are passed
// over.

#include <string>

#include "model/decide/steiner.h"
#include "model/fault.h"

namespace unstring {

inline constexpr double kStpScale = 1e6; ///< numbers of the file times this are the integers of the problem

struct StpFile {
    SteinerProblem problem; ///< vertex v of the file is v - 1 here
    int vertices_given = 0, edges_given = 0, terminals = 0, prizes = 0;
    bool has_root = false;
};

/// `E u v cost` (arcs `A` are refused), `T v` has to be in, `TP v prize`, `RootP v` / `Root v` the root; a
/// vertex with both T and TP has to be in and its prize is never paid. A prize beyond 64 bits means "has to
/// be in".
/// @fault file_missing, file_broken, value_unreadable (row and field named)
[[nodiscard]] Expected<StpFile> read_stp_file(const std::string& path);

} // namespace unstring
