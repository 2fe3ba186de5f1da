#pragma once
// Volts along a radial lighting circuit. Comes in: the tree with the resistance of each span and the load of
// each node. Goes out: volts and drop at each node, current at the source, losses.
//
//   source --span 0-- node 0 --span 1-- node 1
//                        \---span 2-- node 2          span i leads to node i

#include <complex>
#include <optional>
#include <string>
#include <vector>

namespace unstring {

enum class Leg { a, b, ab }; ///< read for three wires only: one leg to neutral, or leg to leg

struct RadialNode {
    int parent = -1;             ///< place of the node nearer to the source; -1 = the source
    double r_ohm = 0, x_ohm = 0; ///< of one conductor of the span, one way
    double watts = 0, pf = 1;    ///< constant power, lagging; pf also turns `amps`
    double amps = 0;             ///< constant current, against the volts at the node; in place of watts
    Leg leg = Leg::ab;
};

struct RadialCase {
    double source_v = 240; ///< between the two wires; leg to leg for three
    int wires = 2;         ///< 2, or 3 with a neutral of the same size
    std::vector<RadialNode> nodes;
};

struct RadialResult {
    bool converged =
        false; ///< false: the load is more than the circuit can carry; the other numbers mean nothing then
    int sweeps = 0;
    std::vector<double> volts;     ///< at each node, between the wires of its load
    std::vector<double> drop_frac; ///< 1 - volts / source volts of the same wires
    std::vector<double> span_a;    ///< in each span, the larger of the two legs
    double worst_drop_frac = 0;
    double source_a = 0; ///< the larger of the two legs
    double source_leg_a[2] = {0, 0}, source_neutral_a = 0;
    double source_w = 0, loss_w = 0;
};

/// Places in an order in which each parent comes before its children; nothing where the parents run in a
/// circle.
[[nodiscard]] std::optional<std::vector<int>> radial_order(const std::vector<RadialNode>& nodes);

/// Backward/forward sweep until no node moves by 1e-10 V. Two wires: both conductors carry the current. Three
/// wires: the neutral carries the difference of the legs. Valid for one phase, any load that has a solution;
/// 20 000 sweeps without rest, or volts that fall to nothing, is collapse (converged = false). Throws
/// std::logic_error for parents in a circle or out of range, wires other than 2 and 3, pf outside (0, 1].
/// Source: backward/forward sweep of radial feeders, I = conj(S / V). Checked in tests/published/supply.cpp
[[nodiscard]] RadialResult solve_radial(const RadialCase& radial);

} // namespace unstring
