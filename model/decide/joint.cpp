#include "model/decide/joint.h"

#include <algorithm>
#include <queue>

namespace unstring {
namespace {

using Place = std::size_t;

/// Choice and prize of a case as the Steiner problem sees it.
Cents prize_of(const PoleCase& each) {
    return std::max<Cents>(0, each.cents(Choice::solar) - each.cents(Choice::rewire));
}

Choice outside_choice(const PoleCase& each) {
    switch (each.mode) {
    case Mode::open:
    case Mode::solar:
        return Choice::solar;
    case Mode::rewire:
        return Choice::rewire;
    case Mode::keep:
        return Choice::keep;
    case Mode::stuck:
        return Choice::undecided;
    }
    return Choice::undecided;
}

void add_up(const std::vector<PoleCase>& cases, const GroundGraph& graph, JointPlan& plan) {
    plan.cost = 0;
    for (Place i = 0; i < cases.size(); ++i) plan.cost += cases[i].cents(plan.choices[i]);
    for (const int e : plan.edges) plan.cost += graph.edges[Place(e)].cost;
}

} // namespace

JointPlan solve_joint(const GroundGraph& graph, const std::vector<PoleCase>& cases,
                      const SteinerLimits& limits, const Progress& progress) {
    SteinerProblem problem;
    problem.root = GroundGraph::kRoot;
    problem.prize.assign(graph.places.size(), 0);
    problem.must.assign(graph.places.size(), 0);
    for (const GroundEdge& edge : graph.edges) problem.edges.push_back({edge.u, edge.v, edge.cost});
    Cents rewired = 0; // own costs as if every open pole were rewired; a prize left outside makes it solar
    for (const PoleCase& each : cases) {
        const int vertex = graph.vertex_of[each.pole.place()];
        if (each.mode == Mode::open && prize_of(each) > 0) {
            problem.prize[Place(vertex)] = prize_of(each);
            rewired += each.cents(Choice::rewire);
        } else {
            if (each.mode == Mode::rewire && vertex >= 0) problem.must[Place(vertex)] = 1;
            rewired += each.cents(outside_choice(each));
        }
    }
    const SteinerAnswer answer = solve_steiner(problem, limits, progress);

    JointPlan plan;
    plan.edges = answer.edges;
    plan.feasible = answer.feasible;
    plan.bound = answer.bound + rewired;
    std::vector<char> in(graph.places.size(), 0);
    for (const int v : answer.vertices) in[Place(v)] = 1;
    for (const PoleCase& each : cases) {
        const int vertex = graph.vertex_of[each.pole.place()];
        const bool is_taken = each.mode == Mode::open && prize_of(each) > 0 && in[Place(vertex)];
        plan.choices.push_back(is_taken ? Choice::rewire : outside_choice(each));
    }
    add_up(cases, graph, plan);
    return plan;
}

JointPlan greedy_plan(const GroundGraph& graph, const std::vector<PoleCase>& cases) {
    const Ways ways = shortest_ways(graph, {GroundGraph::kRoot});
    JointPlan plan;
    std::vector<char> is_used(graph.edges.size(), 0);
    for (const PoleCase& each : cases) {
        Choice choice = outside_choice(each);
        int v = graph.vertex_of[each.pole.place()];
        const bool is_reached = v >= 0 && ways.cost[Place(v)] >= 0;
        if (each.mode == Mode::open && is_reached &&
            each.cents(Choice::rewire) + ways.cost[Place(v)] < each.cents(Choice::solar))
            choice = Choice::rewire;
        plan.choices.push_back(choice);
        if (choice != Choice::rewire || !is_reached) continue;
        for (int e = ways.edge[Place(v)]; e >= 0 && !is_used[Place(e)]; e = ways.edge[Place(v)]) {
            is_used[Place(e)] = 1;
            v = graph.edges[Place(e)].u == v ? graph.edges[Place(e)].v : graph.edges[Place(e)].u;
        }
    }
    for (Place e = 0; e < is_used.size(); ++e)
        if (is_used[e]) plan.edges.push_back(static_cast<int>(e));
    add_up(cases, graph, plan);
    return plan;
}

Ways shortest_ways(const GroundGraph& graph, const std::vector<int>& from) {
    std::vector<std::vector<int>> at(graph.places.size());
    for (Place e = 0; e < graph.edges.size(); ++e) {
        at[Place(graph.edges[e].u)].push_back(static_cast<int>(e));
        at[Place(graph.edges[e].v)].push_back(static_cast<int>(e));
    }
    Ways ways{std::vector<Cents>(graph.places.size(), -1), std::vector<double>(graph.places.size(), 0),
              std::vector<int>(graph.places.size(), -1)};
    using Item = std::pair<Cents, int>;
    std::priority_queue<Item, std::vector<Item>, std::greater<>> queue;
    for (const int v : from) {
        ways.cost[Place(v)] = 0;
        queue.emplace(0, v);
    }
    while (!queue.empty()) {
        const auto [cost, v] = queue.top();
        queue.pop();
        if (cost > ways.cost[Place(v)]) continue;
        for (const int e : at[Place(v)]) {
            const GroundEdge& edge = graph.edges[Place(e)];
            const int w = edge.u == v ? edge.v : edge.u;
            const Cents next = cost + edge.cost;
            if (ways.cost[Place(w)] >= 0 && ways.cost[Place(w)] <= next) continue;
            ways.cost[Place(w)] = next;
            ways.length_m[Place(w)] = ways.length_m[Place(v)] + edge.length_m;
            ways.edge[Place(w)] = e;
            queue.emplace(next, w);
        }
    }
    return ways;
}

} // namespace unstring
