#include "app/command/work_out_drop.h"

#include <algorithm>
#include <map>
#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_input.h"
#include "model/catalog/cables.h"
#include "model/supply/radial.h"

namespace unstring {
namespace {

struct DropCase {
    RadialCase radial;
    std::vector<std::string> ids, parents;
    double conductor_c = 75;
};

/// 14 to 1 as numbers; 1/0 to 4/0 as text, or as 0 to -3.
int read_awg(JsonFields& fields) {
    if (!fields.has("awg") || fields.raw("awg").is_number())
        return static_cast<int>(fields.integer("awg", -3, 14));
    const std::string text = fields.text_or("awg", "");
    for (int awg = -3; awg <= 14; ++awg)
        if (text == awg_text(awg)) return awg;
    fields.refuse("awg", text, "a size such as 8 or \"1/0\"", "write the AWG size");
    return 8;
}

void read_impedance(JsonFields& fields, const Catalog& catalog, double conductor_c, RadialNode& node) {
    if (fields.has("r_ohm")) {
        if (fields.has("awg")) fields.refuse("awg", "awg beside r_ohm", "one of the two", "leave one out");
        node.r_ohm = fields.number("r_ohm", 0, 1e6);
        node.x_ohm = fields.number_or("x_ohm", 0, 0, 1e6);
        return;
    }
    const double km = fields.number("length_m", 0, 1e6) / 1000;
    const int awg = read_awg(fields);
    const std::string metal = fields.text_or("metal", "cu");
    if (metal != "cu" && metal != "al") fields.refuse("metal", metal, "cu or al", "check its spelling");
    const Cable* cable = find_cable(catalog, awg, metal == "al" ? Metal::aluminium : Metal::copper);
    if (cable == nullptr) {
        fields.refuse("awg", fmt::format("{}", awg), "14, 12, 10, 8, 6, 4, 3, 2, 1, 1/0 .. 4/0",
                      "take a size of the table");
        return;
    }
    node.r_ohm = cable_ohm_per_km_at(*cable, conductor_c) * km;
    node.x_ohm = cable->x_ohm_per_km * km;
}

void read_load(JsonFields& fields, int wires, RadialNode& node) {
    if (fields.has("w") && fields.has("a"))
        fields.refuse("a", "a beside w", "one of the two", "leave one out");
    node.watts = fields.number_or("w", 0, 0, 1e7);
    node.amps = fields.number_or("a", 0, 0, 1e5);
    node.pf = fields.number_or("pf", 1, 0.01, 1);
    const std::string leg = fields.text_or("leg", "ab");
    if (leg != "a" && leg != "b" && leg != "ab")
        fields.refuse("leg", leg, "a, b or ab", "check its spelling");
    if (wires == 2 && fields.has("leg") && leg != "ab")
        fields.refuse("leg", leg, "no leg with two wires", "leave it out, or set wires to 3");
    node.leg = leg == "a" ? Leg::a : leg == "b" ? Leg::b : Leg::ab;
}

std::optional<Fault> read_node(const nlohmann::json& object, const std::string& file, std::size_t place,
                               const Catalog& catalog, DropCase& out) {
    JsonFields fields(object, file, fmt::format("nodes[{}]", place));
    fields.only({"id", "parent", "length_m", "awg", "metal", "w", "pf", "a", "leg", "r_ohm", "x_ohm"});
    RadialNode node;
    read_impedance(fields, catalog, out.conductor_c, node);
    read_load(fields, out.radial.wires, node);
    const std::string id = fields.text_or("id", "");
    if (id.empty()) fields.refuse("id", "nothing", "a name of the node", "give each node an id");
    if (std::find(out.ids.begin(), out.ids.end(), id) != out.ids.end())
        fields.refuse("id", id, "an id that stands once", "rename one of the two");
    out.ids.push_back(id);
    out.parents.push_back(fields.text_or("parent", ""));
    out.radial.nodes.push_back(node);
    return fields.fault();
}

std::optional<Fault> join_parents(const std::string& file, DropCase& out) {
    std::map<std::string, int> place_of;
    for (std::size_t i = 0; i < out.ids.size(); ++i) place_of[out.ids[i]] = static_cast<int>(i);
    const auto refused = [&](std::size_t i, std::string wanted) {
        return Fault{FaultCode::value_unreadable,
                     file,
                     0,
                     fmt::format("nodes[{}].parent", i),
                     out.parents[i],
                     std::move(wanted),
                     "each node hangs on another, or on \"\", the source"};
    };
    for (std::size_t i = 0; i < out.ids.size(); ++i) {
        if (out.parents[i].empty()) continue;
        const auto at = place_of.find(out.parents[i]);
        if (at == place_of.end()) return refused(i, "the id of another node");
        out.radial.nodes[i].parent = at->second;
    }
    if (radial_order(out.radial.nodes)) return std::nullopt;
    std::vector<char> seen;
    for (std::size_t i = 0; i < out.ids.size(); ++i) { // name a node that stands on the circle
        seen.assign(out.ids.size(), 0);
        int at = static_cast<int>(i);
        while (at >= 0 && seen[static_cast<std::size_t>(at)] == 0) {
            seen[static_cast<std::size_t>(at)] = 1;
            at = out.radial.nodes[static_cast<std::size_t>(at)].parent;
        }
        if (at >= 0) return refused(static_cast<std::size_t>(at), "a way to the source, no circle");
    }
    return std::nullopt;
}

Expected<DropCase> read_case(const std::string& file) {
    const Expected<nlohmann::json> read = read_json_file(file);
    if (!read) return tl::unexpected(read.error());
    JsonFields fields(*read, file);
    fields.only({"source_v", "wires", "nodes", "conductor_c"});
    DropCase out;
    out.radial.source_v = fields.number("source_v", 1e-3, 1e6);
    out.radial.wires = static_cast<int>(fields.has("wires") ? fields.integer("wires", 2, 3) : 2);
    out.conductor_c = fields.number_or("conductor_c", 75, -60, 250);
    const nlohmann::json& nodes = fields.raw("nodes");
    if (!nodes.is_array() || nodes.empty())
        fields.refuse("nodes", "no list with a node", "a list of nodes", "write [{..}, ..]");
    if (fields.fault()) return tl::unexpected(*fields.fault());
    Catalog catalog;
    catalog.cables = default_cables();
    for (std::size_t i = 0; i < nodes.size(); ++i)
        if (const auto fault = read_node(nodes[i], file, i, catalog, out)) return tl::unexpected(*fault);
    if (const auto fault = join_parents(file, out)) return tl::unexpected(*fault);
    return out;
}

void tell_steps(const DropCase& given, const RadialResult& result, WorkOutAnswer& answer) {
    answer.steps_text =
        fmt::format("Inputs: source {} V, {} wires, {} nodes; conductors at {} C.\n", given.radial.source_v,
                    given.radial.wires, given.ids.size(), given.conductor_c);
    if (!result.converged) {
        answer.steps_text += fmt::format(
            "No rest after {} sweeps: the load is more than the circuit can carry (voltage collapse).\n",
            result.sweeps);
    } else {
        answer.steps_text += fmt::format("Rest (1e-10 V) after {} sweeps.\n", result.sweeps);
        for (std::size_t i = 0; i < given.ids.size(); ++i)
            answer.steps_text +=
                fmt::format("{}: span {:.6f} ohm + j {:.6f} one way, {:.4f} A; {:.6f} V, drop {:.4f} %\n",
                            given.ids[i], given.radial.nodes[i].r_ohm, given.radial.nodes[i].x_ohm,
                            result.span_a[i], result.volts[i], 100 * result.drop_frac[i]);
        answer.steps_text += fmt::format("source {:.6f} A, {:.4f} W, of it losses {:.5f} W\n",
                                         result.source_a, result.source_w, result.loss_w);
    }
    answer.steps_text += "Method: backward/forward sweep, I = conj(S / V) or constant current; two wires: 2 "
                         "Z I a span; three wires: each "
                         "leg Z I, the neutral Z (Ia - Ib).\nResistance: NFPA 70 ch. 9 table 8 (75 C, "
                         "stranded, uncoated); reactance: table 9, PVC.\n";
}

void work_out(const std::string& file, WorkOutAnswer& answer) {
    const Expected<DropCase> given = read_case(file);
    if (!given) {
        answer.fault = given.error();
        return;
    }
    const RadialResult result = solve_radial(given->radial);
    answer.json["nodes"] = nlohmann::ordered_json::array();
    for (std::size_t i = 0; i < given->ids.size(); ++i) {
        nlohmann::ordered_json node;
        node["id"] = given->ids[i];
        node["volts"] = result.converged ? nlohmann::ordered_json(result.volts[i]) : nlohmann::ordered_json();
        node["drop_frac"] =
            result.converged ? nlohmann::ordered_json(result.drop_frac[i]) : nlohmann::ordered_json();
        answer.json["nodes"].push_back(std::move(node));
    }
    const auto number = [&](double value) {
        return result.converged ? nlohmann::ordered_json(value) : nlohmann::ordered_json();
    };
    answer.json["worst_drop_frac"] = number(result.worst_drop_frac);
    answer.json["source_a"] = number(result.source_a);
    answer.json["loss_w"] = number(result.loss_w);
    answer.json["converged"] = result.converged;
    tell_steps(*given, result, answer);
}

} // namespace

void add_work_out_drop(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic = work_out_app.add_subcommand("drop", "volts along a lighting circuit");
    const auto file = std::make_shared<std::string>();
    topic->add_option("FILE", *file, "JSON: source_v, wires, nodes")->required();
    topic->footer("Example: unstring work-out drop circuit.json\n"
                  "  {\"source_v\": 240, \"wires\": 2, \"nodes\": [{\"id\": \"P1\", \"parent\": \"\", "
                  "\"length_m\": 45, \"awg\": 8, \"metal\": \"cu\", "
                  "\"w\": 60, \"pf\": 0.95}]}");
    topic->callback([file, &answer] { work_out(*file, answer); });
}

} // namespace unstring
