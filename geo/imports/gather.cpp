// Reads all files of one call in the order of their references: tables as text, then the coordinate system of
// all of them together, then records, then what the records say of each other.

#include <algorithm>
#include <array>
#include <cctype>
#include <filesystem>
#include <functional>
#include <list>
#include <utility>

#include <fmt/format.h>

#include "geo/imports/asbuilt_file.h"
#include "geo/imports/catalogue_file.h"
#include "geo/imports/gathered.h"
#include "geo/imports/local_file.h"
#include "geo/imports/project_crs.h"
#include "geo/imports/read_records.h"
#include "geo/imports/references.h"
#include "geo/imports/text_encoding.h"
#include "geo/imports/text_table.h"
#include "geo/imports/vector_table.h"
#include "resources/resources.h"

namespace unstring {
namespace {

struct TableFile {
    const char* name;
    std::string GatherFiles::*path;
    ShapeKind shapes;
};

constexpr std::array kTables = {
    TableFile{"poles", &GatherFiles::poles, ShapeKind::point},
    TableFile{"circuits", &GatherFiles::circuits, ShapeKind::point},
    TableFile{"transformers", &GatherFiles::transformers, ShapeKind::none},
    TableFile{"cutbacks", &GatherFiles::cutbacks, ShapeKind::none},
    TableFile{"services", &GatherFiles::services, ShapeKind::point},
    TableFile{"streets", &GatherFiles::streets, ShapeKind::line},
    TableFile{"canopy", &GatherFiles::canopy, ShapeKind::area},
    TableFile{"obstacles", &GatherFiles::obstacles, ShapeKind::area},
    TableFile{"climate", &GatherFiles::climate, ShapeKind::none},
    TableFile{"prices", &GatherFiles::prices, ShapeKind::none},
    TableFile{"budget", &GatherFiles::budget, ShapeKind::none},
    TableFile{"marks", &GatherFiles::marks, ShapeKind::none},
    TableFile{"asbuilt", &GatherFiles::asbuilt, ShapeKind::none},
};

bool is_text_file(const std::string& path) {
    std::string end = std::filesystem::path(path).extension().string();
    std::transform(end.begin(), end.end(), end.begin(),
                   [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
    return end == ".csv" || end == ".txt" || end == ".tsv" || end == ".epw" || end.empty();
}

PriceBook default_prices() {
    Gathered book;
    auto table = parse_text_table(std::string(resource("prices.csv")), "prices.csv", "prices", book.findings);
    const auto columns = table ? match_columns(*table, {}) : Expected<Columns>(tl::unexpected(table.error()));
    if (!columns) throw std::logic_error("the carried price book: " + fault_text(columns.error()));
    const auto done = read_prices({std::move(*table), *columns, {}}, book);
    if (!done || !book.findings.empty())
        throw std::logic_error("the carried price book has a row that cannot be read");
    return book.prices;
}

Gathered new_city() {
    Gathered city;
    city.catalog = default_catalog();
    city.prices = default_prices();
    return city;
}

class Gathering {
public:
    Gathering(const GatherFiles& files, const Progress& progress, Gathered& out)
        : files_(files), progress_(progress), out_(out) {}

    Expected<void> run() {
        if (!files_.encoding.empty())
            if (auto known = check_encoding(files_.encoding); !known) return known;
        if (!files_.columns.empty()) {
            auto map = read_column_map(files_.columns);
            if (!map) return tl::unexpected(map.error());
            map_ = std::move(*map);
        }
        if (auto done = read_catalogue_file(); !done) return done;
        if (auto done = read_tables(); !done) return done;
        if (auto done = settle_places(); !done) return done;
        if (auto done = read_all_records(); !done) return done;
        resolve_references(out_);
        if (const ReadyTable* asbuilt = find("asbuilt"))
            if (auto done = read_asbuilt(*asbuilt, out_); !done) return done;
        return settle_centre(out_.city);
    }

private:
    [[nodiscard]] const ReadyTable* find(std::string_view name) const {
        const auto at = std::find_if(tables_.begin(), tables_.end(),
                                     [&](const ReadyTable& table) { return table.table.name == name; });
        return at == tables_.end() ? nullptr : &*at;
    }

    Expected<void> read_catalogue_file() {
        if (files_.catalogue.empty()) return {};
        auto catalog = read_catalogue(files_.catalogue, default_catalog());
        if (!catalog) return tl::unexpected(catalog.error());
        out_.catalog = std::move(*catalog);
        return {};
    }

    void forget(const std::string& table) {
        std::erase_if(out_.findings, [&](const Finding& finding) { return finding.table == table; });
        out_.rows.erase(table);
    }

    Expected<void> read_tables() {
        for (const TableFile& each : kTables) {
            const std::string& path = files_.*each.path;
            if (path.empty()) continue;
            if (progress_.is_cancelled()) return tl::unexpected(cancelled());
            forget(each.name);
            if (std::string_view(each.name) == "canopy" && is_raster_file(path)) {
                if (auto done = take_raster(path); !done) return done;
                continue;
            }
            if (auto done = read_table(each, path); !done) return done;
        }
        return {};
    }

    Expected<void> take_raster(const std::string& path) {
        auto fingerprint = content_fingerprint(path);
        if (!fingerprint) return tl::unexpected(fingerprint.error());
        out_.canopy_raster = std::filesystem::absolute(path).lexically_normal().string();
        out_.canopy_fingerprint = std::move(*fingerprint);
        out_.city.canopy.clear();
        return {};
    }

    Expected<void> read_table(const TableFile& each, const std::string& path) {
        auto table = is_text_file(path) ? read_text_table(path, each.name, files_.encoding, out_.findings)
                                        : read_vector_table(path, each.name, each.shapes, files_.encoding,
                                                            out_.findings, out_.notes);
        if (!table) return tl::unexpected(table.error());
        auto columns = match_columns(*table, map_);
        if (!columns) return tl::unexpected(columns.error());
        auto placed = look_at_places(*table, *columns, files_.crs);
        if (!placed) {
            if (!files_.crs.empty() && table->crs.empty())
                return tl::unexpected(Fault{FaultCode::bad_usage,
                                            {},
                                            0,
                                            "--crs",
                                            files_.crs,
                                            "a projected or geographic system of the EPSG registry",
                                            "give --crs EPSG:n"});
            Fault fault = placed.error();
            if (fault.file.empty()) fault.file = path;
            return tl::unexpected(fault);
        }
        tables_.push_back({std::move(*table), std::move(*columns), std::move(*placed)});
        return {};
    }

    Expected<void> settle_places() {
        std::vector<ReadyTable*> tables;
        for (ReadyTable& table : tables_) tables.push_back(&table);
        std::optional<RasterFacts> raster;
        if (!out_.canopy_raster.empty() && !files_.canopy.empty() && find("canopy") == nullptr) {
            auto facts = raster_facts(out_.canopy_raster);
            if (!facts) return tl::unexpected(facts.error());
            raster = std::move(*facts);
        }
        const std::string before = out_.city.crs;
        if (auto done = settle_crs(files_, tables, raster ? &*raster : nullptr, out_); !done) return done;
        if (const ReadyTable* poles = find("poles")) say_swapped(*poles, out_);
        if (raster)
            if (auto done = check_raster(*raster); !done) return done;
        return before.empty() || before == out_.city.crs ? Expected<void>() : move_kept_places(before);
    }

    Expected<void> check_raster(const RasterFacts& raster) {
        if (raster.crs.empty()) {
            out_.notes.push_back(
                "canopy: the raster says no coordinate system; taken to be of the project's");
            return {};
        }
        const auto facts = crs_facts(raster.crs);
        if (!facts) return tl::unexpected(facts.error());
        if (out_.city.crs.empty() || facts->code == out_.city.crs) return {};
        return tl::unexpected(
            Fault{FaultCode::crs_unknown, files_.canopy, 0, "canopy",
                  facts->code.empty() ? facts->name : facts->code, out_.city.crs,
                  fmt::format("warp it: gdalwarp -t_srs {} {} canopy.tif", out_.city.crs, files_.canopy)});
    }

    /// Tables of an earlier call, when the poles of this one changed the project's system.
    Expected<void> move_kept_places(const std::string& before) {
        const auto transform = CrsTransform::make(before, out_.city.crs);
        if (!transform) return tl::unexpected(transform.error());
        const auto move = [&](MapPoint& place) {
            if (const auto moved = (*transform)(place.x_m, place.y_m)) place = *moved;
        };
        for (Pole& pole : out_.city.poles) move(pole.place);
        for (SeriesString& string : out_.city.strings)
            if (string.station) move(*string.station);
        for (ServicePoint& service : out_.city.services) move(service.place);
        for (Street& street : out_.city.streets) std::for_each(street.line.begin(), street.line.end(), move);
        for (CanopyArea& area : out_.city.canopy) std::for_each(area.ring.begin(), area.ring.end(), move);
        for (Obstacle& obstacle : out_.city.obstacles)
            std::for_each(obstacle.ring.begin(), obstacle.ring.end(), move);
        out_.notes.push_back(fmt::format("coordinates: the tables of earlier calls were moved from {} to {}",
                                         before, out_.city.crs));
        return {};
    }

    Expected<void> read_records(const ReadyTable& table) {
        const std::string& name = table.table.name;
        if (name == "poles") return read_poles(table, progress_, out_);
        if (name == "circuits") return read_circuits(table, out_);
        if (name == "transformers") return read_transformers(table, out_);
        if (name == "cutbacks") return read_cutbacks(table, out_);
        if (name == "services") return read_services(table, out_);
        if (name == "streets") return read_streets(table, out_);
        if (name == "obstacles") return read_obstacles(table, out_);
        if (name == "climate") return read_climate(table, out_);
        if (name == "budget") return read_budget(table, out_);
        if (name == "marks") return read_marks(table, out_);
        if (name == "prices") {
            auto done = read_prices(table, out_);
            out_.prices = out_.prices.with_defaults(default_prices());
            return done;
        }
        if (name == "canopy") {
            out_.canopy_raster.clear();
            out_.canopy_fingerprint.clear();
            return read_canopy_areas(table, out_);
        }
        return {}; // asbuilt is compared after the references are settled
    }

    Expected<void> read_all_records() {
        for (const ReadyTable& table : tables_) {
            if (progress_.is_cancelled()) return tl::unexpected(cancelled());
            if (auto done = read_records(table); !done) return done;
        }
        return {};
    }

    static Fault cancelled() { return {FaultCode::cancelled, {}, 0, {}, "a stop by the user", {}, {}}; }

    const GatherFiles& files_;
    const Progress& progress_;
    Gathered& out_;
    ColumnMap map_;
    std::list<ReadyTable> tables_;
};

} // namespace

Expected<Gathered> read_files(const GatherFiles& files, const Gathered* earlier, const Progress& progress) {
    Gathered out = earlier != nullptr ? *earlier : new_city();
    out.marks.clear();
    out.notes.clear();
    if (auto done = Gathering(files, progress, out).run(); !done) return tl::unexpected(done.error());
    progress.at(1);
    return out;
}

} // namespace unstring
