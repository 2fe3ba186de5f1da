// Streets, tree crowns and buildings: records whose substance is a shape.

#include <fmt/format.h>

#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

/// One row may hold several parts; each part is a record. Rows without a usable part are `row-broken`.
template <class Keep>
Expected<void> read_shapes(TableReader& in, const ReadyTable& from, ShapeKind kind, std::string_view wanted,
                           Gathered& out, const Keep& keep) {
    if (from.placed.kind != Placed::Kind::shapes)
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    from.table.file,
                                    0,
                                    {},
                                    "a table without geometry",
                                    std::string(wanted),
                                    "give a vector file (GeoPackage, Shapefile, GeoJSON)"});
    const auto place_of = PlaceReader::make(in, from.placed, out.city.crs);
    if (!place_of) return tl::unexpected(place_of.error());
    const std::size_t fewest = kind == ShapeKind::line ? 2 : 3;
    read_rows(in, {}, out, [&] {
        const Shape& shape = from.table.shapes[in.row()];
        bool is_kept = false;
        if (shape.kind == kind)
            for (auto& part : place_of->parts(shape))
                if (part.size() >= fewest) {
                    keep(std::move(part));
                    is_kept = true;
                }
        if (!is_kept)
            in.add_finding("row-broken",
                           shape.kind == kind ? "a shape that cannot be placed" : "no such shape",
                           std::string(wanted), "mend the feature; it is left out until then");
        return is_kept;
    });
    return {};
}

} // namespace

Expected<void> read_streets(const ReadyTable& from, Gathered& out) {
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const TextField name(in, "street"), road_class(in, "road_class");
    const WordField<Surface> surface(in, "surface", "paved or verge",
                                     "asphalt=paved concrete=paved grass=verge unpaved=verge soft=verge");
    const NumberField width_m(in, "width_m", 0, 200), repave_year(in, "repave_year", 1900, 2200);
    out.city.streets.clear();
    return read_shapes(in, from, ShapeKind::line, "lines", out, [&](std::vector<MapPoint> line) {
        out.city.streets.push_back({name.unless_blank(), road_class.unless_blank(),
                                    surface().value_or(Surface::verge), width_m(), repave_year.whole(),
                                    std::move(line), in.from()});
    });
}

Expected<void> read_canopy_areas(const ReadyTable& from, Gathered& out) {
    if (auto has_height = need_column(from, "height_m"); !has_height) return has_height;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const NumberField height_m(in, "height_m", 0, 150);
    const WordField<Leaf> leaf(in, "leaf", "deciduous or evergreen",
                               "broadleaf=deciduous conifer=evergreen coniferous=evergreen");
    const YesNoField is_protected(in, "protected");
    out.city.canopy.clear();
    return read_shapes(in, from, ShapeKind::area, "polygons", out, [&](std::vector<MapPoint> ring) {
        out.city.canopy.push_back({std::move(ring), height_m().value_or(0), leaf().value_or(Leaf::deciduous),
                                   is_protected().value_or(false)});
    });
}

Expected<void> read_obstacles(const ReadyTable& from, Gathered& out) {
    if (auto has_height = need_column(from, "height_m"); !has_height) return has_height;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const NumberField height_m(in, "height_m", 0, 1000);
    out.city.obstacles.clear();
    return read_shapes(in, from, ShapeKind::area, "polygons", out, [&](std::vector<MapPoint> ring) {
        out.city.obstacles.push_back({std::move(ring), height_m().value_or(0)});
    });
}

} // namespace unstring
