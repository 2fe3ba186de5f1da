#include "model/solar/pole_shade.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <span>
#include <tuple>
#include <utility>

#include <fmt/format.h>

#include "model/solar/battery_life.h"
#include "model/solar/night.h"
#include "model/solar/panel_bearing.h"
#include "model/solar/screening.h"

namespace unstring {
namespace {

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
        points.push_back(
            {360.0 * static_cast<double>(i) / static_cast<double>(heights_deg.size()) + convergence_deg,
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

/// The batteries new, their lives, and the batteries at the end of those lives beside aged panels.
void run_group(const CityLight& light, const HeadGroup& group, const ShadeTerms& terms, ShadeScratch& scratch,
               std::span<HeadAnswer> answers) {
    std::array<double, kLanes> panel_wp{};
    for (std::size_t lane = 0; lane < answers.size(); ++lane) panel_wp[lane] = group.heads[lane]->panel_wp;
    const auto fresh =
        run_batteries(light.sun, group.fresh, scratch.yield, panel_wp, kSettlingYears, scratch.soc.data());
    for (std::size_t lane = 0; lane < answers.size(); ++lane) {
        const std::span<const float> soc = std::span(scratch.soc).subspan(lane);
        answers[lane].nights_dark_year_new = fresh[lane].dark_a_year();
        answers[lane].battery_years =
            battery_life_yr(light.sun, charge_history(light.sun, soc, kLanes), light.temp_c);
        panel_wp[lane] *= std::pow(1.0 - terms.panel_ages_frac_yr, answers[lane].battery_years);
    }
    const auto worn = run_batteries(light.sun, group.worn, scratch.yield, panel_wp, kSettlingYears, nullptr);
    for (std::size_t lane = 0; lane < answers.size(); ++lane) {
        HeadAnswer& answer = answers[lane];
        answer.nights_dark_year = worn[lane].dark_a_year();
        answer.nights_dark_worst_year =
            *std::max_element(worn[lane].dark_in_year.begin(), worn[lane].dark_in_year.end());
        answer.longest_dark_run = worn[lane].longest_dark_run;
        answer.supply_kwh = worn[lane].supply_kwh;
        answer.demand_kwh = group.worn.demand_kwh[lane];
        answer.worst_month = worst_month(answer.supply_kwh, answer.demand_kwh);
    }
}

void judge(const Pole& pole, const Head& head, double nights_goal, const PoleHorizon& horizon,
           HeadAnswer& answer) {
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
            : fmt::format("sky unknown in {} of {} directions, reckoned as open", horizon.unknown_deg.size(),
                          kDirections);
    answer.why += answer.why.empty() ? note : "; " + note;
}

/// The cheapest eligible head. Prices are not known here: less panel, then less battery, costs less.
int best_head(const std::vector<HeadAnswer>& answers, const Catalog& catalog) {
    const auto rank = [&](const HeadAnswer& answer) {
        const Head& head = *find_head(catalog, answer.head);
        return std::make_tuple(!answer.eligible, answer.eligible ? 0.0 : answer.nights_dark_year,
                               head.panel_wp, head.battery_wh);
    };
    int best = -1;
    for (std::size_t i = 0; i < answers.size(); ++i)
        if (best < 0 || rank(answers[i]) < rank(answers[static_cast<std::size_t>(best)]))
            best = static_cast<int>(i);
    return best;
}

/// What a head's panel gets at this pole, written into its lane of the scratch room.
HeadAnswer light_on_head(const ShadeInput& input, const CityLight& light, const ShadeTerms& terms,
                         const SkyLayers& layers, const Head& head, const PanelBearing& bearing,
                         std::size_t lane, ShadeScratch& scratch) {
    const PanelPlace place{head.tilt_deg, bearing.bearing_deg + input.city.convergence_deg, light.albedo};
    const PanelLight panel = panel_light(light.sun, scratch.through, layers, place, terms.sky_step_deg);
    write_yield_wh_per_wp(light.sun, light.sky, panel, light.air_c, {}, scratch.yield.data() + lane, kLanes);
    const MonthlyLight monthly = monthly_light(light.sun, light.sky, panel);
    HeadAnswer answer;
    answer.head = head.head;
    answer.sky_view_frac = panel.opaque_sky_frac;
    answer.shade_score = shade_score(monthly);
    answer.panel_kwh_m2 = monthly.panel_kwh_m2;
    return answer;
}

PoleShade described(PoleIx pole, const PoleHorizon& horizon) {
    PoleShade shade;
    shade.pole = pole;
    shade.panel_height_m = horizon.panel_height_m;
    shade.solid_deg = horizon.solid_deg;
    shade.unknown_deg = horizon.unknown_deg;
    shade.canopy_deg = horizon.deciduous_deg;
    for (std::size_t i = 0; i < shade.canopy_deg.size(); ++i)
        shade.canopy_deg[i] = std::max(shade.canopy_deg[i], horizon.evergreen_deg[i]);
    return shade;
}

void make_room(const CityLight& light, ShadeScratch& scratch) {
    scratch.yield.resize(light.sky.global.size() * kLanes);
    scratch.soc.resize(static_cast<std::size_t>(light.sky.years - light.sky.settling_years) * kHours *
                       kLanes);
}

} // namespace

PoleShade shade_pole(const ShadeInput& input, const CityLight& light, const ShadeTerms& terms, PoleIx pole_ix,
                     const PoleHorizon& horizon, ShadeScratch& scratch) {
    const Pole& pole = input.city.poles[pole_ix.place()];
    PoleShade shade = described(pole_ix, horizon);
    const SkyLayers layers = sky_layers(light, horizon, input.city.convergence_deg);
    write_beam_through(light, horizon, scratch.through);
    make_room(light, scratch);
    const PanelBearing arm = arm_bearing(input.city, pole);
    for (const HeadGroup& group : light.groups) {
        const std::size_t first = shade.heads.size();
        for (std::size_t lane = 0; lane < group.heads.size(); ++lane) {
            const PanelBearing bearing = panel_bearing(arm, group.heads[lane]->turn_deg);
            if (shade.heads.empty()) {
                shade.bearing_deg = bearing.bearing_deg;
                shade.bearing_from = bearing.from;
            }
            shade.heads.push_back(
                light_on_head(input, light, terms, layers, *group.heads[lane], bearing, lane, scratch));
        }
        run_group(light, group, terms, scratch, std::span(shade.heads).subspan(first));
        for (std::size_t lane = 0; lane < group.heads.size(); ++lane)
            judge(pole, *group.heads[lane], input.nights_goal, horizon, shade.heads[first + lane]);
    }
    shade.best = best_head(shade.heads, input.catalog);
    return shade;
}

} // namespace unstring
