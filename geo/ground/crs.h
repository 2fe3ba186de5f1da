#pragma once
// Coordinate systems: the only place that talks to PROJ. Axis order is settled here once: x east or
// longitude, y north or latitude, whatever the authority's own order is. No grid is ever fetched over a
// network.

#include <memory>
#include <optional>
#include <string>

#include "model/fault.h"
#include "model/quantities.h"

namespace unstring {

struct CrsFacts {
    std::string code; ///< "EPSG:n"; empty where the definition has no code
    std::string name;
    bool is_geographic = false;
    double unit_m = 1;             ///< metres per unit of a projected system (0.3048006.. for US survey feet)
    LonLat south_west, north_east; ///< area of use; all zero where none is stated
};

/// @param crs  "EPSG:n" (or "n"), or WKT as a file carries it
/// @fault crs_unknown
[[nodiscard]] Expected<CrsFacts> crs_facts(const std::string& crs);

/// From one system to another. One instance serves one thread at a time.
class CrsTransform {
public:
    /// @fault crs_unknown (either is unknown, or there is no way between them)
    static Expected<CrsTransform> make(const std::string& from, const std::string& to);
    CrsTransform(CrsTransform&&) noexcept;
    CrsTransform& operator=(CrsTransform&&) noexcept;
    ~CrsTransform();

    /// In the units of the systems (degrees for geographic ones). Nothing where the point cannot be
    /// projected.
    [[nodiscard]] std::optional<MapPoint> operator()(double x, double y) const;

private:
    struct Inside;
    explicit CrsTransform(std::unique_ptr<Inside> inside);
    std::unique_ptr<Inside> inside_;
};

/// The UTM zone (WGS 84) that fits a place, as "EPSG:n"; with the exceptions for south-west Norway and
/// Svalbard. Valid from 80 S to 84 N.
[[nodiscard]] std::string fitting_utm(LonLat place);

/// A system in metres for planning in: the given one where it is projected, in metres and true to scale
/// within 1 % at the place; the same projection in metres where the registry has it ("NAD83 / California zone
/// 5" for its feet form); else the fitting UTM zone.
[[nodiscard]] Expected<std::string> metric_crs(const std::string& crs, LonLat place);

/// Longitude and latitude (WGS 84) of a point of a system.
[[nodiscard]] Expected<LonLat> lon_lat_of(const std::string& crs, double x, double y);

/// Grid north minus true north [deg] at a point: true bearing = grid bearing + this.
[[nodiscard]] Expected<double> convergence_deg(const std::string& crs, MapPoint at);

/// Map distance over ground distance along the meridian at a point of a system in metres.
[[nodiscard]] Expected<double> scale_factor(const std::string& crs, MapPoint at);
/// WKT 1 as GeoPackage keeps it; empty where the system is not known or has no such form.
[[nodiscard]] std::string crs_wkt(const std::string& crs);

} // namespace unstring
