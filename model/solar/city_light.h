#pragma once
// Everything of the shade step that is the same for all poles: the sun, the weather, the heads' lamps and
// batteries.

#include <vector>

#include "model/catalog/catalog.h"
#include "model/city/city.h"
#include "model/solar/battery.h"
#include "model/solar/panel.h"
#include "model/solar/shade_city.h"
#include "model/solar/shade_terms.h"

namespace unstring {

/// Up to kLanes heads of the catalogue, run side by side.
struct HeadGroup {
    std::vector<const Head*> heads;
    BatteryGroup fresh, worn; ///< the batteries new, and at the end of their lives
};

/// Where a step of the sun falls among the horizon's directions.
struct SunDirection {
    std::uint16_t from = 0;
    float along = 0;
};

struct CityLight {
    SunYear sun;
    HourlySky sky;
    std::vector<double> air_c;
    std::vector<SunDirection> directions; ///< one per step of the sun
    std::vector<HeadGroup> groups;
    Monthly temp_c{}, albedo{}, deciduous{}, evergreen{};
};

/// @fault value_unknown (a head that the catalogue has not), value_unreadable (a climate that cannot be)
[[nodiscard]] Expected<CityLight> city_light(const ShadeInput& input, const ShadeTerms& terms);

/// Monthly clearness of a climate at a place. @fault value_unreadable
[[nodiscard]] Expected<Monthly> monthly_clearness(const SunYear& sun, const Monthly& ghi_kwh_m2_day);

} // namespace unstring
