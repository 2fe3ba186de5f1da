#include "app/command/work_out_horizon.h"

#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_options.h"
#include "geo/ground/height_raster.h"
#include "model/sun/horizon.h"
#include "model/sun/horizon_scan.h"

namespace unstring {
namespace {

struct HorizonOptions {
    std::string raster, at;
    double height_m = 0, reach_m = 120;
    int directions = 72;
};

nlohmann::ordered_json points_json(const ScannedHorizon& horizon) {
    auto points = nlohmann::ordered_json::array();
    const auto size = static_cast<double>(horizon.height_deg.size());
    for (std::size_t i = 0; i < horizon.height_deg.size(); ++i)
        points.push_back({360.0 * static_cast<double>(i) / size, static_cast<double>(horizon.height_deg[i])});
    return points;
}

std::string steps_text(const HorizonOptions& given, double cell_m, const ScannedHorizon& horizon,
                       double frac) {
    std::string text = fmt::format("Inputs: raster {} with cells of {} m, at {}, {} m above the ground "
                                   "there; reach {} m, {} directions.\n"
                                   "Each direction is marched in steps of a quarter cell from {} m away; the "
                                   "height there is bilinear between the four\n"
                                   "nearest cell centres; horizon = atan((height - {}) / distance), the "
                                   "steepest counts, the ground lies level.\n",
                                   given.raster, cell_m, given.at, given.height_m, given.reach_m,
                                   given.directions, cell_m, given.height_m);
    for (std::size_t i = 0; i < horizon.height_deg.size(); ++i)
        text += fmt::format("azimuth {:7.2f}  height {:7.3f}\n",
                            360.0 * static_cast<double>(i) / static_cast<double>(horizon.height_deg.size()),
                            horizon.height_deg[i]);
    text += fmt::format(
        "sky unknown in {} directions (nodata, or beyond the raster's edge): what is known there counts.\n"
        "sky view of a flat panel  {:.6f}\n"
        "Source: sky view after J. Dozier, J. Frew, IEEE Trans. Geosci. Remote Sens. 28 (1990) 963-969.\n",
        horizon.unknown_deg.size(), frac);
    return text;
}

void work_out(const HorizonOptions& given, WorkOutAnswer& answer) {
    const auto at = read_list("--at", given.at, 2, 2, "X,Y in the raster's coordinates, metres");
    if (!at) {
        answer.fault = at.error();
        return;
    }
    answer.fault = out_of_range("--height", given.height_m, 0, 1000, "metres above the ground");
    if (!answer.fault) answer.fault = out_of_range("--reach", given.reach_m, 1, 5000, "metres");
    if (!answer.fault) answer.fault = out_of_range("--directions", given.directions, 4, 3600, "72 is usual");
    if (answer.fault) return;
    const auto raster = open_height_raster(given.raster);
    if (!raster) {
        answer.fault = raster.error();
        return;
    }
    const MapPoint place{(*at)[0], (*at)[1]};
    const double cell_m = (*raster)->cell_m();
    const auto window = (*raster)->window(place, given.reach_m + 2 * cell_m);
    if (!window) {
        answer.fault = window.error();
        return;
    }
    const ScannedHorizon horizon =
        scan_horizon(*window, bounds_of(*window), place, given.height_m, given.reach_m, given.directions);
    const HorizonProfile profile = HorizonProfile::from_directions(horizon.height_deg);
    const double frac = sky_view_frac({&profile, 1}, 0, 0);
    answer.json["horizon"] = points_json(horizon);
    answer.json["sky_view_frac"] = frac;
    answer.json["unknown_deg"] = horizon.unknown_deg;
    answer.steps_text = steps_text(given, cell_m, horizon, frac);
}

} // namespace

void add_work_out_horizon(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic =
        work_out_app.add_subcommand("horizon", "the horizon of a point in a raster of heights above ground");
    const auto given = std::make_shared<HorizonOptions>();
    topic->add_option("--raster", given->raster, "heights above the ground, any raster that GDAL reads")
        ->required();
    topic->add_option("--at", given->at, "X,Y in the raster's coordinates")->required();
    topic->add_option("--height", given->height_m, "of the panel above the ground, m")->required();
    topic->add_option("--reach", given->reach_m, "how far to look, m")->capture_default_str();
    topic->add_option("--directions", given->directions, "how many, from grid north clockwise")
        ->capture_default_str();
    topic->footer("Example: unstring work-out horizon --raster canopy.tif --at 512340,3761200 --height 8");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
