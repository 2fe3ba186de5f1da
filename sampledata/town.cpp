#include "sampledata/town.h"

#include <algorithm>
#include <array>
#include <cmath>

#include "sampledata/dice.h"

namespace unstring::sample {
namespace {

constexpr std::array<double, kColumns> kColumnStep_m = {118, 132, 124, 140, 126, 112, 128, 136, 142,
                                                        120, 130, 126, 134, 118, 124, 138, 122, 128};
constexpr std::array<double, kRows> kRowStep_m = {86, 92, 84, 96, 98, 88, 94, 90, 82, 92, 86, 94};
constexpr std::array<int, 5> kDistrictColumn = {0, 3, 7, 12, 15}; // first column of each
constexpr std::array<int, 4> kDistrictRow = {0, 3, 7, 10};
constexpr int kDistrictAt[4][5] = {
    {12, 13, 14, 15, 16}, {8, 9, 10, 11, 17}, {5, 6, 7, 4, 18}, {1, 2, 19, 3, 20}};
constexpr int kRoadRow = 4, kAvenueColumn = 8; // the two arterials
constexpr double kTurn_deg = 4;                // the grid is turned a little from grid north
constexpr MapPoint kOrigin{406540, 3762130};   // of EPSG:32609: the first tile lies around 34 N 130 W

constexpr std::array<const char*, kColumns> kColumnName = {
    "Gannet Lane", "Plover Lane",    "Heron Lane",      "Curlew Lane", "Sandpiper Lane", "Dunlin Lane",
    "Tern Lane",   "Whimbrel Lane",  "Meridian Avenue", "Petrel Lane", "Turnstone Lane", "Avocet Lane",
    "Osprey Lane", "Kittiwake Lane", "Puffin Lane",     "Godwit Lane", "Fulmar Lane",    "Shearwater Lane"};
constexpr std::array<const char*, kRows> kRowName = {"Ropewalk",         "Cooper Street",  "Tallow Street",
                                                     "Sailmaker Street", "Harbour Road",   "Saltmarket",
                                                     "Glazier Street",   "Kiln Street",    "Chandler Street",
                                                     "Fuller Street",    "Orchard Street", "Thatcher Street"};

constexpr int tile_place(int global, int size) { return global % size; }

template <std::size_t n>
double along_m(const std::array<double, n>& steps, int global) {
    double tile_m = 0, in_tile_m = 0;
    for (std::size_t i = 0; i < n; ++i) {
        if (static_cast<int>(i) < global % static_cast<int>(n)) in_tile_m += steps[i];
        tile_m += steps[i];
    }
    return tile_m * (global / static_cast<int>(n)) + in_tile_m;
}

template <std::size_t n>
int band_of(const std::array<int, n>& firsts, int place) {
    return static_cast<int>(std::upper_bound(firsts.begin(), firsts.end(), place) - firsts.begin()) - 1;
}

// Mercer Green, two blocks by two, and Chapel Green, one block.
bool is_in_park(Corner block) {
    const int column = tile_place(block.column, kColumns), row = tile_place(block.row, kRows);
    return ((column == 10 || column == 11) && (row == 5 || row == 6)) || (column == 4 && row == 8);
}

bool is_park_middle(Corner corner) {
    return tile_place(corner.column, kColumns) == 11 && tile_place(corner.row, kRows) == 6;
}

bool runs_east(const Block& block) { return block.from.row == block.to.row; }

RoadClass class_of_row(int row) {
    if (row == kRoadRow) return RoadClass::arterial;
    return row == 1 || row == 7 || row == 10 ? RoadClass::collector : RoadClass::local;
}

RoadClass class_of_column(int column) {
    if (column == kAvenueColumn) return RoadClass::arterial;
    return column == 3 || column == 13 ? RoadClass::collector : RoadClass::local;
}

std::string numbered(const char* name, int tile) {
    return tile == 0 ? name : std::string(name) + " " + std::to_string(tile + 1);
}

} // namespace

const char* text_of(RoadClass value) {
    switch (value) {
    case RoadClass::local:
        return "local";
    case RoadClass::collector:
        return "collector";
    case RoadClass::arterial:
        return "arterial";
    }
    return "";
}

Town town_for(long poles, std::uint64_t seed) {
    constexpr double kPolesPerTile = 1400; // a little under what a tile holds
    const double tiles = std::max(1.0, std::ceil(static_cast<double>(poles) / kPolesPerTile));
    Town town;
    town.seed = seed;
    // A tile is twice as wide as it is high.
    town.tiles_x = std::max(1, static_cast<int>(std::floor(std::sqrt(tiles / 2))));
    town.tiles_y = static_cast<int>(std::ceil(tiles / town.tiles_x));
    return town;
}

bool is_land(const Town& town, Corner corner) {
    const int from_east = town.tiles_x * kColumns - 1 - corner.column;
    return from_east + 1.4 * corner.row > 2.5; // the harbour cuts the south-east corner off
}

bool has_corner(const Town& town, Corner corner) {
    return corner.column >= 0 && corner.row >= 0 && corner.column < town.tiles_x * kColumns &&
           corner.row < town.tiles_y * kRows && is_land(town, corner) && !is_park_middle(corner);
}

MapPoint place_of(const Town& town, Corner corner) {
    Dice dice(town.seed,
              {1, static_cast<std::uint64_t>(corner.column), static_cast<std::uint64_t>(corner.row)});
    const double x = along_m(kColumnStep_m, corner.column) + dice.between(-6, 6);
    const double y = along_m(kRowStep_m, corner.row) + dice.between(-5, 5);
    const double cosine = std::cos(kTurn_deg * kRadPerDeg), sine = std::sin(kTurn_deg * kRadPerDeg);
    return {kOrigin.x_m + x * cosine - y * sine, kOrigin.y_m + x * sine + y * cosine};
}

std::vector<Block> blocks_from(const Town& town, Corner corner) {
    std::vector<Block> blocks;
    if (!has_corner(town, corner)) return blocks;
    for (const Corner to : {Corner{corner.column + 1, corner.row}, Corner{corner.column, corner.row + 1}})
        if (has_corner(town, to)) blocks.push_back({corner, to});
    return blocks;
}

Road road_of(const Town& town, const Block& block) {
    const bool east = runs_east(block);
    const int place = east ? tile_place(block.from.row, kRows) : tile_place(block.from.column, kColumns);
    const int tile = east ? block.from.row / kRows : block.from.column / kColumns;
    Road road;
    road.name = numbered(east ? kRowName[static_cast<std::size_t>(place)]
                              : kColumnName[static_cast<std::size_t>(place)],
                         tile);
    road.road_class = east ? class_of_row(place) : class_of_column(place);
    road.width_m = road.road_class == RoadClass::arterial    ? 18
                   : road.road_class == RoadClass::collector ? 12
                                                             : 9;
    const Quarter quarter = quarter_of(block.from);
    Dice dice(town.seed,
              {2, east ? 1U : 0U, static_cast<std::uint64_t>(east ? block.from.row : block.from.column)});
    // Whole streets are repaved together.
    if (dice.chance(0.45)) road.repave_year = 2027 + dice.below(10);
    road.is_paved = road.road_class != RoadClass::local || quarter.building_m > 9;
    road.is_avenue = quarter.trees_frac > 0.25 && road.road_class != RoadClass::arterial &&
                     dice.chance(0.3 + 0.5 * quarter.trees_frac);
    return road;
}

int district_of(Corner corner) {
    const int column = band_of(kDistrictColumn, tile_place(corner.column, kColumns));
    const int row = band_of(kDistrictRow, tile_place(corner.row, kRows));
    return kDistrictAt[row][column];
}

int district_of(const Block& block) {
    if (runs_east(block) && tile_place(block.from.row, kRows) == kRoadRow) return kHarbourRoad;
    return district_of(block.from);
}

int ward_of(Corner corner) {
    const int column = tile_place(corner.column, kColumns), row = tile_place(corner.row, kRows);
    if (row < 4) return column < 9 ? 5 : 4;
    if (column >= 12) return 3;
    return column < 7 ? 1 : 2;
}

Quarter quarter_of(Corner corner) {
    Quarter quarter;
    quarter.is_park = is_in_park(corner);
    switch (district_of(corner)) {
    case 1:
    case 2:
    case 5:
        quarter.trees_frac = 0.75;
        break;
    case 6:
    case 8:
        quarter.trees_frac = 0.6;
        break;
    case 4:
    case 9:
    case 3:
        quarter.trees_frac = 0.4;
        break;
    case 7:
    case 10:
        quarter = {0.3, 14, quarter.is_park};
        break; // the middle of the town
    case 14:
        quarter = {0.12, 11, quarter.is_park};
        break;
    case 20:
    case 12:
    case 13:
        quarter.trees_frac = 0.15;
        break;
    case 15:
    case 16:
        quarter = {0.02, 10, quarter.is_park};
        break; // quays
    default:
        quarter.trees_frac = 0.2;
        break;
    }
    return quarter;
}

std::vector<Corner> corners_of(const Town& town, int tile_x, int tile_y, int district) {
    std::vector<Corner> corners;
    for (int row = tile_y * kRows; row < (tile_y + 1) * kRows; ++row)
        for (int column = tile_x * kColumns; column < (tile_x + 1) * kColumns; ++column)
            if (const Corner corner{column, row}; has_corner(town, corner) && district_of(corner) == district)
                corners.push_back(corner);
    return corners;
}

} // namespace unstring::sample
