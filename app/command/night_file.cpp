#include "app/command/night_file.h"

#include <algorithm>

#include <fmt/format.h>

#include "app/command/work_out.h"
#include "app/command/work_out_input.h"
#include "model/solar/canopy_months.h"
#include "model/sun/clearness.h"

namespace unstring {
namespace {

Monthly months_of(JsonFields& fields, std::string_view key, double low, double high) {
    const std::vector<double> values = fields.numbers(key, low, high);
    Monthly months{};
    if (values.size() == months.size())
        std::copy(values.begin(), values.end(), months.begin());
    else
        fields.refuse(key, fmt::format("{} numbers", values.size()), "12, January first",
                      "give one for each month");
    return months;
}

Monthly albedo_of(JsonFields& fields) {
    Monthly albedo{};
    albedo.fill(0.2);
    if (fields.has("albedo") && fields.raw("albedo").is_array()) return months_of(fields, "albedo", 0, 1);
    albedo.fill(fields.number_or("albedo", 0.2, 0, 1));
    return albedo;
}

HorizonProfile profile_of(JsonFields& fields, std::string_view key) {
    if (!fields.has(key)) return {};
    const nlohmann::json& list = fields.raw(key);
    std::vector<HorizonPoint> points;
    const auto is_angle = [](const nlohmann::json& value, double low, double high) {
        return value.is_number() && value.get<double>() >= low && value.get<double>() <= high;
    };
    const auto refuse = [&](const nlohmann::json& found) {
        fields.refuse(key, found.dump().substr(0, 60), "[[azimuth_deg, height_deg], ..]",
                      "azimuth -360 to 360, height -90 to 90");
    };
    if (!list.is_array()) {
        refuse(list);
        return {};
    }
    for (const nlohmann::json& point : list) {
        if (!point.is_array() || point.size() != 2 || !is_angle(point[0], -360, 360) ||
            !is_angle(point[1], -90, 90)) {
            refuse(point);
            return {};
        }
        points.push_back({point[0].get<double>(), point[1].get<double>()});
    }
    return HorizonProfile(std::move(points));
}

std::vector<DimStep> dimming_of(JsonFields& fields, const std::string& path) {
    std::vector<DimStep> steps;
    if (!fields.has("dimming")) return steps;
    const nlohmann::json& list = fields.raw("dimming");
    if (!list.is_array()) {
        fields.refuse("dimming", list.dump().substr(0, 60), "a list of {from_h, to_h, frac}", "write [..]");
        return steps;
    }
    for (std::size_t i = 0; i < list.size(); ++i) {
        JsonFields step(list[i], path, fmt::format("dimming[{}]", i));
        step.only({"from_h", "to_h", "frac"});
        steps.push_back(
            {step.number("from_h", 0, 24), step.number("to_h", 0, 24), step.number("frac", 0, 1)});
        if (steps.back().to_h <= steps.back().from_h)
            step.refuse("to_h", fmt::format("{}", steps.back().to_h), "more than from_h",
                        "hours after switch-on");
        if (step.fault())
            fields.refuse(step.fault()->field, step.fault()->found, step.fault()->wanted,
                          step.fault()->remedy);
    }
    return steps;
}

void read_canopy(JsonFields& fields, NightCase& night) {
    night.layers.solid = profile_of(fields, "horizon");
    night.layers.deciduous = profile_of(fields, "canopy");
    night.layers.deciduous_beam = fields.has("canopy_beam")
                                      ? months_of(fields, "canopy_beam", 0, 1)
                                      : canopy_through(Leaf::deciduous, night.place.lat_deg);
    night.layers.deciduous_diffuse = fields.has("canopy_diffuse") ? months_of(fields, "canopy_diffuse", 0, 1)
                                                                  : night.layers.deciduous_beam;
}

void read_battery(JsonFields& fields, NightCase& night) {
    constexpr double kLeast = 1e-6;
    night.battery.capacity_wh = fields.number("battery_wh", kLeast, 1e7);
    night.battery.charge_frac = fields.number_or("charge_frac", 0.95, kLeast, 1);
    night.battery.discharge_frac = fields.number_or("discharge_frac", 0.97, kLeast, 1);
    night.battery.soc_min = fields.number_or("soc_min", 0.1, 0, 0.999);
    night.battery.cold_charge_c = fields.optional_number("cold_charge_c", -60, 60);
}

void read_choices(JsonFields& fields, NightCase& night) {
    const std::string weather = fields.text_or("weather", "mean");
    if (weather != "mean" && weather != "generated")
        fields.refuse("weather", weather, "mean or generated", "check its spelling");
    night.weather = weather == "generated" ? Weather::generated : Weather::mean;
    const std::string model = fields.text_or("day_model", "cooper");
    if (model != "cooper" && model != "psa")
        fields.refuse("day_model", model, "cooper or psa", "check its spelling");
    night.day_model = model == "psa" ? DayModel::psa : DayModel::cooper;
    night.years = fields.has("years") ? static_cast<int>(fields.integer("years", 1, 200)) : 1;
    night.seed = fields.has("seed") ? static_cast<std::uint64_t>(fields.integer("seed", 0, 1L << 52)) : 1;
    night.day_to_day = fields.number_or("ar1", kDayToDay, -0.99, 0.99);
    night.sun_step_min =
        fields.has("sun_step_min") ? static_cast<int>(fields.integer("sun_step_min", 1, 60)) : 5;
    if (60 % std::max(1, night.sun_step_min) != 0)
        fields.refuse("sun_step_min", fmt::format("{}", night.sun_step_min), "a divisor of 60", "5 is usual");
}

/// From the file, or from the irradiation that it gives.
void read_clearness(JsonFields& fields, NightCase& night) {
    if (fields.has("clearness") == fields.has("ghi_kwh_m2_day")) {
        fields.refuse("clearness", fields.has("clearness") ? "ghi_kwh_m2_day beside it" : "nothing",
                      "clearness or ghi_kwh_m2_day", "give one of the two");
        return;
    }
    const bool is_generated = night.weather == Weather::generated;
    const double low = is_generated ? kClearnessMeanMin : 0;
    const double high = is_generated ? kClearnessMeanMax : 1;
    if (fields.has("clearness")) {
        night.clearness = months_of(fields, "clearness", low, high);
        return;
    }
    const Monthly ghi = months_of(fields, "ghi_kwh_m2_day", 0, 15);
    if (fields.fault()) return;
    const Monthly outside = monthly_outside_wh_m2(make_sun_year(night.place, night.day_model, 60));
    for (std::size_t month = 0; month < 12; ++month) {
        const double clearness = outside[month] > 0 ? ghi[month] * 1000.0 / outside[month] : 0;
        const bool is_dark_month = outside[month] <= 0 && ghi[month] == 0;
        night.clearness[month] = is_dark_month ? 0.4 : clearness;
        if (!is_dark_month && (outside[month] <= 0 || clearness < low || clearness > high))
            fields.refuse(
                fmt::format("ghi_kwh_m2_day[{}]", month), fmt::format("{}", ghi[month]),
                fmt::format("{:.3f} to {:.3f}", low * outside[month] / 1000, high * outside[month] / 1000),
                "outside the atmosphere there is no more; check unit and latitude");
    }
}

} // namespace

Expected<NightCase> read_night_file(const std::string& path) {
    const auto json = read_json_file(path);
    if (!json) return tl::unexpected(json.error());
    JsonFields fields(*json, path);
    fields.only({"lat",       "lon",          "clearness",   "ghi_kwh_m2_day",
                 "temp_c",    "temp_swing_k", "albedo",      "panel_wp",
                 "tilt_deg",  "bearing_deg",  "battery_wh",  "led_w",
                 "dimming",   "switch_deg",   "charge_frac", "discharge_frac",
                 "soc_min",   "panel_frac",   "temp_coeff",  "cold_charge_c",
                 "horizon",   "canopy",       "canopy_beam", "canopy_diffuse",
                 "years",     "seed",         "weather",     "ar1",
                 "day_model", "sun_step_min"});
    NightCase night;
    night.place = {fields.number_or("lon", 0, -180, 180), fields.number("lat", -90, 90)};
    read_choices(fields, night);
    if (night.day_model == DayModel::psa && !fields.has("lon"))
        fields.refuse("lon", "nothing", "a longitude, -180 to 180", "day_model psa runs in UTC and needs it");
    night.temp_c = months_of(fields, "temp_c", -90, 60);
    night.temp_swing_k = fields.number_or("temp_swing_k", 0, -40, 40);
    night.panel.albedo = albedo_of(fields);
    night.panel.tilt_deg = fields.number_or("tilt_deg", 0, 0, 90);
    night.panel.bearing_deg = fields.number_or("bearing_deg", 180, -360, 360);
    night.panel_wp = fields.number("panel_wp", 0, 1e6);
    night.terms.gives_frac = fields.number_or("panel_frac", 0.9, 0, 1);
    night.terms.temp_coeff = fields.number_or("temp_coeff", -0.004, -0.02, 0.02);
    night.led_w = fields.number("led_w", 0, 1e5);
    night.dimming = dimming_of(fields, path);
    night.switch_deg = fields.number_or("switch_deg", kSwitch_deg, -90, 90);
    read_battery(fields, night);
    read_canopy(fields, night);
    if (!fields.fault()) read_clearness(fields, night);
    if (fields.fault()) return tl::unexpected(*fields.fault());
    return night;
}

} // namespace unstring
