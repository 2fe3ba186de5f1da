#include "model/decide/circuit_limits.h"

#include <algorithm>
#include <map>
#include <queue>
#include <set>

#include <fmt/format.h>
#include <tbb/parallel_for.h>

#include "model/decide/circuit_load.h"
#include "model/decide/span_cost.h"

namespace unstring {
namespace {

using Place = std::size_t;
constexpr int kMostChanges = 400;

struct Branch {     ///< one way to relieve a circuit
    int head = -1;  ///< the branch is what hangs at this vertex
    int entry = -1; ///< vertex of the branch by which it joins another source; -1 = it goes to solar
    Cents price = 0;
    double kva = 0;
};

class Limits {
public:
    Limits(const MoneyInput& input, const GroundGraph& graph, const std::vector<PoleCase>& cases,
           JointPlan plan, std::vector<Finding>& findings)
        : input_(input), graph_(graph), cases_(cases), plan_(std::move(plan)), findings_(findings) {
        case_at_.assign(graph.places.size(), -1);
        for (Place i = 0; i < cases.size(); ++i)
            if (const int v = graph.vertex_of[cases[i].pole.place()]; v >= 0)
                case_at_[Place(v)] = static_cast<int>(i);
        at_.resize(graph.places.size());
        for (Place e = 0; e < graph.edges.size(); ++e) {
            at_[Place(graph.edges[e].u)].push_back(static_cast<int>(e));
            at_[Place(graph.edges[e].v)].push_back(static_cast<int>(e));
        }
    }

    JointPlan run(const Progress& progress) {
        look();
        for (int change = 0; change < kMostChanges && !progress.is_cancelled(); ++change) {
            const int source = next_broken();
            if (source < 0) break;
            const Branch branch = cheapest_relief(source);
            if (branch.head < 0)
                give_up(source);
            else if (branch.entry < 0)
                to_solar(branch);
            else
                move(branch);
            look();
        }
        plan_.cost = 0;
        for (Place i = 0; i < cases_.size(); ++i) plan_.cost += cases_[i].cents(plan_.choices[i]);
        for (const int e : plan_.edges) plan_.cost += graph_.edges[Place(e)].cost;
        return std::move(plan_);
    }

private:
    [[nodiscard]] const GroundEdge& edge(int e) const { return graph_.edges[Place(e)]; }
    [[nodiscard]] int other(int e, int v) const { return edge(e).u == v ? edge(e).v : edge(e).u; }
    [[nodiscard]] ServiceIx service_at(int source) const { return edge(tree_.edge[Place(source)]).service; }
    [[nodiscard]] double free_kva(ServiceIx service) const {
        if (!service.is_valid()) return 1e9;
        return input_.city.services[service.place()].free_kva.value_or(1e9);
    }
    [[nodiscard]] double own_kva(int v) const {
        if (!tree_.is_rewired[Place(v)]) return 0;
        const LampLoad lamp = lamp_load(input_.catalog, input_.city.poles[graph_.pole_at[Place(v)].place()]);
        return lamp.watts / lamp.pf / 1000;
    }
    /// Reads the plan anew: its tree, the load at and beyond each vertex.
    void look() {
        tree_ = rooted(graph_, cases_, plan_);
        kva_.assign(graph_.places.size(), 0);
        for (auto v = tree_.order.rbegin(); v != tree_.order.rend(); ++v) {
            kva_[Place(*v)] += own_kva(*v);
            if (tree_.parent[Place(*v)] >= 0) kva_[Place(tree_.parent[Place(*v)])] += kva_[Place(*v)];
        }
    }
    CircuitLoad load_of(int source) const {
        CircuitLoad load;
        load.source_v = source_volts(input_.city, service_at(source));
        std::map<int, int> span_at;
        for (const int v : tree_.order) {
            if (v == GroundGraph::kRoot || tree_.source[Place(v)] != source || tree_.lamps[Place(v)] == 0)
                continue;
            if (v == source && service_at(source).is_valid()) continue;
            const auto above = span_at.find(tree_.parent[Place(v)]);
            SizingSpan span;
            span.parent = above == span_at.end() ? -1 : above->second;
            span.length_m = edge(tree_.edge[Place(v)]).length_m;
            if (tree_.is_rewired[Place(v)]) {
                const LampLoad lamp =
                    lamp_load(input_.catalog, input_.city.poles[graph_.pole_at[Place(v)].place()]);
                span.watts = lamp.watts;
                span.pf = lamp.pf;
            }
            span_at.emplace(v, static_cast<int>(load.spans.size()));
            load.spans.push_back(span);
        }
        return load;
    }
    /// What a circuit breaks; empty = nothing. A circuit is worked out again only when its lamps have
    /// changed.
    std::string broken(int source) {
        const double free = free_kva(service_at(source));
        if (kva_[Place(source)] > free + 1e-9)
            return fmt::format("{:.2f} kVA of lamps, {:.2f} kVA free", kva_[Place(source)], free);
        std::vector<int> members;
        for (const int v : tree_.order)
            if (v != GroundGraph::kRoot && tree_.source[Place(v)] == source)
                members.push_back(v * 2 + tree_.is_rewired[Place(v)]);
        const auto known = known_.find(source);
        if (known != known_.end() && known->second.first == members) return known->second.second;
        std::string text = beyond_any_wire(input_, load_of(source), kDropLimitFrac);
        known_[source] = {std::move(members), text};
        return text;
    }
    int next_broken() {
        for (const int v : tree_.order)
            if (tree_.parent[Place(v)] == GroundGraph::kRoot && tree_.lamps[Place(v)] > 0 &&
                !given_up_.contains(v) && !broken(v).empty())
                return v;
        return -1;
    }
    void give_up(int source) {
        given_up_.insert(source);
        const ServiceIx service = service_at(source);
        const std::string id = service.is_valid()
                                   ? input_.city.services[service.place()].id
                                   : input_.city.poles[graph_.pole_at[Place(source)].place()].id;
        findings_.push_back(make_finding("circuit-over", {}, 0, id, broken(source),
                                         "within what the source, the drop and the wire allow",
                                         "give another service near by, or lock some of its poles to solar",
                                         service.is_valid() ? "services" : "poles"));
    }

    /// The chain that is no longer needed when the branch at `head` leaves: up to the next fork, lamp or
    /// source.
    std::vector<int> chain_above(int head) const {
        std::vector<int> chain;
        for (int v = head;; v = tree_.parent[Place(v)]) {
            chain.push_back(tree_.edge[Place(v)]);
            const int above = tree_.parent[Place(v)];
            if (above == GroundGraph::kRoot || tree_.lamps[Place(above)] != tree_.lamps[Place(head)])
                return chain;
        }
    }
    Cents cost_of(const std::vector<int>& edges) const {
        Cents sum = 0;
        for (const int e : edges) sum += edge(e).cost;
        return sum;
    }
    std::vector<int> members(int head) const {
        std::vector<int> list{head};
        for (Place i = 0; i < list.size(); ++i)
            for (const int e : at_[Place(list[i])]) {
                const int w = other(e, list[i]);
                if (tree_.edge[Place(w)] == e && tree_.parent[Place(w)] == list[i]) list.push_back(w);
            }
        return list;
    }
    /// Ways from every other source that has room, not through this circuit.
    void find_ways(int source) {
        way_.assign(graph_.places.size(), -1);
        way_edge_.assign(graph_.places.size(), -1);
        way_from_.assign(graph_.places.size(), -1);
        using Item = std::pair<Cents, int>;
        std::priority_queue<Item, std::vector<Item>, std::greater<>> queue;
        const auto offer = [&](int v, Cents cost, int e, int from) {
            if (way_[Place(v)] >= 0 && way_[Place(v)] <= cost) return;
            way_[Place(v)] = cost;
            way_edge_[Place(v)] = e;
            way_from_[Place(v)] = from;
            queue.emplace(cost, v);
        };
        for (const int v : tree_.order) {
            const int at = tree_.source[Place(v)];
            if (v == GroundGraph::kRoot || at == source || tree_.lamps[Place(v)] == 0) continue;
            if (free_kva(service_at(at)) - kva_[Place(at)] > 0.01 && !given_up_.contains(at))
                offer(v, 0, -1, at);
        }
        for (const int e : at_[Place(GroundGraph::kRoot)]) {
            const int v = other(e, GroundGraph::kRoot);
            if (tree_.source[Place(v)] < 0) offer(v, edge(e).cost, e, v);
        }
        while (!queue.empty()) {
            const auto [cost, v] = queue.top();
            queue.pop();
            if (cost > way_[Place(v)]) continue;
            if (tree_.source[Place(v)] == source && tree_.lamps[Place(v)] > 0) continue; // the way ends here
            for (const int e : at_[Place(v)]) {
                const int w = other(e, v);
                const bool is_other = w == GroundGraph::kRoot ||
                                      (tree_.source[Place(w)] >= 0 && tree_.source[Place(w)] != source);
                if (!is_other) offer(w, cost + edge(e).cost, e, way_from_[Place(v)]);
            }
        }
    }
    [[nodiscard]] double room_at(int from) const {
        if (tree_.source[Place(from)] >= 0) return free_kva(service_at(from)) - kva_[Place(from)];
        for (const int e : at_[Place(from)])
            if (other(e, from) == GroundGraph::kRoot) return free_kva(edge(e).service);
        return 0;
    }
    /// The cheapest single branch that brings the circuit under its limit, else the cheapest per kVA.
    Branch cheapest_relief(int source) {
        find_ways(source);
        const double over = kva_[Place(source)] - free_kva(service_at(source));
        const double need = over > 1e-9 ? over : 0.15 * kva_[Place(source)];
        Branch cure, step;
        double step_ratio = 0;
        for (const int head : tree_.order) {
            if (head == GroundGraph::kRoot || tree_.source[Place(head)] != source ||
                tree_.lamps[Place(head)] == 0 || leads_on(head))
                continue;
            for (const Branch& branch : ways_out(head)) {
                const double ratio = static_cast<double>(branch.price) / branch.kva;
                if (branch.kva >= need && (cure.head < 0 || branch.price < cure.price)) cure = branch;
                if (step.head < 0 || ratio < step_ratio) step = branch, step_ratio = ratio;
            }
        }
        return cure.head >= 0 ? cure : step;
    }
    /// A bare point with one way on: the branch begins further out.
    [[nodiscard]] bool leads_on(int v) const {
        for (const int e : at_[Place(v)]) {
            const int w = other(e, v);
            if (tree_.edge[Place(w)] == e && tree_.parent[Place(w)] == v &&
                tree_.lamps[Place(w)] == tree_.lamps[Place(v)])
                return true;
        }
        return false;
    }
    /// Solar and another source, each where it is possible.
    std::vector<Branch> ways_out(int head) const {
        std::vector<Branch> out;
        const std::vector<int> list = members(head);
        Cents saved = cost_of(chain_above(head)), inner = 0, worth = 0;
        bool all_open = true;
        Branch moved{head, -1, 0, kva_[Place(head)]};
        for (const int v : list) {
            if (v != head) inner += edge(tree_.edge[Place(v)]).cost;
            if (tree_.is_rewired[Place(v)]) {
                const PoleCase& each = cases_[Place(case_at_[Place(v)])];
                all_open = all_open && each.mode == Mode::open;
                worth += each.cents(Choice::solar) - each.cents(Choice::rewire);
            }
            const bool is_nearer =
                way_[Place(v)] >= 0 && (moved.entry < 0 || way_[Place(v)] < way_[Place(moved.entry)]);
            if (is_nearer && room_at(way_from_[Place(v)]) >= moved.kva) moved.entry = v;
        }
        if (all_open) out.push_back({head, -1, worth - inner - saved, moved.kva});
        if (moved.entry >= 0) {
            moved.price = way_[Place(moved.entry)] - saved;
            out.push_back(moved);
        }
        return out;
    }
    void drop_edges(const std::vector<int>& edges) {
        const std::set<int> gone(edges.begin(), edges.end());
        std::erase_if(plan_.edges, [&](int e) { return gone.contains(e); });
    }
    void to_solar(const Branch& branch) {
        std::vector<int> gone = chain_above(branch.head);
        for (const int v : members(branch.head)) {
            if (v != branch.head) gone.push_back(tree_.edge[Place(v)]);
            if (tree_.is_rewired[Place(v)]) plan_.choices[Place(case_at_[Place(v)])] = Choice::solar;
        }
        drop_edges(gone);
    }
    void move(const Branch& branch) {
        drop_edges(chain_above(branch.head));
        for (int v = branch.entry, e = way_edge_[Place(v)]; e >= 0;
             e = v == GroundGraph::kRoot ? -1 : way_edge_[Place(v)]) {
            plan_.edges.push_back(e);
            v = other(e, v);
        }
        std::sort(plan_.edges.begin(), plan_.edges.end());
    }

    const MoneyInput& input_;
    const GroundGraph& graph_;
    const std::vector<PoleCase>& cases_;
    JointPlan plan_;
    std::vector<Finding>& findings_;
    Rooted tree_;
    std::vector<double> kva_;
    std::vector<int> case_at_;
    std::vector<std::vector<int>> at_;
    std::vector<Cents> way_;
    std::vector<int> way_edge_, way_from_;
    std::set<int> given_up_;
    std::map<int, std::pair<std::vector<int>, std::string>> known_;
};

} // namespace

double source_volts(const City& city, ServiceIx service) {
    return service.is_valid() ? city.services[service.place()].volts : 240;
}

JointPlan keep_limits(const MoneyInput& input, const GroundGraph& graph, const std::vector<PoleCase>& cases,
                      JointPlan plan, std::vector<Finding>& findings, const Progress& progress) {
    return Limits(input, graph, cases, std::move(plan), findings).run(progress);
}

std::vector<double> size_circuits(const MoneyInput& input, DecideResult& result) {
    std::vector<double> pole_volts(input.city.poles.size(), 0);
    std::map<PoleIx, Place> circuit_of;
    for (Place c = 0; c < result.circuits.size(); ++c)
        for (const PoleIx pole : result.circuits[c].poles) circuit_of.emplace(pole, c);
    std::vector<std::vector<int>> spans_of(result.circuits.size());
    for (const CircuitSpan& span : result.spans)
        spans_of[circuit_of.at(span.poles_beyond.front())].push_back(span.id);

    tbb::parallel_for(Place{0}, result.circuits.size(), [&](Place c) {
        Circuit& circuit = result.circuits[c];
        CircuitLoad load;
        load.source_v = source_volts(input.city, circuit.service);
        std::map<int, int> place_of;
        const std::set<PoleIx> lamps(circuit.poles.begin(), circuit.poles.end());
        for (const int id : spans_of[c]) {
            const CircuitSpan& span = result.spans[Place(id)];
            SizingSpan next;
            next.parent = span.parent < 0 ? -1 : place_of.at(span.parent);
            next.length_m = span.length_m;
            if (span.pole.is_valid() && lamps.contains(span.pole)) {
                const LampLoad lamp = lamp_load(input.catalog, input.city.poles[span.pole.place()]);
                next.watts = lamp.watts;
                next.pf = lamp.pf;
                circuit.load_kva += lamp.watts / lamp.pf / 1000;
            }
            place_of.emplace(id, static_cast<int>(load.spans.size()));
            load.spans.push_back(next);
        }
        const CircuitAnswer answer = work_circuit(input, load, kDropLimitFrac);
        circuit.worst_drop_frac = answer.volts.worst_drop_frac;
        circuit.source_a = answer.volts.source_a;
        circuit.device_a = answer.device_a;
        for (Place i = 0; i < spans_of[c].size(); ++i) {
            CircuitSpan& span = result.spans[Place(spans_of[c][i])];
            if (i < answer.awg.size()) span.awg = answer.awg[i];
            span.cost = 0;
            for (const CashLine& line : span_lines(input, span, input.plan.decide_year()))
                span.cost += line.amount;
            if (span.pole.is_valid() && i < answer.volts.volts.size())
                pole_volts[span.pole.place()] = answer.volts.volts[i];
        }
    });
    return pole_volts;
}

} // namespace unstring
