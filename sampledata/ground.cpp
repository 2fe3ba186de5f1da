#include "sampledata/ground.h"

#include <algorithm>
#include <cmath>

#include "sampledata/dice.h"

namespace unstring::sample {
namespace {

constexpr double kMargin_m = 150;

struct Cell { // u east, v north, both 0..1
    MapPoint south_west, south_east, north_west, north_east;

    [[nodiscard]] MapPoint at(double u, double v) const {
        const auto mix = [&](double sw, double se, double nw, double ne) {
            return (1 - v) * ((1 - u) * sw + u * se) + v * ((1 - u) * nw + u * ne);
        };
        return {mix(south_west.x_m, south_east.x_m, north_west.x_m, north_east.x_m),
                mix(south_west.y_m, south_east.y_m, north_west.y_m, north_east.y_m)};
    }
};

Tree tree_at(MapPoint place, Dice& dice, double small_m, double tall_m) {
    Tree tree;
    tree.place = place;
    tree.height_m = dice.between(small_m, tall_m);
    tree.crown_m = tree.height_m * dice.between(0.29, 0.42);
    return tree;
}

void add_avenue(const Town& town, const Block& block, Ground& ground) {
    const Road road = road_of(town, block);
    if (!road.is_avenue) return;
    const MapPoint from = place_of(town, block.from), to = place_of(town, block.to);
    const double length_m = distance_m(from, to), ux = (to.x_m - from.x_m) / length_m,
                 uy = (to.y_m - from.y_m) / length_m;
    Dice dice(town.seed,
              {20, static_cast<std::uint64_t>(block.from.column), static_cast<std::uint64_t>(block.from.row),
               block.from.row == block.to.row ? 1U : 0U});
    for (const double side : {-1.0, 1.0})
        for (double along_m = 12; along_m < length_m - 12; along_m += dice.between(9, 14)) {
            if (dice.chance(0.22)) continue; // felled, never replanted
            const double right_m = side * (road.width_m / 2 + 2.4);
            const MapPoint place{from.x_m + ux * along_m + uy * right_m,
                                 from.y_m + uy * along_m - ux * right_m};
            ground.trees.push_back(tree_at(place, dice, 7, 13));
        }
}

void add_park(const Cell& cell, Dice& dice, Ground& ground) {
    for (int i = 0; i < 55; ++i) {
        const double u = dice.between(0.04, 0.96), v = dice.between(0.04, 0.96);
        if (std::hypot(u - 0.5, v - 0.5) < 0.2) continue; // the lawn
        ground.trees.push_back(tree_at(cell.at(u, v), dice, 9, 17));
    }
}

void add_gardens(const Cell& cell, double trees_frac, Dice& dice, Ground& ground) {
    const int trees = static_cast<int>(std::lround(trees_frac * 34));
    for (int i = 0; i < trees; ++i)
        ground.trees.push_back(
            tree_at(cell.at(dice.between(0.08, 0.92), dice.between(0.38, 0.62)), dice, 6, 13));
    for (int i = 0; i < trees / 3; ++i) // front gardens
        ground.trees.push_back(
            tree_at(cell.at(dice.between(0.1, 0.9), dice.chance(0.5) ? 0.1 : 0.9), dice, 4, 9));
}

void add_row_of_houses(const Cell& cell, double v_from, double v_to, double usual_m, Dice& dice,
                       Ground& ground) {
    const double width_m = distance_m(cell.south_west, cell.south_east);
    const double frontage_m = usual_m > 9 ? 26 : 19;
    const double edge = 11.5 / width_m;
    const int lots = std::max(1, static_cast<int>((width_m - 23) / frontage_m));
    for (int i = 0; i < lots; ++i) {
        if (dice.chance(0.08)) continue; // an empty lot
        const double lot = (1 - 2 * edge) / lots, gap = dice.between(0.06, 0.16) * lot;
        const double u0 = edge + i * lot + gap, u1 = edge + (i + 1) * lot - gap;
        const double v0 = v_from + dice.between(0, 0.03), v1 = v_to - dice.between(0, 0.06);
        Building building;
        building.height_m = std::round(usual_m * dice.between(0.75, 1.35) * 2) / 2;
        building.ring = {cell.at(u0, v0), cell.at(u1, v0), cell.at(u1, v1), cell.at(u0, v1), cell.at(u0, v0)};
        ground.buildings.push_back(std::move(building));
    }
}

} // namespace

void add_cell(const Town& town, Corner corner, Ground& ground) {
    for (const Block& block : blocks_from(town, corner)) add_avenue(town, block, ground);
    const Corner east{corner.column + 1, corner.row}, north{corner.column, corner.row + 1},
        far{corner.column + 1, corner.row + 1};
    for (const Corner each : {corner, east, north, far})
        if (!is_land(town, each) || each.column >= town.tiles_x * kColumns ||
            each.row >= town.tiles_y * kRows)
            return;
    const Cell cell{place_of(town, corner), place_of(town, east), place_of(town, north), place_of(town, far)};
    const Quarter quarter = quarter_of(corner);
    Dice dice(town.seed,
              {21, static_cast<std::uint64_t>(corner.column), static_cast<std::uint64_t>(corner.row)});
    if (quarter.is_park) return add_park(cell, dice, ground);
    const double height_m = distance_m(cell.south_west, cell.north_west), edge = 12.5 / height_m;
    add_row_of_houses(cell, edge, 0.4, quarter.building_m, dice, ground);
    add_row_of_houses(cell, 0.62, 1 - edge, quarter.building_m, dice, ground);
    add_gardens(cell, quarter.trees_frac, dice, ground);
}

Box extent_of(const Town& town) {
    Box box{1e12, 1e12, -1e12, -1e12};
    for (int row = 0; row < town.tiles_y * kRows; ++row)
        for (int column = 0; column < town.tiles_x * kColumns; ++column) {
            const MapPoint place = place_of(town, {column, row});
            box.west_m = std::min(box.west_m, place.x_m), box.east_m = std::max(box.east_m, place.x_m);
            box.south_m = std::min(box.south_m, place.y_m), box.north_m = std::max(box.north_m, place.y_m);
        }
    return {std::floor(box.west_m - kMargin_m), std::floor(box.south_m - kMargin_m),
            std::ceil(box.east_m + kMargin_m), std::ceil(box.north_m + kMargin_m)};
}

void crown_row(const std::vector<const Tree*>& trees, double west_m, double centre_m, double cell_m,
               std::vector<unsigned char>& row) {
    std::fill(row.begin(), row.end(), static_cast<unsigned char>(0));
    for (const Tree* tree : trees) {
        const double up_m = centre_m - tree->place.y_m, half_m2 = tree->crown_m * tree->crown_m - up_m * up_m;
        if (half_m2 <= 0) continue;
        const double half_m = std::sqrt(half_m2);
        const auto first = std::max(0L, std::lround((tree->place.x_m - half_m - west_m) / cell_m));
        const auto last = std::min(static_cast<long>(row.size()),
                                   std::lround((tree->place.x_m + half_m - west_m) / cell_m));
        for (long i = first; i < last; ++i) {
            const double side_m = west_m + (static_cast<double>(i) + 0.5) * cell_m - tree->place.x_m;
            const double rim = (up_m * up_m + side_m * side_m) / (tree->crown_m * tree->crown_m);
            const double height_m =
                tree->height_m * (0.6 + 0.4 * std::sqrt(std::max(0.0, 1 - rim))); // a dome
            unsigned char& cell = row[static_cast<std::size_t>(i)];
            cell = std::max(cell, static_cast<unsigned char>(std::lround(height_m)));
        }
    }
}

} // namespace unstring::sample
