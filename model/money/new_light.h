#pragma once
// What burns at a pole today, what burns there after a rewire, and what kind of road it stands on.

#include <string>
#include <string_view>

#include "model/catalog/catalog.h"
#include "model/city/city.h"

namespace unstring {

/// System watts of the series lamp: the file's, else the catalogue's for its fixture; 188 (150 W sodium)
/// where neither tells. Source of the 188: common system watts, from memory.
[[nodiscard]] double lamp_watts(const Catalog& catalog, const Pole& pole);

struct NewLight {
    std::string name;
    double led_w = 0;
    std::string_view price_item;
};

/// The smallest luminaire of the catalogue with the lumens that the pole needs (need_lm); where that is not
/// told, with 0.32 of the old lamp's system watts (188 W of sodium to 60 W of LED, an assumption). None that
/// large: the largest. An empty catalogue: a nameless luminaire of that wattage at the price of "led_head".
[[nodiscard]] NewLight new_light(const Catalog& catalog, const Pole& pole);

enum class RoadClass { local, collector, arterial };
/// By the words "arterial" and "collector" in the pole's road_class, else local.
[[nodiscard]] RoadClass road_class_of(const Pole& pole);

/// Surface of the pole's street; verge where the street is not known.
[[nodiscard]] Surface surface_at(const City& city, const Pole& pole);

} // namespace unstring
