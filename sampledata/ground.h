#pragma once
// What stands between the streets: houses and trees, one grid cell (the block of houses between four corners)
// at a time.

#include <vector>

#include "sampledata/town.h"

namespace unstring::sample {

struct Tree {
    MapPoint place;
    double crown_m = 4; ///< radius
    double height_m = 10;
};

struct Building {
    std::vector<MapPoint> ring; ///< closed
    double height_m = 7;
};

struct Ground {
    std::vector<Tree> trees;
    std::vector<Building> buildings;
};

/// The cell north-east of the corner, and the rows of trees along the streets that start at it.
void add_cell(const Town& town, Corner corner, Ground& ground);

struct Box {
    double west_m = 0, south_m = 0, east_m = 0, north_m = 0;
};
/// All corners of the town and a margin wide enough that no pole looks beyond the canopy raster.
[[nodiscard]] Box extent_of(const Town& town);

/// One row of crown heights above ground [whole m], cells from west to east at `north_m` = the cells' centre.
/// @param trees  those that may reach the row
void crown_row(const std::vector<const Tree*>& trees, double west_m, double centre_m, double cell_m,
               std::vector<unsigned char>& row);

} // namespace unstring::sample
