#include "model/series/string_loop.h"

#include <algorithm>
#include <numeric>
#include <unordered_map>

#include "model/series/lamp_load.h"
#include "model/series/loop_geometry.h"
#include "model/series/string_load.h"
#include "model/series/units.h"

namespace unstring {
namespace {

constexpr double kUsualCurrent_a = 6.6;
constexpr double kUsualCable_kv = 5;
constexpr int kUsualCableAwg = 8;
constexpr double kSamePlace_m = 5;

double median_or(std::vector<double> values, double fallback) {
    if (values.empty()) return fallback;
    const auto middle = values.begin() + static_cast<long>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    return *middle;
}

OrderFrom order_from_of(const City& city, const std::vector<PoleIx>& lamps) {
    const auto is_given = [&](PoleIx lamp) {
        const Pole& pole = city.poles[lamp.place()];
        return pole.order.has_value() && !pole.order_is_inferred;
    };
    const auto given = static_cast<std::size_t>(std::count_if(lamps.begin(), lamps.end(), is_given));
    if (given == lamps.size()) return OrderFrom::given;
    return given == 0 ? OrderFrom::inferred : OrderFrom::partial;
}

/// A unit whose record is set aside still drives its current through the string.
double current_of(const City& city, StringIx string) {
    if (const auto& given = city.strings[string.place()].current_a; given && *given > 0) return *given;
    for (const Transformer& unit : city.transformers) {
        const bool feeds = std::find(unit.strings.begin(), unit.strings.end(), string) != unit.strings.end();
        if (feeds && unit.state == UnitState::in_service && unit.output_a && *unit.output_a > 0)
            return *unit.output_a;
    }
    return kUsualCurrent_a;
}

void add_lamp_loads(const City& city, LampBook& book, StringLoop& loop) {
    std::vector<double> known_w;
    std::vector<LampLoad> loads;
    for (const PoleIx lamp : loop.lamps) {
        loads.push_back(book.load_of(city.poles[lamp.place()]));
        if (loads.back().w) known_w.push_back(*loads.back().w);
    }
    const double stand_in_w = median_or(std::move(known_w), kUsualLampW);
    for (std::size_t i = 0; i < loop.lamps.size(); ++i) {
        const bool is_down = city.poles[loop.lamps[i].place()].status == PoleStatus::down;
        loop.burns.push_back(is_down ? 0 : 1);
        loop.lamp_w.push_back(is_down ? 0 : loads[i].w.value_or(stand_in_w));
        loop.lamp_pf.push_back(loads[i].pf);
    }
}

/// Poles by id that are in the plan: a set-aside record of one of these, at the same place or at none, is the
/// same lamp.
using KeptById = std::unordered_map<std::string, PoleIx>;

bool is_second_record(const City& city, const KeptById& kept, const Pole& pole) {
    const auto at = kept.find(pole.id);
    if (at == kept.end()) return false;
    const Pole& first = city.poles[at->second.place()];
    return !pole.has_place || !first.has_place || distance_m(pole.place, first.place) <= kSamePlace_m;
}

void add_aside_lamps(const City& city, LampBook& book, std::vector<StringLoop>& loops) {
    KeptById kept;
    for (std::size_t i = 0; i < city.poles.size(); ++i)
        if (!city.poles[i].set_aside) kept.try_emplace(city.poles[i].id, PoleIx(i));
    for (std::size_t i = 0; i < city.poles.size(); ++i) {
        const Pole& pole = city.poles[i];
        const bool burns = pole.status == PoleStatus::standing || pole.status == PoleStatus::not_ours;
        if (!pole.set_aside || !pole.string.is_valid() || !burns || is_second_record(city, kept, pole))
            continue;
        StringLoop& loop = loops[pole.string.place()];
        const LampLoad load = book.load_of(pole);
        if (loop.lamps.empty() || !load.w) continue;
        loop.aside.push_back(PoleIx(i));
        loop.aside_w.push_back(*load.w);
        loop.aside_pf.push_back(load.pf);
    }
}

void scale_to(std::vector<double>& legs_m, const std::optional<double>& length_m) {
    const double straight_m = std::accumulate(legs_m.begin(), legs_m.end(), 0.0);
    if (!length_m || !(*length_m > 0) || !(straight_m > 0)) return;
    for (double& leg_m : legs_m) leg_m *= *length_m / straight_m;
}

struct Ground {
    Extent extent;
    StreetIndex streets;
};

StringLoop loop_of(const City& city, const Catalog& catalog, StringIx string, std::vector<PoleIx> lamps,
                   LampBook& book, const Ground& ground) {
    const SeriesString& row = city.strings[string.place()];
    StringLoop loop;
    loop.string = string;
    loop.cable = find_cable(catalog, row.cable_awg.value_or(kUsualCableAwg), Metal::copper);
    if (loop.cable == nullptr) loop.cable = &usual_string_cable();
    loop.cable_kv = row.cable_kv.value_or(kUsualCable_kv);
    if (row.kind == CircuitKind::parallel || row.set_aside || lamps.empty()) {
        loop.legs_m = {0};
        return loop;
    }
    loop.lamps = std::move(lamps);
    loop.current_a = current_of(city, string);
    loop.order_from = order_from_of(city, loop.lamps);
    loop.order_confidence_frac = row.order_confidence_frac;
    add_lamp_loads(city, book, loop);
    const LoopPlaces places = loop_places(city, ground.extent, string, loop.lamps);
    loop.legs_m = straight_legs_m(places);
    scale_to(loop.legs_m, row.length_m);
    loop.far_position = far_position_of(loop.legs_m);
    loop.cutbacks = cutbacks_of_file(city, string, loop.lamps, places);
    const std::vector<LoopCutBack> candidates = cutback_candidates(loop, places, ground.streets);
    loop.cutbacks.insert(loop.cutbacks.end(), candidates.begin(), candidates.end());
    return loop;
}

} // namespace

const char* text_of(OrderFrom value) {
    switch (value) {
    case OrderFrom::given:
        return "given";
    case OrderFrom::inferred:
        return "inferred";
    case OrderFrom::partial:
        return "partial";
    }
    return "given";
}

std::vector<StringLoop> string_loops(const City& city, const Catalog& catalog) {
    std::vector<std::vector<PoleIx>> lamps = lamps_by_string(city);
    const Ground ground{extent_of(city), StreetIndex(city.streets)};
    LampBook book(catalog);
    std::vector<StringLoop> loops;
    for (std::size_t s = 0; s < city.strings.size(); ++s)
        loops.push_back(loop_of(city, catalog, StringIx(s), std::move(lamps[s]), book, ground));
    add_aside_lamps(city, book, loops);
    return loops;
}

} // namespace unstring
