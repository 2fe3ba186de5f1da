#include "model/supply/radial.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace unstring {
namespace {

using Phasor = std::complex<double>;

constexpr double kRestV = 1e-10;
constexpr int kMostSweeps = 20000;

struct Legs { // two wires: only `a` is used
    Phasor a, b;
};

struct Sweep {
    const RadialCase& radial;
    std::vector<int> order;
    std::vector<Legs> volts;   // leg to neutral, both counted positive; two wires: wire to wire
    std::vector<Legs> current; // in the span that leads to the node
    double leg_v = 0;

    bool has_neutral() const { return radial.wires == 3; }

    Phasor load_volts(std::size_t i) const {
        if (!has_neutral()) return volts[i].a;
        switch (radial.nodes[i].leg) {
        case Leg::a:
            return volts[i].a;
        case Leg::b:
            return volts[i].b;
        case Leg::ab:
            return volts[i].a + volts[i].b;
        }
        return {};
    }

    Phasor load_current(std::size_t i) const {
        const RadialNode& node = radial.nodes[i];
        const double sine = std::sqrt(std::max(0.0, 1 - node.pf * node.pf));
        const Phasor v = load_volts(i);
        if (node.amps != 0) return node.amps * (v / std::abs(v)) * Phasor(node.pf, -sine);
        if (node.watts == 0) return {};
        return std::conj(Phasor(node.watts, node.watts * sine / node.pf) / v);
    }

    void backward() {
        for (std::size_t i = 0; i < current.size(); ++i) {
            const Phasor amps = load_current(i);
            const Leg leg = radial.nodes[i].leg;
            current[i].a = !has_neutral() || leg != Leg::b ? amps : Phasor();
            current[i].b = has_neutral() && leg != Leg::a ? amps : Phasor();
        }
        for (auto at = order.rbegin(); at != order.rend(); ++at) {
            const Legs& own = current[static_cast<std::size_t>(*at)];
            const int parent = radial.nodes[static_cast<std::size_t>(*at)].parent;
            if (parent < 0) continue;
            current[static_cast<std::size_t>(parent)].a += own.a;
            current[static_cast<std::size_t>(parent)].b += own.b;
        }
    }

    /// The largest move of a node [V].
    double forward() {
        double moved = 0;
        for (const int place : order) {
            const auto i = static_cast<std::size_t>(place);
            const RadialNode& node = radial.nodes[i];
            const Legs from =
                node.parent < 0 ? Legs{leg_v, leg_v} : volts[static_cast<std::size_t>(node.parent)];
            const Phasor z(node.r_ohm, node.x_ohm);
            Legs next;
            if (has_neutral()) {
                const Phasor neutral = z * (current[i].a - current[i].b);
                next.a = from.a - z * current[i].a - neutral;
                next.b = from.b - z * current[i].b + neutral;
            } else {
                next.a = from.a - 2.0 * z * current[i].a;
            }
            moved = std::max({moved, std::abs(next.a - volts[i].a), std::abs(next.b - volts[i].b)});
            volts[i] = next;
        }
        return moved;
    }

    /// Volts that are no numbers, or that have fallen to nothing under a load.
    bool has_collapsed() const {
        for (std::size_t i = 0; i < volts.size(); ++i) {
            const double v = std::abs(load_volts(i));
            if (!std::isfinite(v)) return true;
            if ((radial.nodes[i].watts != 0 || radial.nodes[i].amps != 0) && v < 1e-6 * leg_v) return true;
        }
        return false;
    }
};

void check(const RadialCase& radial) {
    if (radial.wires != 2 && radial.wires != 3) throw std::logic_error("radial: 2 or 3 wires");
    if (!(radial.source_v > 0)) throw std::logic_error("radial: source volts above 0");
    for (const RadialNode& node : radial.nodes)
        if (!(node.pf > 0 && node.pf <= 1)) throw std::logic_error("radial: pf in (0, 1]");
}

void read_out(const Sweep& sweep, RadialResult& result) {
    const bool has_neutral = sweep.has_neutral();
    Legs source;
    for (std::size_t i = 0; i < sweep.volts.size(); ++i) {
        const RadialNode& node = sweep.radial.nodes[i];
        const double v = std::abs(sweep.load_volts(i));
        const double nominal = has_neutral && node.leg != Leg::ab ? sweep.leg_v : sweep.radial.source_v;
        result.volts.push_back(v);
        result.drop_frac.push_back(1 - v / nominal);
        result.worst_drop_frac = std::max(result.worst_drop_frac, result.drop_frac.back());
        const Legs& amps = sweep.current[i];
        result.span_a.push_back(std::max(std::abs(amps.a), std::abs(amps.b)));
        const double squares = has_neutral
                                   ? std::norm(amps.a) + std::norm(amps.b) + std::norm(amps.a - amps.b)
                                   : 2 * std::norm(amps.a);
        result.loss_w += node.r_ohm * squares;
        if (node.parent < 0) {
            source.a += amps.a;
            source.b += amps.b;
        }
    }
    result.source_leg_a[0] = std::abs(source.a);
    result.source_leg_a[1] = std::abs(source.b);
    result.source_neutral_a = has_neutral ? std::abs(source.a - source.b) : 0;
    result.source_a = std::max(result.source_leg_a[0], result.source_leg_a[1]);
    result.source_w = sweep.leg_v * (source.a + source.b).real();
}

} // namespace

std::optional<std::vector<int>> radial_order(const std::vector<RadialNode>& nodes) {
    std::vector<std::vector<int>> children(nodes.size() + 1);
    for (std::size_t i = 0; i < nodes.size(); ++i) {
        const int parent = nodes[i].parent;
        if (parent < -1 || parent >= static_cast<int>(nodes.size())) return std::nullopt;
        children[static_cast<std::size_t>(parent + 1)].push_back(static_cast<int>(i));
    }
    std::vector<int> order = children[0];
    for (std::size_t done = 0; done < order.size(); ++done)
        for (const int child : children[static_cast<std::size_t>(order[done] + 1)]) order.push_back(child);
    if (order.size() != nodes.size()) return std::nullopt;
    return order;
}

RadialResult solve_radial(const RadialCase& radial) {
    check(radial);
    auto order = radial_order(radial.nodes);
    if (!order) throw std::logic_error("radial: parents in a circle or out of range");
    const double leg_v = radial.wires == 3 ? radial.source_v / 2 : radial.source_v;
    Sweep sweep{radial, std::move(*order), std::vector<Legs>(radial.nodes.size(), {leg_v, leg_v}),
                std::vector<Legs>(radial.nodes.size()), leg_v};
    if (radial.wires == 2)
        for (Legs& legs : sweep.volts) legs.b = {};
    RadialResult result;
    while (!result.converged && result.sweeps < kMostSweeps && !sweep.has_collapsed()) {
        sweep.backward();
        result.converged = sweep.forward() < kRestV;
        ++result.sweeps;
    }
    if (result.converged) {
        sweep.backward();
        read_out(sweep, result);
    }
    return result;
}

} // namespace unstring
