#include "model/sun/horizon.h"

#include <algorithm>
#include <cmath>
#include <utility>

#include "model/quantities.h"

namespace unstring {
namespace {

double turned(double azimuth_deg) {
    if (azimuth_deg >= 0 && azimuth_deg <= 360) return azimuth_deg;
    const double rest = std::fmod(azimuth_deg, 360.0);
    return rest < 0 ? rest + 360.0 : rest;
}

std::vector<double> pieces(std::span<const HorizonProfile> profiles) {
    std::vector<double> bounds = {0, 360};
    for (const HorizonProfile& profile : profiles)
        for (const HorizonPoint& point : profile.points()) bounds.push_back(point.azimuth_deg);
    std::sort(bounds.begin(), bounds.end());
    bounds.erase(std::unique(bounds.begin(), bounds.end()), bounds.end());
    return bounds;
}

/// Heights of one profile at the two ends of a piece.
struct PieceEnds {
    double start_deg, end_deg;
};

} // namespace

HorizonProfile::HorizonProfile(std::vector<HorizonPoint> points) : points_(std::move(points)) {
    for (HorizonPoint& point : points_) {
        point.azimuth_deg = turned(point.azimuth_deg);
        point.height_deg = std::max(0.0, point.height_deg);
    }
    std::stable_sort(points_.begin(), points_.end(), [](const HorizonPoint& a, const HorizonPoint& b) {
        return a.azimuth_deg < b.azimuth_deg;
    });
}

HorizonProfile HorizonProfile::from_directions(std::span<const float> heights_deg) {
    HorizonProfile profile;
    profile.points_.reserve(heights_deg.size());
    for (std::size_t i = 0; i < heights_deg.size(); ++i)
        profile.points_.push_back({360.0 * static_cast<double>(i) / static_cast<double>(heights_deg.size()),
                                   std::max(0.0, static_cast<double>(heights_deg[i]))});
    return profile;
}

/// On the line that ends in point `next` (its size: the line round to the first point).
double HorizonProfile::between_deg(std::size_t next, double azimuth_deg) const {
    const HorizonPoint& from = next == 0 ? points_.back() : points_[next - 1];
    const HorizonPoint& to = next == points_.size() ? points_.front() : points_[next];
    double width = to.azimuth_deg - from.azimuth_deg;
    if (next == 0 || next == points_.size()) width += 360.0;
    double along = azimuth_deg - from.azimuth_deg;
    if (along < 0) along += 360.0;
    if (width <= 0) return to.height_deg;
    return from.height_deg + (to.height_deg - from.height_deg) * (along / width);
}

double HorizonProfile::height_deg(double azimuth_deg) const {
    if (points_.empty()) return 0;
    const double azimuth = azimuth_deg == 360.0 ? 0.0 : turned(azimuth_deg);
    // A last point at 360 ends the round: what begins at 0 is the first point's piece.
    const auto after =
        std::upper_bound(points_.begin(), points_.end(), azimuth,
                         [](double a, const HorizonPoint& point) { return a < point.azimuth_deg; });
    return between_deg(static_cast<std::size_t>(after - points_.begin()), azimuth);
}

double HorizonProfile::height_before_deg(double azimuth_deg) const {
    if (points_.empty()) return 0;
    const double azimuth = azimuth_deg == 0.0 ? 360.0 : turned(azimuth_deg);
    const auto at =
        std::lower_bound(points_.begin(), points_.end(), azimuth,
                         [](const HorizonPoint& point, double a) { return point.azimuth_deg < a; });
    // From the last point round to 0 the piece is the one that ends in the first point.
    return between_deg(static_cast<std::size_t>(at - points_.begin()), azimuth);
}

double sky_view_frac(std::span<const HorizonProfile> profiles, double tilt_deg, double bearing_deg,
                     double step_deg) {
    const double cos_tilt = std::cos(tilt_deg * kRadPerDeg);
    const double sin_tilt = std::sin(tilt_deg * kRadPerDeg);
    const auto is_open = [](const HorizonProfile& profile) { return profile.is_open(); };
    if (std::all_of(profiles.begin(), profiles.end(), is_open)) return 0.5 * (1.0 + cos_tilt);
    const std::vector<double> bounds = pieces(profiles);
    std::vector<PieceEnds> ends(profiles.size());
    double sum = 0;
    for (std::size_t i = 0; i + 1 < bounds.size(); ++i) {
        const double width_deg = bounds[i + 1] - bounds[i];
        for (std::size_t p = 0; p < profiles.size(); ++p)
            ends[p] = {profiles[p].height_deg(bounds[i]), profiles[p].height_before_deg(bounds[i + 1])};
        const int steps = std::max(1, static_cast<int>(std::ceil(width_deg / step_deg)));
        for (int step = 0; step < steps; ++step) {
            const double along = (step + 0.5) / steps;
            double height_deg = 0;
            for (const PieceEnds& end : ends)
                height_deg = std::max(height_deg, end.start_deg + (end.end_deg - end.start_deg) * along);
            const double turn = std::cos((bounds[i] + width_deg * along - bearing_deg) * kRadPerDeg);
            // The plane's own horizon: behind a tilted panel the sky begins above the panel's plane.
            const double own = std::atan2(-sin_tilt * turn, cos_tilt);
            const double from_zenith = 0.5 * std::numbers::pi - std::max(height_deg * kRadPerDeg, own);
            const double sine = std::sin(from_zenith);
            sum += (cos_tilt * sine * sine + sin_tilt * turn * (from_zenith - sine * std::cos(from_zenith))) *
                   width_deg / steps;
        }
    }
    return sum / 360.0;
}

} // namespace unstring
