#include "model/solar/pole_horizon.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <span>
#include <utility>

#include <tbb/parallel_for.h>

#include "model/sun/horizon_polygons.h"
#include "model/sun/horizon_scan.h"

namespace unstring {
namespace {

constexpr double kTile_m = 256;

struct Box {
    double west_m, south_m, east_m, north_m;
};

Box box_of(std::span<const MapPoint> ring) {
    Box box{ring[0].x_m, ring[0].y_m, ring[0].x_m, ring[0].y_m};
    for (const MapPoint& point : ring) {
        box.west_m = std::min(box.west_m, point.x_m);
        box.east_m = std::max(box.east_m, point.x_m);
        box.south_m = std::min(box.south_m, point.y_m);
        box.north_m = std::max(box.north_m, point.y_m);
    }
    return box;
}

double distance_to_m(const Box& box, MapPoint place) {
    const double dx = std::max({box.west_m - place.x_m, 0.0, place.x_m - box.east_m});
    const double dy = std::max({box.south_m - place.y_m, 0.0, place.y_m - box.north_m});
    return std::hypot(dx, dy);
}

enum class Kind { deciduous, evergreen, solid };

struct Block {
    std::span<const MapPoint> ring;
    double height_m;
    Kind kind;
    Box box;
};

std::vector<Block> blocks_of(const City& city) {
    std::vector<Block> blocks;
    for (const CanopyArea& crown : city.canopy)
        if (crown.ring.size() >= 3)
            blocks.push_back({crown.ring, crown.height_m,
                              crown.leaf == Leaf::evergreen ? Kind::evergreen : Kind::deciduous,
                              box_of(crown.ring)});
    for (const Obstacle& obstacle : city.obstacles)
        if (obstacle.ring.size() >= 3)
            blocks.push_back({obstacle.ring, obstacle.height_m, Kind::solid, box_of(obstacle.ring)});
    return blocks;
}

std::span<float> layer_of(PoleHorizon& horizon, Kind kind) {
    switch (kind) {
    case Kind::deciduous:
        return horizon.deciduous_deg;
    case Kind::evergreen:
        return horizon.evergreen_deg;
    case Kind::solid:
        break;
    }
    return horizon.solid_deg;
}

void add_blocks(std::span<const Block> blocks, MapPoint place, PoleHorizon& horizon) {
    static const double kLowest = std::tan(kLowestOutline_deg * kRadPerDeg);
    for (const Block& block : blocks) {
        const double above_m = block.height_m - horizon.panel_height_m;
        if (above_m <= 0 || distance_to_m(block.box, place) * kLowest > above_m) continue;
        raise_by_block(block.ring, above_m, place, layer_of(horizon, block.kind));
    }
}

using Tiles = std::map<std::pair<long, long>, std::vector<std::size_t>>;

Tiles tiles_of(const City& city, const std::vector<PoleIx>& poles) {
    Tiles tiles;
    for (std::size_t i = 0; i < poles.size(); ++i) {
        const MapPoint place = city.poles[poles[i].place()].place;
        tiles[{std::lround(std::floor(place.x_m / kTile_m)), std::lround(std::floor(place.y_m / kTile_m))}]
            .push_back(i);
    }
    return tiles;
}

Expected<void> scan_raster(const City& city, const std::vector<PoleIx>& poles, HeightSource& heights,
                           const Progress& progress, std::vector<PoleHorizon>& horizons) {
    const Tiles tiles = tiles_of(city, poles);
    double done = 0;
    for (const auto& [tile, members] : tiles) {
        if (progress.is_cancelled())
            return tl::unexpected(Fault{FaultCode::cancelled, {}, 0, {}, {}, {}, {}});
        const MapPoint centre{(static_cast<double>(tile.first) + 0.5) * kTile_m,
                              (static_cast<double>(tile.second) + 0.5) * kTile_m};
        const auto window = heights.window(centre, 0.5 * kTile_m + kReach_m + 2.0 * heights.cell_m());
        if (!window) return tl::unexpected(window.error());
        const WindowBounds bounds = bounds_of(*window);
        tbb::parallel_for(std::size_t{0}, members.size(), [&, &members = members](std::size_t k) {
            PoleHorizon& horizon = horizons[members[k]];
            ScannedHorizon scanned =
                scan_horizon(*window, bounds, city.poles[poles[members[k]].place()].place,
                             horizon.panel_height_m, kReach_m, kDirections);
            horizon.deciduous_deg = std::move(scanned.height_deg);
            horizon.unknown_deg = std::move(scanned.unknown_deg);
        });
        done += static_cast<double>(members.size());
        progress.at(done / static_cast<double>(poles.size()));
    }
    return {};
}

} // namespace

Expected<std::vector<PoleHorizon>> pole_horizons(const City& city, const std::vector<PoleIx>& poles,
                                                 HeightSource* heights, const Progress& progress) {
    const std::vector<Block> blocks = blocks_of(city);
    std::vector<PoleHorizon> horizons(poles.size());
    for (std::size_t i = 0; i < poles.size(); ++i) {
        PoleHorizon& horizon = horizons[i];
        horizon.panel_height_m = city.poles[poles[i].place()].mount_m.value_or(kMount_m);
        for (const Kind kind : {Kind::deciduous, Kind::evergreen, Kind::solid}) {
            auto& layer = kind == Kind::deciduous   ? horizon.deciduous_deg
                          : kind == Kind::evergreen ? horizon.evergreen_deg
                                                    : horizon.solid_deg;
            layer.assign(kDirections, 0.0F);
        }
        if (heights == nullptr && blocks.empty())
            for (int k = 0; k < kDirections; ++k)
                horizon.unknown_deg.push_back(static_cast<float>(360.0 * k / kDirections));
    }
    if (heights != nullptr)
        if (auto scanned = scan_raster(city, poles, *heights, progress, horizons); !scanned)
            return tl::unexpected(scanned.error());
    tbb::parallel_for(std::size_t{0}, poles.size(), [&](std::size_t i) {
        add_blocks(blocks, city.poles[poles[i].place()].place, horizons[i]);
    });
    return horizons;
}

} // namespace unstring
