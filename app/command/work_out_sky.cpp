#include "app/command/work_out_sky.h"

#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_options.h"
#include "geo/imports/numbers.h"
#include "geo/imports/text_table.h"
#include "model/sun/horizon.h"
#include "model/sun/transposition.h"

namespace unstring {
namespace {

struct SkyOptions {
    std::string file;
    double tilt_deg = 0, bearing_deg = 180;
};

Expected<std::size_t> column_of(const Table& table, std::string_view wanted) {
    for (std::size_t i = 0; i < table.columns.size(); ++i)
        if (table.columns[i] == wanted) return i;
    return tl::unexpected(Fault{FaultCode::column_missing, table.file, 1, std::string(wanted),
                                "no such column", "azimuth_deg,height_deg",
                                "name the two columns in the first line"});
}

DecimalMark mark_of(const Table& table, std::size_t column) {
    DecimalEvidence evidence;
    for (std::size_t row = 0; row < table.rows(); ++row) evidence.add(table.cell(row, column));
    return judge_mark(evidence, evidence, table.delimiter);
}

Expected<std::vector<double>> numbers_of(const Table& table, std::string_view name, double low, double high) {
    const auto column = column_of(table, name);
    if (!column) return tl::unexpected(column.error());
    const DecimalMark mark = mark_of(table, *column);
    std::vector<double> values;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        const auto value = read_number(table.cell(row, *column), mark);
        if (!value || *value < low || *value > high)
            return tl::unexpected(Fault{FaultCode::value_unreadable, table.file, table.lines[row],
                                        std::string(name), std::string(table.cell(row, *column)),
                                        fmt::format("{} to {}", low, high), "degrees, one point a line"});
        values.push_back(*value);
    }
    return values;
}

Expected<HorizonProfile> read_horizon(const std::string& path) {
    std::vector<Finding> findings;
    const auto table = read_text_table(path, "horizon", {}, findings);
    if (!table) return tl::unexpected(table.error());
    if (!findings.empty())
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    path,
                                    findings[0].row,
                                    {},
                                    findings[0].found,
                                    findings[0].wanted,
                                    findings[0].remedy});
    const auto azimuths = numbers_of(*table, "azimuth_deg", -360, 360);
    if (!azimuths) return tl::unexpected(azimuths.error());
    const auto heights = numbers_of(*table, "height_deg", -90, 90);
    if (!heights) return tl::unexpected(heights.error());
    if (azimuths->empty())
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    path,
                                    0,
                                    {},
                                    "no points",
                                    "one point or more",
                                    "an open horizon is one point of height 0"});
    std::vector<HorizonPoint> points;
    for (std::size_t i = 0; i < azimuths->size(); ++i) points.push_back({(*azimuths)[i], (*heights)[i]});
    return HorizonProfile(std::move(points));
}

void work_out(const SkyOptions& given, WorkOutAnswer& answer) {
    answer.fault = out_of_range("--tilt", given.tilt_deg, 0, 180, "degrees from lying flat");
    if (!answer.fault)
        answer.fault =
            out_of_range("--bearing", given.bearing_deg, -360, 360, "degrees, clockwise from north");
    if (answer.fault) return;
    const auto horizon = read_horizon(given.file);
    if (!horizon) {
        answer.fault = horizon.error();
        return;
    }
    const double frac = sky_view_frac({&*horizon, 1}, given.tilt_deg, given.bearing_deg);
    answer.json["sky_view_frac"] = frac;
    answer.steps_text = fmt::format(
        "Inputs: {} points, tilt {} deg, bearing of the downward tilt {} deg.\n"
        "Heights are linear between the points and round from the last to the first; below 0 counts as 0.\n"
        "sky view = 1/360 sum over the azimuth a of [cos b sin2 H + sin b cos(a - A) (H - sin H cos H)] da, "
        "H = 90 - height,\n"
        "the height never below the panel's own plane; steps of 0.02 deg or less, cut at every point.\n"
        "sky view                     {:.6f}\n"
        "the same under an open sky   (1 + cos b) / 2 = {:.6f}\n"
        "Source: J. Dozier, J. Frew, IEEE Trans. Geosci. Remote Sens. 28 (1990) 963-969, eq. 7b.\n",
        horizon->points().size(), given.tilt_deg, given.bearing_deg, frac, even_sky_frac(given.tilt_deg));
}

} // namespace

void add_work_out_sky(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic =
        work_out_app.add_subcommand("sky", "the share of the sky that a panel sees over a horizon");
    const auto given = std::make_shared<SkyOptions>();
    topic->add_option("file", given->file, "points of the horizon: azimuth_deg,height_deg")->required();
    topic->add_option("--tilt", given->tilt_deg, "of the panel, 0 = lying flat")->capture_default_str();
    topic->add_option("--bearing", given->bearing_deg, "of its downward tilt, clockwise from north")
        ->capture_default_str();
    topic->footer("Example: unstring work-out sky horizon.csv --tilt 15 --bearing 180");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
