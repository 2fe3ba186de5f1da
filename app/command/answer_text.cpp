#include "app/command/answer_text.h"

#include <algorithm>

#include <fmt/format.h>

#include "app/command/answer_json.h"
#include "model/money/money_text.h"

namespace unstring {
namespace {

// How many findings of one code are written out before the rest is only counted.
constexpr int kShownOfOneCode = 5;

std::string plural(long count, const char* one, const char* many) {
    return fmt::format("{} {}", count, count == 1 ? one : many);
}

std::string gap_text(double cost, double bound, bool is_feasible) {
    if (!is_feasible || !(cost > 0)) return "no gap: the plan breaks a check";
    return fmt::format("at most {:.2f} % above the least possible", 100 * (cost - bound) / cost);
}

std::string limit_text(const std::optional<double>& limit) {
    return limit ? dollars_text(*limit) : std::string("none");
}

std::string finding_line(const Finding& f) {
    std::string where = f.file;
    if (f.row > 0) where += fmt::format(" row {}", f.row);
    if (!f.record.empty()) where += (where.empty() ? "" : ", ") + f.record;
    std::string text =
        fmt::format("  {:<7} {:<20} {}: {}", severity_text(f.severity), f.code, where, f.found);
    if (!f.wanted.empty()) text += fmt::format("; wanted {}", f.wanted);
    if (!f.remedy.empty()) text += fmt::format(". {}", f.remedy);
    return text + "\n";
}

std::string option_text(const char* name, const OptionCost& option) {
    if (!option.possible) return fmt::format("  {:<7} not possible: {}\n", name, option.stopped_by);
    std::string text = fmt::format("  {:<7} {:>12} present value\n", name, dollars_text(option.cost, true));
    for (const CashLine& line : option.lines)
        text += fmt::format("      {}  {:<44} {:>10.2f} x {:>10.4f} = {:>12}  x {:.6f}\n", line.year,
                            line.what, line.quantity, line.unit_price,
                            dollars_text(to_dollars(line.amount), true), line.factor);
    return text;
}

} // namespace

std::string findings_text(const std::vector<Finding>& findings) {
    std::vector<Finding> sorted = findings;
    std::stable_sort(sorted.begin(), sorted.end(), [](const Finding& a, const Finding& b) {
        return std::pair(a.severity, a.code) < std::pair(b.severity, b.code);
    });
    std::string text;
    for (std::size_t i = 0; i < sorted.size();) {
        const auto end = std::find_if(sorted.begin() + static_cast<std::ptrdiff_t>(i), sorted.end(),
                                      [&](const Finding& f) { return f.code != sorted[i].code; });
        const auto count = static_cast<int>(end - (sorted.begin() + static_cast<std::ptrdiff_t>(i)));
        for (int k = 0; k < std::min(count, kShownOfOneCode); ++k)
            text += finding_line(sorted[i + static_cast<std::size_t>(k)]);
        if (count > kShownOfOneCode)
            text += fmt::format("          {} more {}\n", count - kShownOfOneCode, sorted[i].code);
        i += static_cast<std::size_t>(count);
    }
    return text;
}

std::string gather_text(const GatherReport& report) {
    std::string text;
    for (const std::string& note : report.notes) text += "  " + note + "\n";
    text += findings_text(report.findings);
    for (const auto& [table, count] : report.rows)
        text += fmt::format("  {:<13} {:>7} rows read, {} kept, {} set aside\n", table, count.read,
                            count.kept, count.set_aside);
    text +=
        fmt::format("gathered {}, {} of them on {}; {}; {}; coordinates {} (from {})",
                    plural(report.poles, "pole", "poles"), report.series_poles,
                    plural(report.strings, "series string", "series strings"),
                    plural(report.transformers, "RO transformer", "RO transformers"),
                    plural(report.services, "service point", "service points"), report.crs, report.crs_from);
    return text;
}

std::string vet_text(const ProjectView& view) {
    const auto findings = vetted_findings(view);
    std::string text = findings_text(findings);
    if (view.vet) {
        text += fmt::format("  {:<10} {:>5} {:<9} {:>8} {:>8} {:>8}  {:<8} {:>7}  {}\n", "string", "lamps",
                            "order", "kW", "kVA", "V", "unit", "load", "verdict");
        for (const VetString& s : view.vet->strings)
            text += fmt::format(
                "  {:<10} {:>5} {:<9} {:>8.2f} {:>8.2f} {:>8.0f}  {:<8} {:>6.1f}%  {}\n",
                view.city.strings[s.string.place()].id, s.lamps, text_of(s.order), s.load_kw, s.load_kva,
                s.volts, s.transformer.is_valid() ? view.city.transformers[s.transformer.place()].id : "-",
                100 * s.loading_frac, text_of(s.verdict));
    }
    const int errors = count_errors(findings);
    text += fmt::format("vetted: {}, {} in all, {} set aside", plural(errors, "error", "errors"),
                        plural(static_cast<long>(findings.size()), "finding", "findings"),
                        plural(poles_set_aside(view), "pole", "poles"));
    if (errors > 0)
        text += fmt::format(
            ". The next step waits until they are mended, or set aside by: unstring vet {} --set-aside",
            view.path);
    return text;
}

std::string shade_text(const ProjectView& view) {
    const Json json = shade_json(view, false);
    std::string text;
    for (const auto& each : json["by_head"])
        text += fmt::format("  {:<24} stays lit on {} poles\n", each["head"].get<std::string>(),
                            each["eligible"].get<int>());
    return text + fmt::format("shade: {} of {} poles could carry a solar head that stays lit",
                              json["eligible"].get<int>(), json["poles"].get<int>());
}

std::string decide_text(const ProjectView& view) {
    const DecideResult& r = *view.decide;
    std::string text = findings_text(r.findings);
    for (const auto& refused : r.marks_refused)
        text += fmt::format("  mark refused at {}: {}\n", view.city.poles[refused.pole.place()].id,
                            refused.reason);
    text += fmt::format(
        "  all rewired {} ({} poles could not be), all solar {} ({} could not be), pole by pole {}\n",
        dollars_text(r.all_rewire_cost), r.all_rewire_not_possible, dollars_text(r.all_solar_cost),
        r.all_solar_not_possible, dollars_text(r.greedy_cost));
    text += fmt::format(
        "decided at {} prices, before phasing: {} keep, {} rewire, {} solar; {:.0f} m of trench, {}\n",
        view.plan.decide_year(), r.keep, r.rewire, r.solar, r.trench_m,
        plural(r.services_new, "new service", "new services"));
    return text + fmt::format("cost {} present value, bound {}, {}", dollars_text(r.cost),
                              dollars_text(r.bound), gap_text(r.cost, r.bound, r.feasible));
}

std::string phase_text(const ProjectView& view) {
    const PhaseResult& r = *view.phase;
    std::string text = findings_text(r.failures);
    text += fmt::format("  {:<6} {:>12} {:>12} {:>11} {:>7} {:>6} {:>7} {:>7} {:>7} {:>7} {:>7}\n", "year",
                        "money", "limit", "operating", "rewire", "solar", "left", "line h", "civil h",
                        "light h", "elec h");
    for (const PhaseYear& y : r.years)
        text += fmt::format(
            "  {:<6} {:>12} {:>12} {:>11} {:>7} {:>6} {:>7} {:>7.0f} {:>7.0f} {:>7.0f} {:>7.0f}\n", y.year,
            dollars_text(to_dollars(y.money)), limit_text(y.money_limit),
            dollars_text(to_dollars(y.operating)), y.rewire, y.solar, y.series_lamps_left, y.hours.line,
            y.hours.civil, y.hours.lighting, y.hours.electric);
    for (const UnitMove& move : r.moves)
        text += fmt::format("  {}: {} moves from {} to {}\n", move.year,
                            move.transformer.is_valid() ? view.city.transformers[move.transformer.place()].id
                                                        : "a unit",
                            move.from, move.to);
    return text + summary_text(view);
}

std::string summary_text(const ProjectView& view) {
    if (!view.phase) return "no phased plan yet";
    const PhaseResult& r = *view.phase;
    int rewire = 0, solar = 0, keep = 0;
    for (const PolePlan& pole : view.plan.poles) {
        rewire += pole.choice == Choice::rewire ? 1 : 0;
        solar += pole.choice == Choice::solar ? 1 : 0;
        keep += pole.choice == Choice::keep ? 1 : 0;
    }
    std::string text =
        fmt::format("plan \"{}\", {} to {}: {} rewire, {} solar, {} keep, {} not reached by {}\n",
                    view.plan.settings.name, view.plan.settings.first_year, view.plan.last_year(), rewire,
                    solar, keep, r.not_reached, view.plan.last_year());
    text += fmt::format("cost {} present value over {} years at {:.1f} %, bound {}, {}",
                        dollars_text(r.cost, true), view.plan.settings.horizon_years,
                        100 * view.plan.settings.rate, dollars_text(r.bound, true),
                        gap_text(r.cost, r.bound, r.feasible));
    const int errors = count_errors(r.failures);
    if (errors > 0)
        text += fmt::format("\n{} must be mended before hand-out",
                            plural(errors, "failed check", "failed checks"));
    return text;
}

std::string hand_out_text(const HandOutReport& report) {
    std::string text;
    for (const OrderLine& order : report.orders)
        text += fmt::format("  {:<28} {}  {:<9} {:>4} poles {:>7.1f} h\n", order.order_id, order.year,
                            order.crew, order.poles, order.hours);
    text += "files:\n";
    for (const std::string& file : report.files) text += "  " + file + "\n";
    return text + fmt::format("handed out {}",
                              plural(static_cast<long>(report.orders.size()), "work order", "work orders"));
}

std::string why_text(const ProjectView& view, PoleIx pole) {
    const Json json = why_json(view, pole);
    std::string text = fmt::format(
        "pole {}: {}\n{}\n", json["pole_id"].get<std::string>(),
        json["choice"].get<std::string>().empty() ? "no decision" : json["choice"].get<std::string>(),
        json["reason"].get<std::string>());
    if (const PoleDecision* decision = view.decide ? view.decide->find(pole) : nullptr) {
        text += option_text("keep", decision->options[0]) + option_text("rewire", decision->options[1]) +
                option_text("solar", decision->options[2]);
        for (const auto& [name, value] : decision->numbers)
            text += fmt::format("  {} = {:.6g}\n", name, value);
        for (const std::string& source : decision->sources) text += "  source: " + source + "\n";
    }
    text.pop_back();
    return text;
}

} // namespace unstring
