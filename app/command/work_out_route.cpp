#include "app/command/work_out_route.h"

#include <algorithm>
#include <cctype>
#include <cmath>
#include <memory>
#include <utility>

#include <fmt/format.h>

#include "geo/imports/numbers.h"
#include "geo/imports/text_table.h"
#include "model/series/route.h"

namespace unstring {
namespace {

constexpr std::size_t kMostPoints = 3000;
constexpr double kFarthest = 1e9;

struct RouteOptions {
    std::string file;
    bool is_closed = false;
};

bool is_name(const std::string& column, char name) {
    return column.size() == 1 && std::tolower(static_cast<unsigned char>(column[0])) == name;
}

/// The columns x and y by their names, else the first two.
std::pair<std::size_t, std::size_t> columns_of(const Table& table) {
    std::size_t x = table.columns.size(), y = x;
    for (std::size_t i = 0; i < table.columns.size(); ++i) {
        if (is_name(table.columns[i], 'x')) x = i;
        if (is_name(table.columns[i], 'y')) y = i;
    }
    return x < table.columns.size() && y < table.columns.size() ? std::pair(x, y)
                                                                : std::pair<std::size_t, std::size_t>(0, 1);
}

Fault bad_row(const std::string& file, long row, std::string field, std::string found) {
    return {FaultCode::value_unreadable,       file, row, std::move(field), std::move(found), "a number",
            "mend the cell, or delete the row"};
}

Expected<std::vector<MapPoint>> read_points(const std::string& file) {
    std::vector<Finding> findings;
    const Expected<Table> table = read_text_table(file, "points", {}, findings);
    if (!table) return tl::unexpected(table.error());
    for (const Finding& finding : findings)
        if (finding.code == "row-broken")
            return tl::unexpected(Fault{FaultCode::file_broken,
                                        file,
                                        finding.row,
                                        {},
                                        finding.found,
                                        finding.wanted,
                                        finding.remedy});
    if (table->columns.size() < 2)
        return tl::unexpected(Fault{FaultCode::column_missing, file, 1, "y", "one column",
                                    "two columns, x and y", "give both coordinates"});
    const auto [x, y] = columns_of(*table);
    DecimalEvidence evidence;
    for (std::size_t row = 0; row < table->rows(); ++row) {
        evidence.add(table->cell(row, x));
        evidence.add(table->cell(row, y));
    }
    const DecimalMark mark = judge_mark(evidence, evidence, table->delimiter);
    std::vector<MapPoint> points;
    // A first line of numbers is no heading but the first point; of two alike the reader keeps one, with a
    // finding.
    const bool is_y_alike = table->columns[y].empty() && !findings.empty();
    const auto first_x = read_number(table->columns[x], mark);
    const auto first_y = is_y_alike ? first_x : read_number(table->columns[y], mark);
    if (first_x && first_y) points.push_back({*first_x, *first_y});
    for (std::size_t row = 0; row < table->rows(); ++row) {
        const auto at_x = read_number(table->cell(row, x), mark),
                   at_y = read_number(table->cell(row, y), mark);
        if (!at_x || std::abs(*at_x) > kFarthest)
            return tl::unexpected(bad_row(file, table->lines[row], "x", std::string(table->cell(row, x))));
        if (!at_y || std::abs(*at_y) > kFarthest)
            return tl::unexpected(bad_row(file, table->lines[row], "y", std::string(table->cell(row, y))));
        points.push_back({*at_x, *at_y});
    }
    if (points.empty() || points.size() > kMostPoints)
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    file,
                                    0,
                                    {},
                                    fmt::format("{} points", points.size()),
                                    fmt::format("1 to {} points", kMostPoints),
                                    "give fewer, or one at the least"});
    return points;
}

std::string steps_of(const RouteOptions& given, const std::vector<MapPoint>& points, const Route& route) {
    std::string text = fmt::format(
        "Inputs: {} points of {}, straight distances; {}.\n", points.size(), given.file,
        given.is_closed ? "closed, back to the first point" : "from the first point, ending anywhere");
    for (std::size_t i = 1; i < route.order.size() && i <= 20; ++i) {
        const MapPoint a = points[static_cast<std::size_t>(route.order[i - 1])],
                       b = points[static_cast<std::size_t>(route.order[i])];
        text += fmt::format("{} to {}: {:.3f}\n", route.order[i - 1], route.order[i], distance_m(a, b));
    }
    if (route.order.size() > 21) text += fmt::format(".. and {} legs more\n", route.order.size() - 21);
    text += fmt::format("Length: {:.3f}\n", route.length_m);
    return text + (points.size() <= kExactStops
                       ? "Method: exact, the dynamic programme of Held and Karp (1962).\n"
                       : "Method: 2-opt and Or-opt on neighbour lists, iterated with local double bridges: "
                         "good, not "
                         "proved best.\n");
}

void work_out(const RouteOptions& given, WorkOutAnswer& answer) {
    const Expected<std::vector<MapPoint>> points = read_points(given.file);
    if (!points) {
        answer.fault = points.error();
        return;
    }
    const DistanceTable distances = straight_distances(*points);
    const Route route = given.is_closed ? closed_route(distances) : open_route(distances);
    answer.json["length"] = route.length_m;
    answer.json["order"] = route.order;
    answer.steps_text = steps_of(given, *points, route);
}

} // namespace

void add_work_out_route(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic = work_out_app.add_subcommand(
        "route", "the shortest way over points; \"order\" counts the file's points from 0");
    const auto given = std::make_shared<RouteOptions>();
    topic
        ->add_option("FILE", given->file,
                     "CSV with columns x and y, one point a line; the first is the start")
        ->required();
    topic->add_flag("--closed", given->is_closed, "back to the first point (default: open, ending anywhere)");
    topic->footer("Example: unstring work-out route stops.csv --closed");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
