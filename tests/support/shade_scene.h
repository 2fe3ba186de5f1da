#pragma once
// A small invented street for the tests of sun and shade: poles in a row, two heads, a temperate climate at
// 40 N.

#include <functional>
#include <limits>
#include <string>
#include <utility>

#include "model/solar/shade_city.h"

namespace unstring {

/// Heights of the ground as a formula, cut into cells like a raster; NaN outside a square around the origin.
class FormulaHeights : public HeightSource {
public:
    explicit FormulaHeights(std::function<double(MapPoint)> height, double cell_m = 0.5, double half_m = 1e9)
        : height_(std::move(height)), cell_m_(cell_m), half_m_(half_m) {}

    [[nodiscard]] double cell_m() const override { return cell_m_; }

    [[nodiscard]] Expected<HeightWindow> window(MapPoint centre, double reach_m) override {
        HeightWindow out;
        out.cell_m = cell_m_;
        const double west = std::floor((centre.x_m - reach_m) / cell_m_);
        const double north = std::ceil((centre.y_m + reach_m) / cell_m_);
        out.columns = out.rows = static_cast<std::size_t>(std::ceil(2 * reach_m / cell_m_)) + 1;
        out.west_m = west * cell_m_;
        out.north_m = north * cell_m_;
        out.height_m.reserve(out.columns * out.rows);
        for (std::size_t row = 0; row < out.rows; ++row)
            for (std::size_t column = 0; column < out.columns; ++column) {
                const MapPoint place{out.west_m + (static_cast<double>(column) + 0.5) * cell_m_,
                                     out.north_m - (static_cast<double>(row) + 0.5) * cell_m_};
                const bool is_outside = std::abs(place.x_m) > half_m_ || std::abs(place.y_m) > half_m_;
                out.height_m.push_back(is_outside ? std::numeric_limits<float>::quiet_NaN()
                                                  : static_cast<float>(height_(place)));
            }
        return out;
    }

private:
    std::function<double(MapPoint)> height_;
    double cell_m_, half_m_;
};

struct ShadeScene {
    City city;
    Catalog catalog;
    Climate climate;

    explicit ShadeScene(int poles) {
        city.centre = {-75, 40};
        city.strings.emplace_back();
        city.strings.back().id = "S1";
        for (int i = 0; i < poles; ++i) {
            Pole pole;
            pole.id = "P" + std::to_string(i + 1);
            pole.string = StringIx(0);
            pole.place = {35.0 * i, 0};
            pole.has_place = true;
            pole.mount_m = 8;
            pole.arm_deg = 180;
            city.poles.push_back(pole);
        }
        catalog.heads.push_back(head("small", 80, 500, 12, 1800));
        catalog.heads.push_back(head("large", 180, 1400, 30, 4500));
        climate.ghi_kwh_m2_day = {1.8, 2.6, 3.7, 4.7, 5.5, 6.1, 6.0, 5.3, 4.3, 3.1, 2.0, 1.6};
        climate.temp_c = {0, 2, 7, 12, 17, 22, 25, 24, 19, 13, 6, 1};
        climate.albedo.fill(0.2);
    }

    [[nodiscard]] static Head head(std::string name, double panel_wp, double battery_wh, double led_w,
                                   double lumens) {
        Head head;
        head.head = std::move(name);
        head.panel_wp = panel_wp;
        head.tilt_deg = 10;
        head.battery_wh = battery_wh;
        head.led_w = led_w;
        head.lumens = lumens;
        head.dimming = {{0, 4, 1}, {4, 9, .3}, {9, 24, .7}};
        head.epa_m2 = 0.3;
        return head;
    }

    [[nodiscard]] ShadeInput input(HeightSource* heights = nullptr) const {
        return {.city = city,
                .catalog = catalog,
                .climate = climate,
                .heights = heights,
                .nights_goal = 3,
                .heads = {}};
    }
};

} // namespace unstring
