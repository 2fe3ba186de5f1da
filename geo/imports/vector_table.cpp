#include "geo/imports/vector_table.h"

#include <algorithm>
#include <cctype>
#include <cstdint>
#include <filesystem>
#include <memory>
#include <utility>

#include <cpl_conv.h>
#include <cpl_error.h>
#include <fmt/format.h>
#include <ogrsf_frmts.h>

#include "geo/ground/gdal_start.h"
#include "geo/imports/local_file.h"
#include "geo/imports/text_encoding.h"

namespace unstring {
namespace {

constexpr long kMaxFeatures = 5'000'000;
constexpr std::size_t kMaxPoints = 50'000'000;
constexpr std::size_t kMaxCell = 64 * 1024;
constexpr std::uintmax_t kMaxFile = 16ULL << 30U;

struct DatasetEnd {
    void operator()(GDALDataset* dataset) const { GDALClose(dataset); }
};
using Dataset = std::unique_ptr<GDALDataset, DatasetEnd>;

Fault broken(const std::string& file, std::string found, std::string wanted, std::string remedy) {
    return {FaultCode::file_broken, file, 0, {}, std::move(found), std::move(wanted), std::move(remedy)};
}

Dataset open(const std::string& path) {
    start_gdal();
    const char* options[] = {"LIST_ALL_TABLES=NO", nullptr};
    return Dataset(GDALDataset::Open(path.c_str(), GDAL_OF_VECTOR | GDAL_OF_READONLY, vector_drivers(),
                                     options, nullptr));
}

ShapeKind kind_of(OGRwkbGeometryType type) {
    switch (wkbFlatten(OGR_GT_GetLinear(type))) {
    case wkbPoint:
    case wkbMultiPoint:
        return ShapeKind::point;
    case wkbLineString:
    case wkbMultiLineString:
        return ShapeKind::line;
    case wkbPolygon:
    case wkbMultiPolygon:
        return ShapeKind::area;
    default:
        return ShapeKind::none;
    }
}

/// A database view could run any query that its author wrote; only stored tables are read.
bool is_view(GDALDataset& dataset, const std::string& layer) {
    const std::string driver = dataset.GetDriverName();
    if (driver != "GPKG") return false;
    std::string quoted;
    for (const char c : layer) quoted += c == '\'' ? std::string("''") : std::string(1, c);
    OGRLayer* answer = dataset.ExecuteSQL(
        fmt::format("SELECT 1 FROM sqlite_master WHERE name = '{}' AND type = 'view'", quoted).c_str(),
        nullptr, nullptr);
    if (answer == nullptr) return true;
    const bool found = OGRFeatureUniquePtr(answer->GetNextFeature()) != nullptr;
    dataset.ReleaseResultSet(answer);
    return found;
}

std::string lower(std::string text) {
    std::transform(text.begin(), text.end(), text.begin(),
                   [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
    return text;
}

Expected<OGRLayer*> choose_layer(GDALDataset& dataset, const std::string& path, const std::string& name,
                                 ShapeKind wanted, std::vector<std::string>& notes) {
    std::vector<OGRLayer*> usable;
    std::string names;
    for (int i = 0; i < std::min(dataset.GetLayerCount(), 1000); ++i) {
        OGRLayer* layer = dataset.GetLayer(i);
        if (layer == nullptr || is_view(dataset, layer->GetName())) continue;
        usable.push_back(layer);
        names += fmt::format("{}{}", names.empty() ? "" : ", ", layer->GetName());
    }
    if (usable.empty())
        return tl::unexpected(
            broken(path, "no layer that is a stored table", "a layer", "export the layer again"));
    const auto choose = [&](OGRLayer* layer) {
        if (usable.size() > 1)
            notes.push_back(fmt::format("{}: layer \"{}\" of {} read", name, layer->GetName(), names));
        return layer;
    };
    for (OGRLayer* layer : usable)
        if (lower(layer->GetName()) == name) return choose(layer);
    for (OGRLayer* layer : usable)
        if (wanted == ShapeKind::none || kind_of(layer->GetGeomType()) == wanted) return choose(layer);
    return choose(usable.front());
}

/// Collects the points of one geometry, curves drawn as lines.
class ShapeMaker {
public:
    Shape make(const OGRGeometry* geometry) {
        Shape shape;
        if (geometry == nullptr || geometry->IsEmpty()) return shape;
        std::unique_ptr<OGRGeometry> straight;
        if (geometry->hasCurveGeometry()) {
            straight.reset(geometry->getLinearGeometry());
            geometry = straight.get();
        }
        if (geometry == nullptr) return shape;
        shape.kind = kind_of(geometry->getGeometryType());
        if (shape.kind != ShapeKind::none) add(*geometry, shape);
        return shape;
    }
    [[nodiscard]] std::size_t points() const { return points_; }

private:
    void add(const OGRGeometry& geometry, Shape& shape) {
        switch (wkbFlatten(geometry.getGeometryType())) {
        case wkbPoint: {
            const OGRPoint* point = geometry.toPoint();
            if (!point->IsEmpty()) shape.parts.push_back({{point->getX(), point->getY()}});
            ++points_;
            break;
        }
        case wkbLineString:
            add_line(*geometry.toLineString(), shape);
            break;
        case wkbPolygon:
            if (const OGRLinearRing* ring = geometry.toPolygon()->getExteriorRing()) add_line(*ring, shape);
            break;
        case wkbMultiPoint:
        case wkbMultiLineString:
        case wkbMultiPolygon:
            for (const OGRGeometry* part : geometry.toGeometryCollection()) add(*part, shape);
            break;
        default:
            break;
        }
    }

    void add_line(const OGRSimpleCurve& line, Shape& shape) {
        points_ += static_cast<std::size_t>(line.getNumPoints());
        std::vector<Xy> part;
        part.reserve(static_cast<std::size_t>(line.getNumPoints()));
        for (int i = 0; i < line.getNumPoints(); ++i) part.push_back({line.getX(i), line.getY(i)});
        shape.parts.push_back(std::move(part));
    }

    std::size_t points_ = 0;
};

std::string crs_of(const OGRLayer& layer) {
    const OGRSpatialReference* system = const_cast<OGRLayer&>(layer).GetSpatialRef();
    if (system == nullptr || system->IsLocal()) return {};
    const char* authority = system->GetAuthorityName(nullptr);
    const char* code = system->GetAuthorityCode(nullptr);
    if (authority != nullptr && code != nullptr && std::string_view(authority) == "EPSG")
        return fmt::format("EPSG:{}", code);
    char* wkt = nullptr;
    const char* options[] = {"FORMAT=WKT2_2019", nullptr};
    const bool is_written = system->exportToWkt(&wkt, options) == OGRERR_NONE;
    std::string text = is_written && wkt != nullptr ? wkt : "";
    CPLFree(wkt);
    return text;
}

/// The text of one attribute; lists and dates in GDAL's own spelling, numbers in full.
std::string text_of_field(const OGRFeature& feature, int field) {
    if (!feature.IsFieldSetAndNotNull(field)) return {};
    if (feature.GetFieldDefnRef(field)->GetType() == OFTReal)
        return fmt::format("{}", feature.GetFieldAsDouble(field));
    return const_cast<OGRFeature&>(feature).GetFieldAsString(field);
}

class LayerReader {
public:
    LayerReader(Table& table, OGRLayer& layer, const std::string& encoding, std::vector<Finding>& findings)
        : table_(table), layer_(layer), encoding_(encoding), findings_(findings) {
        const OGRFeatureDefn* definition = layer.GetLayerDefn();
        for (int i = 0; i < definition->GetFieldCount(); ++i)
            table.columns.emplace_back(definition->GetFieldDefn(i)->GetNameRef());
        has_shapes_ = layer.GetGeomType() != wkbNone;
    }

    Expected<void> read() {
        layer_.ResetReading();
        CPLErrorReset();
        while (const OGRFeatureUniquePtr feature{layer_.GetNextFeature()}) {
            if (++table_.read > kMaxFeatures || maker_.points() > kMaxPoints)
                return tl::unexpected(broken(table_.file, "more features or points than are read",
                                             fmt::format("at most {} features", kMaxFeatures),
                                             "split the file"));
            if (auto done = add(*feature); !done) return done;
        }
        if (CPLGetLastErrorType() == CE_Failure)
            return tl::unexpected(broken(table_.file, CPLGetLastErrorMsg(),
                                         "a file that can be read to its end", "export the layer again"));
        return {};
    }

private:
    Expected<void> add(const OGRFeature& feature) {
        std::vector<std::string> texts;
        for (int field = 0; field < static_cast<int>(table_.columns.size()); ++field) {
            std::string text = text_of_field(feature, field);
            if (text.size() > kMaxCell) {
                findings_.push_back(make_finding("row-broken", table_.file, table_.read, {},
                                                 "a cell of more than 64 KiB", "a shorter text",
                                                 "mend the feature; it is left out until then", table_.name));
                return {};
            }
            if (!is_utf8(text)) {
                auto decoded = decode_text(std::move(text), encoding_, table_.file);
                if (!decoded) return tl::unexpected(decoded.error());
                if (decoded->is_guessed && !std::exchange(is_guess_said_, true))
                    findings_.push_back(make_finding(
                        "encoding-guessed", table_.file, table_.read, {},
                        fmt::format("read as {}: \"{}\"", decoded->encoding, decoded->sample), "UTF-8",
                        "look at the sample; give --encoding if it is wrong", table_.name));
                text = std::move(decoded->utf8);
            }
            texts.push_back(std::move(text));
        }
        for (std::string& text : texts)
            table_.cells.emplace_back(text.empty()
                                          ? std::string_view()
                                          : std::string_view(table_.pool.emplace_back(std::move(text))));
        table_.lines.push_back(table_.read);
        if (has_shapes_) table_.shapes.push_back(maker_.make(feature.GetGeometryRef()));
        return {};
    }

    Table& table_;
    OGRLayer& layer_;
    std::string encoding_;
    std::vector<Finding>& findings_;
    ShapeMaker maker_;
    bool has_shapes_ = false, is_guess_said_ = false;
};

} // namespace

Expected<Table> read_vector_table(const std::string& path, const std::string& name, ShapeKind wanted,
                                  const std::string& encoding, std::vector<Finding>& findings,
                                  std::vector<std::string>& notes) {
    // A file geodatabase is a folder; everything else is an ordinary file.
    const bool is_folder = path.ends_with(".gdb") && std::filesystem::is_directory(path);
    if (!is_folder)
        if (const auto size = local_file_size(path, kMaxFile); !size) return tl::unexpected(size.error());
    const Dataset dataset = open(path);
    if (!dataset)
        return tl::unexpected(
            broken(path, "a file of no known kind",
                   "CSV, GeoPackage, Shapefile, GeoJSON, FlatGeobuf, KML, GML, MapInfo, GPX, XLSX or ODS",
                   "export the table in one of these"));
    const auto layer = choose_layer(*dataset, path, name, wanted, notes);
    if (!layer) return tl::unexpected(layer.error());
    Table table;
    table.name = name;
    table.file = path;
    if ((*layer)->GetGeomType() != wkbNone) table.crs = crs_of(**layer);
    if (auto done = LayerReader(table, **layer, encoding, findings).read(); !done)
        return tl::unexpected(done.error());
    return table;
}

bool is_raster_file(const std::string& path) {
    if (!local_file_size(path, UINTMAX_MAX)) return false;
    start_gdal();
    return GDALIdentifyDriverEx(path.c_str(), GDAL_OF_RASTER, raster_drivers(), nullptr) != nullptr;
}

} // namespace unstring
