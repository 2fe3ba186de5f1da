#include "model/plan/change.h"

#include <utility>

namespace unstring {

Change inverse(const Change& change) {
    Change swapped = change;
    for (RowChange& row : swapped.rows) std::swap(row.before, row.after);
    return swapped;
}

} // namespace unstring
