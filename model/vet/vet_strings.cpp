// Each series string as it stands today: wiring settled, load, volts and cable against its unit and its
// cable's class.

#include <algorithm>
#include <cmath>
#include <numeric>

#include <fmt/format.h>
#include <tbb/parallel_for.h>

#include "model/series/loop_geometry.h"
#include "model/series/units.h"
#include "model/vet/vet_checks.h"
#include "model/vet/wiring_order.h"

namespace unstring {
namespace {

constexpr double kLongSpan_m = 120;
constexpr double kReadingDiffers_frac = 0.1;
constexpr double kShortestLength_frac = 0.95; // of the straight legs; less cable than that cannot be
constexpr double kLongestLength_frac = 3;     // feet taken for metres give 3.28
constexpr double kLightLoad_frac = 0.5;

struct StringUnderVet {
    const VetInput& vet;
    const SeriesString& row;
    const StringLoop& loop;
    const StringState& state;
    const VetString& today;

    void add(std::string code, std::string found, std::string wanted, std::string remedy) const {
        vet.add(std::move(code), kCircuitsTable, row.from, row.id, std::move(found), std::move(wanted),
                std::move(remedy));
    }
};

void vet_order_inferred(const StringUnderVet& string) {
    if (string.today.order == OrderFrom::given) return;
    string.add(
        "order-inferred",
        fmt::format("{} from the map, {:.0f} % of neighbour pairs stay when distances are shaken by 10 %",
                    string.today.order == OrderFrom::inferred ? "order inferred" : "order partly inferred",
                    100 * string.today.order_confidence_frac),
        "an order that was traced", "confirm it before work on this string is handed out");
}

void vet_load(const StringUnderVet& string) {
    if (string.state.lamps == 0) return;
    if (!string.today.transformer.is_valid()) {
        string.add("transformer-missing",
                   fmt::format("{} lamps, no RO transformer in service", string.state.lamps),
                   "the unit that feeds it", "add the unit's row, or mend its string_id and state");
        return;
    }
    const Transformer& unit = string.vet.city.transformers[string.today.transformer.place()];
    const std::string tap = string.today.tap < 1 ? fmt::format(" at tap {:g}", string.today.tap) : "";
    const std::string load = fmt::format(
        "{:.2f} kVA on {} of {:g} kW{}{}: {:.0f} %", string.state.load_kva, unit.id, loop_rating_kw(unit),
        unit.strings.size() == 2 ? " a loop" : "", tap, 100 * string.today.loading_frac);
    if (string.today.verdict == Verdict::over)
        string.add("load-over", load, "load within the unit's rating",
                   "check lamps, cable length and nameplate; swap the unit");
    if (string.today.verdict == Verdict::low)
        string.add("load-low", load, fmt::format("at least {:.0f} %", 100 * min_frac_of(unit)),
                   "check lamps and nameplate; a smaller unit would hold the current better");
    if (string.row.pulsing && string.today.loading_frac < kLightLoad_frac)
        string.add("pulsing-light", "pulsing on record, " + load, "half load or more where lamps pulse",
                   "a smaller unit, or this string first");
}

void vet_volts(const StringUnderVet& string) {
    if (string.state.lamps == 0) return;
    const double class_v = string.loop.cable_kv * 1000;
    const std::string wanted = fmt::format("at most {:.0f} V, the cable's class", class_v);
    if (string.state.volts > class_v)
        string.add("volts-over", fmt::format("{:.0f} V running", string.state.volts), wanted,
                   "check lamps and cable_kv; split the string");
    if (!string.today.transformer.is_valid()) return;
    const OpenVolts open =
        open_volts(string.vet.city.transformers[string.today.transformer.place()], string.loop.current_a);
    if (open.volts <= class_v) return;
    if (open.is_estimate)
        string.add("volts-open", fmt::format("{:.0f} V open-circuit (estimate)", open.volts), wanted,
                   "read open_v from the nameplate; until then keep the approach distance of the estimate");
    else
        string.add("volts-over", fmt::format("{:.0f} V open-circuit (nameplate)", open.volts), wanted,
                   "check cable_kv and the unit");
}

void vet_readings(const StringUnderVet& string) {
    const auto differs = [](double read, double computed) {
        return std::abs(read - computed) > kReadingDiffers_frac * computed;
    };
    if (string.row.asfound_v && string.state.volts > 0 && differs(*string.row.asfound_v, string.state.volts))
        string.add("reading-differs", fmt::format("{:.0f} V read", *string.row.asfound_v),
                   fmt::format("{:.0f} V computed, within 10 %", string.state.volts),
                   "check lamps, jumpered poles and cable length");
    if (string.row.asfound_a && differs(*string.row.asfound_a, string.loop.current_a))
        string.add("reading-differs", fmt::format("{:.2f} A read", *string.row.asfound_a),
                   fmt::format("{:g} A, within 10 %", string.loop.current_a),
                   "check the unit's setting and the meter");
}

void vet_lengths(const StringUnderVet& string) {
    const LoopPlaces places =
        loop_places(string.vet.city, string.vet.extent, string.loop.string, string.loop.lamps);
    for (std::size_t p = 2; p + 1 < places.size(); ++p) {
        if (!places[p - 1] || !places[p]) continue;
        const double span_m = distance_m(*places[p - 1], *places[p]);
        if (span_m <= kLongSpan_m) continue;
        const Pole& before = string.vet.city.poles[string.loop.lamps[p - 2].place()];
        const Pole& pole = string.vet.city.poles[string.loop.lamps[p - 1].place()];
        string.vet.add("span-long", kPolesTable, pole.from, pole.id,
                       fmt::format("{:.0f} m from {}", span_m, before.id),
                       fmt::format("{:.0f} m at most from lamp to lamp", kLongSpan_m),
                       "check the order, or a pole that is missing");
    }
    const std::vector<double> straight = straight_legs_m(places);
    const double straight_m = std::accumulate(straight.begin(), straight.end(), 0.0);
    if (!string.row.length_m || !(straight_m > 0)) return;
    const double frac = *string.row.length_m / straight_m;
    if (frac >= kShortestLength_frac && frac <= kLongestLength_frac) return;
    string.add("length-odd", fmt::format("length_m {:.0f}", *string.row.length_m),
               fmt::format("{:.0f} m, from lamp to lamp in a straight line, or somewhat more", straight_m),
               "check unit and figure: the whole conductor, return included");
}

/// No cable length in the file: what is shown is the straight line, which is short of the truth.
void vet_length_given(const StringUnderVet& string) {
    if (string.row.length_m || string.loop.lamps.empty()) return;
    Finding note =
        make_finding("length-missing", string.row.from.file, string.row.from.row, string.row.id,
                     "no length_m", "conductor metres of the loop, return included",
                     fmt::format("{:.0f} m taken, straight from lamp to lamp: the true length is more",
                                 string.state.cable_m),
                     kCircuitsTable);
    note.severity = Severity::notice;
    string.vet.findings.push_back(std::move(note));
}

/// Settles the wiring of every series string; each is independent of the others.
std::vector<VetString> settle_wiring(const VetInput& vet) {
    const std::vector<std::vector<PoleIx>> lamps = lamps_by_string(vet.city);
    const StreetIndex streets(vet.city.streets);
    std::vector<VetString> strings;
    for (std::size_t s = 0; s < vet.city.strings.size(); ++s) {
        if (vet.city.strings[s].kind == CircuitKind::parallel) continue;
        strings.emplace_back();
        strings.back().string = StringIx(s);
    }
    tbb::parallel_for(std::size_t{0}, strings.size(), [&](std::size_t i) {
        VetString& string = strings[i];
        const std::size_t s = string.string.place();
        if (vet.city.strings[s].set_aside) return;
        SettledOrder settled = settle_order(vet.city, vet.extent, streets, string.string, lamps[s]);
        string.order = settled.from;
        string.order_confidence_frac = settled.confidence_frac;
        string.wiring = std::move(settled.wiring);
    });
    return strings;
}

void set_state(const City& city, const StringLoop& loop, const StringState& state, VetString& string) {
    string.lamps = state.lamps;
    string.load_kw = state.load_kw;
    string.load_kva = state.load_kva;
    string.volts = state.volts;
    string.cable_m = state.cable_m;
    string.transformer = unit_today(city, loop.string);
    double min_frac = kUsualMinFrac;
    if (string.transformer.is_valid()) {
        const Transformer& unit = city.transformers[string.transformer.place()];
        min_frac = min_frac_of(unit);
        string.tap = tap_for(unit, state.load_kva);
        if (loop_rating_kw(unit) > 0)
            string.loading_frac = state.load_kva / (loop_rating_kw(unit) * string.tap);
    }
    string.verdict = verdict_of(string.transformer.is_valid(), state.lamps, string.loading_frac, min_frac);
}

} // namespace

std::vector<VetString> vet_strings(const VetInput& vet) {
    std::vector<VetString> strings = settle_wiring(vet);
    const City wired = with_wiring(vet.city, strings);
    const std::vector<StringLoop> loops = string_loops(wired, vet.catalog);
    for (VetString& string : strings) {
        const StringLoop& loop = loops[string.string.place()];
        const StringState state = string_state(loop, std::vector<char>(loop.lamps.size(), 1));
        set_state(vet.city, loop, state, string);
        const StringUnderVet under{vet, vet.city.strings[string.string.place()], loop, state, string};
        vet_order_inferred(under);
        vet_load(under);
        vet_volts(under);
        vet_readings(under);
        vet_lengths(under);
        vet_length_given(under);
    }
    return strings;
}

} // namespace unstring
