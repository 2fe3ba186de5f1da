// All six steps on the sample city, as a newcomer's script would run them.

#include <cmath>
#include <set>

#include <catch2/catch.hpp>

#include "tests/support/program.h"

using namespace unstring::tests;
using nlohmann::json;

namespace {

void check_keys(const json& object, std::initializer_list<const char*> keys) {
    for (const char* key : keys) {
        INFO("key " << key);
        CHECK(object.contains(key));
    }
}

void check_money(double found, double wanted) { CHECK(found == Approx(wanted).margin(0.0051)); }

void check_finding_keys(const json& findings) {
    for (const json& finding : findings)
        check_keys(finding, {"code", "severity", "file", "row", "record", "found", "wanted", "remedy"});
}

void check_gather(const json& answer) {
    check_keys(answer, {"poles", "strings", "series_poles", "transformers", "services", "crs", "crs_from",
                        "rows", "findings"});
    CHECK(answer["crs"] == "EPSG:32609");
    CHECK(answer["poles"] == 1400);
    CHECK(answer["strings"] == 14);
    CHECK(answer["transformers"] == 17);
    for (const auto& [table, count] : answer["rows"].items()) {
        INFO(table);
        CHECK(count["read"].get<long>() == count["kept"].get<long>() + count["set_aside"].get<long>());
    }
}

void check_vet(const json& answer) {
    check_keys(answer, {"errors", "warnings", "set_aside", "findings", "strings"});
    check_finding_keys(answer["findings"]);
    CHECK(answer["errors"] == 0);
    REQUIRE(answer["strings"].size() == 14);
    for (const json& string : answer["strings"])
        check_keys(string, {"string_id", "lamps", "order", "load_kw", "load_kva", "volts", "cable_m",
                            "transformer_id", "tap", "loading_frac", "verdict"});
}

void check_shade(const json& answer, std::size_t candidates) {
    check_keys(answer, {"poles", "eligible", "seconds", "by_head", "per_pole"});
    CHECK(answer["poles"] == candidates);
    REQUIRE(answer["per_pole"].size() == candidates);
    for (const json& pole : answer["per_pole"]) {
        check_keys(pole, {"pole_id", "head", "sky_view_frac", "shade_score", "worst_month", "panel_kwh_m2",
                          "nights_dark_year", "nights_dark_worst_year", "nights_dark_year_new",
                          "battery_years", "eligible", "why"});
        CHECK(pole["panel_kwh_m2"].size() == 12);
        CHECK(pole["eligible"].get<bool>() == pole["why"].get<std::string>().empty());
    }
}

void check_decide(const json& answer, std::size_t candidates) {
    check_keys(answer, {"keep", "rewire", "solar", "cost", "bound", "gap_frac", "trench_m", "services_new",
                        "marks_followed", "marks_refused", "all_rewire_cost", "all_rewire_not_possible",
                        "all_solar_cost", "all_solar_not_possible", "greedy_cost", "seconds"});
    CHECK(answer["keep"].get<std::size_t>() + answer["rewire"].get<std::size_t>() +
              answer["solar"].get<std::size_t>() ==
          candidates);
    CHECK(answer["bound"].get<double>() <= answer["cost"].get<double>() + 0.005);
    CHECK(answer["cost"].get<double>() <= answer["greedy_cost"].get<double>() + 0.005);
    for (const json& refused : answer["marks_refused"]) check_keys(refused, {"pole_id", "reason"});
}

void check_phase(const json& answer, const json& decided, std::size_t candidates) {
    check_keys(answer, {"years", "strings", "moves", "not_reached", "cost", "bound", "gap_frac", "failures"});
    std::size_t rewire = 0, solar = 0;
    for (const json& year : answer["years"]) {
        check_keys(year, {"year", "money", "money_limit", "operating", "hours", "poles", "series_lamps_left",
                          "dark_lamp_nights", "spares"});
        check_keys(year["hours"], {"line", "civil", "lighting", "electric"});
        check_keys(year["dark_lamp_nights"], {"transformers", "cable"});
        for (const json& spare : year["spares"])
            check_keys(spare, {"rated_kw", "output_a", "primary_v", "count", "cover_frac"});
        rewire += year["poles"]["rewire"].get<std::size_t>();
        solar += year["poles"]["solar"].get<std::size_t>();
    }
    CHECK(rewire + solar + decided["keep"].get<std::size_t>() + answer["not_reached"].get<std::size_t>() ==
          candidates);
    double cost = 0;
    for (const json& year : answer["ledger"])
        cost +=
            (year["capital"].get<double>() + year["operating"].get<double>()) * year["factor"].get<double>();
    check_money(answer["cost"], cost);
    CHECK(answer["bound"].get<double>() <= answer["cost"].get<double>() + 0.005);
    CHECK(answer["bound"].get<double>() > 0);
    std::set<std::pair<std::string, std::string>> said;
    for (const json& finding : answer["failures"]) said.emplace(finding["code"], finding["record"]);
    for (const json& string : answer["strings"])
        for (const json& year : string["years"]) {
            check_keys(year, {"year", "lamps", "load_kva", "volts", "cable_m", "transformer_id", "tap",
                              "loading_frac", "verdict"});
            const bool is_over =
                year["verdict"] == "over" || (year["verdict"] == "open" && year["lamps"].get<int>() > 0);
            if (!is_over) CHECK(year["loading_frac"].get<double>() <= 1.0);
            INFO(string["string_id"] << " " << year["year"] << " " << year["verdict"]);
            if (is_over) CHECK_FALSE(said.empty());
        }
}

double rebuilt(const json& option) {
    double cost = 0;
    for (const json& line : option["lines"]) {
        check_keys(line, {"what", "year", "quantity", "unit_price", "amount", "factor"});
        check_money(line["amount"], line["quantity"].get<double>() * line["unit_price"].get<double>());
        cost += line["amount"].get<double>() * line["factor"].get<double>();
    }
    return cost;
}

void check_why(const std::string& project, const std::string& pole_id) {
    const Ran ran = run_program({"why", project, pole_id, "--json"});
    REQUIRE(ran.status == 0);
    const json answer = ran.json();
    check_keys(answer, {"pole_id", "choice", "locked", "mark", "options", "reason", "numbers", "sources"});
    for (const char* name : {"keep", "rewire", "solar"}) {
        const json& option = answer["options"][name];
        check_keys(option, {"possible", "stopped_by", "cost", "lines"});
        INFO(pole_id << " " << name);
        CHECK(option["possible"].get<bool>() == option["stopped_by"].get<std::string>().empty());
        if (option["possible"].get<bool>()) check_money(option["cost"], rebuilt(option));
    }
    CHECK(answer["options"][answer["choice"].get<std::string>()]["possible"].get<bool>());
}

} // namespace

TEST_CASE("sample city: the six steps answer every key of the contract, and no pole or dollar is lost "
          "between them") {
    const TempFolder folder;
    const std::string project = folder.file("quillhaven.gpkg");
    const Ran gather =
        run_program(gather_arguments(project, std::string(UNSTRING_SOURCE) + "/sampledata/quillhaven"));
    INFO(gather.err);
    REQUIRE(gather.status == 0);
    check_gather(gather.json());

    const Ran vet = run_program({"vet", project, "--json"});
    INFO(vet.err);
    REQUIRE(vet.status == 0);
    check_vet(vet.json());

    const Ran shade = run_program({"shade", project, "--json", "--per-pole"});
    INFO(shade.err);
    REQUIRE(shade.status == 0);
    const auto candidates = shade.json()["poles"].get<std::size_t>();
    check_shade(shade.json(), candidates);

    const Ran decide = run_program({"decide", project, "--json"});
    INFO(decide.err);
    REQUIRE(decide.status == 0);
    check_decide(decide.json(), candidates);

    const Ran phase = run_program({"phase", project, "--json"});
    INFO(phase.err);
    REQUIRE(phase.status == 0);
    check_phase(phase.json(), decide.json(), candidates);

    const json per_pole = shade.json()["per_pole"];
    for (std::size_t i = 0; i < per_pole.size(); i += 97) check_why(project, per_pole[i]["pole_id"]);

    const Ran hand_out = run_program({"hand-out", project, "--to", folder.file("orders"), "--json"});
    INFO(hand_out.err);
    REQUIRE(hand_out.status == 0);
    const json answer = hand_out.json();
    check_keys(answer, {"files", "orders"});
    for (const json& file : answer["files"]) CHECK(std::filesystem::file_size(file.get<std::string>()) > 0);
    REQUIRE_FALSE(answer["orders"].empty());
    for (const json& order : answer["orders"])
        check_keys(order, {"order_id", "year", "crew", "poles", "hours"});
}
