#include "model/decide/circuit_load.h"

#include <algorithm>

#include <fmt/format.h>

#include "model/catalog/cables.h"
#include "model/catalog/prices.h"
#include "model/money/new_light.h"
#include "model/supply/protection.h"

namespace unstring {
namespace {

using Place = std::size_t;

/// Copper from AWG 8 up: the sizes that the price book has and a street circuit is pulled with.
std::vector<Cable> street_cables(const Catalog& catalog) {
    std::vector<Cable> all = catalog.cables.empty() ? default_cables() : catalog.cables;
    std::erase_if(all, [](const Cable& cable) {
        return cable.metal != Metal::copper || cable.awg > 8 || cable.awg < -3;
    });
    std::erase_if(all, [](const Cable& cable) { return find_price_item(wire_item(cable.awg)) == nullptr; });
    return all;
}

RadialCase with_cable(const CircuitLoad& load, const Cable& cable) {
    RadialCase radial;
    radial.source_v = load.source_v;
    for (const SizingSpan& span : load.spans) {
        RadialNode node;
        node.parent = span.parent;
        node.r_ohm = cable.ohm_per_km * span.length_m / 1000;
        node.x_ohm = cable.x_ohm_per_km * span.length_m / 1000;
        node.watts = span.watts;
        node.pf = span.pf;
        radial.nodes.push_back(node);
    }
    return radial;
}

struct Merged {
    std::vector<SizingSpan> spans;
    std::vector<int> of; ///< merged span of each span
};

/// Spans without a lamp that only lead on are one with the next.
Merged merged(const std::vector<SizingSpan>& spans) {
    std::vector<int> children(spans.size(), 0);
    for (const SizingSpan& span : spans)
        if (span.parent >= 0) ++children[Place(span.parent)];
    Merged out;
    out.of.assign(spans.size(), -1);
    for (Place i = 0; i < spans.size(); ++i) {
        const int parent = spans[i].parent;
        const bool leads_on = parent >= 0 && children[Place(parent)] == 1 && spans[Place(parent)].watts == 0;
        if (leads_on) {
            SizingSpan& chain = out.spans[Place(out.of[Place(parent)])];
            chain.length_m += spans[i].length_m;
            chain.watts = spans[i].watts;
            chain.pf = spans[i].pf;
            out.of[i] = out.of[Place(parent)];
        } else {
            SizingSpan next = spans[i];
            next.parent = parent < 0 ? -1 : out.of[Place(parent)];
            out.of[i] = static_cast<int>(out.spans.size());
            out.spans.push_back(next);
        }
    }
    return out;
}

} // namespace

LampLoad lamp_load(const Catalog& catalog, const Pole& pole) {
    const NewLight light = new_light(catalog, pole);
    for (const Luminaire& each : catalog.luminaires)
        if (each.luminaire == light.name) return {light.led_w, each.pf};
    return {light.led_w, 0.95};
}

CircuitAnswer work_circuit(const MoneyInput& input, const CircuitLoad& load, double drop_frac) {
    CircuitAnswer answer;
    const std::vector<Cable> cables = street_cables(input.catalog);
    const auto eight =
        std::find_if(cables.begin(), cables.end(), [](const Cable& cable) { return cable.awg == 8; });
    if (eight != cables.end()) {
        answer.volts = solve_radial(with_cable(load, *eight));
        answer.device_a = answer.volts.converged ? device_for(answer.volts.source_a) : 0;
        answer.possible = answer.volts.converged && answer.volts.worst_drop_frac <= drop_frac &&
                          answer.device_a > 0 && largest_device(*eight) >= answer.device_a;
        answer.awg.assign(load.spans.size(), 8);
        if (answer.possible || load.spans.empty()) return answer;
    }
    if (cables.empty()) {
        answer.stopped_by = "no copper cable of AWG 8 or larger in the catalogue";
        return answer;
    }
    const Merged chains = merged(load.spans);
    SizingLimits limits;
    limits.source_v = load.source_v;
    limits.drop_frac = drop_frac;
    limits.cables = cables;
    const int year = input.plan.decide_year();
    limits.price_m = [&](const Cable& cable) { return input.prices.at(wire_item(cable.awg), year); };
    const SizingResult sized = size_wires(chains.spans, limits);
    answer.possible = sized.possible;
    answer.stopped_by = sized.stopped_by;
    if (!sized.possible) return answer;
    answer.awg.clear();
    for (const int chain : chains.of) answer.awg.push_back(sized.awg[Place(chain)]);
    answer.device_a = sized.device_a;
    answer.volts = sized.volts;
    // Volts of the merged spans, told at every span.
    std::vector<double> volts, drop;
    for (const int chain : chains.of) {
        volts.push_back(sized.volts.volts[Place(chain)]);
        drop.push_back(sized.volts.drop_frac[Place(chain)]);
    }
    answer.volts.volts = std::move(volts);
    answer.volts.drop_frac = std::move(drop);
    return answer;
}

std::string beyond_any_wire(const MoneyInput& input, const CircuitLoad& load, double drop_frac) {
    const std::vector<Cable> cables = street_cables(input.catalog);
    if (load.spans.empty()) return {};
    if (cables.empty()) return "no copper cable of AWG 8 or larger in the catalogue";
    const Cable& thickest =
        *std::min_element(cables.begin(), cables.end(),
                          [](const Cable& a, const Cable& b) { return a.ohm_per_km < b.ohm_per_km; });
    const RadialResult volts = solve_radial(with_cable(load, thickest));
    if (!volts.converged) return "the load is more than the circuit can carry at any size";
    if (volts.worst_drop_frac > drop_frac)
        return fmt::format("drop {:.1f} % with AWG {}, {:.1f} % allowed", 100 * volts.worst_drop_frac,
                           awg_text(thickest.awg), 100 * drop_frac);
    double source_va = 0;
    for (const SizingSpan& span : load.spans) source_va += span.watts / span.pf;
    const int device_a = device_for(source_va / (load.source_v * (1 - drop_frac)));
    if (device_a == 0 || largest_device(thickest) < device_a)
        return fmt::format("{:.0f} A is more than any device and wire carries", volts.source_a);
    return {};
}

} // namespace unstring
