#pragma once
// What decide answers: a choice per pole with its options, the trench tree, the lighting circuits, cost and
// bound.

#include <array>
#include <map>
#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/finding.h"
#include "model/money/cash.h"
#include "model/plan/plan.h"

namespace unstring {

enum class SpanKind { trench_verge, trench_paved, bore, conduit, aerial, tap, service };

struct CircuitSpan { ///< one edge of the chosen tree
    int id = 0;
    int parent = -1;   ///< span nearer to the source, -1 = at the service point
    PoleIx pole;       ///< pole at its far end; not valid at a bare street point
    ServiceIx service; ///< of its circuit; not valid: fed by a tap of the secondary at the first pole
    SpanKind kind = SpanKind::trench_verge;
    std::vector<MapPoint> line;
    double length_m = 0;
    Cents cost = 0; ///< capital at decide_year's price, wire included, not discounted
    int awg = 8;
    int boxes = 0;                    ///< pull boxes that are set with it
    Surface surface = Surface::verge; ///< over an old conduit: what is dug up where the conduit is bad
    StringIx duct_string; ///< string whose old conduit it reuses, dead before it is pulled; not valid = none,
                          ///< or a spare duct
    PoleIx duct_from, duct_to;        ///< the poles at the ends of that conduit span, in wiring order
    std::vector<PoleIx> poles_beyond; ///< rewired poles fed through it
};

struct PoleDecision {
    PoleIx pole;
    Choice choice = Choice::undecided;
    std::string head;                  ///< where solar
    std::array<OptionCost, 3> options; ///< keep, rewire, solar; rewire's lines hold its marginal trench share
    double trench_share =
        0; ///< what the plan would cost less without this pole's connection [dollars, present value]
    double trench_m = 0;           ///< metres of that share
    double breakeven_trench_m = 0; ///< metres of trench at which solar and rewire cost the same; < 0 = never
    double volts = 0, drop_frac = 0; ///< at the lamp, where rewired
    std::string reason;              ///< in words, with numbers
    std::map<std::string, double> numbers;
    std::vector<std::string> sources;
};

struct Circuit {       ///< one lighting circuit
    ServiceIx service; ///< not valid: a tap of the secondary at poles[0]
    std::vector<PoleIx> poles;
    double load_kva = 0, worst_drop_frac = 0, source_a = 0, device_a = 0;
    Cents connection_cost = 0;
};

struct DecideResult {
    std::vector<PoleDecision> poles; ///< candidates only, in the order of the city
    std::vector<CircuitSpan> spans;
    std::vector<Circuit> circuits;
    int keep = 0, rewire = 0, solar = 0, services_new = 0, marks_followed = 0;
    struct Refused {
        PoleIx pole;
        std::string reason;
    };
    std::vector<Refused> marks_refused;
    double cost = 0, bound = 0; ///< dollars, present value, at decide_year ("before phasing")
    bool feasible = true;
    double trench_m = 0;
    double all_rewire_cost = 0, all_solar_cost = 0, greedy_cost = 0;
    int all_rewire_not_possible = 0, all_solar_not_possible = 0;
    double limits_price = 0; ///< what the electrical limits add
    std::vector<Finding> findings;
    double seconds = 0;
    [[nodiscard]] const PoleDecision* find(PoleIx pole) const;
};

} // namespace unstring
