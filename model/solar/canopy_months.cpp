#include "model/solar/canopy_months.h"

namespace unstring {

Monthly canopy_through(Leaf leaf, double lat_deg, const CanopyTerms& terms) {
    Monthly through{};
    through.fill(terms.evergreen);
    if (leaf == Leaf::evergreen) return through;
    for (std::size_t month = 0; month < 12; ++month) {
        const double leaves = terms.leaves[lat_deg < 0 ? (month + 6) % 12 : month];
        through[month] =
            terms.deciduous_leaf_off + leaves * (terms.deciduous_leaf_on - terms.deciduous_leaf_off);
    }
    return through;
}

} // namespace unstring
