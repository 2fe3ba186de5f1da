#include "model/solar/pole_shade.h"

#include <algorithm>
#include <cmath>
#include <numeric>
#include <tuple>

#include <fmt/format.h>

#include "model/solar/battery_life.h"
#include "model/solar/night.h"
#include "model/solar/panel_bearing.h"
#include "model/solar/screening.h"

namespace unstring {
namespace {

constexpr int kSettlingYears = 1;

/// The horizon's directions with the first once more at the end, so that the last piece needs no wrap.
std::vector<float> closed(const std::vector<float>& heights_deg) {
    std::vector<float> out = heights_deg;
    out.push_back(heights_deg.front());
    return out;
}

bool is_open(const std::vector<float>& heights_deg) {
    return std::all_of(heights_deg.begin(), heights_deg.end(), [](float height) { return height <= 0; });
}

/// The same as beam_through, by the directions that every pole shares.
void write_beam_through(const CityLight& light, const PoleHorizon& horizon, std::vector<float>& through) {
    const std::vector<float> solid = closed(horizon.solid_deg);
    const std::vector<float> evergreen = closed(horizon.evergreen_deg);
    const std::vector<float> deciduous = closed(horizon.deciduous_deg);
    through.assign(light.sun.steps.size(), 1.0F);
    for (std::size_t hour = 0; hour < kHours; ++hour) {
        const auto month = static_cast<std::size_t>(light.sun.month_of_hour(hour) - 1);
        for (std::uint32_t i = light.sun.first_step[hour]; i < light.sun.first_step[hour + 1]; ++i) {
            const SunDirection at = light.directions[i];
            const float elevation_deg = light.sun.steps[i].elevation_deg;
            const auto hides = [&](const std::vector<float>& layer) {
                return elevation_deg <= layer[at.from] + (layer[at.from + 1U] - layer[at.from]) * at.along;
            };
            if (hides(solid))
                through[i] = 0;
            else if (hides(evergreen))
                through[i] = static_cast<float>(light.evergreen[month]);
            else if (hides(deciduous))
                through[i] = static_cast<float>(light.deciduous[month]);
        }
    }
}

/// Directions turned from grid north to true north; an open layer stays without points.
HorizonProfile true_profile(const std::vector<float>& heights_deg, double convergence_deg) {
    if (is_open(heights_deg)) return {};
    std::vector<HorizonPoint> points;
    for (std::size_t i = 0; i < heights_deg.size(); ++i)
        points.push_back({360.0 * static_cast<double>(i) / static_cast<double>(heights_deg.size()) + convergence_deg,
                          static_cast<double>(heights_deg[i])});
    return HorizonProfile(std::move(points));
}

SkyLayers sky_layers(const CityLight& light, const PoleHorizon& horizon, double convergence_deg) {
    SkyLayers layers;
    layers.solid = true_profile(horizon.solid_deg, convergence_deg);
    layers.evergreen = true_profile(horizon.evergreen_deg, convergence_deg);
    layers.deciduous = true_profile(horizon.deciduous_deg, convergence_deg);
    layers.evergreen_beam = layers.evergreen_diffuse = light.evergreen;
    layers.deciduous_beam = layers.deciduous_diffuse = light.deciduous;
    return layers;
}

double mean_of(const std::vector<int>& counts) {
    if (counts.empty()) return 0;
    return std::accumulate(counts.begin(), counts.end(), 0.0) / static_cast<double>(counts.size());
}

/// The battery new, its life, and the battery at the end of that life beside an aged panel.
void run_head(const CityLight& light, const HeadTerms& terms, const ShadeTerms& shade, ShadeScratch& scratch,
              HeadAnswer& answer) {
    const double panel_wp = terms.head->panel_wp;
    const BatteryRun fresh = run_battery(
        {light.sun, scratch.yield, panel_wp, terms.fresh_hours, terms.fresh, kSettlingYears}, &scratch.soc);
    answer.nights_dark_year_new = mean_of(fresh.dark_in_year);
    answer.battery_years = battery_life_yr(light.sun, scratch.soc, light.temp_c);
    const double aged_wp = panel_wp * std::pow(1.0 - shade.panel_ages_frac_yr, answer.battery_years);
    const BatteryRun worn =
        run_battery({light.sun, scratch.yield, aged_wp, terms.worn_hours, terms.worn, kSettlingYears}, nullptr);
    answer.nights_dark_year = mean_of(worn.dark_in_year);
    answer.nights_dark_worst_year = *std::max_element(worn.dark_in_year.begin(), worn.dark_in_year.end());
    answer.longest_dark_run = worn.longest_dark_run;
    answer.supply_kwh = worn.supply_kwh;
    answer.demand_kwh = worn.demand_kwh;
    answer.worst_month = worst_month(worn.supply_kwh, worn.demand_kwh);
}

void judge(const Pole& pole, const Head& head, double nights_goal, const PoleHorizon& horizon, HeadAnswer& answer) {
    const double goal = goal_of(pole, nights_goal);
    answer.why = what_stops(pole, head);
    if (answer.why.empty() && answer.nights_dark_year > goal)
        answer.why = fmt::format("{:.1f} nights dark a year at the end of battery life, {:.1f} are allowed",
                                 answer.nights_dark_year, goal);
    answer.eligible = answer.why.empty();
    if (horizon.unknown_deg.empty()) return;
    const std::string note =
        horizon.unknown_deg.size() == kDirections
            ? std::string("sky unknown: no heights of trees or buildings here, reckoned as open")
            : fmt::format("sky unknown in {} of {} directions, reckoned as open", horizon.unknown_deg.size(), kDirections);
    answer.why += answer.why.empty() ? note : "; " + note;
}

/// The cheapest eligible head. Prices are not known here: less panel, then less battery, costs less.
int best_head(const std::vector<HeadAnswer>& answers, const CityLight& light) {
    const auto rank = [&](std::size_t i) {
        const Head& head = *light.heads[i].head;
        const bool fits = answers[i].eligible;
        return std::make_tuple(!fits, fits ? 0.0 : answers[i].nights_dark_year, head.panel_wp, head.battery_wh, i);
    };
    int best = -1;
    for (std::size_t i = 0; i < answers.size(); ++i)
        if (best < 0 || rank(i) < rank(static_cast<std::size_t>(best))) best = static_cast<int>(i);
    return best;
}

}  // namespace

PoleShade shade_pole(const ShadeInput& input, const CityLight& light, const ShadeTerms& terms, PoleIx pole_ix,
                     const PoleHorizon& horizon, ShadeScratch& scratch) {
    const Pole& pole = input.city.poles[pole_ix.place()];
    PoleShade shade;
    shade.pole = pole_ix;
    shade.panel_height_m = horizon.panel_height_m;
    shade.solid_deg = horizon.solid_deg;
    shade.unknown_deg = horizon.unknown_deg;
    shade.canopy_deg = horizon.deciduous_deg;
    for (std::size_t i = 0; i < shade.canopy_deg.size(); ++i)
        shade.canopy_deg[i] = std::max(shade.canopy_deg[i], horizon.evergreen_deg[i]);

    const SkyLayers layers = sky_layers(light, horizon, input.city.convergence_deg);
    write_beam_through(light, horizon, scratch.through);
    scratch.yield.resize(light.sky.global.size());
    for (const HeadTerms& head : light.heads) {
        const PanelBearing bearing = panel_bearing(input.city, pole, head.head->turn_deg);
        if (shade.heads.empty()) {
            shade.bearing_deg = bearing.bearing_deg;
            shade.bearing_from = bearing.from;
        }
        const PanelPlace place{head.head->tilt_deg, bearing.bearing_deg + input.city.convergence_deg, light.albedo};
        const PanelLight panel = panel_light(light.sun, scratch.through, layers, place, terms.sky_step_deg);
        write_yield_wh_per_wp(light.sun, light.sky, panel, light.air_c, {}, scratch.yield);
        const MonthlyLight monthly = monthly_light(light.sun, light.sky, panel, kSettlingYears);
        HeadAnswer answer;
        answer.head = head.head->head;
        answer.sky_view_frac = panel.opaque_sky_frac;
        answer.shade_score = shade_score(monthly);
        answer.panel_kwh_m2 = monthly.panel_kwh_m2;
        run_head(light, head, terms, scratch, answer);
        judge(pole, *head.head, input.nights_goal, horizon, answer);
        shade.heads.push_back(std::move(answer));
    }
    shade.best = best_head(shade.heads, light);
    return shade;
}

}  // namespace unstring
