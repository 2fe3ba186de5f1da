#pragma once
// The sky above a pole as a round plot: what stands up as height round the compass, and the sun's way on
// three dates.

#include <QWidget>

#include <vector>

#include "app/window/desk.h"

namespace unstring {

struct SkyPoint {
    double bearing_deg = 0; ///< clockwise from true north
    double elevation_deg = 0;
};
/// The sun's way over a day, a point every 10 minutes while it is up; no refraction.
/// Spherical triangle of pole, zenith and sun; declination in degrees.
[[nodiscard]] std::vector<SkyPoint> sun_path(double lat_deg, double declination_deg);

/// Height of a skyline at a bearing [deg], linear between its directions; 0 where there is none.
[[nodiscard]] double skyline_at(const std::vector<float>& heights_deg, double bearing_deg);

class SkyPlot : public QWidget {
    Q_OBJECT
public:
    explicit SkyPlot(Desk& desk, QWidget* parent = nullptr);
    void set_pole(PoleIx pole);
    [[nodiscard]] bool hasHeightForWidth() const override { return true; }
    [[nodiscard]] int heightForWidth(int) const override { return 236; }
    [[nodiscard]] QSize sizeHint() const override { return {340, 236}; }

protected:
    void paintEvent(QPaintEvent* event) override;

private:
    [[nodiscard]] QPointF on_plot(double grid_bearing_deg, double elevation_deg) const;
    void paint_skyline(QPainter& painter, const std::vector<float>& heights_deg, const QBrush& brush,
                       const QColor& edge);
    void paint_sun(QPainter& painter, const PoleShade& shade);
    void paint_key(QPainter& painter, const PoleShade& shade);

    Desk& desk_;
    PoleIx pole_;
    QPointF centre_{112, 118};
    double radius_ = 92;
};

} // namespace unstring
