#pragma once
// Where wire can run: poles, both sides of each street, services, and what an edge between them costs.
//
//      root --connection-- service --lead-- kerb ---verge--- kerb ---verge--- kerb
//                                            |                |  crossing (bore)
//      pole ==old conduit== pole            kerb ---paved--- kerb --lead-- pole

#include <vector>

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"

namespace unstring {

struct GroundEdge {
    int u = 0, v = 0;
    SpanKind kind = SpanKind::trench_verge;
    double length_m = 0;
    int boxes = 0;
    Surface surface = Surface::verge;
    StringIx duct_string;
    PoleIx duct_from, duct_to;
    ServiceIx service; ///< root edge: the service that is connected
    Cents cost = 0;    ///< present value when built in decide_year, AWG 8
};

struct GroundGraph {
    static constexpr int kRoot = 0;
    std::vector<MapPoint> places; ///< one per vertex; the root's means nothing
    std::vector<PoleIx> pole_at;  ///< one per vertex
    std::vector<int> vertex_of;   ///< one per pole of the city, -1 = none
    std::vector<GroundEdge> edges;

    int add_vertex(MapPoint place, PoleIx pole = {});
    void add_edge(GroundEdge edge) { edges.push_back(edge); }
    [[nodiscard]] int size() const { return static_cast<int>(places.size()); }
};

/// The graph of the whole city, its edges priced. Poles further than 60 m from every street are joined to
/// their neighbours straight. Old conduit between neighbours in wiring order at its expected price; where the
/// later pole's span has a spare duct, no string has to be dead first. Roots: services, circuit ends,
/// candidates, and taps of a secondary.
[[nodiscard]] GroundGraph ground_graph(const MoneyInput& input);

/// Span of one edge, going from `from` to the other end, without its place in a tree.
[[nodiscard]] CircuitSpan span_of(const GroundGraph& graph, const GroundEdge& edge, int from);

} // namespace unstring
