#include "app/command/work_out_loop.h"

#include <algorithm>
#include <cmath>
#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_input.h"
#include "model/series/energised_loop.h"

namespace unstring {
namespace {

struct LoopCase {
    std::vector<double> legs_m;
    std::vector<char> live;
    std::vector<LoopCutBack> cutbacks;
};

void read_live(JsonFields& fields, LoopCase& out) {
    const auto lamps = static_cast<double>(out.live.size());
    for (const double position : fields.numbers("live", 1, lamps)) {
        if (std::floor(position) != position) {
            fields.refuse("live", fmt::format("{}", position), "whole positions",
                          "give the places of the lamps in wiring order");
            return;
        }
        out.live[static_cast<std::size_t>(position) - 1] = 1;
    }
}

std::optional<Fault> read_cutbacks(JsonFields& fields, const std::string& file, LoopCase& out) {
    if (!fields.has("cutbacks")) return std::nullopt;
    const nlohmann::json& list = fields.raw("cutbacks");
    if (!list.is_array()) {
        fields.refuse("cutbacks", "no list", "a list of {\"a\", \"b\", \"new_cable_m\"}", "write [{..}, ..]");
        return fields.fault();
    }
    const auto last = static_cast<long>(out.legs_m.size());
    for (std::size_t k = 0; k < list.size(); ++k) {
        JsonFields row(list[k], file, fmt::format("cutbacks[{}]", k));
        row.only({"a", "b", "new_cable_m"});
        const long a = row.integer("a", 0, last), b = row.integer("b", 0, last);
        if (a == b)
            row.refuse("b", fmt::format("{}", b), "another position than a",
                       "give the two ends of the splice");
        const double new_cable_m = row.number("new_cable_m", 0, 1e6);
        if (row.fault()) return row.fault();
        out.cutbacks.push_back({static_cast<int>(std::min(a, b)), static_cast<int>(std::max(a, b)),
                                new_cable_m, static_cast<int>(k), true, CutBackKind::pullbox});
    }
    return std::nullopt;
}

Expected<LoopCase> read_case(const std::string& file) {
    const Expected<nlohmann::json> read = read_json_file(file);
    if (!read) return tl::unexpected(read.error());
    JsonFields fields(*read, file);
    fields.only({"legs_m", "live", "cutbacks"});
    LoopCase out;
    out.legs_m = fields.numbers("legs_m", 0, 1e6);
    if (!fields.fault() && out.legs_m.empty())
        fields.refuse("legs_m", "[]", "one metre figure more than lamps", "give every leg of the loop");
    if (fields.fault()) return tl::unexpected(*fields.fault());
    out.live.assign(out.legs_m.size() - 1, 0);
    read_live(fields, out);
    if (fields.fault()) return tl::unexpected(*fields.fault());
    if (const auto fault = read_cutbacks(fields, file, out)) return tl::unexpected(*fault);
    return out;
}

std::string steps_of(const LoopCase& given, const EnergisedLoop& loop) {
    double whole_m = 0;
    for (const double leg_m : given.legs_m) whole_m += leg_m;
    const auto live = std::count(given.live.begin(), given.live.end(), 1);
    std::string text = fmt::format("Inputs: {} lamps, {} live, {} cut-backs; the whole loop is {:g} m.\n",
                                   given.live.size(), live, given.cutbacks.size(), whole_m);
    if (live == 0) text += "No live lamp: nothing is energised.\n";
    for (const int k : loop.used) {
        const LoopCutBack& cutback = given.cutbacks[static_cast<std::size_t>(k)];
        double skipped_m = 0;
        for (int leg = cutback.a; leg < cutback.b; ++leg)
            skipped_m += given.legs_m[static_cast<std::size_t>(leg)];
        text += fmt::format("Cut-back {} from {} to {}: {:g} m new for {:g} m of legs.\n", k, cutback.a,
                            cutback.b, cutback.new_cable_m, skipped_m);
    }
    text += fmt::format("Energised: {:g} m, of which {:g} m new.\n", loop.cable_m, loop.new_cable_m);
    return text + "Method: the shortest walk from station to station over the live lamps in wiring order, in "
                  "which a run whose lamps are "
                  "all off may be skipped by a cut-back; exact, by dynamic programming over the positions.\n";
}

void work_out(const std::string& file, WorkOutAnswer& answer) {
    const Expected<LoopCase> given = read_case(file);
    if (!given) {
        answer.fault = given.error();
        return;
    }
    const EnergisedLoop loop = energised_loop(given->legs_m, given->live, given->cutbacks);
    answer.json["cable_m"] = loop.cable_m;
    answer.json["new_cable_m"] = loop.new_cable_m;
    answer.json["used"] = loop.used;
    answer.steps_text = steps_of(*given, loop);
}

} // namespace

void add_work_out_loop(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic = work_out_app.add_subcommand(
        "loop", "the cable of a string that stays energised; \"used\" counts cut-backs from 0");
    const auto file = std::make_shared<std::string>();
    topic
        ->add_option(
            "FILE", *file,
            "JSON: {\"legs_m\": [n + 1 metres], \"live\": [positions 1..n], \"cutbacks\": [{\"a\", \"b\", "
            "\"new_cable_m\"}]}; positions 0 and n + 1 are the station's terminals")
        ->required();
    topic->footer("Example: unstring work-out loop loop.json\n"
                  "with {\"legs_m\": [100, 35, 35, 20, 35, 35, 100], \"live\": [1, 6], \"cutbacks\": "
                  "[{\"a\": 1, \"b\": 6, \"new_cable_m\": 20}]}");
    topic->callback([file, &answer] { work_out(*file, answer); });
}

} // namespace unstring
