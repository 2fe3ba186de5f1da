#include "model/decide/plan_tree.h"

#include <algorithm>
#include <map>

#include "model/decide/span_cost.h"
#include "model/money/new_light.h"

namespace unstring {
namespace {

using Place = std::size_t;

Cents capital_of(const std::vector<CashLine>& lines) {
    Cents sum = 0;
    for (const CashLine& line : lines)
        if (line.purse == Purse::capital) sum += line.amount;
    return sum;
}

/// The span at each vertex, -1 where there is none.
std::vector<int> lay_spans(const MoneyInput& input, const GroundGraph& graph, const Rooted& tree,
                           std::vector<ServiceIx>& service_of, DecideResult& result) {
    std::vector<int> span_at(graph.places.size(), -1);
    const int year = input.plan.decide_year();
    for (const int v : tree.order) {
        if (v == GroundGraph::kRoot || tree.lamps[Place(v)] == 0) continue;
        const GroundEdge& edge = graph.edges[Place(tree.edge[Place(v)])];
        const int above = tree.parent[Place(v)];
        if (above == GroundGraph::kRoot && edge.service.is_valid()) {
            service_of[Place(v)] = edge.service;
            continue;
        }
        CircuitSpan span = span_of(graph, edge, above);
        span.id = static_cast<int>(result.spans.size());
        span.parent = span_at[Place(above)];
        service_of[Place(v)] = span.service = service_of[Place(above)];
        span.cost = capital_of(span_lines(input, span, year));
        span_at[Place(v)] = span.id;
        const bool is_dug = span.kind == SpanKind::trench_verge || span.kind == SpanKind::trench_paved ||
                            span.kind == SpanKind::bore;
        if (is_dug) result.trench_m += span.length_m;
        result.spans.push_back(std::move(span));
    }
    return span_at;
}

} // namespace

Rooted rooted(const GroundGraph& graph, const std::vector<PoleCase>& cases, const JointPlan& plan) {
    Rooted out;
    out.parent.assign(graph.places.size(), -1);
    out.edge.assign(graph.places.size(), -1);
    out.lamps.assign(graph.places.size(), 0);
    out.is_rewired.assign(graph.places.size(), 0);
    out.source.assign(graph.places.size(), -1);
    std::vector<std::vector<int>> at(graph.places.size());
    for (const int e : plan.edges) {
        at[Place(graph.edges[Place(e)].u)].push_back(e);
        at[Place(graph.edges[Place(e)].v)].push_back(e);
    }
    out.order.push_back(GroundGraph::kRoot);
    for (Place i = 0; i < out.order.size(); ++i) {
        const int v = out.order[i];
        for (const int e : at[Place(v)]) {
            if (e == out.edge[Place(v)]) continue;
            const int w = graph.edges[Place(e)].u == v ? graph.edges[Place(e)].v : graph.edges[Place(e)].u;
            out.parent[Place(w)] = v;
            out.edge[Place(w)] = e;
            out.source[Place(w)] = v == GroundGraph::kRoot ? w : out.source[Place(v)];
            out.order.push_back(w);
        }
    }
    for (Place i = 0; i < cases.size(); ++i) {
        const int v = graph.vertex_of[cases[i].pole.place()];
        if (plan.choices[i] == Choice::rewire && v >= 0 && out.parent[Place(v)] >= 0)
            out.lamps[Place(v)] = out.is_rewired[Place(v)] = 1;
    }
    for (auto v = out.order.rbegin(); v != out.order.rend(); ++v)
        if (out.parent[Place(*v)] >= 0) out.lamps[Place(out.parent[Place(*v)])] += out.lamps[Place(*v)];
    return out;
}

void lay_out(const MoneyInput& input, const GroundGraph& graph, const std::vector<PoleCase>& cases,
             const JointPlan& plan, DecideResult& result) {
    const Rooted tree = rooted(graph, cases, plan);
    std::vector<ServiceIx> service_of(graph.places.size());
    const std::vector<int> span_at = lay_spans(input, graph, tree, service_of, result);
    std::map<int, std::size_t> circuit_at; // by the first vertex under the root
    for (const int v : tree.order) {
        if (v == GroundGraph::kRoot || tree.lamps[Place(v)] == 0) continue;
        const auto [found, is_new] = circuit_at.emplace(tree.source[Place(v)], result.circuits.size());
        if (is_new) {
            Circuit circuit;
            circuit.service = service_of[Place(v)];
            circuit.connection_cost =
                capital_of(connection_lines(input, circuit.service, input.plan.decide_year()));
            if (circuit.service.is_valid() &&
                input.city.services[circuit.service.place()].kind == ServiceKind::candidate)
                ++result.services_new;
            result.circuits.push_back(circuit);
        }
        if (!tree.is_rewired[Place(v)]) continue;
        const PoleIx pole = graph.pole_at[Place(v)];
        result.circuits[found->second].poles.push_back(pole);
        for (int s = span_at[Place(v)]; s >= 0; s = result.spans[Place(s)].parent)
            result.spans[Place(s)].poles_beyond.push_back(pole);
    }
}

std::vector<Share> marginal_shares(const GroundGraph& graph, const std::vector<PoleCase>& cases,
                                   const JointPlan& plan) {
    const Rooted tree = rooted(graph, cases, plan);
    std::vector<int> from;
    for (const int v : tree.order)
        if (v == GroundGraph::kRoot || tree.lamps[Place(v)] > 0) from.push_back(v);
    const Ways ways = shortest_ways(graph, from);
    std::vector<Share> shares;
    for (const PoleCase& each : cases) {
        const int vertex = graph.vertex_of[each.pole.place()];
        Share share;
        if (vertex < 0 || ways.cost[Place(vertex)] < 0) {
            share = {-1, 0};
        } else if (!tree.is_rewired[Place(vertex)]) {
            share = {ways.cost[Place(vertex)], ways.length_m[Place(vertex)]};
        } else {
            // Everything up to the first place that another rewired pole needs too.
            for (int v = vertex; v != GroundGraph::kRoot && tree.lamps[Place(v)] == 1;
                 v = tree.parent[Place(v)]) {
                share.cost += graph.edges[Place(tree.edge[Place(v)])].cost;
                share.length_m += graph.edges[Place(tree.edge[Place(v)])].length_m;
            }
        }
        shares.push_back(share);
    }
    return shares;
}

} // namespace unstring
