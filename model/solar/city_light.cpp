#include "model/solar/city_light.h"

#include <algorithm>
#include <cmath>
#include <utility>

#include <fmt/format.h>

#include "model/solar/canopy_months.h"
#include "model/solar/lamp.h"
#include "model/solar/night.h"
#include "model/solar/pole_horizon.h"
#include "model/sun/clearness.h"
#include "model/sun/generated_weather.h"

namespace unstring {
namespace {

/// Below this the sun hardly rises in the month: any clearness will do.
constexpr double kNoSun_wh_m2 = 100;

Fault climate_fault(std::string_view field, std::size_t month, double found, std::string wanted) {
    return {FaultCode::value_unreadable,
            {},
            0,
            fmt::format("{} of month {}", field, month + 1),
            fmt::format("{}", found),
            std::move(wanted),
            "check the climate file, its units and the place of the poles"};
}

Expected<void> check_climate(const Climate& climate) {
    for (std::size_t month = 0; month < 12; ++month) {
        if (!(std::abs(climate.temp_c[month]) <= 60))
            return tl::unexpected(climate_fault("temp_c", month, climate.temp_c[month], "-60 to 60"));
        if (!(climate.albedo[month] >= 0 && climate.albedo[month] <= 1))
            return tl::unexpected(climate_fault("albedo", month, climate.albedo[month], "0 to 1"));
    }
    return {};
}

Expected<std::vector<const Head*>> wanted_heads(const ShadeInput& input) {
    for (const std::string& name : input.heads)
        if (find_head(input.catalog, name) == nullptr)
            return tl::unexpected(Fault{FaultCode::value_unknown,
                                        {},
                                        0,
                                        "head",
                                        name,
                                        "a head of the catalogue",
                                        "see the heads of catalogue.json"});
    std::vector<const Head*> heads;
    for (const Head& head : input.catalog.heads)
        if (input.heads.empty() ||
            std::find(input.heads.begin(), input.heads.end(), head.head) != input.heads.end())
            heads.push_back(&head);
    return heads;
}

HeadGroup head_group(std::span<const Head* const> heads, const CityLight& light, const ShadeTerms& terms) {
    HeadGroup group;
    group.heads.assign(heads.begin(), heads.end());
    for (std::size_t lane = 0; lane < heads.size(); ++lane) {
        const Head& head = *heads[lane];
        BatteryTerms battery;
        battery.capacity_wh = head.battery_wh;
        battery.cold_charge_c = terms.cold_charge_c;
        battery.lost_frac_day = terms.lost_frac_day;
        battery.standby_w = terms.standby_w;
        battery.shrinks_in_cold = true;
        const std::vector<double> load = lamp_load_wh(light.sun, head.led_w, head.dimming);
        set_lane(group.fresh, lane, light.sun, load, light.air_c, battery);
        battery.capacity_wh *= terms.end_of_life_frac;
        set_lane(group.worn, lane, light.sun, load, light.air_c, battery);
    }
    return group;
}

std::vector<SunDirection> sun_directions(const SunYear& sun, double convergence_deg) {
    std::vector<SunDirection> directions;
    directions.reserve(sun.steps.size());
    for (const SunStep& step : sun.steps) {
        double grid_deg = std::fmod(static_cast<double>(step.azimuth_deg) - convergence_deg, 360.0);
        if (grid_deg < 0) grid_deg += 360.0;
        const double place = grid_deg / 360.0 * kDirections;
        const int from = std::min(static_cast<int>(place), kDirections - 1);
        directions.push_back({static_cast<std::uint16_t>(from), static_cast<float>(place - from)});
    }
    return directions;
}

} // namespace

Expected<Monthly> monthly_clearness(const SunYear& sun, const Monthly& ghi_kwh_m2_day) {
    const Monthly outside = monthly_outside_wh_m2(sun);
    Monthly clearness{};
    for (std::size_t month = 0; month < 12; ++month) {
        const double ghi_wh = ghi_kwh_m2_day[month] * 1000.0;
        const double most = outside[month] * kClearnessMeanMax;
        const double least = outside[month] < kNoSun_wh_m2 ? 0 : outside[month] * kClearnessMeanMin;
        if (!(ghi_wh >= least && ghi_wh <= std::max(most, kNoSun_wh_m2)))
            return tl::unexpected(
                climate_fault("ghi_kwh_m2_day", month, ghi_kwh_m2_day[month],
                              fmt::format("{:.2f} to {:.2f}: outside the atmosphere it is {:.2f}",
                                          least / 1000.0, most / 1000.0, outside[month] / 1000.0)));
        clearness[month] = outside[month] < kNoSun_wh_m2 ? 0.4 : ghi_wh / outside[month];
    }
    return clearness;
}

Expected<CityLight> city_light(const ShadeInput& input, const ShadeTerms& terms) {
    const auto heads = wanted_heads(input);
    if (!heads) return tl::unexpected(heads.error());
    if (const auto checked = check_climate(input.climate); !checked) return tl::unexpected(checked.error());
    CityLight light;
    const LonLat centre = input.city.centre;
    light.sun = make_sun_year(centre, DayModel::psa, terms.sun_step_min, std::round(centre.lon_deg / 15.0),
                              Sampling::staggered);
    const auto clearness = monthly_clearness(light.sun, input.climate.ghi_kwh_m2_day);
    if (!clearness) return tl::unexpected(clearness.error());
    light.sky = make_hourly_sky(
        light.sun, generate_clearness(*clearness, terms.weather_years + kSettlingYears, 1), kSettlingYears);
    light.air_c = hourly_air_c(light.sun, input.climate.temp_c, terms.temp_swing_k);
    light.directions = sun_directions(light.sun, input.city.convergence_deg);
    light.temp_c = input.climate.temp_c;
    light.albedo = input.climate.albedo;
    light.deciduous = canopy_through(Leaf::deciduous, centre.lat_deg);
    light.evergreen = canopy_through(Leaf::evergreen, centre.lat_deg);
    for (std::size_t first = 0; first < heads->size(); first += kLanes)
        light.groups.push_back(head_group(
            std::span(*heads).subspan(first, std::min(kLanes, heads->size() - first)), light, terms));
    return light;
}

} // namespace unstring
