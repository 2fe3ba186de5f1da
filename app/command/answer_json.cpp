#include "app/command/answer_json.h"

#include <algorithm>

namespace unstring {
namespace {

// Nothing where a number would not be true: JSON has no NaN.
Json gap_of(double cost, double bound, bool is_feasible) {
    if (!is_feasible || !(cost > 0)) return nullptr;
    return (cost - bound) / cost;
}

Json id_of(const City& city, TransformerIx transformer) {
    return transformer.is_valid() ? Json(city.transformers[transformer.place()].id) : Json(nullptr);
}

Json head_json(const Pole& pole, const HeadAnswer& head) {
    return {{"pole_id", pole.id},
            {"head", head.head},
            {"sky_view_frac", head.sky_view_frac},
            {"shade_score", head.shade_score},
            {"worst_month", head.worst_month},
            {"panel_kwh_m2", head.panel_kwh_m2},
            {"nights_dark_year", head.nights_dark_year},
            {"nights_dark_worst_year", head.nights_dark_worst_year},
            {"nights_dark_year_new", head.nights_dark_year_new},
            {"battery_years", head.battery_years},
            {"eligible", head.eligible},
            {"why", head.why}};
}

Json option_json(const OptionCost& option) {
    Json lines = Json::array();
    for (const CashLine& line : option.lines)
        lines.push_back({{"what", line.what},
                         {"year", line.year},
                         {"quantity", line.quantity},
                         {"unit_price", line.unit_price},
                         {"amount", to_dollars(line.amount)},
                         {"factor", line.factor}});
    return {{"possible", option.possible},
            {"stopped_by", option.stopped_by},
            {"cost", option.cost},
            {"lines", lines}};
}

Json year_json(const PhaseYear& year) {
    Json spares = Json::array();
    for (const SpareCover& spare : year.spares)
        spares.push_back({{"rated_kw", spare.rated_kw},
                          {"output_a", spare.output_a},
                          {"primary_v", spare.primary_v},
                          {"count", spare.count},
                          {"cover_frac", spare.cover_frac}});
    return {{"year", year.year},
            {"money", to_dollars(year.money)},
            {"money_limit", year.money_limit ? Json(*year.money_limit) : Json(nullptr)},
            {"operating", to_dollars(year.operating)},
            {"hours",
             {{"line", year.hours.line},
              {"civil", year.hours.civil},
              {"lighting", year.hours.lighting},
              {"electric", year.hours.electric}}},
            {"poles", {{"rewire", year.rewire}, {"solar", year.solar}}},
            {"series_lamps_left", year.series_lamps_left},
            {"dark_lamp_nights", {{"transformers", year.dark_transformers}, {"cable", year.dark_cable}}},
            {"spares", spares}};
}

Json string_years_json(const City& city, const PhaseResult& phase, int first_year) {
    Json strings = Json::array();
    for (const StringYear& each : phase.string_years) {
        if (each.year < first_year) continue; // today's state stands in vet's answer
        const std::string& id = city.strings[each.string.place()].id;
        if (strings.empty() || strings.back()["string_id"] != id)
            strings.push_back({{"string_id", id}, {"years", Json::array()}});
        strings.back()["years"].push_back({{"year", each.year},
                                           {"lamps", each.lamps},
                                           {"load_kva", each.load_kva},
                                           {"volts", each.volts},
                                           {"cable_m", each.cable_m},
                                           {"transformer_id", id_of(city, each.transformer)},
                                           {"tap", each.tap},
                                           {"loading_frac", each.loading_frac},
                                           {"verdict", text_of(each.verdict)}});
    }
    return strings;
}

Json not_planned(const std::string& why) {
    const OptionCost none{false, why, 0, {}};
    return {{"keep", option_json(none)}, {"rewire", option_json(none)}, {"solar", option_json(none)}};
}

std::string why_not_planned(const City& city, const Pole& pole) {
    if (pole.set_aside || (pole.string.is_valid() && city.strings[pole.string.place()].set_aside))
        return "set aside by vet: mend its record first";
    if (is_parallel(city, pole)) return "already on a parallel lighting circuit";
    if (!pole.string.is_valid()) return "on no string that is known";
    if (!pole.has_place) return "its place is not known";
    if (pole.status != PoleStatus::standing)
        return std::string("no lamp to decide on: ") + text_of(pole.status);
    return "not decided yet: run decide";
}

} // namespace

Json findings_json(const std::vector<Finding>& findings) {
    Json list = Json::array();
    for (const Finding& f : findings)
        list.push_back({{"code", f.code},
                        {"severity", severity_text(f.severity)},
                        {"file", f.file},
                        {"row", f.row},
                        {"record", f.record},
                        {"found", f.found},
                        {"wanted", f.wanted},
                        {"remedy", f.remedy}});
    return list;
}

Json gather_json(const GatherReport& report) {
    Json rows = Json::object();
    for (const auto& [table, count] : report.rows)
        rows[table] = {{"read", count.read}, {"kept", count.kept}, {"set_aside", count.set_aside}};
    return {{"poles", report.poles},
            {"strings", report.strings},
            {"series_poles", report.series_poles},
            {"transformers", report.transformers},
            {"services", report.services},
            {"crs", report.crs},
            {"crs_from", report.crs_from},
            {"rows", rows},
            {"notes", report.notes},
            {"findings", findings_json(report.findings)}};
}

int count_errors(const std::vector<Finding>& findings) {
    return static_cast<int>(std::count_if(findings.begin(), findings.end(),
                                          [](const Finding& f) { return f.severity == Severity::error; }));
}

std::vector<Finding> vetted_findings(const ProjectView& view) {
    const bool is_acknowledged = view.steps[static_cast<std::size_t>(Step::gather)].errors == 0;
    std::vector<Finding> findings;
    for (const Finding& finding : view.gather_findings)
        if (!is_acknowledged || finding.severity != Severity::error) findings.push_back(finding);
    if (view.vet) findings.insert(findings.end(), view.vet->findings.begin(), view.vet->findings.end());
    return findings;
}

int poles_set_aside(const ProjectView& view) {
    const auto is_aside = [&](const Pole& pole) {
        return pole.set_aside || (pole.string.is_valid() && view.city.strings[pole.string.place()].set_aside);
    };
    return static_cast<int>(std::count_if(view.city.poles.begin(), view.city.poles.end(), is_aside)) +
           static_cast<int>(view.pole_rows_not_kept);
}

Json vet_json(const ProjectView& view) {
    const auto findings = vetted_findings(view);
    const auto count = [&](Severity severity) {
        return std::count_if(findings.begin(), findings.end(),
                             [&](const Finding& f) { return f.severity == severity; });
    };
    Json strings = Json::array();
    if (view.vet)
        for (const VetString& each : view.vet->strings)
            strings.push_back({{"string_id", view.city.strings[each.string.place()].id},
                               {"lamps", each.lamps},
                               {"order", text_of(each.order)},
                               {"load_kw", each.load_kw},
                               {"load_kva", each.load_kva},
                               {"volts", each.volts},
                               {"cable_m", each.cable_m},
                               {"transformer_id", id_of(view.city, each.transformer)},
                               {"tap", each.tap},
                               {"loading_frac", each.loading_frac},
                               {"verdict", text_of(each.verdict)},
                               {"order_confidence_frac", each.order_confidence_frac}});
    return {{"errors", count(Severity::error)},
            {"warnings", count(Severity::warning)},
            {"set_aside", poles_set_aside(view)},
            {"findings", findings_json(findings)},
            {"strings", strings}};
}

Json shade_json(const ProjectView& view, bool per_pole) {
    if (!view.shade) return Json::object();
    Json by_head = Json::array();
    int eligible = 0;
    std::vector<std::pair<std::string, int>> counts;
    Json poles = Json::array();
    for (const PoleShade& sky : view.shade->poles) {
        bool any = false;
        for (const HeadAnswer& head : sky.heads) {
            auto at = std::find_if(counts.begin(), counts.end(),
                                   [&](const auto& each) { return each.first == head.head; });
            if (at == counts.end()) at = counts.insert(counts.end(), {head.head, 0});
            at->second += head.eligible ? 1 : 0;
            any = any || head.eligible;
        }
        eligible += any ? 1 : 0;
        if (per_pole && !sky.heads.empty())
            poles.push_back(head_json(view.city.poles[sky.pole.place()],
                                      sky.heads[static_cast<std::size_t>(std::max(sky.best, 0))]));
    }
    for (const auto& [head, count] : counts) by_head.push_back({{"head", head}, {"eligible", count}});
    Json json = {{"poles", view.shade->poles.size()},
                 {"eligible", eligible},
                 {"seconds", view.shade->seconds},
                 {"by_head", by_head}};
    if (per_pole) json["per_pole"] = poles;
    return json;
}

Json decide_json(const ProjectView& view) {
    if (!view.decide) return Json::object();
    const DecideResult& r = *view.decide;
    Json refused = Json::array();
    for (const auto& each : r.marks_refused)
        refused.push_back({{"pole_id", view.city.poles[each.pole.place()].id}, {"reason", each.reason}});
    return {{"keep", r.keep},
            {"rewire", r.rewire},
            {"solar", r.solar},
            {"cost", r.cost},
            {"bound", r.bound},
            {"gap_frac", gap_of(r.cost, r.bound, r.feasible)},
            {"trench_m", r.trench_m},
            {"services_new", r.services_new},
            {"marks_followed", r.marks_followed},
            {"marks_refused", refused},
            {"all_rewire_cost", r.all_rewire_cost},
            {"all_rewire_not_possible", r.all_rewire_not_possible},
            {"all_solar_cost", r.all_solar_cost},
            {"all_solar_not_possible", r.all_solar_not_possible},
            {"greedy_cost", r.greedy_cost},
            {"limits_price", r.limits_price},
            {"decide_year", view.plan.decide_year()},
            {"findings", findings_json(r.findings)},
            {"seconds", r.seconds}};
}

Json phase_json(const ProjectView& view) {
    if (!view.phase) return Json::object();
    const PhaseResult& r = *view.phase;
    Json years = Json::array(), ledger = Json::array(), moves = Json::array();
    for (const PhaseYear& year : r.years) years.push_back(year_json(year));
    for (const LedgerYear& year : r.ledger)
        ledger.push_back({{"year", year.year},
                          {"capital", to_dollars(year.capital)},
                          {"operating", to_dollars(year.operating)},
                          {"factor", year.factor}});
    for (const UnitMove& move : r.moves)
        moves.push_back({{"year", move.year},
                         {"transformer_id", id_of(view.city, move.transformer)},
                         {"from", move.from},
                         {"to", move.to}});
    return {{"years", years},
            {"strings", string_years_json(view.city, r, view.plan.settings.first_year)},
            {"moves", moves},
            {"not_reached", r.not_reached},
            {"cost", r.cost},
            {"bound", r.bound},
            {"gap_frac", gap_of(r.cost, r.bound, r.feasible)},
            {"failures", findings_json(r.failures)},
            {"ledger", ledger},
            {"seconds", r.seconds}};
}

Json hand_out_json(const HandOutReport& report) {
    Json orders = Json::array();
    for (const OrderLine& order : report.orders)
        orders.push_back({{"order_id", order.order_id},
                          {"year", order.year},
                          {"crew", order.crew},
                          {"poles", order.poles},
                          {"hours", order.hours}});
    return {{"files", report.files}, {"orders", orders}};
}

Json why_json(const ProjectView& view, PoleIx pole) {
    const Pole& record = view.city.poles[pole.place()];
    const PolePlan& row = view.plan.poles[pole.place()];
    const PoleDecision* decision = view.decide ? view.decide->find(pole) : nullptr;
    Json json = {{"pole_id", record.id},
                 {"choice", text_of(row.choice)},
                 {"locked", row.lock != Choice::undecided},
                 {"mark", row.mark == Choice::undecided ? Json(nullptr) : Json(text_of(row.mark))}};
    if (decision == nullptr) {
        const std::string why = why_not_planned(view.city, record);
        json.update({{"options", not_planned(why)},
                     {"reason", why},
                     {"numbers", Json::object()},
                     {"sources", Json::array()}});
        return json;
    }
    json["options"] = {{"keep", option_json(decision->options[0])},
                       {"rewire", option_json(decision->options[1])},
                       {"solar", option_json(decision->options[2])}};
    json["reason"] = decision->reason;
    json["numbers"] = decision->numbers;
    json["sources"] = decision->sources;
    json["head"] = decision->head;
    json["year"] = row.year == 0 ? Json(nullptr) : Json(row.year);
    json["trench_m"] = decision->trench_m;
    json["breakeven_trench_m"] = decision->breakeven_trench_m;
    return json;
}

} // namespace unstring
