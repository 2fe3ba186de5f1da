#include "sampledata/route.h"

#include <algorithm>
#include <deque>
#include <map>
#include <set>
#include <tuple>

namespace unstring::sample {
namespace {

using CornerKey = std::pair<int, int>;
using BlockKey = std::tuple<int, int, int, int>;

CornerKey key_of(Corner corner) { return {corner.row, corner.column}; }
BlockKey key_of(const Block& block) {
    return {block.from.row, block.from.column, block.to.row, block.to.column};
}

Block between(Corner a, Corner b) {
    const bool forward = a.row < b.row || (a.row == b.row && a.column < b.column);
    return forward ? Block{a, b} : Block{b, a};
}

// The streets of one district as a tree that hangs from its roots, and the blocks left over as spurs.
class Walker {
public:
    Walker(const Town& town, const std::vector<Corner>& corners, int district)
        : town_(town), district_(district) {
        for (const Corner corner : corners) inside_.insert(key_of(corner));
    }

    bool owns(Corner a, Corner b) const {
        const Block block = between(a, b);
        return inside_.count(key_of(block.from)) != 0 && has_corner(town_, a) && has_corner(town_, b) &&
               district_of(block) == district_;
    }

    void take(Corner root) {
        reached_.insert(key_of(root));
        queue_.push_back(root);
    }
    void reserve(Corner a, Corner b) { used_.insert(key_of(between(a, b))); }

    // North and south first, so that side streets hang from the trunk.
    void grow() {
        grow_along({{0, 1}, {0, -1}});
        grow_along({{1, 0}, {-1, 0}, {0, 1}, {0, -1}});
    }

    void hang(Corner parent, Corner child) {
        children_[key_of(parent)].push_back(child);
        reserve(parent, child);
        take(child);
    }

    void excursions(Corner at, Route& route) {
        for (const Block& block : blocks_from(town_, at))
            if (owns(block.from, block.to) && used_.insert(key_of(block)).second)
                out_and_back(at, block.to, route, false);
        const auto found = children_.find(key_of(at));
        if (found == children_.end()) return;
        for (const Corner child : found->second) out_and_back(at, child, route, true);
    }

private:
    void grow_along(const std::vector<Corner>& steps) {
        std::deque<Corner> open = queue_;
        while (!open.empty()) {
            const Corner at = open.front();
            open.pop_front();
            for (const Corner step : steps) {
                const Corner next{at.column + step.column, at.row + step.row};
                if (inside_.count(key_of(next)) == 0 || reached_.count(key_of(next)) != 0 || !owns(at, next))
                    continue;
                hang(at, next);
                open.push_back(next);
            }
        }
    }

    void out_and_back(Corner at, Corner to, Route& route, bool goes_on) {
        const int out = static_cast<int>(route.passes.size());
        route.passes.push_back({between(at, to), at, to, Way::out, -1});
        if (goes_on) excursions(to, route);
        const int back = static_cast<int>(route.passes.size());
        route.passes.push_back({between(at, to), to, at, Way::back, out});
        route.passes[static_cast<std::size_t>(out)].other = back;
    }

    const Town& town_;
    int district_;
    std::set<CornerKey> inside_, reached_;
    std::set<BlockKey> used_;
    std::map<CornerKey, std::vector<Corner>> children_;
    std::deque<Corner> queue_;
};

// Clockwise round the rectangle of the district, from its south-west corner.
std::vector<Corner> rim_of(const std::vector<Corner>& corners) {
    int west = corners.front().column, east = west, south = corners.front().row, north = south;
    for (const Corner corner : corners) {
        west = std::min(west, corner.column), east = std::max(east, corner.column);
        south = std::min(south, corner.row), north = std::max(north, corner.row);
    }
    std::vector<Corner> rim;
    for (int row = south; row < north; ++row) rim.push_back({west, row});
    for (int column = west; column < east; ++column) rim.push_back({column, north});
    for (int row = north; row > south; --row) rim.push_back({east, row});
    for (int column = east; column > west; --column) rim.push_back({column, south});
    return rim;
}

bool is_closed(const Walker& walker, const std::vector<Corner>& rim) {
    for (std::size_t i = 0; i < rim.size(); ++i)
        if (!walker.owns(rim[i], rim[(i + 1) % rim.size()])) return false;
    return rim.size() > 3;
}

Route ring_route(Walker& walker, const std::vector<Corner>& rim) {
    Route route;
    route.ring = rim;
    route.station = rim.front();
    for (std::size_t i = 0; i < rim.size(); ++i) {
        walker.take(rim[i]);
        walker.reserve(rim[i], rim[(i + 1) % rim.size()]);
    }
    walker.grow();
    for (std::size_t i = 0; i < rim.size(); ++i) {
        const Corner next = rim[(i + 1) % rim.size()];
        walker.excursions(rim[i], route);
        route.passes.push_back({between(rim[i], next), rim[i], next, Way::once, -1});
    }
    return route;
}

// The collector street of the district where it has one, else the row in its middle.
int trunk_row(const Town& town, const std::vector<Corner>& corners) {
    for (const Corner corner : corners)
        if (road_of(town, {corner, {corner.column + 1, corner.row}}).road_class == RoadClass::collector)
            return corner.row;
    const int south = corners.front().row, north = corners.back().row;
    return south + (north - south + 1) / 2;
}

Route tree_route(const Town& town, Walker& walker, const std::vector<Corner>& corners) {
    const int trunk = trunk_row(town, corners);
    std::vector<Corner> line;
    for (const Corner corner : corners)
        if (corner.row == trunk) line.push_back(corner);
    Route route;
    route.station = line.front();
    walker.take(line.front());
    for (std::size_t i = 1; i < line.size() && walker.owns(line[i - 1], line[i]); ++i)
        walker.hang(line[i - 1], line[i]);
    walker.grow();
    walker.excursions(route.station, route);
    return route;
}

} // namespace

Route route_of(const Town& town, int tile_x, int tile_y, int district, Shape shape) {
    const std::vector<Corner> corners = corners_of(town, tile_x, tile_y, district);
    if (corners.empty()) return {};
    Walker walker(town, corners, district);
    if (shape == Shape::ring)
        if (const std::vector<Corner> rim = rim_of(corners); is_closed(walker, rim))
            return ring_route(walker, rim);
    return tree_route(town, walker, corners);
}

Route harbour_road(const Town& town, int tile_x, int tile_y) {
    Route route;
    const int first = tile_x * kColumns, last = first + kColumns - 1;
    for (int row = tile_y * kRows; row < (tile_y + 1) * kRows; ++row) {
        const Block probe{{first, row}, {first + 1, row}};
        if (district_of(probe) != kHarbourRoad) continue;
        route.station = probe.from;
        for (int column = first; column <= last; ++column)
            if (const Corner from{column, row}, to{column + 1, row};
                has_corner(town, from) && has_corner(town, to))
                route.passes.push_back({{from, to}, from, to, Way::out, -1});
    }
    const int count = static_cast<int>(route.passes.size());
    for (int i = count - 1; i >= 0; --i) {
        const Pass out = route.passes[static_cast<std::size_t>(i)];
        route.passes[static_cast<std::size_t>(i)].other = static_cast<int>(route.passes.size());
        route.passes.push_back({out.block, out.to, out.from, Way::back, i});
    }
    return route;
}

} // namespace unstring::sample
