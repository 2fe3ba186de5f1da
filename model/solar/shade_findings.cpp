#include "model/solar/shade_findings.h"

#include <algorithm>

#include <fmt/format.h>

#include "model/solar/pole_horizon.h"

namespace unstring {
namespace {

bool has_eligible(const PoleShade& shade) {
    return std::any_of(shade.heads.begin(), shade.heads.end(),
                       [](const HeadAnswer& head) { return head.eligible; });
}

bool is_all_unknown(const PoleShade& shade) { return shade.unknown_deg.size() == kDirections; }

Finding sky_unknown(const Pole& pole, const PoleShade& shade) {
    return make_finding(
        "sky-unknown", pole.from.file, pole.from.row, pole.id,
        is_all_unknown(shade)
            ? std::string("no heights of trees or buildings around the pole")
            : fmt::format("no heights in {} of {} directions", shade.unknown_deg.size(), kDirections),
        "heights of canopy and buildings around every pole",
        "give a canopy raster that reaches past the pole; until then its sky counts as open there", "poles");
}

Finding whole_city_unknown(std::size_t poles) {
    return make_finding("sky-unknown", {}, 0, "all poles",
                        fmt::format("no canopy and no obstacles, {} poles", poles),
                        "heights of canopy and buildings",
                        "gather --canopy and --obstacles; until then every sky counts as open", "poles");
}

Finding attachments(const Pole& pole) {
    return make_finding("attachments", pole.from.file, pole.from.row, pole.id, pole.attachments,
                        "a pole that carries the head alone",
                        "check the wind area of head and attachments together before a head is ordered",
                        "poles");
}

} // namespace

std::vector<Finding> shade_findings(const City& city, const ShadeResult& shade) {
    std::vector<Finding> findings;
    const bool is_whole_city =
        !shade.poles.empty() && std::all_of(shade.poles.begin(), shade.poles.end(), is_all_unknown);
    if (is_whole_city) findings.push_back(whole_city_unknown(shade.poles.size()));
    for (const PoleShade& each : shade.poles) {
        const Pole& pole = city.poles[each.pole.place()];
        if (!is_whole_city && !each.unknown_deg.empty()) findings.push_back(sky_unknown(pole, each));
        if (!pole.attachments.empty() && has_eligible(each)) findings.push_back(attachments(pole));
    }
    return findings;
}

} // namespace unstring
