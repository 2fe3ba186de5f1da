#pragma once
// How a district's circuit runs: a closed walk from the station through every street of the district, and the
// lamps along it. Lamps stand at the right of the way of the walk, so a street walked out and back is lit on
// both sides.
//
//     open loop with spurs                 out and back
//     o--o--o--o--o                        o   o   o
//     |  o  o  o  |   (spurs inward)       |   |   |
//     [T]-o--o--o-o                        [T]=o===o===o   (the trunk, then side streets)

#include <vector>

#include "sampledata/town.h"

namespace unstring::sample {

enum class Way { once, out, back }; ///< a block walked once, or the two passes of a block walked twice

struct Pass {
    Block block;
    Corner from, to; ///< as walked
    Way way = Way::once;
    int other = -1; ///< place of the other pass of the same block
};

struct Route {
    std::vector<Corner> ring; ///< corners of the open loop in walking order; empty for out and back
    Corner station;
    std::vector<Pass> passes;
};

enum class Shape { out_and_back, ring };

/// The walk of one district; blocks that cannot be reached inside the district are left out.
[[nodiscard]] Route route_of(const Town& town, int tile_x, int tile_y, int district, Shape shape);
/// Both sides of Harbour Road, west to east and back.
[[nodiscard]] Route harbour_road(const Town& town, int tile_x, int tile_y);

struct Lamp {
    MapPoint place;
    Block block;
    int pass = 0;
    double arm_deg = 0;    ///< bearing from pole to street
    const char* side = ""; ///< of the street: N, E, S, W
    bool is_at_corner = false;
};

/// In walking order: every 33 m on alternate sides of a local street, opposite pairs on the others.
[[nodiscard]] std::vector<Lamp> lamps_along(const Town& town, const Route& route);

struct Pair { ///< a place where the loop can be spliced across: two lamps, by place in `lamps`
    int a = 0, b = 0;
    double cable_m = 0;
    bool is_across_block = false; ///< through new ground, from one side of the ring to the other
};

/// Both lamps at the mouth of each street that was walked out and back, and across a ring where a street
/// joins its two sides. Nested or apart, never crossing; only where lamps lie between.
[[nodiscard]] std::vector<Pair> pairs_of(const Town& town, const Route& route,
                                         const std::vector<Lamp>& lamps);

} // namespace unstring::sample
