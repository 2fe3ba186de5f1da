#include "geo/exports/plan_layers.h"

#include <algorithm>
#include <cstdlib>
#include <ctime>
#include <filesystem>

#include <cpl_conv.h>
#include <fmt/chrono.h>
#include <fmt/format.h>
#include <gdal_priv.h>
#include <ogr_spatialref.h>
#include <ogrsf_frmts.h>

#include "geo/exports/layer_writer.h"
#include "geo/ground/gdal_start.h"
#include "model/phase/duct_live.h"
#include "model/phase/phase_facts.h"

namespace unstring {
namespace {

struct Source {
    const City& city;
    const Plan& plan;
    const DecideResult& decide;
    const PhaseResult& phase;
    int year_of(PoleIx pole) const {
        return pole.place() < phase.pole_year.size() ? phase.pole_year[pole.place()] : 0;
    }
};

bool write_poles(const Source& source, GDALDataset& file, OGRSpatialReference& crs) {
    LayerWriter layer(file, "poles", wkbPoint, &crs,
                      {{"pole_id", OFTString},
                       {"string_id", OFTString},
                       {"wiring_order", OFTInteger},
                       {"choice", OFTString},
                       {"head", OFTString},
                       {"year", OFTInteger},
                       {"year_by", OFTString},
                       {"lock", OFTString},
                       {"street", OFTString},
                       {"ward", OFTString},
                       {"planned_v", OFTReal},
                       {"cost_keep", OFTReal},
                       {"cost_rewire", OFTReal},
                       {"cost_solar", OFTReal},
                       {"reason", OFTString}});
    for (std::size_t i = 0; i < source.city.poles.size(); ++i) {
        const Pole& pole = source.city.poles[i];
        if (!is_candidate(source.city, pole)) continue;
        const PolePlan& row = source.plan.poles[i];
        layer.begin();
        layer.set("pole_id", pole.id);
        layer.set("string_id", source.city.strings[pole.string.place()].id);
        if (pole.order) layer.set("wiring_order", *pole.order);
        layer.set("choice", std::string(text_of(row.choice)));
        layer.set("head", row.head);
        if (source.year_of(PoleIx(i)) != 0) layer.set("year", source.year_of(PoleIx(i)));
        layer.set("year_by", std::string(text_of(row.year_by)));
        layer.set("lock", std::string(text_of(row.lock)));
        layer.set("street", pole.street);
        layer.set("ward", pole.ward);
        if (const PoleDecision* decision = source.decide.find(PoleIx(i))) {
            if (row.choice == Choice::rewire) layer.set("planned_v", decision->volts);
            constexpr std::array<const char*, 3> kCosts = {"cost_keep", "cost_rewire", "cost_solar"};
            for (std::size_t k = 0; k < kCosts.size(); ++k)
                if (decision->options[k].possible) layer.set(kCosts[k], decision->options[k].cost);
            layer.set("reason", decision->reason);
        }
        layer.point(pole.place);
        if (!layer.end()) return false;
    }
    return layer.is_good();
}

bool write_spans(const Source& source, GDALDataset& file, OGRSpatialReference& crs) {
    LayerWriter layer(file, "spans", wkbLineString, &crs,
                      {{"span_id", OFTInteger},
                       {"kind", OFTString},
                       {"length_m", OFTReal},
                       {"awg", OFTInteger},
                       {"boxes", OFTInteger},
                       {"year", OFTInteger},
                       {"service_id", OFTString},
                       {"pole_id", OFTString},
                       {"cost", OFTReal},
                       {"duct_string_id", OFTString}});
    constexpr std::array<const char*, 7> kKinds = {"trench-verge", "trench-paved", "bore",   "conduit",
                                                   "aerial",       "tap",          "service"};
    const std::vector<int> years = span_years(source.decide, source.plan, source.phase.pole_year);
    for (std::size_t i = 0; i < source.decide.spans.size(); ++i) {
        const CircuitSpan& span = source.decide.spans[i];
        layer.begin();
        layer.set("span_id", span.id);
        layer.set("kind", std::string(kKinds[static_cast<std::size_t>(span.kind)]));
        layer.set("length_m", span.length_m);
        layer.set("awg", span.awg);
        layer.set("boxes", span.boxes);
        if (years[i] != 0) layer.set("year", years[i]);
        if (span.service.is_valid()) layer.set("service_id", source.city.services[span.service.place()].id);
        if (span.pole.is_valid()) layer.set("pole_id", source.city.poles[span.pole.place()].id);
        layer.set("cost", to_dollars(span.cost));
        if (span.duct_string.is_valid())
            layer.set("duct_string_id", source.city.strings[span.duct_string.place()].id);
        layer.line(span.line);
        if (!layer.end()) return false;
    }
    return layer.is_good();
}

/// Last year of work where every lamp of the plan leaves, else 0.
int last_year_of(const Source& source, const std::vector<PoleIx>& lamps) {
    int last = 0;
    for (const PoleIx lamp : lamps) {
        if (!is_candidate(source.city, source.city.poles[lamp.place()])) continue;
        if (source.year_of(lamp) == 0) return 0;
        last = std::max(last, source.year_of(lamp));
    }
    return last;
}

bool write_strings(const Source& source, GDALDataset& file, OGRSpatialReference& crs) {
    LayerWriter layer(file, "strings", wkbLineString, &crs,
                      {{"string_id", OFTString}, {"lamps", OFTInteger}, {"last_year", OFTInteger}});
    const auto lamps = lamps_by_string(source.city);
    for (std::size_t s = 0; s < lamps.size(); ++s) {
        const SeriesString& string = source.city.strings[s];
        if (string.kind != CircuitKind::series || lamps[s].empty()) continue;
        std::vector<MapPoint> loop;
        if (string.station) loop.push_back(*string.station);
        for (const PoleIx lamp : lamps[s])
            if (source.city.poles[lamp.place()].has_place)
                loop.push_back(source.city.poles[lamp.place()].place);
        if (string.station) loop.push_back(*string.station);
        layer.begin();
        layer.set("string_id", string.id);
        layer.set("lamps", static_cast<int>(lamps[s].size()));
        if (const int last = last_year_of(source, lamps[s]); last != 0) layer.set("last_year", last);
        layer.line(loop);
        if (!layer.end()) return false;
    }
    return layer.is_good();
}

bool write_string_years(const Source& source, GDALDataset& file) {
    LayerWriter layer(file, "string_years", wkbNone, nullptr,
                      {{"string_id", OFTString},
                       {"year", OFTInteger},
                       {"lamps", OFTInteger},
                       {"load_kva", OFTReal},
                       {"volts", OFTReal},
                       {"cable_m", OFTReal},
                       {"transformer_id", OFTString},
                       {"tap", OFTReal},
                       {"loading_frac", OFTReal},
                       {"verdict", OFTString}});
    for (const StringYear& each : source.phase.string_years) {
        layer.begin();
        layer.set("string_id", source.city.strings[each.string.place()].id);
        layer.set("year", each.year);
        layer.set("lamps", each.lamps);
        layer.set("load_kva", each.load_kva);
        layer.set("volts", each.volts);
        layer.set("cable_m", each.cable_m);
        if (each.transformer.is_valid())
            layer.set("transformer_id", source.city.transformers[each.transformer.place()].id);
        layer.set("tap", each.tap);
        layer.set("loading_frac", each.loading_frac);
        layer.set("verdict", std::string(text_of(each.verdict)));
        if (!layer.end()) return false;
    }
    return layer.is_good();
}

/// The date that GDAL writes into the file: SOURCE_DATE_EPOCH where it is set, so that the same plan gives
/// the same bytes.
class WrittenDate {
public:
    WrittenDate() {
        const char* epoch = std::getenv("SOURCE_DATE_EPOCH");
        if (epoch == nullptr) return;
        const std::string date =
            fmt::format("{:%Y-%m-%dT%H:%M:%S.000Z}",
                        fmt::gmtime(static_cast<std::time_t>(std::strtoll(epoch, nullptr, 10))));
        CPLSetThreadLocalConfigOption("OGR_CURRENT_DATE", date.c_str());
    }
    ~WrittenDate() { CPLSetThreadLocalConfigOption("OGR_CURRENT_DATE", nullptr); }
    WrittenDate(const WrittenDate&) = delete;
    WrittenDate& operator=(const WrittenDate&) = delete;
};

bool write_all(const Source& source, const std::string& path) {
    GDALDriver* driver = GetGDALDriverManager()->GetDriverByName("GPKG");
    if (driver == nullptr) return false;
    OGRSpatialReference crs;
    if (!source.city.crs.empty() && crs.SetFromUserInput(source.city.crs.c_str()) != OGRERR_NONE)
        return false;
    crs.SetAxisMappingStrategy(OAMS_TRADITIONAL_GIS_ORDER);
    const WrittenDate date;
    GDALDatasetUniquePtr file(driver->Create(path.c_str(), 0, 0, 0, GDT_Unknown, nullptr));
    if (file == nullptr || file->StartTransaction() != OGRERR_NONE) return false;
    const bool is_written = write_poles(source, *file, crs) && write_spans(source, *file, crs) &&
                            write_strings(source, *file, crs) && write_string_years(source, *file);
    const bool is_committed = is_written && file->CommitTransaction() == OGRERR_NONE;
    file.reset(); // what fails while closing shows only in the last error
    return is_committed && CPLGetLastErrorType() < CE_Failure;
}

} // namespace

Expected<std::vector<std::string>> export_layers(const std::string& folder, const City& city,
                                                 const Plan& plan, const DecideResult& decide,
                                                 const PhaseResult& phase) {
    start_gdal();
    const std::string path = (std::filesystem::path(folder) / "plan.gpkg").string();
    const std::string part = (std::filesystem::path(folder) / "plan.part.gpkg").string();
    std::error_code ignored, moved;
    std::filesystem::remove(part, ignored);
    CPLErrorReset();
    const DecideResult built = as_built(decide, phase);
    bool is_whole = write_all({city, plan, built, phase}, part);
    const std::string said = CPLGetLastErrorMsg();
    if (is_whole) {
        std::filesystem::rename(part, path, moved);
        is_whole = !moved;
    }
    if (is_whole) return std::vector<std::string>{path};
    std::filesystem::remove(part, ignored);
    return tl::make_unexpected(Fault{FaultCode::write_failed,
                                     path,
                                     0,
                                     {},
                                     moved          ? moved.message()
                                     : said.empty() ? "a write that stopped"
                                                    : said,
                                     "a file that can be written",
                                     "check the folder and the space left"});
}

} // namespace unstring
