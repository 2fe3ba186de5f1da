#include "geo/imports/project_crs.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <utility>

#include <fmt/format.h>

#include "geo/ground/crs.h"

namespace unstring {
namespace {

constexpr double kSameCity_m = 50'000; ///< two files further apart do not speak of one city

bool has_places(const ReadyTable& table) { return table.placed.kind != Placed::Kind::none; }

std::optional<Xy> middle_of(const ReadyTable& table) {
    return middle_of(table.table, table.columns, table.placed);
}

/// The first table with coordinates, in the order that they are given: the poles where there are poles.
ReadyTable* find_anchor(const std::vector<ReadyTable*>& tables) {
    const auto at = std::find_if(tables.begin(), tables.end(), [](const ReadyTable* table) {
        return has_places(*table) && middle_of(*table);
    });
    return at == tables.end() ? nullptr : *at;
}

Fault crs_missing(const ReadyTable& table) {
    const auto middle = middle_of(table);
    const std::string found =
        middle ? fmt::format("coordinates around {:.1f}, {:.1f} without a coordinate system", middle->x,
                             middle->y)
               : "coordinates without a coordinate system";
    return {FaultCode::crs_unknown, table.table.file,   0, table.placed.x_field, found,
            "a coordinate system",  "give --crs EPSG:n"};
}

struct Donor {
    std::string crs, file;
    Xy middle;
};

std::vector<Donor> donors_of(const std::vector<ReadyTable*>& tables, const GatherFiles& files,
                             const RasterFacts* raster) {
    std::vector<Donor> donors;
    for (const ReadyTable* table : tables)
        if (table->placed.crs_from == "file")
            if (const auto middle = middle_of(*table))
                donors.push_back({table->placed.crs, table->table.file, *middle});
    if (raster != nullptr && !raster->crs.empty())
        donors.push_back({raster->crs, files.canopy, {raster->middle().x_m, raster->middle().y_m}});
    return donors;
}

struct Settler {
    const GatherFiles& files;
    std::vector<ReadyTable*> tables;
    const RasterFacts* raster;
    Gathered& out;

    Expected<void> give(ReadyTable& table, const std::string& crs, const std::string& from) const {
        return set_crs(table.placed, table.columns, crs, from);
    }

    /// A system for a table that has none of its own.
    Expected<void> find_for(ReadyTable& table, const std::string& project_crs) const {
        if (!project_crs.empty()) return give(table, project_crs, out.crs_from);
        for (const Donor& donor : donors_of(tables, files, raster)) {
            if (!lies_near(table, donor)) continue;
            out.notes.push_back(
                fmt::format("{}: coordinate system taken from {}, which lies at the same place",
                            table.table.name, donor.file));
            return give(table, donor.crs, "file");
        }
        return tl::unexpected(crs_missing(table));
    }

    /// Whether the coordinates, read in the donor's system, lie where the donor lies.
    static bool lies_near(const ReadyTable& table, const Donor& donor) {
        Placed placed = table.placed;
        if (!set_crs(placed, table.columns, donor.crs, "file")) return false;
        const auto middle = unstring::middle_of(table.table, table.columns, placed);
        const auto facts = crs_facts(donor.crs);
        return middle && facts && !facts->is_geographic &&
               std::hypot(middle->x - donor.middle.x, middle->y - donor.middle.y) * facts->unit_m <
                   kSameCity_m;
    }

    /// The system in metres that the project is kept in, chosen by the anchor's.
    Expected<std::string> project_crs(const ReadyTable& anchor) const {
        Xy middle = *middle_of(anchor);
        const auto facts = crs_facts(anchor.placed.crs);
        if (!facts) return tl::unexpected(facts.error());
        if (facts->is_geographic && std::abs(middle.y) > 90 && std::abs(middle.x) <= 90)
            std::swap(middle.x, middle.y); // said by say_swapped
        const auto place = lon_lat_of(anchor.placed.crs, middle.x, middle.y);
        if (!place) return tl::unexpected(place.error());
        const auto user =
            files.crs.empty() ? Expected<CrsFacts>(CrsFacts{{}, {}, true, 1, {}, {}}) : crs_facts(files.crs);
        if (!user) return tl::unexpected(user.error());
        if (!user->is_geographic) return metric_crs(files.crs, *place);
        auto crs = metric_crs(anchor.placed.crs, *place);
        // Where the poles' own system will not do, the canopy's saves warping it.
        if (crs && *crs != facts->code && raster != nullptr && !raster->crs.empty())
            if (const auto of_raster = crs_facts(raster->crs);
                of_raster && !of_raster->is_geographic && of_raster->unit_m == 1.0)
                if (auto same = metric_crs(raster->crs, *place)) return same;
        return crs;
    }

    Expected<void> settle() const {
        City& city = out.city;
        const bool has_poles = std::any_of(tables.begin(), tables.end(), [](const ReadyTable* table) {
            return table->table.name == "poles" && has_places(*table);
        });
        ReadyTable* anchor = find_anchor(tables);
        const std::string before = city.crs;
        if (anchor != nullptr && (has_poles || before.empty())) {
            if (anchor->placed.crs.empty())
                if (auto done = find_for(*anchor, before); !done) return done;
            const auto crs = project_crs(*anchor);
            if (!crs) return tl::unexpected(crs.error());
            city.crs = *crs;
            const auto user = files.crs.empty() ? Expected<CrsFacts>(CrsFacts{{}, {}, true, 1, {}, {}})
                                                : crs_facts(files.crs);
            out.crs_from = user && !user->is_geographic ? "user" : anchor->placed.crs_from;
            say(*anchor);
        } else if (before.empty() && !files.crs.empty()) {
            const auto user = crs_facts(files.crs);
            if (user && !user->is_geographic && user->unit_m == 1.0) {
                city.crs = user->code;
                out.crs_from = "user";
            }
        }
        for (ReadyTable* table : tables)
            if (has_places(*table) && table->placed.crs.empty() && middle_of(*table))
                if (auto done = find_for(*table, city.crs); !done) return done;
        return {};
    }

    void say(const ReadyTable& anchor) const {
        const auto of_file = crs_facts(anchor.placed.crs);
        const auto of_project = crs_facts(out.city.crs);
        if (!of_file || !of_project) return;
        const char* from = out.crs_from == "user"   ? "given by the user"
                           : out.crs_from == "file" ? "from the file"
                                                    : "guessed";
        out.notes.push_back(fmt::format("coordinates: {} are of {} {}; the project is in {} {}, metres ({})",
                                        anchor.table.name, of_file->code, of_file->name, out.city.crs,
                                        of_project->name, from));
    }
};

bool is_inside(const CrsFacts& facts, const std::string& crs, double x, double y) {
    constexpr double kMargin_deg = 2;
    const auto at = lon_lat_of(crs, x, y);
    return at && at->lon_deg > facts.south_west.lon_deg - kMargin_deg &&
           at->lon_deg < facts.north_east.lon_deg + kMargin_deg &&
           at->lat_deg > facts.south_west.lat_deg - kMargin_deg &&
           at->lat_deg < facts.north_east.lat_deg + kMargin_deg;
}

/// Degrees of single rows: nearer to the middle of the city the other way round.
void say_swapped_rows(const ReadyTable& from, Xy middle, Gathered& out) {
    const auto x_column = *from.columns.at(from.placed.x_field).column;
    const auto y_column = *from.columns.at(from.placed.y_field).column;
    const auto& table = from.table;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        const auto x = read_number(table.cell(row, x_column), DecimalMark::point);
        const auto y = read_number(table.cell(row, y_column), DecimalMark::point);
        if (!x || !y) continue;
        const double as_is = std::hypot(*x - middle.x, *y - middle.y);
        const double turned = std::hypot(*y - middle.x, *x - middle.y);
        if (as_is < 1 || turned > 1) continue;
        const FieldColumn& id = from.columns.at("pole_id");
        out.findings.push_back(make_finding(
            "place-swapped", table.file, table.lines[row], std::string(table.cell(row, *id.column)),
            fmt::format("{}, {}", *x, *y), fmt::format("about {:.2f}, {:.2f}", middle.x, middle.y),
            "longitude and latitude are the wrong way round: turn them", table.name));
    }
}

} // namespace

Expected<void> settle_crs(const GatherFiles& files, std::vector<ReadyTable*> tables,
                          const RasterFacts* raster, Gathered& out) {
    if (!files.crs.empty() && !crs_facts(files.crs))
        return tl::unexpected(Fault{FaultCode::bad_usage,
                                    {},
                                    0,
                                    "--crs",
                                    files.crs,
                                    "a projected or geographic system of the EPSG registry",
                                    "give --crs EPSG:n"});
    return Settler{files, std::move(tables), raster, out}.settle();
}

void say_swapped(const ReadyTable& from, Gathered& out) {
    const Placed& placed = from.placed;
    const auto middle = middle_of(from);
    if (!middle || (placed.kind != Placed::Kind::columns && placed.kind != Placed::Kind::lon_lat) ||
        !from.columns.has("pole_id"))
        return;
    const auto facts = crs_facts(placed.crs);
    if (!facts) return;
    const bool has_area = facts->south_west.lon_deg != facts->north_east.lon_deg;
    const bool is_turned = facts->is_geographic
                               ? std::abs(middle->y) > 90 && std::abs(middle->x) <= 90
                               : has_area && !is_inside(*facts, placed.crs, middle->x, middle->y) &&
                                     is_inside(*facts, placed.crs, middle->y, middle->x);
    if (is_turned)
        out.findings.push_back(make_finding("place-swapped", from.table.file, 1, {},
                                            fmt::format("{} around {:.5g}, {} around {:.5g}", placed.x_field,
                                                        middle->x, placed.y_field, middle->y),
                                            fmt::format("coordinates of {}", facts->name),
                                            "the columns are the wrong way round: turn them with --columns",
                                            from.table.name));
    else if (facts->is_geographic)
        say_swapped_rows(from, *middle, out);
}

Expected<void> settle_centre(City& city) {
    std::vector<double> x, y;
    for (const Pole& pole : city.poles)
        if (pole.has_place) {
            x.push_back(pole.place.x_m);
            y.push_back(pole.place.y_m);
        }
    if (x.empty() || city.crs.empty()) return {};
    const auto middle = [](std::vector<double>& values) {
        const auto half = values.begin() + static_cast<long>(values.size() / 2);
        std::nth_element(values.begin(), half, values.end());
        return *half;
    };
    const MapPoint at{middle(x), middle(y)};
    const auto centre = lon_lat_of(city.crs, at.x_m, at.y_m);
    if (!centre) return tl::unexpected(centre.error());
    const auto convergence = convergence_deg(city.crs, at);
    if (!convergence) return tl::unexpected(convergence.error());
    city.centre = *centre;
    city.convergence_deg = *convergence;
    return {};
}

} // namespace unstring
