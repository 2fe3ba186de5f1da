#include "app/command/work_out_string.h"

#include <algorithm>
#include <cmath>
#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_input.h"
#include "model/catalog/cables.h"
#include "model/series/string_load.h"
#include "model/series/units.h"
#include "model/series/verdict.h"

namespace unstring {
namespace {

struct StringCase {
    double current_a = 6.6;
    Cable cable;
    double cable_m = 0, cable_c = kStringCableC, ageing_frac = 0;
    std::vector<double> lamp_w, lamp_pf;
    std::optional<double> rated_kw;
    double min_frac = kUsualMinFrac;
    std::optional<double> cable_kv;
};

/// 14 to 1 as numbers; 1/0 to 4/0 as text, or as 0 to -3.
Cable read_cable(JsonFields& fields) {
    std::string asked = fields.has("cable_awg") ? fields.raw("cable_awg").dump() : "nothing";
    if (asked.size() > 2 && asked.front() == '"') asked = asked.substr(1, asked.size() - 2);
    for (const Cable& cable : default_cables()) {
        const bool is_number = fields.raw("cable_awg").is_number_integer();
        const bool is_it = is_number ? asked == std::to_string(cable.awg) : asked == awg_text(cable.awg);
        if (is_it && cable.metal == Metal::copper) return cable;
    }
    fields.refuse("cable_awg", asked, "14, 12, 10, 8, 6, 4, 3, 2, 1, \"1/0\" .. \"4/0\"",
                  "take a size of the table");
    return usual_string_cable();
}

std::optional<Fault> read_lamps(JsonFields& fields, const std::string& file, StringCase& out) {
    const nlohmann::json& lamps = fields.raw("lamps");
    if (!lamps.is_array()) {
        fields.refuse("lamps", fields.has("lamps") ? "no list" : "nothing", "a list of {\"w\", \"pf\"}",
                      "write [{..}, ..]");
        return fields.fault();
    }
    for (std::size_t i = 0; i < lamps.size(); ++i) {
        JsonFields lamp(lamps[i], file, fmt::format("lamps[{}]", i));
        lamp.only({"w", "pf"});
        out.lamp_w.push_back(lamp.number("w", 0, 100000));
        out.lamp_pf.push_back(lamp.number("pf", 0.01, 1));
        if (lamp.fault()) return lamp.fault();
    }
    return std::nullopt;
}

std::optional<Fault> read_unit(JsonFields& fields, const std::string& file, StringCase& out) {
    if (!fields.has("transformer")) return std::nullopt;
    JsonFields unit(fields.raw("transformer"), file, "transformer");
    unit.only({"rated_kw", "min_frac"});
    out.rated_kw = unit.number("rated_kw", 0.001, 10000);
    out.min_frac = unit.number_or("min_frac", kUsualMinFrac, 0, 1);
    return unit.fault();
}

Expected<StringCase> read_case(const std::string& file) {
    const Expected<nlohmann::json> read = read_json_file(file);
    if (!read) return tl::unexpected(read.error());
    JsonFields fields(*read, file);
    fields.only(
        {"current_a", "cable_awg", "cable_m", "cable_c", "lamps", "ageing_frac", "transformer", "cable_kv"});
    if (fields.fault()) return tl::unexpected(*fields.fault());
    StringCase out;
    out.current_a = fields.number("current_a", 0.1, 1000);
    out.cable = read_cable(fields);
    out.cable_m = fields.number("cable_m", 0, 1e6);
    out.cable_c = fields.number_or("cable_c", kStringCableC, -60, 250);
    out.ageing_frac = fields.number_or("ageing_frac", 0, -0.9, 10);
    out.cable_kv = fields.optional_number("cable_kv", 0.001, 1000);
    if (const auto fault = read_lamps(fields, file, out)) return tl::unexpected(*fault);
    if (const auto fault = read_unit(fields, file, out)) return tl::unexpected(*fault);
    if (fields.fault()) return tl::unexpected(*fields.fault());
    return out;
}

int burning_lamps(const StringCase& given) {
    return static_cast<int>(
        std::count_if(given.lamp_w.begin(), given.lamp_w.end(), [](double w) { return w > 0; }));
}

std::string input_text(const StringCase& given) {
    double watts = 0;
    for (const double w : given.lamp_w) watts += w;
    std::string text = fmt::format(
        "Inputs: {:g} A, {:g} m of AWG {} copper at {:g} C, {} lamps of together {:g} W, of which {} burn",
        given.current_a, given.cable_m, awg_text(given.cable.awg), given.cable_c, given.lamp_w.size(), watts,
        burning_lamps(given));
    if (given.ageing_frac != 0)
        text += fmt::format(", watts and volts x {:g} for ageing", 1 + given.ageing_frac);
    return text + ".\n";
}

std::string load_text(const StringCase& given, const StringLoad& load) {
    const double r = cable_ohm_per_km_at(given.cable, given.cable_c);
    const double km = given.cable_m / 1000;
    std::string text = fmt::format("Cable: R75 = {:.4f} ohm/km, at {:g} C x (1 + 0.00323 ({:g} - 75)) = "
                                   "{:.4f} ohm/km; X = {:.4f} ohm/km; over "
                                   "{:g} km R = {:.4f}, X = {:.4f} ohm.\n",
                                   given.cable.ohm_per_km, given.cable_c, given.cable_c, r,
                                   given.cable.x_ohm_per_km, km, r * km, given.cable.x_ohm_per_km * km);
    text += fmt::format("Cable loss I^2 R = {:.1f} W.\nEach lamp P/I volts in phase and P/I x tan(acos pf) "
                        "lagging; sum with I (R + jX): "
                        "{:.1f} V in phase, {:.1f} V lagging.\n",
                        load.cable_w, load.load_kw * 1000 / given.current_a,
                        load.volts * std::sqrt(std::max(0.0, 1 - load.pf * load.pf)));
    return text + fmt::format("|V| = {:.1f} V; load I Re V = {:.3f} kW, I |V| = {:.3f} kVA, pf {:.3f}.\n",
                              load.volts, load.load_kw, load.load_kva, load.pf);
}

void work_out(const std::string& file, WorkOutAnswer& answer) {
    const Expected<StringCase> given = read_case(file);
    if (!given) {
        answer.fault = given.error();
        return;
    }
    const StringLoad load = string_load(given->current_a, given->cable, given->cable_m, given->cable_c,
                                        given->lamp_w, given->lamp_pf, given->ageing_frac);
    const double loading_frac = given->rated_kw ? load.load_kva / *given->rated_kw : 0;
    const Verdict verdict =
        verdict_of(given->rated_kw.has_value(), burning_lamps(*given), loading_frac, given->min_frac);
    answer.json["volts"] = load.volts;
    answer.json["load_kw"] = load.load_kw;
    answer.json["load_kva"] = load.load_kva;
    answer.json["pf"] = load.pf;
    answer.json["cable_w"] = load.cable_w;
    answer.json["loading_frac"] = nullptr;
    answer.json["verdict"] = text_of(verdict);
    answer.json["primary_pf"] = nullptr;
    answer.steps_text = input_text(*given) + load_text(*given, load);
    if (given->rated_kw) {
        const PrimarySide primary = primary_side(*given->rated_kw, load.load_kw);
        answer.json["loading_frac"] = loading_frac;
        answer.json["primary_pf"] = primary.pf;
        answer.steps_text +=
            fmt::format("Unit of {:g} kW: loading {:.3f}, {} (low under {:g}). Input: S = 1.04 x {:g} / .78 "
                        "= {:.2f} kVA, "
                        "P = {:.3f} + .04 x {:g} = {:.3f} kW, pf {:.3f}.\n",
                        *given->rated_kw, loading_frac, text_of(verdict), given->min_frac, *given->rated_kw,
                        primary.kva, load.load_kw, *given->rated_kw, primary.kw, primary.pf);
    }
    if (given->cable_kv) {
        const bool within = load.volts <= *given->cable_kv * 1000;
        answer.json["within_cable_class"] = within;
        answer.steps_text += fmt::format(
            "Running volts are {} the cable's class of {:g} kV. Open-circuit volts are higher: see the "
            "nameplate.\n",
            within ? "within" : "OVER", *given->cable_kv);
    }
    answer.steps_text += "Source: phasor sum of a series circuit; resistance NFPA 70 chapter 9 table 8 "
                         "(stranded, uncoated copper), "
                         "reactance table 9 (PVC). Input side: moving-coil unit of constant kVA, 4 % fixed "
                         "loss (from memory).\n";
}

} // namespace

void add_work_out_string(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic =
        work_out_app.add_subcommand("string", "volts, load and transformer loading of one series string");
    const auto file = std::make_shared<std::string>();
    topic
        ->add_option("FILE", *file,
                     "JSON: {\"current_a\", \"cable_awg\", \"cable_m\", \"cable_c\": 25, \"lamps\": [{\"w\", "
                     "\"pf\"}], "
                     "\"ageing_frac\": 0, \"transformer\": {\"rated_kw\", \"min_frac\"}, \"cable_kv\"}")
        ->required();
    topic->footer("Example: unstring work-out string string.json\n"
                  "with {\"current_a\": 6.6, \"cable_awg\": 8, \"cable_m\": 2300, \"lamps\": [{\"w\": 188, "
                  "\"pf\": 0.8}], "
                  "\"transformer\": {\"rated_kw\": 10}}");
    topic->callback([file, &answer] { work_out(*file, answer); });
}

} // namespace unstring
