#pragma once
// The results of steps as JSON, for the project file only. An index is its place, or -1.

#include <nlohmann/json.hpp>

#include "model/decide/decide_result.h"
#include "model/solar/shade.h"
#include "model/vet/vet_result.h"

namespace unstring {

template <class Tag>
void to_json(nlohmann::json& json, const Index<Tag>& index) {
    json = index.is_valid() ? static_cast<std::int64_t>(index.value) : std::int64_t{-1};
}
template <class Tag>
void from_json(const nlohmann::json& json, Index<Tag>& index) {
    const auto place = json.get<std::int64_t>();
    index = place < 0 ? Index<Tag>() : Index<Tag>(static_cast<std::size_t>(place));
}
inline void to_json(nlohmann::json& json, const MapPoint& point) { json = {point.x_m, point.y_m}; }
inline void from_json(const nlohmann::json& json, MapPoint& point) {
    point = {json.at(0).get<double>(), json.at(1).get<double>()};
}

NLOHMANN_JSON_SERIALIZE_ENUM(Choice, {{Choice::undecided, ""},
                                      {Choice::keep, "keep"},
                                      {Choice::rewire, "rewire"},
                                      {Choice::solar, "solar"}})
NLOHMANN_JSON_SERIALIZE_ENUM(Purse, {{Purse::capital, "capital"}, {Purse::operating, "operating"}})
NLOHMANN_JSON_SERIALIZE_ENUM(OrderFrom, {{OrderFrom::given, "given"},
                                         {OrderFrom::inferred, "inferred"},
                                         {OrderFrom::partial, "partial"}})
NLOHMANN_JSON_SERIALIZE_ENUM(Verdict, {{Verdict::open, "open"},
                                       {Verdict::over, "over"},
                                       {Verdict::tight, "tight"},
                                       {Verdict::good, "good"},
                                       {Verdict::light, "light"},
                                       {Verdict::low, "low"},
                                       {Verdict::none, "none"}})
NLOHMANN_JSON_SERIALIZE_ENUM(Surface, {{Surface::verge, "verge"}, {Surface::paved, "paved"}})
NLOHMANN_JSON_SERIALIZE_ENUM(SpanKind, {{SpanKind::trench_verge, "trench-verge"},
                                        {SpanKind::trench_paved, "trench-paved"},
                                        {SpanKind::bore, "bore"},
                                        {SpanKind::conduit, "conduit"},
                                        {SpanKind::aerial, "aerial"},
                                        {SpanKind::tap, "tap"},
                                        {SpanKind::service, "service"}})

NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(CashLine, what, year, quantity, unit_price, amount, factor, purse)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(OptionCost, possible, stopped_by, cost, lines)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(PoleDecision, pole, choice, head, options, trench_share, trench_m,
                                   breakeven_trench_m, volts, drop_frac, reason, numbers, sources)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(CircuitSpan, id, parent, pole, service, kind, line, length_m, cost, awg,
                                   boxes, surface, duct_string, duct_from, duct_to, poles_beyond)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(Circuit, service, poles, load_kva, worst_drop_frac, source_a, device_a,
                                   connection_cost)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(DecideResult::Refused, pole, reason)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(HeadAnswer, head, sky_view_frac, shade_score, worst_month, panel_kwh_m2,
                                   supply_kwh, demand_kwh, nights_dark_year, nights_dark_worst_year,
                                   nights_dark_year_new, longest_dark_run, battery_years, eligible, why)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(VetString, string, lamps, order, order_confidence_frac, wiring, load_kw,
                                   load_kva, volts, cable_m, transformer, tap, loading_frac, verdict)

} // namespace unstring
