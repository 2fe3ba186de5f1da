#pragma once
// The ground plan of Quillhaven: a street grid that repeats in tiles of 18 x 12 corners. A tile has 21
// districts: 14 of them burn on series strings, 7 on parallel circuits. A bigger city is more tiles, north
// and east of the first.
//
//     north   S-01  S-02  19    S-03  20
//             S-05  S-06  S-07  S-04  18          district 21: the lamps along Harbour Road, across the whole
//             tile S-08  S-09  S-10  S-11  17
//     south   S-12  S-13  S-14  15    16 ~~~      ~~~ Quillhaven Harbour

#include <cstdint>
#include <string>
#include <vector>

#include "model/quantities.h"

namespace unstring::sample {

inline constexpr int kColumns = 18, kRows = 12; ///< corners of a tile
inline constexpr int kDistricts = 21, kStrings = 14;
inline constexpr int kHarbourRoad = 21;

struct Town {
    std::uint64_t seed = 0;
    int tiles_x = 1, tiles_y = 1;
};

/// A town with room for that many poles.
[[nodiscard]] Town town_for(long poles, std::uint64_t seed);

struct Corner { ///< where two streets meet; counted over the whole town
    int column = 0, row = 0;
    constexpr bool operator==(const Corner&) const = default;
};

struct Block { ///< one stretch of street between two corners; it belongs to its western or southern corner
    Corner from, to;
};

enum class RoadClass { local, collector, arterial };
[[nodiscard]] const char* text_of(RoadClass value);

struct Road {
    std::string name;
    RoadClass road_class = RoadClass::local;
    double width_m = 9;
    bool is_paved = false;  ///< paved up to the building line; else a verge
    bool is_avenue = false; ///< a row of trees on both sides
    int repave_year = 0;    ///< 0 = none planned
};

[[nodiscard]] bool is_land(const Town& town, Corner corner);
/// In the town, on land, not inside a park.
[[nodiscard]] bool has_corner(const Town& town, Corner corner);
[[nodiscard]] MapPoint place_of(const Town& town, Corner corner);

/// Streets that start at a corner and run east or north: none, one or two.
[[nodiscard]] std::vector<Block> blocks_from(const Town& town, Corner corner);
[[nodiscard]] Road road_of(const Town& town, const Block& block);

/// 1..21: whose district the corner lies in. A block belongs to the district of its first corner, but the
/// blocks of Harbour Road to district 21.
[[nodiscard]] int district_of(Corner corner);
[[nodiscard]] int district_of(const Block& block);
[[nodiscard]] int ward_of(Corner corner);

struct Quarter {           ///< what it looks like around a corner
    double trees_frac = 0; ///< 0 bare .. 1 shady
    double building_m = 7; ///< usual height
    bool is_park = false;  ///< the ground north-east of the corner is a park
};
[[nodiscard]] Quarter quarter_of(Corner corner);

/// Corners of one district in one tile, row by row.
[[nodiscard]] std::vector<Corner> corners_of(const Town& town, int tile_x, int tile_y, int district);

} // namespace unstring::sample
