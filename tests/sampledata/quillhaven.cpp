// The committed city, read as text and worked out here by itself.
#include <algorithm>
#include <cmath>
#include <complex>
#include <map>
#include <set>

#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>

#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;

namespace {

using Phasor = std::complex<double>;

std::map<std::string, std::vector<Row>> lamps_by_string() {
    std::map<std::string, std::vector<Row>> lamps;
    for (const Row& pole : read_csv(committed("poles.csv")))
        if (!pole.at("order").empty()) lamps[pole.at("string_id")].push_back(pole);
    for (auto& [string, poles] : lamps)
        std::stable_sort(poles.begin(), poles.end(),
                         [](const Row& a, const Row& b) { return number(a, "order") < number(b, "order"); });
    return lamps;
}

std::map<std::string, Row> circuits() {
    std::map<std::string, Row> answer;
    for (const Row& row : read_csv(committed("circuits.csv"))) answer[row.at("string_id")] = row;
    return answer;
}

double apart_m(double e1, double n1, double e2, double n2) { return std::hypot(e1 - e2, n1 - n2); }

std::vector<double> legs_m(const Row& circuit, const std::vector<Row>& lamps) {
    std::vector<double> legs;
    double e = number(circuit, "station_e"), n = number(circuit, "station_n");
    for (const Row& lamp : lamps) {
        legs.push_back(apart_m(e, n, number(lamp, "easting"), number(lamp, "northing")));
        e = number(lamp, "easting"), n = number(lamp, "northing");
    }
    legs.push_back(apart_m(e, n, number(circuit, "station_e"), number(circuit, "station_n")));
    return legs;
}

double sum(const std::vector<double>& values) {
    double total = 0;
    for (const double value : values) total += value;
    return total;
}

// System watts and power factor by fixture, from the default catalogue.
const std::map<std::string, std::pair<double, double>>& catalogue() {
    static const auto kLamps = [] {
        std::map<std::string, std::pair<double, double>> lamps;
        const auto file =
            nlohmann::json::parse(text_of_file(std::string(UNSTRING_SOURCE) + "/resources/catalogue.json"));
        for (const auto& lamp : file.at("lamps"))
            lamps[lamp.at("fixture")] = {lamp.at("system_w"), lamp.at("pf")};
        return lamps;
    }();
    return kLamps;
}

double watts_of(const Row& lamp) {
    return lamp.at("lamp_w").empty() ? catalogue().at(lamp.at("fixture")).first : number(lamp, "lamp_w");
}
double power_factor_of(const Row& lamp) {
    return lamp.at("lamp_pf").empty() ? catalogue().at(lamp.at("fixture")).second : number(lamp, "lamp_pf");
}

// V = I (R + jX) + sum of P / (I pf), lagging; S = I |V|. R: NEC ch. 9 table 8, stranded uncoated copper at
// 75 C, 0.778 and 0.491 ohm per 1000 ft for AWG 8 and 6, brought to 25 C; X: table 9, PVC, 0.052 and 0.051.
double load_kva(const Row& circuit, const std::vector<Row>& lamps, double ageing) {
    const double metres =
        circuit.at("length_m").empty() ? sum(legs_m(circuit, lamps)) * 1.06 : number(circuit, "length_m");
    const double kilofeet = metres / 304.8;
    const bool is_six = circuit.at("cable_awg") == "6";
    Phasor volts =
        6.6 * Phasor((is_six ? 0.491 : 0.778) * (1 + 0.00323 * (25 - 75)), is_six ? 0.051 : 0.052) * kilofeet;
    for (const Row& lamp : lamps)
        if (lamp.at("status") == "standing")
            volts += std::polar((1 + ageing) * watts_of(lamp) / (6.6 * power_factor_of(lamp)),
                                std::acos(power_factor_of(lamp)));
    return 6.6 * std::abs(volts) / 1000;
}

struct Seat {
    Row unit;
    double rated_kw = 0; ///< of this loop: a two-loop unit gives each half
};

std::map<std::string, Seat> seats() {
    const auto units = read_csv(committed("transformers.csv"));
    std::map<std::string, int> loops;
    for (const Row& unit : units) ++loops[unit.at("transformer_id")];
    std::map<std::string, Seat> answer;
    for (const Row& unit : units)
        if (!unit.at("string_id").empty())
            answer[unit.at("string_id")] = {unit,
                                            number(unit, "rated_kw") / loops[unit.at("transformer_id")]};
    return answer;
}

std::set<std::string> values_of(const std::string& file, const std::string& column) {
    std::set<std::string> values;
    for (const Row& row : read_csv(committed(file))) values.insert(row.at(column));
    return values;
}

} // namespace

TEST_CASE("Quillhaven: wiring orders of each string run 1..n without a gap, 30 to 120 lamps") {
    const auto lamps = lamps_by_string();
    CHECK(lamps.size() == 14);
    for (const auto& [string, poles] : lamps) {
        INFO(string);
        CHECK(poles.size() >= 30);
        CHECK(poles.size() <= 120);
        for (std::size_t i = 0; i < poles.size(); ++i)
            REQUIRE(number(poles[i], "order") == static_cast<double>(i + 1));
    }
}

TEST_CASE("Quillhaven: each string loads its transformer 55 to 95 %, and stays under the rating when its "
          "lamps have aged") {
    const auto lamps = lamps_by_string();
    auto rows = circuits();
    auto at = seats();
    for (const auto& [string, poles] : lamps) {
        INFO(string);
        REQUIRE(at.count(string) == 1);
        const double rated_kw = at[string].rated_kw;
        const double today = load_kva(rows[string], poles, 0) / rated_kw,
                     aged = load_kva(rows[string], poles, 0.1) / rated_kw;
        CHECK(today >= 0.55);
        CHECK(today <= 0.95);
        CHECK(aged < 1);
    }
}

TEST_CASE("Quillhaven: running and open-circuit volts stay within the cable's class") {
    const auto lamps = lamps_by_string();
    auto rows = circuits();
    for (const auto& [string, seat] : seats()) {
        INFO(string);
        const double class_v = number(rows[string], "cable_kv") * 1000;
        CHECK(load_kva(rows[string], lamps.at(string), 0.1) / 6.6 * 1000 < class_v);
        const double open_v =
            seat.unit.at("open_v").empty() ? 1.4 * seat.rated_kw * 1000 / 6.6 : number(seat.unit, "open_v");
        CHECK(open_v < class_v);
    }
}

TEST_CASE("Quillhaven: volts that were read agree with the volts of the lamps and the cable within 1 %") {
    const auto lamps = lamps_by_string();
    int read = 0;
    for (const auto& [string, row] : circuits()) {
        if (row.at("asfound_v").empty()) continue;
        INFO(string);
        ++read;
        CHECK(number(row, "asfound_v") ==
              Approx(load_kva(row, lamps.at(string), 0) / 6.6 * 1000).epsilon(0.01));
    }
    CHECK(read > 3);
}

TEST_CASE("Quillhaven: no leg of a loop is over 120 m, no two poles closer than 5 m") {
    auto rows = circuits();
    for (const auto& [string, poles] : lamps_by_string()) {
        INFO(string);
        const auto legs = legs_m(rows[string], poles);
        CHECK(*std::max_element(legs.begin(), legs.end()) < 120);
    }
    const auto poles = read_csv(committed("poles.csv"));
    double closest_m = 1e9;
    for (std::size_t i = 0; i < poles.size(); ++i)
        for (std::size_t j = 0; j < i; ++j)
            closest_m =
                std::min(closest_m, apart_m(number(poles[i], "easting"), number(poles[i], "northing"),
                                            number(poles[j], "easting"), number(poles[j], "northing")));
    CHECK(closest_m > 5);
}

TEST_CASE("Quillhaven: 13 transformers in service, one with two loops, and 4 spares; current, volts and "
          "mount fit") {
    const auto units = read_csv(committed("transformers.csv"));
    std::set<std::string> in_service, spare;
    for (const Row& unit : units)
        (unit.at("state") == "spare" ? spare : in_service).insert(unit.at("transformer_id"));
    CHECK(in_service.size() == 13);
    CHECK(spare.size() == 4);
    CHECK(units.size() == 18);
    CHECK(values_of("transformers.csv", "primary_v").size() == 2);
    CHECK(values_of("transformers.csv", "mount") == std::set<std::string>{"pad", "pole", "vault"});
    CHECK(values_of("transformers.csv", "oil") == std::set<std::string>{"mineral", "none", "unknown"});
    CHECK(values_of("transformers.csv", "output_a") == std::set<std::string>{"6.6"});
}

TEST_CASE(
    "Quillhaven: cut-backs join two lamps of one string in order, never cross, and most are confirmed") {
    std::map<std::string, int> position;
    for (const auto& [string, poles] : lamps_by_string())
        for (const Row& pole : poles)
            position[string + "|" + pole.at("pole_id")] = std::stoi(pole.at("order"));
    std::map<std::string, std::vector<std::pair<int, int>>> spans;
    int confirmed = 0, all = 0;
    for (const Row& row : read_csv(committed("cutbacks.csv"))) {
        INFO(row.at("string_id") << " " << row.at("pole_a") << " " << row.at("pole_b"));
        const auto place = [&](const std::string& pole) {
            return pole == "out"      ? 0
                   : pole == "return" ? 1000
                                      : position.at(row.at("string_id") + "|" + pole);
        };
        const int a = place(row.at("pole_a")), b = place(row.at("pole_b"));
        CHECK(b - a > 1);
        CHECK(number(row, "new_cable_m") > 0);
        ++all, confirmed += row.at("confirmed") == "yes";
        spans[row.at("string_id")].push_back({a, b});
    }
    CHECK(spans.size() == 14);
    CHECK(confirmed > all / 2);
    CHECK(confirmed < all);
    int crossing = 0;
    for (const auto& [string, list] : spans)
        for (const auto& [a, b] : list)
            for (const auto& [c, d] : list) crossing += a < c && c < b && b < d;
    CHECK(crossing == 0);
}

TEST_CASE("Quillhaven: every kind of pole, duct, source and topology is there") {
    CHECK(values_of("poles.csv", "status") ==
          std::set<std::string>{"standing", "down", "not-ours", "proposed"});
    CHECK(values_of("poles.csv", "duct") ==
          std::set<std::string>{"", "proven", "inspected", "assumed", "unknown", "bad", "direct-buried"});
    CHECK(values_of("poles.csv", "feed") == std::set<std::string>{"underground", "overhead"});
    CHECK(values_of("poles.csv", "owner") == std::set<std::string>{"city", "utility", "other"});
    CHECK(values_of("poles.csv", "consent") == std::set<std::string>{"", "yes", "no"});
    CHECK(values_of("poles.csv", "need_lm") == std::set<std::string>{"4000", "7000", "11000"});
    CHECK(values_of("poles.csv", "critical") == std::set<std::string>{"yes", "no"});
    CHECK(values_of("poles.csv", "attachments").size() == 5);
    CHECK(values_of("services.csv", "kind") == std::set<std::string>{"service", "circuit-end", "candidate"});
    CHECK(values_of("circuits.csv", "control_from") == std::set<std::string>{"", "S-06"});
    for (const Row& pole : read_csv(committed("poles.csv")))
        REQUIRE((pole.at("pole_kind") == "wood") == (pole.at("feed") == "overhead"));
}

TEST_CASE("Quillhaven: services at poles name poles that are there, marks too") {
    const auto poles = values_of("poles.csv", "pole_id");
    for (const Row& row : read_csv(committed("services.csv")))
        if (!row.at("pole_id").empty()) CHECK(poles.count(row.at("pole_id")) == 1);
    int locks = 0, keeps = 0;
    const auto marks = read_csv(committed("marks.csv"));
    for (const Row& row : marks) {
        CHECK(poles.count(row.at("pole_id")) == 1);
        locks += row.at("lock") == "1";
        keeps += row.at("mark") == "keep" && row.at("lock") == "0";
    }
    CHECK(marks.size() == 12);
    CHECK(locks == 3);
    CHECK(keeps == 1);
}

// Daily irradiation outside the atmosphere by Cooper's declination (Duffie and Beckman, Solar Engineering of
// Thermal Processes, eq. 1.6.1a and 1.10.3), on Klein's mean days.
TEST_CASE("Quillhaven: the climate's monthly clearness is that of a real sky, .4 to .65") {
    constexpr int kMeanDay[12] = {17, 47, 75, 105, 135, 162, 198, 228, 258, 288, 318, 344};
    const double latitude = 34 * M_PI / 180;
    const auto rows = read_csv(committed("climate.csv"));
    REQUIRE(rows.size() == 12);
    for (std::size_t i = 0; i < 12; ++i) {
        const double declination = 23.45 * M_PI / 180 * std::sin(2 * M_PI * (284 + kMeanDay[i]) / 365.0);
        const double sunset = std::acos(-std::tan(latitude) * std::tan(declination));
        const double outside_kwh = 24 / M_PI * 1.367 *
                                   (1 + 0.033 * std::cos(2 * M_PI * kMeanDay[i] / 365.0)) *
                                   (std::cos(latitude) * std::cos(declination) * std::sin(sunset) +
                                    sunset * std::sin(latitude) * std::sin(declination));
        const double clearness = number(rows[i], "ghi_kwh_m2_day") / outside_kwh;
        INFO("month " << i + 1);
        CHECK(clearness > 0.4);
        CHECK(clearness < 0.65);
    }
}

TEST_CASE("Quillhaven: eight budget years of 1.0 to 1.3 million") {
    const auto rows = read_csv(committed("budget.csv"));
    REQUIRE(rows.size() == 8);
    for (std::size_t i = 0; i < rows.size(); ++i) {
        CHECK(number(rows[i], "year") == 2027 + static_cast<double>(i));
        CHECK(number(rows[i], "money") >= 1.0e6);
        CHECK(number(rows[i], "money") <= 1.3e6);
    }
}
