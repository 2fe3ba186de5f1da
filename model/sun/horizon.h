#pragma once
// What stands around a panel, as heights above the horizontal over the azimuth, and the sky that is left over
// it.

#include <span>
#include <vector>

namespace unstring {

struct HorizonPoint {
    double azimuth_deg = 0; ///< clockwise from north, 0..360
    double height_deg = 0;  ///< above the horizontal; below 0 counts as 0
};

/// Heights at points, linear between them and round from the last to the first; two points of one azimuth
/// make a step, the first of them ends the piece before it. One point is a uniform horizon, none an open one.
class HorizonProfile {
public:
    HorizonProfile() = default;
    /// Sorts by azimuth, keeps the order of points at one azimuth. Azimuths outside 0..360 are turned into
    /// it.
    explicit HorizonProfile(std::vector<HorizonPoint> points);
    /// Heights at directions i * 360 / size.
    [[nodiscard]] static HorizonProfile from_directions(std::span<const float> heights_deg);

    [[nodiscard]] bool is_open() const { return points_.empty(); }
    [[nodiscard]] const std::vector<HorizonPoint>& points() const { return points_; }
    /// Height [deg], at a step that of the piece that begins there.
    [[nodiscard]] double height_deg(double azimuth_deg) const;
    /// At a step that of the piece that ends there.
    [[nodiscard]] double height_before_deg(double azimuth_deg) const;

private:
    [[nodiscard]] double between_deg(std::size_t next, double azimuth_deg) const;
    std::vector<HorizonPoint> points_;
};

/// Share of the light of an even sky on a panel, 1 = a flat panel under an open sky; the panel's own back
/// counts. Where several profiles are given the highest hides the sky. Source: J. Dozier, J. Frew, IEEE
/// Trans. Geosci. Remote Sens. 28 (1990) 963-969, eq. 7b. Checked against closed forms in
/// tests/published/sky.cpp.
/// @param step_deg  largest azimuth step of the integral
[[nodiscard]] double sky_view_frac(std::span<const HorizonProfile> profiles, double tilt_deg,
                                   double bearing_deg, double step_deg = 0.02);

} // namespace unstring
