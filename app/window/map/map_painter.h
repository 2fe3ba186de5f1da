#pragma once
// Paints the map from its parts, ground first: streets, buildings, canopy, trench, strings, poles. Each part
// draws only what the camera sees.

#include <QPainter>
#include <QPixmap>

#include <array>
#include <map>

#include "app/window/desk.h"
#include "app/window/look/signs.h"
#include "app/window/map/camera.h"
#include "app/window/map/canopy_tint.h"

namespace unstring {

enum class PoleColour { decision, year, shade };

struct MapStyle {
    PoleColour colour = PoleColour::decision;
    std::array<bool, 6> shown{true, true, true, true, true, true}; ///< by PoleSign: the legend is a filter
};

void paint_ground(QPainter& painter, const Desk& desk, const Camera& camera, const CanopyTint& tint);

/// Loops at the year looked at: what is energised solid, what is dead broken; stations, cut-backs, names.
void paint_strings(QPainter& painter, const Desk& desk, const Camera& camera);
/// Stations and the strings' names, over the poles.
void paint_stations(QPainter& painter, const Desk& desk, const Camera& camera);
/// The trench tree with its wire sizes, and the service points.
void paint_circuits(QPainter& painter, const Desk& desk, const Camera& camera);

/// Signs are painted once each into small pictures and stamped.
class PolePainter {
public:
    void paint(QPainter& painter, const Desk& desk, const Camera& camera, const MapStyle& style);
    void forget() { stamps_.clear(); }

private:
    const QPixmap& stamp(const Look& look, PoleSign sign, bool is_done, double r, bool with_halo, QColor tone,
                         double ratio);
    std::map<std::string, QPixmap> stamps_;
};

/// A pole's sign, and whether its work is done by the end of the year looked at.
[[nodiscard]] PoleSign pole_sign(const ProjectView& view, const Plan& plan, PoleIx pole);
[[nodiscard]] bool is_done_by(const Plan& plan, PoleIx pole, int year);

/// Which legs of a loop are energised at the end of a year; one entry a leg. And the cut-backs in use.
struct LiveLoop {
    std::vector<char> legs;
    std::vector<int> used;
    int lamps = 0;
};
[[nodiscard]] LiveLoop live_loop(const StringLoop& loop, const Plan& plan, int year);

void paint_scale(QPainter& painter, const Look& look, const Camera& camera);

} // namespace unstring
