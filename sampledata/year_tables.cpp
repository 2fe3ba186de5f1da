#include "sampledata/year_tables.h"

#include <algorithm>
#include <array>
#include <cmath>

#include <fmt/format.h>

#include "sampledata/csv_file.h"

namespace unstring::sample {
namespace {

// A mid-latitude ocean island: mild winters, a clearness of about .5 in winter and .56 in summer. Invented.
constexpr std::array<double, 12> kGhi_kwh_m2_day = {2.72, 3.55, 4.72, 5.78, 6.30, 6.48,
                                                    6.55, 6.02, 5.05, 3.92, 2.95, 2.48};
constexpr std::array<double, 12> kTemp_c = {13.2, 13.0, 13.6, 14.6, 16.0, 17.8,
                                            19.6, 20.6, 20.3, 18.7, 16.3, 14.2};

Expected<void> write_climate(const std::string& folder) {
    CsvFile file(folder + "/climate.csv", "month,ghi_kwh_m2_day,temp_c,albedo");
    for (std::size_t i = 0; i < 12; ++i)
        file.row({std::to_string(i + 1), cell(kGhi_kwh_m2_day[i], 2), cell(kTemp_c[i], 1), "0.20"});
    return file.close();
}

Expected<void> write_prices(const std::string& folder) {
    CsvFile file(folder + "/prices.csv",
                 "item,unit,low,base,high,note,date,from_year,to_year,change_frac_year");
    const std::string note = "invented, Quillhaven works department";
    file.row({"trench_soft", "ft", "32", "48", "75", note, "2025-11-03", "2026", "", "0.01"});
    file.row({"trench_paved", "ft", "80", "118", "190", note, "2025-11-03", "2026", "", "0.015"});
    file.row({"bore", "ft", "45", "70", "105", note, "2025-11-03", "", "", ""});
    file.row({"pull", "ft", "5", "8.5", "14", note, "2025-11-03", "", "", ""});
    file.row({"service_new", "each", "6000", "11500", "26000", note + "; utility's tariff", "2025-07-01",
              "2026", "", "0.02"});
    file.row({"led_head", "each", "290", "430", "700", note + "; term contract", "2025-09-15", "2026", "2028",
              "-0.01"});
    file.row({"led_head", "each", "280", "410", "700", note + "; expected after the contract", "2025-09-15",
              "2029", "", ""});
    file.row({"solar_head_m", "each", "3400", "4350", "6000", note + "; quotation", "2025-10-20", "2026", "",
              "-0.015"});
    file.row({"solar_head_l", "each", "5000", "6300", "8600", note + "; quotation", "2025-10-20", "2026", "",
              "-0.015"});
    file.row({"battery", "each", "380", "560", "900", note, "2025-10-20", "2026", "", "-0.02"});
    file.row({"energy_kwh", "kWh", "0.14", "0.19", "0.28", note + "; island tariff", "2025-07-01", "2026", "",
              "0.005"});
    file.row({"upkeep_series", "year", "90", "135", "210", note + "; mean of the last five years",
              "2025-06-30", "", "", ""});
    file.row({"traffic_arterial", "day", "1600", "2600", "4800", note, "2025-11-03", "", "", ""});
    return file.close();
}

Expected<void> write_budget(const std::string& folder, long poles) {
    // Enough for the whole conversion, with little to spare in money, diggers' and electricians' hours.
    constexpr std::array<double, 8> kMoney_k = {1000, 1100, 1200, 1250, 1250, 1300, 1300, 1300};
    CsvFile file(folder + "/budget.csv",
                 "year,money,fund,wards,kinds,spend_by,match_frac,line_h,civil_h,lighting_h,electric_h");
    // Small cities get somewhat more by the pole: one trench may fill their year.
    const double share = (static_cast<double>(poles) / 1400 + 0.1) / 1.1;
    const auto scaled = [&](double value) {
        return fmt::format("{:.0f}", std::ceil(value * share / 10 - 1e-9) * 10);
    };
    for (std::size_t i = 0; i < kMoney_k.size(); ++i)
        file.row({std::to_string(2027 + i), scaled(kMoney_k[i] * 1000), "street lighting", "", "", "", "",
                  scaled(250),
                  scaled(i == 0   ? 2600
                         : i == 1 ? 2800
                                  : 3200),
                  scaled(400), scaled(i < 2 ? 850 : 900)});
    return file.close();
}

// The n-th standing pole that is still on a string and passes the test.
template <class Test>
const PoleRow* pick(const std::vector<PoleRow>& poles, const std::string& circuit, std::size_t nth,
                    Test test) {
    for (const PoleRow& pole : poles)
        if (pole.circuit == circuit && pole.order != 0 && pole.status == "standing" && test(pole) &&
            nth-- == 0)
            return &pole;
    return nullptr;
}

struct Wish {
    const char* circuit;
    std::size_t nth;
    const char* road_class;
    const char* mark;
    bool is_lock;
    int year;
    const char* who;
    const char* note;
};

Expected<void> write_marks(const std::string& folder, const std::vector<PoleRow>& poles) {
    constexpr std::array<Wish, 12> kWishes = {{
        {"S-04", 9, "local", "rewire", false, 0, "east ward", "school gate, wants a wired light"},
        {"S-04", 17, "local", "rewire", false, 0, "east ward", "crowns on both sides"},
        {"S-06", 20, "local", "solar", false, 0, "tree desk", "roots in the way of a trench"},
        {"S-06", 21, "local", "solar", false, 0, "tree desk", "roots in the way of a trench"},
        {"S-08", 4, "local", "solar", false, 0, "west ward", ""},
        {"S-12", 11, "local", "rewire", false, 0, "line crew", "secondary on this pole"},
        {"S-09", 6, "collector", "rewire", false, 0, "traffic desk", ""},
        {"S-10", 12, "arterial", "solar", false, 0, "council office", "asked for at the hearing"},
        {"S-05", 6, "local", "keep", false, 0, "heritage desk", "old filament lamps, keep them burning"},
        {"S-13", 8, "local", "solar", true, 2027, "planner", "shown at the opening day"},
        {"S-14", 5, "arterial", "rewire", true, 0, "planner", "camera needs power"},
        {"S-03", 5, "local", "rewire", true, 2029, "planner", "with the repaving"},
    }};
    CsvFile file(folder + "/marks.csv", "pole_id,mark,lock,year,who,note");
    for (const Wish& wish : kWishes) {
        const PoleRow* pole = pick(poles, wish.circuit, wish.nth,
                                   [&](const PoleRow& each) { return each.road_class == wish.road_class; });
        if (pole == nullptr) continue; // a small city has not all of these strings
        file.row({pole->id, wish.mark, wish.is_lock ? "1" : "0",
                  wish.year == 0 ? "" : std::to_string(wish.year), wish.who, wish.note});
    }
    return file.close();
}

} // namespace

Expected<void> write_year_tables(const std::string& folder, long poles,
                                 const std::vector<PoleRow>& first_poles) {
    if (auto written = write_climate(folder); !written) return written;
    if (auto written = write_prices(folder); !written) return written;
    if (auto written = write_budget(folder, poles); !written) return written;
    return write_marks(folder, first_poles);
}

} // namespace unstring::sample
