#include "model/supply/sizing.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>
#include <stdexcept>

#include <fmt/format.h>

#include "model/catalog/cables.h"
#include "model/supply/protection.h"

namespace unstring {
namespace {

constexpr int kSteps = 2000; // of the drop limit
constexpr int kRounds = 8;
constexpr double kNever = std::numeric_limits<double>::infinity();

struct Problem {
    const std::vector<SizingSpan>& spans;
    const SizingLimits& limits;
    std::vector<int> order;      // parents first
    std::vector<Cable> cables;   // those that the device may protect, cheapest first
    std::vector<double> price_m; // of each
    double drop_v = 0;           // allowed

    RadialCase radial(const std::vector<std::size_t>& chosen) const {
        RadialCase out{limits.source_v, limits.wires, {}};
        for (std::size_t i = 0; i < spans.size(); ++i) {
            const Cable& cable = cables[chosen[i]];
            const double km = spans[i].length_m / 1000;
            out.nodes.push_back({spans[i].parent, cable.ohm_per_km * km, cable.x_ohm_per_km * km,
                                 spans[i].watts, spans[i].pf, 0, Leg::ab});
        }
        return out;
    }
    double cost(const std::vector<std::size_t>& chosen) const {
        double sum = 0;
        for (std::size_t i = 0; i < spans.size(); ++i) sum += price_m[chosen[i]] * spans[i].length_m;
        return sum;
    }
    bool keeps_limits(const RadialResult& volts) const {
        if (!volts.converged) return false;
        const double least = limits.source_v - drop_v - 1e-9;
        return std::all_of(volts.volts.begin(), volts.volts.end(), [&](double v) { return v >= least; });
    }
};

struct Amps { ///< in one span, part in step with the volts and part behind them
    double active = 0, reactive = 0;
};

/// Current in each span with each lamp at the volts given.
std::vector<Amps> span_amps(const Problem& problem, const std::vector<double>& volts) {
    std::vector<Amps> amps(problem.spans.size());
    for (std::size_t i = 0; i < amps.size(); ++i) {
        const SizingSpan& span = problem.spans[i];
        amps[i].active = span.watts / volts[i];
        amps[i].reactive = amps[i].active * std::sqrt(1 - span.pf * span.pf) / span.pf;
    }
    for (auto at = problem.order.rbegin(); at != problem.order.rend(); ++at) {
        const int parent = problem.spans[static_cast<std::size_t>(*at)].parent;
        if (parent < 0) continue;
        amps[static_cast<std::size_t>(parent)].active += amps[static_cast<std::size_t>(*at)].active;
        amps[static_cast<std::size_t>(parent)].reactive += amps[static_cast<std::size_t>(*at)].reactive;
    }
    return amps;
}

/// Drop of a span [V]: 2 (R I cos + X I sin), the first order of the phasor drop.
double span_drop_v(const Cable& cable, double length_m, const Amps& amps) {
    return 2 * length_m / 1000 * (cable.ohm_per_km * amps.active + cable.x_ohm_per_km * amps.reactive);
}

/// The cheapest sizes by drops counted in whole steps: below[node][budget] is the wire beyond the node when
/// `budget` steps are left there. Empty where nothing fits.
std::vector<std::size_t> cheapest_sizes(const Problem& problem, const std::vector<Amps>& amps,
                                        double budget_v) {
    const std::size_t n = problem.spans.size();
    std::vector<std::vector<double>> below(n, std::vector<double>(kSteps + 1, 0.0));
    std::vector<std::vector<int>> pick(n, std::vector<int>(kSteps + 1, -1));
    std::vector<std::vector<int>> used(n, std::vector<int>(problem.cables.size()));
    for (auto at = problem.order.rbegin(); at != problem.order.rend(); ++at) {
        const auto i = static_cast<std::size_t>(*at);
        const double length_m = problem.spans[i].length_m;
        for (std::size_t c = 0; c < problem.cables.size(); ++c) {
            const double steps = span_drop_v(problem.cables[c], length_m, amps[i]) / budget_v * kSteps;
            used[i][c] = static_cast<int>(std::min<double>(kSteps + 1, std::round(steps)));
        }
        for (int budget = 0; budget <= kSteps; ++budget) {
            double best = kNever;
            for (std::size_t c = 0; c < problem.cables.size(); ++c) {
                if (used[i][c] > budget) continue;
                const double cost =
                    problem.price_m[c] * length_m + below[i][static_cast<std::size_t>(budget - used[i][c])];
                if (cost < best) {
                    best = cost;
                    pick[i][static_cast<std::size_t>(budget)] = static_cast<int>(c);
                }
            }
            const int parent = problem.spans[i].parent;
            if (parent >= 0)
                below[static_cast<std::size_t>(parent)][static_cast<std::size_t>(budget)] += best;
        }
    }
    std::vector<std::size_t> chosen(n);
    std::vector<int> left(n, kSteps);
    for (const int place : problem.order) {
        const auto i = static_cast<std::size_t>(place);
        const int parent = problem.spans[i].parent;
        const int budget = parent < 0 ? kSteps : left[static_cast<std::size_t>(parent)];
        const int c = pick[i][static_cast<std::size_t>(budget)];
        if (c < 0) return {};
        chosen[i] = static_cast<std::size_t>(c);
        left[i] = budget - used[i][chosen[i]];
    }
    return chosen;
}

/// The thickest everywhere: what remains to try when the upper estimate finds nothing.
std::vector<std::size_t> thickest(const Problem& problem) {
    std::size_t best = 0;
    for (std::size_t c = 1; c < problem.cables.size(); ++c)
        if (problem.cables[c].ohm_per_km < problem.cables[best].ohm_per_km) best = c;
    return std::vector<std::size_t>(problem.spans.size(), best);
}

struct Sized {
    std::vector<std::size_t> chosen;
    RadialResult volts;
    double cost = kNever;
};

/// Sizes for currents at the source's volts first, then at the volts that those sizes give; each answer is
/// judged by the exact sweep, and where it drops too much the next round has that much less to spend.
Sized sized_by_rounds(const Problem& problem) {
    Sized best;
    std::vector<double> volts(problem.spans.size(), problem.limits.source_v);
    double budget_v = problem.drop_v;
    for (int round = 0; round < kRounds; ++round) {
        std::vector<std::size_t> chosen = cheapest_sizes(problem, span_amps(problem, volts), budget_v);
        if (chosen.size() != problem.spans.size()) break;
        RadialResult exact = solve_radial(problem.radial(chosen));
        if (!exact.converged) break;
        volts = exact.volts;
        if (!problem.keeps_limits(exact)) {
            const double dropped_v = exact.worst_drop_frac * problem.limits.source_v;
            if (round > 0) budget_v *= std::min(0.9995, problem.drop_v / dropped_v);
            continue;
        }
        const double cost = problem.cost(chosen);
        if (cost >= best.cost) break;
        best = {std::move(chosen), std::move(exact), cost};
    }
    return best;
}

/// Takes the largest saving that the exact sweep allows, again and again.
void make_thinner(const Problem& problem, std::vector<std::size_t>& chosen, RadialResult& volts) {
    for (bool changed = true; changed;) {
        changed = false;
        double best_saving = 0;
        std::vector<std::size_t> best;
        RadialResult best_volts;
        for (std::size_t i = 0; i < chosen.size(); ++i) {
            for (std::size_t c = 0; c < problem.cables.size(); ++c) {
                const double saving =
                    (problem.price_m[chosen[i]] - problem.price_m[c]) * problem.spans[i].length_m;
                if (saving <= best_saving) continue;
                std::vector<std::size_t> next = chosen;
                next[i] = c;
                RadialResult answer = solve_radial(problem.radial(next));
                if (!problem.keeps_limits(answer)) continue;
                best_saving = saving;
                best = std::move(next);
                best_volts = std::move(answer);
            }
        }
        if (best.empty()) continue;
        chosen = std::move(best);
        volts = std::move(best_volts);
        changed = true;
    }
}

/// The same in one pass, for circuits of many spans: each span in turn takes the cheapest size that the exact
/// sweep allows, the span with most to save first.
void make_thinner_once(const Problem& problem, std::vector<std::size_t>& chosen, RadialResult& volts) {
    std::vector<std::size_t> order(chosen.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    const auto most = [&](std::size_t i) {
        return (problem.price_m[chosen[i]] - problem.price_m.front()) * problem.spans[i].length_m;
    };
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return most(a) > most(b); });
    for (const std::size_t i : order) {
        for (std::size_t c = 0; problem.price_m[c] < problem.price_m[chosen[i]]; ++c) {
            std::vector<std::size_t> next = chosen;
            next[i] = c;
            RadialResult answer = solve_radial(problem.radial(next));
            if (!problem.keeps_limits(answer)) continue;
            chosen = std::move(next);
            volts = std::move(answer);
            break;
        }
    }
}

/// Sizes that may be protected by the device, cheapest first.
void fill_cables(Problem& problem, int device_a) {
    problem.cables.clear();
    for (const Cable& cable : problem.limits.cables)
        if (largest_device(cable) >= device_a) problem.cables.push_back(cable);
    std::stable_sort(problem.cables.begin(), problem.cables.end(), [&](const Cable& a, const Cable& b) {
        return problem.limits.price_m(a) < problem.limits.price_m(b);
    });
    problem.price_m.clear();
    for (const Cable& cable : problem.cables) problem.price_m.push_back(problem.limits.price_m(cable));
}

SizingResult finished(const Problem& problem, Sized& sized, int device_a) {
    const auto is_thicker = [](const Cable& a, const Cable& b) { return a.ohm_per_km < b.ohm_per_km; };
    SizingResult result;
    result.possible = true;
    result.device_a = device_a;
    result.cost = problem.cost(sized.chosen);
    result.volts = std::move(sized.volts);
    const Cable* largest = nullptr;
    for (const std::size_t c : sized.chosen) {
        result.awg.push_back(problem.cables[c].awg);
        if (largest == nullptr || is_thicker(problem.cables[c], *largest)) largest = &problem.cables[c];
    }
    const Cable& needed = *std::max_element(problem.cables.begin(), problem.cables.end(), is_thicker);
    if (largest != nullptr) result.grounding_awg = grounding_awg_upsized(device_a, needed, *largest);
    return result;
}

SizingResult refused(std::string why) {
    SizingResult result;
    result.stopped_by = std::move(why);
    return result;
}

} // namespace

SizingResult size_wires(const std::vector<SizingSpan>& spans, const SizingLimits& limits) {
    if (limits.cables.empty() || !limits.price_m) throw std::logic_error("sizing: no cables or no price");
    std::vector<RadialNode> nodes;
    for (const SizingSpan& span : spans) nodes.push_back({span.parent, 0, 0, 0, 1, 0, Leg::ab});
    auto order = radial_order(nodes);
    if (!order) throw std::logic_error("sizing: parents in a circle or out of range");
    Problem problem{spans, limits, std::move(*order), {}, {}, 0};
    problem.drop_v = std::min(limits.drop_frac * limits.source_v, limits.source_v - limits.least_v);
    if (!(problem.drop_v > 0))
        return refused(fmt::format("the driver needs {:.0f} V, the source gives {:.0f} V", limits.least_v,
                                   limits.source_v));

    double source_va = 0;
    for (const SizingSpan& span : spans) source_va += span.watts / span.pf;
    const double source_a =
        source_va / (limits.source_v - problem.drop_v); // each lamp at the lowest volts allowed
    const int device_a = device_for(source_a);
    if (device_a == 0)
        return refused(fmt::format("{:.0f} A is more than any device of the list carries", source_a));
    fill_cables(problem, device_a);
    if (problem.cables.empty())
        return refused(fmt::format("no wire of the list may be protected by a {} A device", device_a));

    Sized sized = sized_by_rounds(problem);
    if (sized.chosen.size() != spans.size()) {
        sized.chosen = thickest(problem);
        sized.volts = solve_radial(problem.radial(sized.chosen));
    }
    if (!sized.volts.converged) return refused("the load is more than the circuit can carry at any size");
    if (!problem.keeps_limits(sized.volts))
        return refused(fmt::format(
            "drop {:.1f} % with AWG {}, {:.1f} % allowed", 100 * sized.volts.worst_drop_frac,
            awg_text(problem.cables[sized.chosen.front()].awg), 100 * problem.drop_v / limits.source_v));
    constexpr std::size_t kFewSpans = 16;
    if (spans.size() <= kFewSpans)
        make_thinner(problem, sized.chosen, sized.volts);
    else
        make_thinner_once(problem, sized.chosen, sized.volts);
    return finished(problem, sized, device_a);
}

} // namespace unstring
