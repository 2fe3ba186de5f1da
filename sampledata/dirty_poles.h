#pragma once
// The dirty pole file as rows of cells, with the troubles that were put into it.

#include <string>
#include <vector>

#include "sampledata/records.h"

namespace unstring::sample {

struct Trouble {
    std::string code, file;
    long line = 0; ///< 1 = the header
    std::string record, why;
};

struct DirtyPoles {
    std::string header;
    std::vector<std::vector<std::string>> rows; ///< UTF-8; row i is line i + 2
    std::vector<Trouble> troubles;
};

/// Strings of the dirty set, each cut from a clean string of Quillhaven.
struct DirtyString {
    const char* id;
    const char* from;         ///< clean string
    std::size_t first, count; ///< lamps of it
};
[[nodiscard]] const std::vector<DirtyString>& dirty_strings();

[[nodiscard]] DirtyPoles dirty_poles(const Tables& clean);

} // namespace unstring::sample
