#pragma once
// The types that carry a meaning which a bare number would lose: indices, places, money, bearings.
// Names, symbols and units of everything else: quantities.md.

#include <cmath>
#include <compare>
#include <cstddef>
#include <cstdint>
#include <numbers>

namespace unstring {

/// A place in one table; the tag keeps a pole's index out of a string's table.
template <class Tag>
struct Index {
    static constexpr std::uint32_t kNone = 0xffffffffU;
    std::uint32_t value = kNone;

    constexpr Index() = default;
    constexpr explicit Index(std::size_t place) : value(static_cast<std::uint32_t>(place)) {}
    [[nodiscard]] constexpr bool is_valid() const { return value != kNone; }
    [[nodiscard]] constexpr std::size_t place() const { return value; }
    constexpr auto operator<=>(const Index&) const = default;
};

using PoleIx = Index<struct PoleTag>;
using StringIx = Index<struct StringTag>;
using TransformerIx = Index<struct TransformerTag>;
using ServiceIx = Index<struct ServiceTag>;
using StreetIx = Index<struct StreetTag>;

/// Metres in the project's coordinate system, x east, y north.
struct MapPoint {
    double x_m = 0;
    double y_m = 0;
    constexpr bool operator==(const MapPoint&) const = default;
};

struct LonLat {
    double lon_deg = 0;
    double lat_deg = 0;
};

/// Money is counted in whole cents.
using Cents = std::int64_t;

/// Dollars to cents, halves away from zero.
[[nodiscard]] inline Cents to_cents(double dollars) { return std::llround(dollars * 100.0); }
[[nodiscard]] constexpr double to_dollars(Cents cents) { return static_cast<double>(cents) / 100.0; }

inline constexpr double kMetresPerFoot = 0.3048;
inline constexpr double kMetresPerSurveyFoot = 1200.0 / 3937.0;
inline constexpr double kRadPerDeg = std::numbers::pi / 180.0;

[[nodiscard]] inline double distance_m(MapPoint a, MapPoint b) {
    return std::hypot(a.x_m - b.x_m, a.y_m - b.y_m);
}

/// Bearing from a to b [deg], clockwise from grid north, in [0, 360).
[[nodiscard]] inline double bearing_deg(MapPoint a, MapPoint b) {
    const double angle = std::atan2(b.x_m - a.x_m, b.y_m - a.y_m) / kRadPerDeg;
    return angle < 0 ? angle + 360.0 : angle;
}

} // namespace unstring
