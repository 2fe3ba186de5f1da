#pragma once
// A panel under its own piece of sky: what reaches it hour by hour, how warm it gets, what it gives.

#include <array>
#include <span>
#include <vector>

#include "model/sun/horizon.h"
#include "model/sun/hourly_sky.h"
#include "model/sun/sun_year.h"

namespace unstring {

using Monthly = std::array<double, 12>;

/// What stands around the panel. Solid wins over evergreen, evergreen over deciduous, where they stand in one
/// line.
struct SkyLayers {
    HorizonProfile solid, evergreen, deciduous; ///< azimuths from true north
    Monthly evergreen_beam{}, evergreen_diffuse{}, deciduous_beam{},
        deciduous_diffuse{}; ///< share let through
};

struct PanelPlace {
    double tilt_deg = 0;
    double bearing_deg = 180; ///< of the panel's downward tilt, clockwise from true north
    Monthly albedo{};
};

/// How the panel turns the light of the horizontal into light on itself.
struct PanelLight {
    std::vector<double>
        beam_factor; ///< kHours: ratio of the beam times the share of it that is not in shadow
    std::vector<double> open_beam_factor; ///< the same without shadow
    Monthly sky_frac{}, ground_frac{};    ///< of the even sky; of global light from the ground
    double open_sky_frac = 1;
    double opaque_sky_frac = 1; ///< sky view with canopy opaque
};

/// Share of the beam let through by what stands around, one per step of the sun; exact profiles.
[[nodiscard]] std::vector<float> beam_through(const SunYear& sun, const SkyLayers& layers);

/// @param through  from beam_through, or its like
/// @param sky_step_deg  azimuth step of the sky-view integral
[[nodiscard]] PanelLight panel_light(const SunYear& sun, std::span<const float> through,
                                     const SkyLayers& layers, const PanelPlace& place, double sky_step_deg);

inline constexpr double kFaimanStill = 25.0, kFaimanWind = 6.84; ///< W/m2K, and per m/s of wind
/// Cell temperature [C]. Source: D. Faiman, Prog. Photovolt. 16 (2008) 307-315.
[[nodiscard]] double cell_temp_c(double light_w_m2, double air_c, double wind_m_s,
                                 double still = kFaimanStill, double per_wind = kFaimanWind);
/// Cell temperature by the nominal operating temperature of the module [C]. Source: R.G. Ross (1976).
[[nodiscard]] double cell_temp_by_noct_c(double light_w_m2, double air_c, double noct_c);

struct PanelTerms {
    double gives_frac = 0.9;    ///< after dirt, wiring and electronics
    double temp_coeff = -0.004; ///< per kelvin above 25 C
    double wind_m_s = 1;
};
/// Power of a panel [W]: linear in light, and in cell temperature. Source: PVWatts, NREL/TP-6A20-62641
/// (2014).
[[nodiscard]] double panel_power_w(double panel_wp, double light_w_m2, double cell_c, double temp_coeff);

/// Per hour of every year the energy of one watt-peak [Wh], before ageing, charge loss and clipping, written
/// to every `stride`-th place. Hours without sun are not touched: they are 0 for every panel.
/// @param air_c  kHours
void write_yield_wh_per_wp(const SunYear& sun, const HourlySky& sky, const PanelLight& light,
                           std::span<const double> air_c, const PanelTerms& terms, double* yield,
                           std::size_t stride);

/// Irradiation on the panel per calendar month, mean of a year [kWh/m2]; with and without what stands around.
struct MonthlyLight {
    Monthly panel_kwh_m2{}, open_kwh_m2{};
};
[[nodiscard]] MonthlyLight monthly_light(const SunYear& sun, const HourlySky& sky, const PanelLight& light);
/// Largest over the months of 1 minus shaded over open; months without sun are left out.
[[nodiscard]] double shade_score(const MonthlyLight& light);

} // namespace unstring
