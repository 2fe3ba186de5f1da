// shade: will a solar head stay lit on each pole?

#include "app/steps/project_inside.h"
#include "geo/ground/height_raster.h"
#include "geo/project/input_hash.h"
#include "geo/project/schema.h"
#include "model/solar/shade_city.h"
#include "model/solar/shade_findings.h"

namespace unstring {
namespace {

Fault missing(const std::string& path, std::string what, std::string remedy) {
    return {FaultCode::not_ready, path, 0, "", std::move(what), "", std::move(remedy)};
}

Expected<void> check_heads(const Catalog& catalog, const std::vector<std::string>& heads) {
    for (const std::string& head : heads)
        if (find_head(catalog, head) == nullptr) {
            std::string known;
            for (const Head& each : catalog.heads) known += (known.empty() ? "" : ", ") + each.head;
            return tl::make_unexpected(Fault{FaultCode::bad_usage, "", 0, "--head", head, "one of " + known,
                                             "Name a head of the catalogue"});
        }
    return {};
}

std::string joined(const std::vector<std::string>& heads) {
    std::string text;
    for (const std::string& head : heads) text += (text.empty() ? "" : "\n") + head;
    return text;
}

} // namespace

Expected<void> OpenProject::run_shade(const std::vector<std::string>& heads, const Progress& progress) {
    Inside& inside = *inside_;
    if (auto may = inside.may_write(); !may) return may;
    if (auto ready = inside.ready_for(Step::shade); !ready) return ready;
    if (!inside.tables.climate)
        return tl::make_unexpected(
            missing(inside.path, "no climate was gathered",
                    "Gather it: unstring gather " + inside.path + " --climate climate.csv"));
    if (inside.tables.catalog.heads.empty())
        return tl::make_unexpected(
            missing(inside.path, "the catalogue has no solar heads", "Gather a catalogue with heads"));
    if (auto good = check_heads(inside.tables.catalog, heads); !good) return good;
    const std::string hash = inside.hash_of(Step::shade, heads);
    const StepState& now = inside.view->steps[static_cast<std::size_t>(Step::shade)];
    if (inside.shade && now.standing == StepStanding::up_to_date && inside.stored_hash(Step::shade) == hash)
        return {}; // nothing is stale

    std::unique_ptr<HeightSource> heights;
    if (!inside.tables.canopy_raster.empty()) {
        auto opened = open_height_raster(inside.tables.canopy_raster);
        if (!opened) return tl::make_unexpected(opened.error());
        heights = std::move(*opened);
    }
    auto result = shade_city({inside.city, inside.tables.catalog, *inside.tables.climate, heights.get(),
                              inside.plan.settings.nights_goal, heads},
                             progress);
    if (!result) return tl::make_unexpected(result.error());
    const auto findings = shade_findings(inside.city, *result);
    auto written = inside.database->transaction([&] {
        set_meta_value(*inside.database, "shade_heads", joined(heads));
        write_shade(*inside.database, inside.city, *result, findings, hash);
    });
    if (!written) return written;
    inside.shade = std::move(*result);
    inside.shade_findings = findings;
    inside.show();
    return {};
}

} // namespace unstring
