#include "app/command/work_out_sun.h"

#include <memory>

#include <fmt/format.h>

#include "app/command/iso_time.h"
#include "app/command/work_out_options.h"
#include "model/sun/spa.h"
#include "model/sun/sun_position.h"

namespace unstring {
namespace {

struct SunOptions {
    std::string at, time, method = "spa";
    double pressure_hpa = 1013.25, temp_c = 12, delta_t_s = 69;
};

std::optional<Fault> check(const SunOptions& given, const std::vector<double>& at) {
    auto fault = out_of_range("--at (latitude)", at[0], -90, 90, "latitude first, then longitude");
    if (!fault) fault = out_of_range("--at (longitude)", at[1], -180, 180, "degrees, east positive");
    if (!fault && at.size() > 2)
        fault = out_of_range("--at (elevation)", at[2], -500, 9000, "metres above the sea");
    if (!fault)
        fault = out_of_range("--pressure-hpa", given.pressure_hpa, 0, 1200, "0 leaves refraction out");
    if (!fault) fault = out_of_range("--temp-c", given.temp_c, -100, 70, "degrees Celsius");
    if (!fault) fault = out_of_range("--delta-t", given.delta_t_s, -8000, 8000, "seconds");
    return fault;
}

std::string inputs_text(const SunOptions& given, const SpaInput& input, const Instant& time) {
    return fmt::format(
        "Inputs: {} N, {} E, {} m, {}{}, {} hPa, {} C, terrestrial minus universal time {} s.\n"
        "days since 2000-01-01 12:00 UTC  {:.8f}\n",
        input.place.lat_deg, input.place.lon_deg, input.elevation_m, given.time,
        time.has_zone ? "" : " (no zone given: UTC)", given.pressure_hpa, given.temp_c, given.delta_t_s,
        input.days_since_2000);
}

void answer_spa(const SpaInput& input, WorkOutAnswer& answer) {
    const SpaSun sun = spa_sun(input);
    answer.json = {{"zenith_deg", sun.zenith_deg},
                   {"elevation_deg", sun.elevation_deg},
                   {"azimuth_deg", sun.azimuth_deg},
                   {"method", "spa"}};
    answer.steps_text += fmt::format(
        "Earth: longitude {:.10f}, latitude {:.10f} deg, distance {:.10f} AU\n"
        "nutation: longitude {:.8f}, obliquity {:.8f} deg; obliquity of the ecliptic {:.6f} deg\n"
        "sun: apparent longitude {:.10f}, right ascension {:.6f}, declination {:.6f} deg\n"
        "sidereal time {:.6f}, hour angle {:.6f}, at the place {:.6f} deg, declination there {:.6f} deg\n"
        "elevation {:.6f} deg, refraction {:.6f} deg, zenith with refraction {:.6f} deg, azimuth {:.6f} deg\n"
        "equation of time {:.4f} min\n"
        "Source: I. Reda, A. Andreas, Solar Energy 76 (2004) 577-589; NREL/TP-560-34302.\n",
        sun.earth_longitude_deg, sun.earth_latitude_deg, sun.radius_au, sun.nutation_longitude_deg,
        sun.nutation_obliquity_deg, sun.obliquity_deg, sun.apparent_longitude_deg, sun.ascension_deg,
        sun.declination_deg, sun.sidereal_deg, sun.hour_angle_deg, sun.topocentric_hour_angle_deg,
        sun.topocentric_declination_deg, sun.elevation_deg, sun.refraction_deg, sun.zenith_deg,
        sun.azimuth_deg, sun.equation_of_time_min);
}

void answer_psa(const SpaInput& input, WorkOutAnswer& answer) {
    const SunPosition sun = psa_sun(input.days_since_2000, input.place);
    const double refraction_deg = air_refraction_deg(input, sun.elevation_deg);
    answer.json = {{"zenith_deg", 90.0 - sun.elevation_deg - refraction_deg},
                   {"elevation_deg", sun.elevation_deg},
                   {"azimuth_deg", sun.azimuth_deg},
                   {"method", "psa"}};
    answer.steps_text += fmt::format(
        "declination {:.6f} deg, hour angle {:.6f} deg\n"
        "elevation {:.6f} deg, refraction {:.6f} deg, zenith with refraction {:.6f} deg, azimuth {:.6f} deg\n"
        "Good to 0.01 degrees in 2020-2050.\n"
        "Source: M. Blanco et al., Solar Energy 212 (2020) 339-341; refraction as in NREL/TP-560-34302.\n",
        sun.declination_deg, sun.hour_angle_deg, sun.elevation_deg, refraction_deg,
        90.0 - sun.elevation_deg - refraction_deg, sun.azimuth_deg);
}

void work_out(const SunOptions& given, WorkOutAnswer& answer) {
    const auto at = read_list("--at", given.at, 2, 3, "LAT,LON or LAT,LON,ELEV_M");
    if (!at) {
        answer.fault = at.error();
        return;
    }
    answer.fault = check(given, *at);
    if (answer.fault) return;
    const auto time = read_iso_time(given.time);
    if (!time) {
        answer.fault = Fault{FaultCode::bad_usage,
                             {},
                             0,
                             "--time",
                             given.time,
                             "an ISO 8601 instant",
                             "write it as 2003-10-17T12:30:30-07:00"};
        return;
    }
    SpaInput input;
    input.days_since_2000 = days_since_2000(time->year, time->month, time->day, time->hour_utc);
    input.place = {(*at)[1], (*at)[0]};
    input.elevation_m = at->size() > 2 ? (*at)[2] : 0;
    input.pressure_hpa = given.pressure_hpa;
    input.temp_c = given.temp_c;
    input.delta_t_s = given.delta_t_s;
    answer.steps_text = inputs_text(given, input, *time);
    if (given.method == "psa")
        answer_psa(input, answer);
    else
        answer_spa(input, answer);
}

} // namespace

void add_work_out_sun(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic = work_out_app.add_subcommand("sun", "where the sun stands at an instant");
    const auto given = std::make_shared<SunOptions>();
    topic->add_option("--at", given->at, "LAT,LON[,ELEV_M] in degrees, north and east positive")->required();
    topic->add_option("--time", given->time, "instant, ISO 8601; without a zone it is UTC")->required();
    topic->add_option("--pressure-hpa", given->pressure_hpa, "air pressure, for refraction")
        ->capture_default_str();
    topic->add_option("--temp-c", given->temp_c, "air temperature, for refraction")->capture_default_str();
    topic->add_option("--delta-t", given->delta_t_s, "terrestrial minus universal time, s (spa)")
        ->capture_default_str();
    topic->add_option("--method", given->method, "spa: exact, psa: the fast one of the shade step")
        ->check(CLI::IsMember({"spa", "psa"}))
        ->capture_default_str();
    topic->footer(
        "Example: unstring work-out sun --at 39.742476,-105.1786,1830.14 --time 2003-10-17T12:30:30-07:00 "
        "--pressure-hpa 820 --temp-c 11 --delta-t 67");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
