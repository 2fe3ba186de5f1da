#include "model/solar/panel.h"

#include <algorithm>
#include <cmath>

#include "model/sun/transposition.h"

namespace unstring {
namespace {

struct Normal {
    float east, north, up;
};

Normal panel_normal(const PanelPlace& place) {
    const double tilt = place.tilt_deg * kRadPerDeg;
    const double bearing = place.bearing_deg * kRadPerDeg;
    return {static_cast<float>(std::sin(tilt) * std::sin(bearing)),
            static_cast<float>(std::sin(tilt) * std::cos(bearing)), static_cast<float>(std::cos(tilt))};
}

/// Mean of what is let through over an hour's steps, weighted by the cosine on the panel.
double through_in_hour(const SunYear& sun, std::span<const float> through, const Normal& normal,
                       std::size_t hour) {
    float weights = 0;
    float sum = 0;
    for (std::uint32_t i = sun.first_step[hour]; i < sun.first_step[hour + 1]; ++i) {
        const SunStep& step = sun.steps[i];
        const float weight =
            std::max(0.0F, normal.east * step.east + normal.north * step.north + normal.up * step.up);
        weights += weight;
        sum += weight * through[i];
    }
    // No step of the hour lights the panel: the little that its share of the day holds counts as unshaded.
    return weights > 0 ? static_cast<double>(sum / weights) : 1.0;
}

std::size_t month_place(const SunYear& sun, std::size_t hour) {
    return static_cast<std::size_t>(sun.month_of_hour(hour) - 1);
}

} // namespace

std::vector<float> beam_through(const SunYear& sun, const SkyLayers& layers) {
    std::vector<float> through(sun.steps.size(), 1.0F);
    for (std::size_t hour = 0; hour < kHours; ++hour) {
        const std::size_t month = month_place(sun, hour);
        for (std::uint32_t i = sun.first_step[hour]; i < sun.first_step[hour + 1]; ++i) {
            const double azimuth_deg = static_cast<double>(sun.steps[i].azimuth_deg);
            const double elevation_deg = static_cast<double>(sun.steps[i].elevation_deg);
            if (elevation_deg <= layers.solid.height_deg(azimuth_deg))
                through[i] = 0;
            else if (elevation_deg <= layers.evergreen.height_deg(azimuth_deg))
                through[i] = static_cast<float>(layers.evergreen_beam[month]);
            else if (elevation_deg <= layers.deciduous.height_deg(azimuth_deg))
                through[i] = static_cast<float>(layers.deciduous_beam[month]);
        }
    }
    return through;
}

PanelLight panel_light(const SunYear& sun, std::span<const float> through, const SkyLayers& layers,
                       const PanelPlace& place, double sky_step_deg) {
    PanelLight light;
    light.beam_factor.assign(kHours, 0.0);
    light.open_beam_factor.assign(kHours, 0.0);
    const Normal normal = panel_normal(place);
    for (std::size_t hour = 0; hour < kHours; ++hour) {
        if (sun.global_share[hour] <= 0) continue;
        const double elevation_deg = sun.elevation_deg[hour];
        const double incidence =
            cos_incidence(place.tilt_deg, place.bearing_deg, elevation_deg, sun.azimuth_deg[hour]);
        const double ratio = beam_ratio(incidence, std::sin(elevation_deg * kRadPerDeg), place.tilt_deg);
        light.open_beam_factor[hour] = ratio;
        light.beam_factor[hour] = ratio * through_in_hour(sun, through, normal, hour);
    }
    const auto sees = [&](std::initializer_list<HorizonProfile> profiles) {
        return sky_view_frac(std::span(profiles.begin(), profiles.size()), place.tilt_deg, place.bearing_deg,
                             sky_step_deg);
    };
    light.open_sky_frac = even_sky_frac(place.tilt_deg);
    const double solid = sees({layers.solid});
    const double hard = layers.evergreen.is_open() ? solid : sees({layers.solid, layers.evergreen});
    const double all =
        layers.deciduous.is_open() ? hard : sees({layers.solid, layers.evergreen, layers.deciduous});
    light.opaque_sky_frac = all;
    for (std::size_t month = 0; month < 12; ++month) {
        light.sky_frac[month] = all + layers.deciduous_diffuse[month] * (hard - all) +
                                layers.evergreen_diffuse[month] * (solid - hard);
        light.ground_frac[month] = place.albedo[month] * ground_frac(place.tilt_deg);
    }
    return light;
}

double cell_temp_c(double light_w_m2, double air_c, double wind_m_s, double still, double per_wind) {
    return air_c + light_w_m2 / (still + per_wind * wind_m_s);
}

double cell_temp_by_noct_c(double light_w_m2, double air_c, double noct_c) {
    return air_c + (noct_c - 20.0) / 800.0 * light_w_m2;
}

double panel_power_w(double panel_wp, double light_w_m2, double cell_c, double temp_coeff) {
    return std::max(0.0, panel_wp * light_w_m2 / 1000.0 * (1.0 + temp_coeff * (cell_c - 25.0)));
}

void write_yield_wh_per_wp(const SunYear& sun, const HourlySky& sky, const PanelLight& light,
                           std::span<const double> air_c, const PanelTerms& terms, double* yield,
                           std::size_t stride) {
    const double per_w_m2 = 1.0 / (kFaimanStill + kFaimanWind * terms.wind_m_s);
    for (std::size_t day = 0; day < kDays * static_cast<std::size_t>(sky.years); ++day) {
        const SunDay& today = sun.days[day % kDays];
        const auto month = static_cast<std::size_t>(today.month - 1);
        const double sky_frac = light.sky_frac[month];
        const double ground = light.ground_frac[month];
        for (std::size_t h = today.first_lit; h < today.end_lit; ++h) {
            const std::size_t at = day * 24 + h;
            const std::size_t of_year = day % kDays * 24 + h;
            const double light_w_m2 = sky.beam_like[at] * light.beam_factor[of_year] +
                                      sky.even_sky[at] * sky_frac + sky.global[at] * ground;
            const double warmer_k = air_c[of_year] + light_w_m2 * per_w_m2 - 25.0;
            const double power = light_w_m2 * 0.001 * (1.0 + terms.temp_coeff * warmer_k) * terms.gives_frac;
            yield[at * stride] = std::max(0.0, power);
        }
    }
}

MonthlyLight monthly_light(const SunYear& sun, const HourlySky& sky, const PanelLight& light) {
    MonthlyLight sums;
    for (std::size_t hour = 0; hour < kHours; ++hour) {
        const std::size_t month = month_place(sun, hour);
        const double from_ground = sky.mean_global[hour] * light.ground_frac[month];
        sums.panel_kwh_m2[month] += 0.001 * (sky.mean_beam_like[hour] * light.beam_factor[hour] +
                                             sky.mean_even_sky[hour] * light.sky_frac[month] + from_ground);
        sums.open_kwh_m2[month] += 0.001 * (sky.mean_beam_like[hour] * light.open_beam_factor[hour] +
                                            sky.mean_even_sky[hour] * light.open_sky_frac + from_ground);
    }
    return sums;
}

double shade_score(const MonthlyLight& light) {
    double score = 0;
    for (std::size_t month = 0; month < 12; ++month)
        if (light.open_kwh_m2[month] > 0)
            score = std::max(score, 1.0 - light.panel_kwh_m2[month] / light.open_kwh_m2[month]);
    return score;
}

} // namespace unstring
