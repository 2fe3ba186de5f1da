#include "geo/ground/crs.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdlib>
#include <string_view>
#include <utility>

#include <fmt/format.h>
#include <proj.h>
#include <proj_experimental.h>

namespace unstring {
namespace {

struct ContextEnd {
    void operator()(PJ_CONTEXT* context) const { proj_context_destroy(context); }
};
struct PjEnd {
    void operator()(PJ* pj) const { proj_destroy(pj); }
};
struct ListEnd {
    void operator()(PJ_OBJ_LIST* list) const { proj_list_destroy(list); }
};
using Context = std::unique_ptr<PJ_CONTEXT, ContextEnd>;
using Pj = std::unique_ptr<PJ, PjEnd>;

constexpr const char* kWgs84 = "EPSG:4326";
constexpr double kSmallStep_deg = 1e-4;
constexpr double kMaxScaleError = 0.01;

Context new_context() {
    Context context(proj_context_create());
    proj_context_set_enable_network(context.get(), 0);
    proj_log_level(context.get(), PJ_LOG_NONE);
    return context;
}

/// "32611" and "epsg:32611" are taken as "EPSG:32611".
std::string spelled(const std::string& crs) {
    const auto is_number = [](std::string_view text) {
        return !text.empty() && text.size() <= 9 &&
               std::all_of(text.begin(), text.end(), [](char c) { return c >= '0' && c <= '9'; });
    };
    if (is_number(crs)) return "EPSG:" + crs;
    if (crs.size() > 5 && is_number(std::string_view(crs).substr(5)) && crs[4] == ':' &&
        (crs.starts_with("epsg") || crs.starts_with("Epsg")))
        return "EPSG:" + crs.substr(5);
    return crs;
}

Fault unknown(const std::string& crs, std::string found) {
    return {FaultCode::crs_unknown,
            {},
            0,
            "crs",
            crs.size() > 80 ? crs.substr(0, 77) + "..." : crs + (found.empty() ? "" : ": ") + found,
            "a coordinate system of the EPSG registry",
            "give --crs EPSG:n"};
}

/// Only codes and WKT: a file name or a PROJ pipeline from outside is never handed on.
bool is_safe_definition(const std::string& crs) {
    if (crs.starts_with("EPSG:") || crs.starts_with("ESRI:") || crs.starts_with("OGC:") ||
        crs.starts_with("IGNF:"))
        return crs.size() < 32;
    for (const char* word :
         {"PROJC", "GEOGC", "PROJCS", "GEOGCS", "COMPD", "COMPOUND", "BOUNDCRS", "GEODCRS"})
        if (crs.starts_with(word)) return true;
    return false;
}

Pj create(PJ_CONTEXT* context, const std::string& crs) {
    const std::string text = spelled(crs);
    if (!is_safe_definition(text)) return nullptr;
    return Pj(proj_create(context, text.c_str()));
}

/// The horizontal part of a compound or bound system.
Pj horizontal(PJ_CONTEXT* context, Pj pj) {
    for (int depth = 0; pj && depth < 4; ++depth) {
        const PJ_TYPE type = proj_get_type(pj.get());
        if (type == PJ_TYPE_BOUND_CRS)
            pj.reset(proj_get_source_crs(context, pj.get()));
        else if (type == PJ_TYPE_COMPOUND_CRS)
            pj.reset(proj_crs_get_sub_crs(context, pj.get(), 0));
        else
            break;
    }
    return pj;
}

std::string code_of(PJ_CONTEXT* context, const PJ* pj) {
    if (const char* code = proj_get_id_code(pj, 0)) {
        const char* authority = proj_get_id_auth_name(pj, 0);
        if (authority != nullptr && std::string_view(authority) == "EPSG")
            return fmt::format("EPSG:{}", code);
    }
    int* confidence = nullptr;
    const std::unique_ptr<PJ_OBJ_LIST, ListEnd> matches(
        proj_identify(context, pj, "EPSG", nullptr, &confidence));
    std::string found;
    if (matches && proj_list_get_count(matches.get()) > 0 && confidence[0] >= 90) {
        const Pj best(proj_list_get(context, matches.get(), 0));
        if (const char* code = best ? proj_get_id_code(best.get(), 0) : nullptr)
            found = fmt::format("EPSG:{}", code);
    }
    proj_int_list_destroy(confidence);
    return found;
}

std::optional<double> unit_of(PJ_CONTEXT* context, const PJ* crs) {
    const Pj axes(proj_crs_get_coordinate_system(context, crs));
    double factor = 0;
    if (!axes || !proj_cs_get_axis_info(context, axes.get(), 0, nullptr, nullptr, nullptr, &factor, nullptr,
                                        nullptr, nullptr))
        return std::nullopt;
    return factor;
}

/// The same projection with metres for its unit, where the registry knows it.
std::string metric_sibling(const std::string& crs) {
    const Context context = new_context();
    const Pj feet = horizontal(context.get(), create(context.get(), crs));
    if (!feet) return {};
    const Pj with_axes(
        proj_crs_alter_cs_linear_unit(context.get(), feet.get(), "metre", 1.0, "EPSG", "9001"));
    const Pj converted(with_axes ? proj_crs_alter_parameters_linear_unit(context.get(), with_axes.get(),
                                                                         "metre", 1.0, "EPSG", "9001", 1)
                                 : nullptr);
    // Without its old name, by which the registry would answer the system in feet again.
    const Pj metres(converted ? proj_alter_name(context.get(), converted.get(), "unknown") : nullptr);
    if (!metres) return {};
    const std::string code = code_of(context.get(), metres.get());
    const auto facts = code.empty() ? Expected<CrsFacts>(tl::unexpected(Fault{})) : crs_facts(code);
    return facts && !facts->is_geographic && facts->unit_m == 1.0 ? code : std::string();
}

struct GridNorth {
    double convergence_deg = 0, scale = 1;
};

/// By a short step along the meridian, on the WGS 84 ellipsoid.
Expected<GridNorth> grid_north(const std::string& crs, MapPoint at) {
    const auto to_lon_lat = CrsTransform::make(crs, kWgs84);
    const auto from_lon_lat = CrsTransform::make(kWgs84, crs);
    if (!to_lon_lat) return tl::unexpected(to_lon_lat.error());
    if (!from_lon_lat) return tl::unexpected(from_lon_lat.error());
    const auto here = (*to_lon_lat)(at.x_m, at.y_m);
    const auto south = here ? (*from_lon_lat)(here->x_m, here->y_m - kSmallStep_deg) : std::nullopt;
    const auto north = here ? (*from_lon_lat)(here->x_m, here->y_m + kSmallStep_deg) : std::nullopt;
    if (!south || !north) return tl::unexpected(unknown(crs, "the point is outside of it"));
    const double lat = here->y_m * kRadPerDeg;
    constexpr double kAxis_m = 6378137.0, kEccentricity2 = 0.00669437999014;
    const double radius_m =
        kAxis_m * (1 - kEccentricity2) / std::pow(1 - kEccentricity2 * std::sin(lat) * std::sin(lat), 1.5);
    const double ground_m = 2 * kSmallStep_deg * kRadPerDeg * radius_m;
    const double dx = north->x_m - south->x_m, dy = north->y_m - south->y_m;
    return GridNorth{-std::atan2(dx, dy) / kRadPerDeg, std::hypot(dx, dy) / ground_m};
}

} // namespace

struct CrsTransform::Inside {
    Context context;
    Pj pj;
};

CrsTransform::CrsTransform(std::unique_ptr<Inside> inside) : inside_(std::move(inside)) {}
CrsTransform::CrsTransform(CrsTransform&&) noexcept = default;
CrsTransform& CrsTransform::operator=(CrsTransform&&) noexcept = default;
CrsTransform::~CrsTransform() = default;

Expected<CrsTransform> CrsTransform::make(const std::string& from, const std::string& to) {
    auto inside = std::make_unique<Inside>();
    inside->context = new_context();
    PJ_CONTEXT* context = inside->context.get();
    const Pj source = horizontal(context, create(context, from));
    const Pj target = horizontal(context, create(context, to));
    if (!source) return tl::unexpected(unknown(from, {}));
    if (!target) return tl::unexpected(unknown(to, {}));
    const Pj raw(proj_create_crs_to_crs_from_pj(context, source.get(), target.get(), nullptr, nullptr));
    if (raw) inside->pj.reset(proj_normalize_for_visualization(context, raw.get()));
    if (!inside->pj) return tl::unexpected(unknown(from, "no way to " + to));
    return CrsTransform(std::move(inside));
}

std::optional<MapPoint> CrsTransform::operator()(double x, double y) const {
    proj_errno_reset(inside_->pj.get());
    const PJ_COORD out = proj_trans(inside_->pj.get(), PJ_FWD, proj_coord(x, y, 0, HUGE_VAL));
    if (!std::isfinite(out.xy.x) || !std::isfinite(out.xy.y)) return std::nullopt;
    return MapPoint{out.xy.x, out.xy.y};
}

Expected<CrsFacts> crs_facts(const std::string& crs) {
    const Context context = new_context();
    const Pj pj = horizontal(context.get(), create(context.get(), crs));
    if (!pj || !proj_is_crs(pj.get())) return tl::unexpected(unknown(crs, {}));
    CrsFacts facts;
    const PJ_TYPE type = proj_get_type(pj.get());
    facts.is_geographic = type == PJ_TYPE_GEOGRAPHIC_2D_CRS || type == PJ_TYPE_GEOGRAPHIC_3D_CRS;
    if (!facts.is_geographic && type != PJ_TYPE_PROJECTED_CRS)
        return tl::unexpected(unknown(crs, "neither projected nor geographic"));
    facts.code = code_of(context.get(), pj.get());
    if (const char* name = proj_get_name(pj.get())) facts.name = name;
    const auto unit = unit_of(context.get(), pj.get());
    if (!unit) return tl::unexpected(unknown(crs, "no axes"));
    facts.unit_m = facts.is_geographic ? 1.0 : *unit;
    double west = 0, south = 0, east = 0, north = 0;
    if (proj_get_area_of_use(context.get(), pj.get(), &west, &south, &east, &north, nullptr) &&
        west >= -360) {
        facts.south_west = {west, south};
        facts.north_east = {east, north};
    }
    return facts;
}

std::string fitting_utm(LonLat place) {
    const double lon = place.lon_deg - 360.0 * std::floor((place.lon_deg + 180.0) / 360.0);
    int zone = std::min(60, static_cast<int>(std::floor((lon + 180.0) / 6.0)) + 1);
    const double lat = place.lat_deg;
    if (lat >= 56 && lat < 64 && lon >= 3 && lon < 12) zone = 32;
    if (lat >= 72 && lon >= 0 && lon < 42) zone = lon < 9 ? 31 : lon < 21 ? 33 : lon < 33 ? 35 : 37;
    return fmt::format("EPSG:{}", (lat < 0 ? 32700 : 32600) + zone);
}

Expected<std::string> metric_crs(const std::string& crs, LonLat place) {
    const auto facts = crs_facts(crs);
    if (!facts) return tl::unexpected(facts.error());
    std::string candidate = facts->code;
    if (!facts->is_geographic && facts->unit_m != 1.0) candidate = metric_sibling(crs);
    if (facts->is_geographic || candidate.empty()) return fitting_utm(place);
    const auto to_candidate = CrsTransform::make(kWgs84, candidate);
    const auto at = to_candidate ? (*to_candidate)(place.lon_deg, place.lat_deg) : std::nullopt;
    const auto scale = at ? scale_factor(candidate, *at) : Expected<double>(tl::unexpected(Fault{}));
    return scale && std::abs(*scale - 1) <= kMaxScaleError ? candidate : fitting_utm(place);
}

Expected<LonLat> lon_lat_of(const std::string& crs, double x, double y) {
    const auto transform = CrsTransform::make(crs, kWgs84);
    if (!transform) return tl::unexpected(transform.error());
    const auto point = (*transform)(x, y);
    if (!point) return tl::unexpected(unknown(crs, fmt::format("{}, {} is outside of it", x, y)));
    return LonLat{point->x_m, point->y_m};
}

Expected<double> convergence_deg(const std::string& crs, MapPoint at) {
    return grid_north(crs, at).map([](const GridNorth& north) { return north.convergence_deg; });
}

Expected<double> scale_factor(const std::string& crs, MapPoint at) {
    return grid_north(crs, at).map([](const GridNorth& north) { return north.scale; });
}

std::string crs_wkt(const std::string& crs) {
    const Context context = new_context();
    const Pj pj = create(context.get(), crs);
    const char* text = pj ? proj_as_wkt(context.get(), pj.get(), PJ_WKT1_GDAL, nullptr) : nullptr;
    return text != nullptr ? text : "";
}

} // namespace unstring
