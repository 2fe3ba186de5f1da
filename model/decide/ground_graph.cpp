#include "model/decide/ground_graph.h"

#include <algorithm>
#include <cctype>
#include <string>
#include <unordered_map>
#include <utility>

#include "model/decide/near_points.h"
#include "model/decide/span_cost.h"
#include "model/decide/street_sides.h"
#include "model/money/works.h"

namespace unstring {
namespace {

using Place = std::size_t;
constexpr double kStreetReachM = 60;
constexpr double kStraightReachM = 150; ///< to a neighbour where no street is near
constexpr double kAerialReachM = 70;    ///< longest aerial span, common practice, no source
constexpr double kConduitReachM = 300;
constexpr int kNeighbours = 4;

bool is_wood(const Pole& pole) {
    std::string kind = pole.pole_kind;
    std::transform(kind.begin(), kind.end(), kind.begin(),
                   [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
    return kind.find("wood") != std::string::npos;
}

double turn(MapPoint a, MapPoint b, MapPoint c) {
    return (b.x_m - a.x_m) * (c.y_m - a.y_m) - (b.y_m - a.y_m) * (c.x_m - a.x_m);
}

/// Streets by cell, to see whether a straight line would cross one.
class StreetLines {
public:
    explicit StreetLines(const City& city) : near_(60) {
        for (const Street& street : city.streets)
            for (Place i = 1; i < street.line.size(); ++i) {
                near_.add_segment(street.line[i - 1], street.line[i], static_cast<int>(lines_.size()));
                lines_.emplace_back(street.line[i - 1], street.line[i]);
            }
    }
    [[nodiscard]] bool is_crossed(MapPoint a, MapPoint b) const {
        bool crossed = false;
        const MapPoint middle{(a.x_m + b.x_m) / 2, (a.y_m + b.y_m) / 2};
        near_.visit_near(middle, distance_m(a, b) / 2, [&](int line, MapPoint) {
            const auto& [c, d] = lines_[Place(line)];
            crossed = crossed || (turn(a, b, c) * turn(a, b, d) < 0 && turn(c, d, a) * turn(c, d, b) < 0);
        });
        return crossed;
    }

private:
    NearPoints near_;
    std::vector<std::pair<MapPoint, MapPoint>> lines_;
};

class Builder {
public:
    explicit Builder(const MoneyInput& input) : input_(input), city_(input.city), near_(kStraightReachM) {
        graph_.add_vertex({}); // the root
        graph_.vertex_of.assign(city_.poles.size(), -1);
        for (const Street& street : city_.streets)
            if (!street.name.empty()) surface_.emplace(street.name, street.surface);
    }
    GroundGraph build() {
        add_poles();
        add_services();
        add_conduits();
        const std::vector<char> has_lead = add_street_sides(city_, fixed_, kStreetReachM, graph_);
        add_straight(has_lead);
        add_aerial();
        price();
        return std::move(graph_);
    }

private:
    [[nodiscard]] const Pole& pole_of(int vertex) const {
        return city_.poles[graph_.pole_at[Place(vertex)].place()];
    }
    [[nodiscard]] double between_m(int u, int v) const {
        return distance_m(graph_.places[Place(u)], graph_.places[Place(v)]);
    }

    /// Poles on series strings, and poles that services stand at.
    int pole_vertex(PoleIx pole) {
        int& vertex = graph_.vertex_of[pole.place()];
        if (vertex < 0) {
            vertex = graph_.add_vertex(city_.poles[pole.place()].place, pole);
            fixed_.push_back(vertex);
            near_.add(graph_.places[Place(vertex)], vertex);
        }
        return vertex;
    }
    void add_poles() {
        for (Place i = 0; i < city_.poles.size(); ++i) {
            const Pole& pole = city_.poles[i];
            if (!is_candidate(city_, pole)) continue;
            const int vertex = pole_vertex(PoleIx(i));
            if (pole.secondary_here == true) add(GroundGraph::kRoot, vertex, SpanKind::tap, 0, 0);
        }
    }
    void add_services() {
        for (Place i = 0; i < city_.services.size(); ++i) {
            const ServicePoint& service = city_.services[i];
            if (service.set_aside) continue;
            const PoleIx pole = service.pole_given.empty() ? PoleIx() : find_pole(city_, service.pole_given);
            const bool at_pole = pole.is_valid() && city_.poles[pole.place()].has_place;
            if (!service.has_place && !at_pole) continue;
            const int vertex =
                graph_.add_vertex(service.has_place ? service.place : city_.poles[pole.place()].place);
            fixed_.push_back(vertex);
            service_vertices_.push_back(vertex);
            add(GroundGraph::kRoot, vertex, SpanKind::service, 0, 0).service = ServiceIx(i);
            if (at_pole) add(vertex, pole_vertex(pole), SpanKind::service, 0, 0);
        }
    }
    GroundEdge& add(int u, int v, SpanKind kind, double length_m, int boxes) {
        GroundEdge edge;
        edge.u = u;
        edge.v = v;
        edge.kind = kind;
        edge.length_m = length_m;
        edge.boxes = boxes;
        graph_.add_edge(edge);
        return graph_.edges.back();
    }
    /// Old conduit between neighbours in wiring order.
    void add_conduits() {
        const std::vector<std::vector<PoleIx>> strings = lamps_by_string(city_);
        for (Place s = 0; s < strings.size(); ++s) {
            if (city_.strings[s].kind != CircuitKind::series || city_.strings[s].set_aside) continue;
            for (Place i = 1; i < strings[s].size(); ++i)
                add_conduit(StringIx(s), strings[s][i - 1], strings[s][i]);
        }
    }
    void add_conduit(StringIx string, PoleIx from, PoleIx to) {
        const Pole& a = city_.poles[from.place()];
        const Pole& b = city_.poles[to.place()];
        if (!a.order || !b.order || !a.has_place || !b.has_place || b.feed == Feed::overhead) return;
        if (duct_sound_frac(input_.prices, b.duct, input_.plan.decide_year()) <= 0) return;
        const double length_m = distance_m(a.place, b.place);
        if (length_m > kConduitReachM) return;
        GroundEdge& edge = add(pole_vertex(from), pole_vertex(to), SpanKind::conduit, length_m, 1);
        const auto street = surface_.find(b.street);
        edge.surface = street == surface_.end() ? Surface::verge : street->second;
        edge.duct_from = from;
        edge.duct_to = to;
        if (b.spare_duct != true) edge.duct_string = string;
    }
    /// The nearest vertices within reach for which `fits` says yes, nearest first.
    template <class Fits>
    std::vector<int> nearest(int vertex, double reach_m, Fits fits) const {
        std::vector<std::pair<double, int>> found;
        near_.visit_near(graph_.places[Place(vertex)], reach_m, [&](int other, MapPoint) {
            const double away = between_m(vertex, other);
            if (other != vertex && away <= reach_m && fits(other)) found.emplace_back(away, other);
        });
        std::sort(found.begin(), found.end());
        std::vector<int> out;
        for (Place i = 0; i < found.size() && i < kNeighbours; ++i) out.push_back(found[i].second);
        return out;
    }
    /// Straight trenches that cross no street: from what no street is near to its neighbours, from services
    /// to the poles at hand.
    void add_straight(const std::vector<char>& has_lead) {
        constexpr double kAtHandM = 40;
        const StreetLines streets(city_);
        std::vector<char> is_service(graph_.places.size(), 0);
        for (const int vertex : service_vertices_) is_service[Place(vertex)] = 1;
        for (Place i = 0; i < fixed_.size(); ++i) {
            const int vertex = fixed_[i];
            if (has_lead[i] && !is_service[Place(vertex)]) continue;
            const auto is_open = [&](int other) {
                return !streets.is_crossed(graph_.places[Place(vertex)], graph_.places[Place(other)]);
            };
            for (const int other : nearest(vertex, has_lead[i] ? kAtHandM : kStraightReachM, is_open))
                add(vertex, other, SpanKind::trench_verge, between_m(vertex, other), 1);
        }
    }
    void add_aerial() {
        const auto is_aerial = [&](int vertex) {
            return graph_.pole_at[Place(vertex)].is_valid() && pole_of(vertex).feed == Feed::overhead &&
                   is_wood(pole_of(vertex));
        };
        for (const int vertex : fixed_) {
            if (!is_aerial(vertex)) continue;
            for (const int other : nearest(vertex, kAerialReachM, is_aerial))
                add(vertex, other, SpanKind::aerial, between_m(vertex, other), 0);
        }
    }
    /// A crossing is bored or dug, whichever is cheaper.
    void price() {
        const int year = input_.plan.decide_year();
        for (GroundEdge& edge : graph_.edges) {
            if (edge.u == GroundGraph::kRoot && edge.kind == SpanKind::service) {
                edge.cost = to_cents(present_value(connection_lines(input_, edge.service, year)));
                continue;
            }
            edge.cost = to_cents(present_value(span_lines(input_, span_of(graph_, edge, edge.u), year)));
            if (edge.kind != SpanKind::bore) continue;
            GroundEdge dug = edge;
            dug.kind = SpanKind::trench_paved;
            dug.cost = to_cents(present_value(span_lines(input_, span_of(graph_, dug, dug.u), year)));
            if (dug.cost < edge.cost) edge = dug;
        }
    }

    const MoneyInput& input_;
    const City& city_;
    GroundGraph graph_;
    std::vector<int> fixed_; ///< poles and services, in the order in which they were added
    std::vector<int> service_vertices_;
    NearPoints near_;
    std::unordered_map<std::string, Surface> surface_; ///< by the street's name
};

} // namespace

int GroundGraph::add_vertex(MapPoint place, PoleIx pole) {
    places.push_back(place);
    pole_at.push_back(pole);
    return size() - 1;
}

GroundGraph ground_graph(const MoneyInput& input) { return Builder(input).build(); }

CircuitSpan span_of(const GroundGraph& graph, const GroundEdge& edge, int from) {
    const int to = edge.u == from ? edge.v : edge.u;
    CircuitSpan span;
    span.kind = edge.kind;
    span.pole = graph.pole_at[Place(to)];
    span.length_m = edge.length_m;
    span.boxes = edge.boxes;
    span.surface = edge.surface;
    span.duct_string = edge.duct_string;
    span.duct_from = edge.duct_from;
    span.duct_to = edge.duct_to;
    if (from != GroundGraph::kRoot) span.line = {graph.places[Place(from)], graph.places[Place(to)]};
    return span;
}

} // namespace unstring
