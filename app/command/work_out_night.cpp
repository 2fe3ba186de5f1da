#include "app/command/work_out_night.h"

#include <algorithm>
#include <memory>

#include <fmt/format.h>

#include "app/command/night_file.h"

namespace unstring {
namespace {

std::string inputs_text(const NightCase& night) {
    return fmt::format("Inputs: {} N, {} E; panel {} Wp, tilt {} deg to {} deg; battery {} Wh, lamp {} W, "
                       "switched at {} deg;\n"
                       "charge {}, discharge {}, lowest charge {}, panel after losses {}, {} per K; {} "
                       "weather, {} year(s), seed {}.\n",
                       night.place.lat_deg, night.place.lon_deg, night.panel_wp, night.panel.tilt_deg,
                       night.panel.bearing_deg, night.battery.capacity_wh, night.led_w, night.switch_deg,
                       night.battery.charge_frac, night.battery.discharge_frac, night.battery.soc_min,
                       night.terms.gives_frac, night.terms.temp_coeff,
                       night.weather == Weather::mean ? "mean" : "generated", night.years, night.seed);
}

std::string months_text(const NightCase& night, const NightAnswer& answer) {
    std::string text =
        "month  clearness  on the panel  under open sky  panel gives  lamp asks  (kWh/m2, kWh a month)\n";
    for (std::size_t month = 0; month < 12; ++month)
        text += fmt::format("{:5}  {:9.4f}  {:12.3f}  {:14.3f}  {:11.3f}  {:9.3f}\n", month + 1,
                            night.clearness[month], answer.light.panel_kwh_m2[month],
                            answer.light.open_kwh_m2[month], answer.supply_kwh[month],
                            answer.month_demand_kwh[month]);
    return text;
}

std::string results_text(const NightAnswer& answer) {
    return fmt::format("global on the flat {:.3f} kWh/m2 a year; sky view of the panel, canopy opaque, "
                       "{:.6f}; lit {:.1f} h a year\n"
                       "panel gives {:.3f} kWh a year, lamp asks {:.3f}, unmet {:.5f}; dark in {:.2f} nights "
                       "a year, {} in a row at most\n"
                       "energy from the cells {:.3f} full charges a year; battery replaced in year {:.0f}; "
                       "charge at the end {:.4f}\n",
                       answer.ghi_kwh_m2, answer.sky_view_frac, answer.lit_h_year, answer.panel_kwh,
                       answer.demand_kwh, answer.unmet_kwh, answer.nights_dark_year, answer.longest_dark_run,
                       answer.cycles_year, answer.battery_years, answer.final_soc);
}

constexpr const char* kSources = "Each hour: charge first, clip at full, then discharge; nights run noon to "
                                 "noon; one year of settling is not counted.\n"
                                 "Sources: day's sun Cooper (1969), or PSA of 2020; diffuse Erbs, Klein, "
                                 "Duffie (1982); hours Collares-Pereira, Rabl\n"
                                 "(1979), Liu, Jordan (1960); days Bendt et al. (1981), Graham et al. "
                                 "(1988); tilt Hay, Davies (1980); cell temperature\n"
                                 "Faiman (2008); battery ageing Gasper et al. (2023), a large-format lithium "
                                 "iron phosphate cell; cycles ASTM E1049.\n";

void work_out(const std::string& path, WorkOutAnswer& answer) {
    const auto night = read_night_file(path);
    if (!night) {
        answer.fault = night.error();
        return;
    }
    const NightAnswer found = run_night(*night);
    answer.json = {
        {"ghi_kwh_m2", found.ghi_kwh_m2},
        {"panel_kwh", found.panel_kwh},
        {"demand_kwh", found.demand_kwh},
        {"unmet_kwh", found.unmet_kwh},
        {"nights_dark_year", found.nights_dark_year},
        {"lolp_energy", found.lolp_energy},
        {"lolp_nights", found.lolp_nights},
        {"cycles_year", found.cycles_year},
        {"battery_years", found.battery_years},
        {"final_soc", found.final_soc},
        {"shade_score", found.shade_score},
        {"worst_month", nullptr},
        {"years_run", found.years_run},
        {"nights_dark_worst_year", *std::max_element(found.dark_in_year.begin(), found.dark_in_year.end())},
        {"longest_dark_run", found.longest_dark_run},
        {"sky_view_frac", found.sky_view_frac},
        {"panel_kwh_m2", found.light.panel_kwh_m2}};
    if (found.worst_month > 0) answer.json["worst_month"] = found.worst_month;
    answer.steps_text = inputs_text(*night) + months_text(*night, found) + results_text(found) + kSources;
}

} // namespace

void add_work_out_night(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic = work_out_app.add_subcommand("night", "one solar lamp and its battery, hour by hour");
    const auto file = std::make_shared<std::string>();
    topic->add_option("file", *file, "a JSON file with place, weather, panel, battery and lamp")->required();
    topic->footer("Example: unstring work-out night lamp.json\n"
                  "lamp.json: {\"lat\": 40, \"lon\": -75, \"clearness\": "
                  "[0.42,0.46,0.50,0.52,0.54,0.57,0.59,0.58,0.55,0.51,0.43,0.39],\n"
                  "  \"temp_c\": [0,2,7,12,17,22,25,24,19,13,6,1], \"panel_wp\": 100, \"battery_wh\": 400, "
                  "\"led_w\": 12}");
    topic->callback([file, &answer] { work_out(*file, answer); });
}

} // namespace unstring
