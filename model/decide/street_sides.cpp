#include "model/decide/street_sides.h"

#include <algorithm>
#include <limits>
#include <map>

#include "model/decide/near_points.h"

namespace unstring {
namespace {

using Place = std::size_t;
constexpr double kSnapM = 0.5; ///< street ends closer than this are one place
constexpr double kWidthM = 9;  ///< carriageway where the file is silent, an assumption
constexpr double kCellM = 60;

struct Piece { ///< of a street, between two nodes
    int a = 0, b = 0;
    int street = 0;
};

struct Arm { ///< of a piece, at one of its nodes
    double angle = 0;
    int piece = 0;
};

struct Foot { ///< where a lead meets its piece
    double along_m = 0;
    int vertex = 0;
    bool is_left = false;
};

MapPoint operator+(MapPoint a, MapPoint b) { return {a.x_m + b.x_m, a.y_m + b.y_m}; }
MapPoint operator-(MapPoint a, MapPoint b) { return {a.x_m - b.x_m, a.y_m - b.y_m}; }
MapPoint operator*(MapPoint a, double k) { return {a.x_m * k, a.y_m * k}; }
double dot(MapPoint a, MapPoint b) { return a.x_m * b.x_m + a.y_m * b.y_m; }
double cross(MapPoint a, MapPoint b) { return a.x_m * b.y_m - a.y_m * b.x_m; }

class StreetSides {
public:
    StreetSides(const City& city, GroundGraph& graph)
        : city_(city), graph_(graph), near_nodes_(2), near_pieces_(kCellM) {}

    void build() {
        collect_segments();
        cut_at_crossings();
        for (Place p = 0; p < pieces_.size(); ++p)
            near_pieces_.add_segment(nodes_[Place(pieces_[p].a)], nodes_[Place(pieces_[p].b)],
                                     static_cast<int>(p));
        feet_.resize(pieces_.size());
        make_corners();
    }
    /// Remembers the lead of a vertex to the nearest piece; the street that its pole names goes before all
    /// others.
    bool lead(int vertex, double reach_m) {
        const MapPoint place = graph_.places[Place(vertex)];
        const PoleIx pole = graph_.pole_at[Place(vertex)];
        const std::string* name = pole.is_valid() ? &city_.poles[pole.place()].street : nullptr;
        int best = -1;
        double best_m = std::numeric_limits<double>::max();
        near_pieces_.visit_near(place, reach_m, [&](int p, MapPoint) {
            double away = distance_m(place, foot_point(p, place));
            if (away > reach_m) return;
            if (name != nullptr && !name->empty() &&
                city_.streets[Place(pieces_[Place(p)].street)].name != *name)
                away += reach_m;
            if (away < best_m || (away == best_m && p < best)) best = p, best_m = away;
        });
        if (best < 0) return false;
        const MapPoint a = nodes_[Place(pieces_[Place(best)].a)], b = nodes_[Place(pieces_[Place(best)].b)];
        feet_[Place(best)].push_back(
            {distance_m(a, foot_point(best, place)), vertex, cross(b - a, place - a) >= 0});
        return true;
    }
    void lay_sides() {
        for (Place p = 0; p < pieces_.size(); ++p) lay_piece(static_cast<int>(p));
    }

private:
    [[nodiscard]] double width(int piece) const {
        return city_.streets[Place(pieces_[Place(piece)].street)].width_m.value_or(kWidthM);
    }
    [[nodiscard]] MapPoint foot_point(int p, MapPoint place) const {
        const MapPoint a = nodes_[Place(pieces_[Place(p)].a)], along = nodes_[Place(pieces_[Place(p)].b)] - a;
        return a + along * std::clamp(dot(place - a, along) / dot(along, along), 0.0, 1.0);
    }

    int node_at(MapPoint place) {
        int found = -1;
        near_nodes_.visit_near(place, kSnapM, [&](int n, MapPoint at) {
            if (distance_m(at, place) <= kSnapM && (found < 0 || n < found)) found = n;
        });
        if (found >= 0) return found;
        nodes_.push_back(place);
        near_nodes_.add(place, static_cast<int>(nodes_.size()) - 1);
        return static_cast<int>(nodes_.size()) - 1;
    }
    void collect_segments() {
        for (Place s = 0; s < city_.streets.size(); ++s) {
            const std::vector<MapPoint>& line = city_.streets[s].line;
            for (Place i = 1; i < line.size(); ++i) {
                const int a = node_at(line[i - 1]), b = node_at(line[i]);
                if (a != b) pieces_.push_back({a, b, static_cast<int>(s)});
            }
        }
    }
    /// Cuts every segment where another crosses or touches it.
    void cut_at_crossings() {
        NearPoints near(kCellM);
        for (Place p = 0; p < pieces_.size(); ++p)
            near.add_segment(nodes_[Place(pieces_[p].a)], nodes_[Place(pieces_[p].b)], static_cast<int>(p));
        std::vector<std::vector<int>> cuts(pieces_.size());
        const std::vector<MapPoint> ends = nodes_;
        for (Place p = 0; p < pieces_.size(); ++p) {
            const MapPoint a = ends[Place(pieces_[p].a)], b = ends[Place(pieces_[p].b)];
            std::vector<int> others;
            near.visit_near((a + b) * 0.5, distance_m(a, b) / 2 + kSnapM, [&](int q, MapPoint) {
                if (q > static_cast<int>(p)) others.push_back(q);
            });
            std::sort(others.begin(), others.end());
            others.erase(std::unique(others.begin(), others.end()), others.end());
            for (const int q : others) cut_pair(p, Place(q), cuts);
        }
        split(cuts);
    }
    void cut_pair(Place p, Place q, std::vector<std::vector<int>>& cuts) {
        const MapPoint a = nodes_[Place(pieces_[p].a)], b = nodes_[Place(pieces_[p].b)];
        const MapPoint c = nodes_[Place(pieces_[q].a)], d = nodes_[Place(pieces_[q].b)];
        for (const auto& [on, node] :
             {std::pair{p, pieces_[q].a}, {p, pieces_[q].b}, {q, pieces_[p].a}, {q, pieces_[p].b}})
            if (distance_m(foot_point(static_cast<int>(on), nodes_[Place(node)]), nodes_[Place(node)]) <=
                kSnapM)
                cuts[on].push_back(node);
        const double turn = cross(b - a, d - c);
        if (std::abs(turn) < 1e-9) return;
        const double s = cross(c - a, d - c) / turn, t = cross(c - a, b - a) / turn;
        if (s <= 0 || s >= 1 || t <= 0 || t >= 1) return;
        const int node = node_at(a + (b - a) * s);
        cuts[p].push_back(node);
        cuts[q].push_back(node);
    }
    void split(const std::vector<std::vector<int>>& cuts) {
        std::vector<Piece> out;
        for (Place p = 0; p < pieces_.size(); ++p) {
            const MapPoint a = nodes_[Place(pieces_[p].a)];
            std::vector<std::pair<double, int>> stops{
                {0, pieces_[p].a}, {distance_m(a, nodes_[Place(pieces_[p].b)]), pieces_[p].b}};
            for (const int n : cuts[p]) stops.emplace_back(distance_m(a, nodes_[Place(n)]), n);
            std::sort(stops.begin(), stops.end());
            for (Place i = 1; i < stops.size(); ++i)
                if (stops[i - 1].second != stops[i].second)
                    out.push_back({stops[i - 1].second, stops[i].second, pieces_[p].street});
        }
        // Two streets drawn over each other are one.
        std::map<std::pair<int, int>, int> seen;
        pieces_.clear();
        for (const Piece& piece : out)
            if (seen.emplace(std::minmax(piece.a, piece.b), 0).second) pieces_.push_back(piece);
    }

    /// Corners of each node: number j lies between arm j and arm j + 1, counter-clockwise.
    void make_corners() {
        std::vector<std::vector<Arm>> arms(nodes_.size());
        for (Place p = 0; p < pieces_.size(); ++p) {
            const MapPoint along = nodes_[Place(pieces_[p].b)] - nodes_[Place(pieces_[p].a)];
            arms[Place(pieces_[p].a)].push_back({std::atan2(along.y_m, along.x_m), static_cast<int>(p)});
            arms[Place(pieces_[p].b)].push_back({std::atan2(-along.y_m, -along.x_m), static_cast<int>(p)});
        }
        start_.resize(pieces_.size());
        end_.resize(pieces_.size());
        for (Place n = 0; n < nodes_.size(); ++n) {
            std::vector<Arm>& at = arms[n];
            std::sort(at.begin(), at.end(), [](const Arm& x, const Arm& y) {
                return std::pair(x.angle, x.piece) < std::pair(y.angle, y.piece);
            });
            std::vector<int> corners;
            for (Place j = 0; j < at.size(); ++j)
                corners.push_back(
                    graph_.add_vertex(corner_place(static_cast<int>(n), at[j], at[(j + 1) % at.size()])));
            for (Place j = 0; j < at.size(); ++j) {
                const int left = corners[j], right = corners[(j + at.size() - 1) % at.size()];
                const Piece& piece = pieces_[Place(at[j].piece)];
                if (piece.a == static_cast<int>(n))
                    start_[Place(at[j].piece)] = {left, right};
                else
                    end_[Place(at[j].piece)] = {right, left};
                if (at.size() > 2 || (at.size() == 2 && j == 0)) add_crossing(left, right, at[j].piece);
            }
        }
    }
    [[nodiscard]] MapPoint corner_place(int n, const Arm& arm, const Arm& next) const {
        const double half = std::min(width(arm.piece), width(next.piece)) / 2;
        const MapPoint left{-std::sin(arm.angle), std::cos(arm.angle)},
            right{std::sin(next.angle), -std::cos(next.angle)};
        const double open = 1 + dot(left, right);
        if (open < 0.3) return nodes_[Place(n)]; // a dead end, or a very sharp corner
        return nodes_[Place(n)] + (left + right) * (half / open);
    }
    /// Both sides from corner to corner over the feet of the leads, with a crossing at each foot.
    void lay_piece(int p) {
        std::vector<Foot>& feet = feet_[Place(p)];
        std::sort(feet.begin(), feet.end(), [](const Foot& x, const Foot& y) {
            return std::pair(x.along_m, x.vertex) < std::pair(y.along_m, y.vertex);
        });
        const MapPoint a = nodes_[Place(pieces_[Place(p)].a)], b = nodes_[Place(pieces_[Place(p)].b)];
        const MapPoint along = (b - a) * (1 / distance_m(a, b)), out{-along.y_m, along.x_m};
        const double half = width(p) / 2;
        std::pair<int, int> last = start_[Place(p)];
        double last_m = -1;
        for (const Foot& foot : feet) {
            if (last_m < 0 || foot.along_m - last_m > kSnapM) {
                const MapPoint on = a + along * foot.along_m;
                const std::pair<int, int> next{graph_.add_vertex(on + out * half),
                                               graph_.add_vertex(on - out * half)};
                add_side(last, next, p);
                add_crossing(next.first, next.second, p);
                last = next;
                last_m = foot.along_m;
            }
            add_trench(foot.is_left ? last.first : last.second, foot.vertex, p, 1);
        }
        add_side(last, end_[Place(p)], p);
    }
    void add_side(std::pair<int, int> from, std::pair<int, int> to, int p) {
        add_trench(from.first, to.first, p, 0);
        add_trench(from.second, to.second, p, 0);
    }
    void add_trench(int u, int v, int p, int boxes) {
        const Surface surface = city_.streets[Place(pieces_[Place(p)].street)].surface;
        GroundEdge edge;
        edge.u = u;
        edge.v = v;
        edge.surface = surface;
        edge.kind = surface == Surface::paved ? SpanKind::trench_paved : SpanKind::trench_verge;
        edge.length_m = distance_m(graph_.places[Place(u)], graph_.places[Place(v)]);
        edge.boxes = boxes;
        graph_.add_edge(edge);
    }
    void add_crossing(int u, int v, int p) {
        GroundEdge edge;
        edge.u = u;
        edge.v = v;
        edge.surface = Surface::paved;
        edge.kind = SpanKind::bore;
        edge.length_m = std::max(width(p), distance_m(graph_.places[Place(u)], graph_.places[Place(v)]));
        edge.boxes = 1;
        graph_.add_edge(edge);
    }

    const City& city_;
    GroundGraph& graph_;
    std::vector<MapPoint> nodes_;
    NearPoints near_nodes_, near_pieces_;
    std::vector<Piece> pieces_;
    std::vector<std::vector<Foot>> feet_;
    std::vector<std::pair<int, int>> start_, end_; ///< left and right corner of each piece, seen from a to b
};

} // namespace

std::vector<char> add_street_sides(const City& city, const std::vector<int>& vertices, double reach_m,
                                   GroundGraph& graph) {
    StreetSides sides(city, graph);
    sides.build();
    std::vector<char> has_lead;
    for (const int vertex : vertices) has_lead.push_back(sides.lead(vertex, reach_m) ? 1 : 0);
    sides.lay_sides();
    return has_lead;
}

} // namespace unstring
