#pragma once
// Sections: lamps of one string that leave together, from the far end inward.

#include <vector>

#include "model/series/string_loop.h"

namespace unstring {

struct Section {
    int id = 0;
    StringIx string;
    int ring = 0;              ///< 0 = at the far end, then inward
    std::vector<PoleIx> poles; ///< in wiring order
    int cutback =
        -1; ///< place in StringLoop.cutbacks that closes the loop once this section is off, -1 = jumpered
};

/// Sections of every string, ring by ring; every lamp of a loop is in exactly one. Off rings 0..k form a run
/// that holds the far end. Ids are places in the answer.
[[nodiscard]] std::vector<Section> sections_of(const std::vector<StringLoop>& loops);

} // namespace unstring
