// The topics sun, sky, night and horizon, through their own option reading.

#include <cmath>
#include <filesystem>
#include <fstream>
#include <string>

#include <gdal_priv.h>
#include <unistd.h>

#include <catch2/catch.hpp>

#include "app/command/iso_time.h"
#include "app/command/work_out_horizon.h"
#include "app/command/work_out_night.h"
#include "app/command/work_out_sky.h"
#include "app/command/work_out_sun.h"
#include "model/quantities.h"

using namespace unstring;

namespace {

WorkOutAnswer asked(void (*add)(CLI::App&, WorkOutAnswer&), const std::string& words) {
    WorkOutAnswer answer;
    CLI::App app;
    add(app, answer);
    app.parse(words);
    return answer;
}

std::string said(const WorkOutAnswer& answer) {
    return answer.fault ? fault_text(*answer.fault) : std::string();
}

class ScratchFile {
public:
    explicit ScratchFile(const std::string& ending, const std::string& text = {})
        : path_(std::filesystem::temp_directory_path() /
                ("unstring-sun-" + std::to_string(getpid()) + ending)) {
        if (!text.empty()) std::ofstream(path_, std::ios::binary) << text;
    }
    ~ScratchFile() { std::filesystem::remove(path_); }
    ScratchFile(const ScratchFile&) = delete;
    ScratchFile& operator=(const ScratchFile&) = delete;
    [[nodiscard]] const std::string& path() const { return path_; }

private:
    std::string path_;
};

WorkOutAnswer night_of(const std::string& text) {
    const ScratchFile file(".json", text);
    return asked(add_work_out_night, "night " + file.path());
}

WorkOutAnswer sky_of(const std::string& text, const std::string& options = {}) {
    const ScratchFile file(".csv", text);
    return asked(add_work_out_sky, "sky " + file.path() + " " + options);
}

const std::string kLamp =
    R"("lat": 40, "clearness": [0.42,0.46,0.50,0.52,0.54,0.57,0.59,0.58,0.55,0.51,0.43,0.39],
       "temp_c": [0,2,7,12,17,22,25,24,19,13,6,1], "panel_wp": 100, "battery_wh": 400, "led_w": 12)";

} // namespace

TEST_CASE("work-out sun: the worked example, with its refraction in the zenith only") {
    const WorkOutAnswer answer =
        asked(add_work_out_sun, "sun --at 39.742476,-105.1786,1830.14 --time 2003-10-17T12:30:30-07:00 "
                                "--pressure-hpa 820 --temp-c 11 --delta-t 67");
    REQUIRE(said(answer) == "");
    CHECK(answer.json["zenith_deg"].get<double>() == Approx(50.11162).margin(1e-5));
    CHECK(answer.json["elevation_deg"].get<double>() == Approx(39.872046).margin(1e-6));
    CHECK(answer.json["azimuth_deg"].get<double>() == Approx(194.340241).margin(1e-6));
    CHECK(answer.json["method"] == "spa");
    CHECK(answer.steps_text.find("202.227") != std::string::npos);
}

TEST_CASE(
    "work-out sun: a place in the south and the fast method; what cannot be read is a fault by its option") {
    const WorkOutAnswer psa =
        asked(add_work_out_sun, "sun --at -33.5,151.2 --time 2025-06-21T02:00Z --method psa");
    REQUIRE(said(psa) == "");
    CHECK(psa.json["method"] == "psa");
    CHECK((psa.json["azimuth_deg"] < 10 || psa.json["azimuth_deg"] > 350));
    CHECK(asked(add_work_out_sun, "sun --at 95,0 --time 2025-06-21T02:00Z").fault->code ==
          FaultCode::bad_usage);
    CHECK(asked(add_work_out_sun, "sun --at 40 --time 2025-06-21T02:00Z").fault->field == "--at");
    CHECK(asked(add_work_out_sun, "sun --at 40,x --time 2025-06-21T02:00Z").fault->field == "--at");
    CHECK(asked(add_work_out_sun, "sun --at 40,0 --time 2025-02-30T02:00Z").fault->field == "--time");
    CHECK_THROWS_AS(asked(add_work_out_sun, "sun --at 40,0 --time 2025-02-20T02:00Z --method other"),
                    CLI::ParseError);
}

TEST_CASE("iso time: zones, fractions and leap days are read, and what is no instant is nothing") {
    CHECK(read_iso_time("2003-10-17T12:30:30-07:00")->hour_utc == Approx(19.508333333));
    CHECK(read_iso_time("2003-10-17 12:30+0530")->hour_utc == Approx(7.0));
    CHECK(read_iso_time("2003-10-17T12:30:30.5Z")->hour_utc == Approx(12 + 30.5 / 60 / 1).margin(0.01));
    CHECK_FALSE(read_iso_time("2003-10-17T12:30")->has_zone);
    CHECK(read_iso_time("2024-02-29T00:00Z"));
    CHECK_FALSE(read_iso_time("2023-02-29T00:00Z"));
    CHECK_FALSE(read_iso_time("2023-02-28T24:10Z"));
    CHECK_FALSE(read_iso_time("2023-02-28T12:10Zx"));
    CHECK_FALSE(read_iso_time("2023-02-28"));
    CHECK_FALSE(read_iso_time(""));
}

TEST_CASE("work-out sky: one point is a uniform horizon, two rows of one azimuth a step") {
    CHECK(sky_of("azimuth_deg,height_deg\n0,30\n").json["sky_view_frac"].get<double>() ==
          Approx(0.75).margin(1e-6));
    const auto sector = sky_of("azimuth_deg,height_deg\r\n100,0\r\n100,40\r\n160,40\r\n160,0\r\n");
    CHECK(sector.json["sky_view_frac"].get<double>() == Approx(0.931137).margin(1e-6));
    const auto tilted = sky_of("azimuth_deg;height_deg\n0;20,0\n", "--tilt 15 --bearing 200");
    CHECK(tilted.json["sky_view_frac"].get<double>() == Approx(0.852934).margin(1e-6));
}

TEST_CASE("work-out sky: a broken cell is a fault with its line") {
    const auto answer = sky_of("azimuth_deg,height_deg\n0,30\n90,high\n");
    REQUIRE(answer.fault);
    CHECK(answer.fault->row == 3);
    CHECK(answer.fault->field == "height_deg");
    CHECK(sky_of("az,h\n0,30\n").fault->code == FaultCode::column_missing);
    CHECK(asked(add_work_out_sky, "sky /nowhere/at-all.csv").fault->code == FaultCode::file_missing);
}

TEST_CASE("work-out night: the deterministic case through its file") {
    const auto answer =
        night_of("{" + kLamp + R"(, "sun_step_min": 60, "weather": "mean", "day_model": "cooper"})");
    REQUIRE(said(answer) == "");
    CHECK(answer.json["ghi_kwh_m2"].get<double>() == Approx(1506.680).margin(5e-4));
    CHECK(answer.json["unmet_kwh"].get<double>() == Approx(1.24995).margin(5e-6));
    CHECK(answer.json["nights_dark_year"] == 48);
    CHECK(answer.json["lolp_nights"].get<double>() == Approx(48 / 365.0));
    CHECK(answer.json["final_soc"].get<double>() == Approx(.2270).margin(5e-5));
    CHECK(answer.json["worst_month"] == 12);
    CHECK(answer.json["years_run"] == 1);
    for (const char* key :
         {"panel_kwh", "demand_kwh", "lolp_energy", "cycles_year", "battery_years", "shade_score"})
        CHECK(answer.json.contains(key));
}

TEST_CASE(
    "work-out night: a key that is not known, a value out of range and a missing month name their field") {
    CHECK(night_of("{" + kLamp + R"(, "panel_w": 3})").fault->field == "panel_w");
    CHECK(night_of("{" + kLamp + R"(, "soc_min": 1.5})").fault->field == "soc_min");
    CHECK(night_of("{" + kLamp + R"(, "ghi_kwh_m2_day": [1]})").fault->field == "clearness");
    CHECK(night_of("{" + kLamp + R"(, "horizon": [[0, 10], [20]]})").fault->field == "horizon");
    CHECK(night_of("{" + kLamp + R"(, "dimming": [{"from_h": 4, "to_h": 2, "frac": 1}]})").fault->field ==
          "dimming[0].to_h");
    CHECK(night_of("{" + kLamp + R"(, "day_model": "psa"})").fault->field == "lon");
    CHECK(night_of("{" + kLamp + R"(, "sun_step_min": 7})").fault->field == "sun_step_min");
    CHECK(night_of(R"({"lat": 40})").fault->field == "temp_c");
    CHECK(night_of("{lat").fault->code == FaultCode::file_broken);
}

TEST_CASE("work-out night: irradiation given by month comes out again") {
    const auto answer = night_of(
        R"({"lat": 40, "ghi_kwh_m2_day": [1.8,2.6,3.7,4.7,5.5,6.1,6.0,5.3,4.3,3.1,2.0,1.6], "temp_c": [0,2,7,12,17,22,25,24,19,13,6,1],
            "panel_wp": 80, "battery_wh": 500, "led_w": 10})");
    REQUIRE(said(answer) == "");
    const double year =
        31 * (1.8 + 3.7 + 5.5 + 6.0 + 5.3 + 3.1 + 1.6) + 30 * (4.7 + 6.1 + 4.3 + 2.0) + 28 * 2.6;
    CHECK(answer.json["ghi_kwh_m2"].get<double>() == Approx(year).epsilon(1e-9));
}

TEST_CASE("work-out horizon: a wall in a raster stands where it was drawn, and the edge is named unknown") {
    GDALAllRegister();
    const ScratchFile file(".tif");
    {
        constexpr int kSize = 200;
        auto* driver = GetGDALDriverManager()->GetDriverByName("GTiff");
        GDALDataset* set = driver->Create(file.path().c_str(), kSize, kSize, 1, GDT_Float32, nullptr);
        double corner[6] = {1000, 0.5, 0, 2000, 0, -0.5};
        set->SetGeoTransform(corner);
        std::vector<float> cells(kSize * kSize, 0.0F);
        for (int row = 0; row < 60; ++row) // all that lies north of y = 1970
            for (int column = 0; column < kSize; ++column)
                cells[static_cast<std::size_t>(row * kSize + column)] = 18;
        CHECK(set->GetRasterBand(1)->RasterIO(GF_Write, 0, 0, kSize, kSize, cells.data(), kSize, kSize,
                                              GDT_Float32, 0, 0) == CE_None);
        GDALClose(set);
    }
    const auto answer =
        asked(add_work_out_horizon,
              "horizon --raster " + file.path() + " --at 1050,1950 --height 8 --reach 30 --directions 36");
    REQUIRE(said(answer) == "");
    REQUIRE(answer.json["horizon"].size() == 36);
    // Due north the wall's face lies 20 m away: atan(10 / 20) = 26.565. Bilinear cells blur it over half a
    // metre, so that its full height stands at 20.25 m.
    CHECK(answer.json["horizon"][0][1].get<double>() ==
          Approx(std::atan(10 / 20.25) / kRadPerDeg).margin(1e-4));
    CHECK(answer.json["horizon"][18][1].get<double>() == 0);
    CHECK(answer.json["horizon"][9][0].get<double>() == 90);
    CHECK(answer.json["unknown_deg"].empty());
    const auto beyond =
        asked(add_work_out_horizon,
              "horizon --raster " + file.path() + " --at 1050,1950 --height 8 --reach 60 --directions 36");
    CHECK(beyond.json["unknown_deg"].size() > 10);
    CHECK(asked(add_work_out_horizon, "horizon --raster /no/such.tif --at 1,2 --height 8").fault->code ==
          FaultCode::file_missing);
    CHECK(asked(add_work_out_horizon, "horizon --raster x --at 1 --height 8").fault->field == "--at");
}
