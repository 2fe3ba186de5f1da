// Tables one by one: what each makes of blank, odd and wrong cells.

#include <algorithm>
#include <string>

#include "geo/imports/catalogue_file.h"
#include "geo/imports/gathered.h"
#include "resources/resources.h"
#include "tests/support/temp_files.h"

#include <catch2/catch.hpp>

using namespace unstring;
using unstring::test::TempFolder;

namespace {

Gathered must_read(const GatherFiles& files, const Gathered* earlier = nullptr) {
    auto read = read_files(files, earlier, {});
    INFO((read ? std::string() : fault_text(read.error())));
    REQUIRE(read);
    return std::move(*read);
}

Fault fault_of(const GatherFiles& files) {
    const auto read = read_files(files, nullptr, {});
    REQUIRE_FALSE(read);
    return read.error();
}

long count_of(const Gathered& city, const std::string& code) {
    return std::count_if(city.findings.begin(), city.findings.end(),
                         [&](const Finding& finding) { return finding.code == code; });
}

constexpr const char* kPoles = "pole_id,string_id,easting,northing\nP1,C-12,400000,3760000\nP2,c12,400030,"
                               "3760000\nP3,12,400060,3760000\nP4,C-99,400090,3760000\n";
constexpr const char* kCircuits = "string_id,kind,current_a,station_e,station_n,cable_awg\nC-12,series,6.6,"
                                  "399990,3760000,8\nP-13,parallel,,,,1/0\n";

GatherFiles poles_and_circuits(const TempFolder& folder) {
    GatherFiles files;
    files.poles = folder.write("poles.csv", kPoles);
    files.circuits = folder.write("circuits.csv", kCircuits);
    files.crs = "EPSG:32609";
    return files;
}

} // namespace

TEST_CASE("strings: a name that differs in case, strokes or letters is taken as the one meant, and said so") {
    const TempFolder folder;
    const Gathered city = must_read(poles_and_circuits(folder));
    for (int i = 0; i < 3; ++i) CHECK(city.city.poles[static_cast<std::size_t>(i)].string == StringIx(0));
    CHECK_FALSE(city.city.poles[3].string.is_valid());
    CHECK(count_of(city, "string-name-variant") == 2);
    CHECK(count_of(city, "string-unknown") == 0); // vet says it, of the record
}

TEST_CASE("strings: a name that fits two strings is taken as neither") {
    const TempFolder folder;
    GatherFiles files = poles_and_circuits(folder);
    files.circuits = folder.write("circuits.csv", "string_id\nC-12\nC12\nD-12\n");
    const Gathered city = must_read(files);
    CHECK(city.city.poles[0].string == StringIx(0));
    CHECK_FALSE(city.city.poles[1].string.is_valid());
    CHECK_FALSE(city.city.poles[2].string.is_valid());
}

TEST_CASE("circuits: wire sizes, stations and defaults are read") {
    const TempFolder folder;
    const Gathered city = must_read(poles_and_circuits(folder));
    CHECK(city.city.strings[0].cable_awg == 8);
    CHECK(city.city.strings[1].cable_awg == 0);
    CHECK(city.city.strings[1].kind == CircuitKind::parallel);
    CHECK(city.city.strings[0].station == MapPoint{399990, 3760000});
    CHECK_FALSE(city.city.strings[1].station);
    CHECK(count_of(city, "number-unreadable") == 0);
}

TEST_CASE(
    "transformers: two rows with two strings are one two-loop unit, two alike stay two for vet to see") {
    const TempFolder folder;
    GatherFiles files = poles_and_circuits(folder);
    files.transformers =
        folder.write("transformers.csv",
                     "transformer_id,rated_kw,output_a,taps,string_id,state,tested\n"
                     "T1,20,6.6,1;.9;.75,C-12,in-service,2024-05-31\nT1,20,6.6,1;.9;.75,P-13,in-service,\n"
                     "T2,10,6.6,100/90/75,,,31.05.2024\nT2,15,6.6,,,,5/31/2024\nT3,10,6.6,1;2x,,,\n");
    const Gathered city = must_read(files);
    REQUIRE(city.city.transformers.size() == 4);
    CHECK(city.city.transformers[0].strings == std::vector<StringIx>{StringIx(0), StringIx(1)});
    CHECK(city.city.transformers[0].taps == std::vector<double>{1, 0.9, 0.75});
    CHECK(city.city.transformers[0].state == UnitState::in_service);
    CHECK(city.city.transformers[1].id == "T2");
    CHECK(city.city.transformers[1].taps == std::vector<double>{1, 0.9, 0.75});
    CHECK(city.city.transformers[1].state == UnitState::spare);
    CHECK(city.city.transformers[1].tested == "2024-05-31");
    CHECK(city.city.transformers[2].tested == "2024-05-31");
    CHECK(city.city.transformers[3].taps == std::vector<double>{1});
    CHECK(count_of(city, "number-unreadable") == 1);
    CHECK(city.rows.at("transformers").read == 5);
    CHECK(city.rows.at("transformers").kept == 5);
}

TEST_CASE("lists: a word that is not in its list is a finding and the field stays unknown") {
    const TempFolder folder;
    GatherFiles files;
    files.poles = folder.write("poles.csv",
                               "pole_id,easting,northing,duct,critical,owner,status\nP1,400000,3760000,weird,"
                               "maybe,,Not Ours\nP2,400030,3760000,Direct Buried,Y,Utility,removed\n");
    files.crs = "EPSG:32609";
    const Gathered city = must_read(files);
    CHECK(count_of(city, "value-unknown") == 2);
    CHECK(city.city.poles[0].duct == Duct::unknown);
    CHECK(city.city.poles[0].status == PoleStatus::not_ours);
    CHECK(city.city.poles[1].duct == Duct::direct_buried);
    CHECK(city.city.poles[1].critical);
    CHECK(city.city.poles[1].owner == Owner::utility);
    CHECK(city.city.poles[1].status == PoleStatus::down);
}

TEST_CASE("services: a pole in place of coordinates gives the place; an unknown pole is said") {
    const TempFolder folder;
    GatherFiles files = poles_and_circuits(folder);
    files.services =
        folder.write("services.csv", "service_id,kind,easting,northing,pole_id,volts,free_kva\nS1,circuit-"
                                     "end,,,P2,240,7.5\nS2,candidate,400000,3760010,,,\nS3,service,,,P9,,\n");
    const Gathered city = must_read(files);
    CHECK(city.city.services[0].place == MapPoint{400030, 3760000});
    CHECK(city.city.services[0].kind == ServiceKind::circuit_end);
    CHECK(city.city.services[1].place == MapPoint{400000, 3760010});
    CHECK_FALSE(city.city.services[2].has_place);
    CHECK(count_of(city, "pole-unknown") == 1);
}

TEST_CASE("marks and cut-backs: unknown poles are said, a mark of one is set aside") {
    const TempFolder folder;
    GatherFiles files = poles_and_circuits(folder);
    files.marks = folder.write(
        "marks.csv", "pole_id,mark,lock,year,who,note\nP1,Solar,1,2029,anna,\nP9,keep,0,,,\nP2,paint,0,,,\n");
    files.cutbacks = folder.write("cutbacks.csv", "string_id,pole_a,pole_b,kind,confirmed,new_cable_m\nC-12,"
                                                  "P1,P3,pullbox,yes,12\nC12,P9,return,,no,\n");
    const Gathered city = must_read(files);
    REQUIRE(city.marks.size() == 2);
    CHECK(city.marks[0].mark == Choice::solar);
    CHECK(city.marks[0].lock);
    CHECK(city.marks[0].year == 2029);
    CHECK(city.marks[1].mark == Choice::undecided);
    CHECK(city.rows.at("marks").read == 3);
    CHECK(city.rows.at("marks").kept == 2);
    CHECK(city.rows.at("marks").set_aside == 1);
    CHECK(count_of(city, "pole-unknown") == 2);
    REQUIRE(city.city.cutbacks.size() == 2);
    CHECK(city.city.cutbacks[0].confirmed);
    CHECK(city.city.cutbacks[0].string == StringIx(0));
    CHECK(city.city.cutbacks[1].string == StringIx(0));
}

TEST_CASE(
    "climate: twelve months in any order, blanks filled and said; anything else is refused with the row") {
    const TempFolder folder;
    GatherFiles files;
    std::string rows = "month,ghi,temp_c,albedo\n";
    for (int month = 12; month >= 1; --month)
        rows += std::to_string(month) + "," + std::to_string(month) + ".5,10,\n";
    files.climate = folder.write("climate.csv", rows);
    const Gathered city = must_read(files);
    REQUIRE(city.climate);
    CHECK(city.climate->ghi_kwh_m2_day[0] == 1.5);
    CHECK(city.climate->ghi_kwh_m2_day[11] == 12.5);
    CHECK(city.climate->albedo[3] == 0.2);
    CHECK(std::any_of(city.notes.begin(), city.notes.end(),
                      [](const std::string& note) { return note.starts_with("climate: no albedo"); }));
    files.climate = folder.write("twice.csv", rows + "3,4,10,\n");
    CHECK(fault_of(files).row == 14);
    files.climate = folder.write("short.csv", "month,ghi,temp_c\n1,2,3\n");
    CHECK(fault_of(files).found == "no month 2");
    files.climate = folder.write("odd.csv", "month,ghi,temp_c\n1,99,3\n");
    CHECK(fault_of(files).field == "ghi_kwh_m2_day");
    files.climate =
        folder.write("hourly.csv", "time,ghi_w_m2,dni_w_m2,dhi_w_m2,temp_c\n2020-01-01T00:00,0,0,0,5\n");
    CHECK(fault_of(files).found == "an hourly weather file");
    files.climate = folder.write(
        "site.epw", "LOCATION,Quillhaven,-,-,invented,000000,34.0,-130.0,-9.0,10.0\nDESIGN CONDITIONS,0\n");
    CHECK(fault_of(files).found == "an hourly weather file");
}

TEST_CASE(
    "prices: the file goes over the default book, and what is no item of the list is left out and said") {
    const TempFolder folder;
    const Gathered before = must_read({});
    GatherFiles files;
    files.prices = folder.write("prices.csv",
                                "item,unit,low,base,high,note,date,from_year,to_year,change_frac_year\npull_"
                                "box,each,900,1300,2100,,,,,\nunicorn,each,1,2,3,,,,,\npull_box,each,,1500,,,"
                                ",2030,,0.02\ntrench_soft,each,1,2,3,,,,,\nled_head,,,,,,,,,\n");
    const Gathered city = must_read(files, &before);
    CHECK(city.prices.at("pull_box", 2027) == Approx(1300));
    CHECK(city.prices.at("pull_box", 2031) == Approx(1530));
    CHECK(city.prices.at("service_new", 2027) == before.prices.at("service_new", 2027));
    CHECK(city.prices.at("trench_soft", 2027) == before.prices.at("trench_soft", 2027));
    CHECK(city.rows.at("prices").read == 5);
    CHECK(city.rows.at("prices").kept == 2);
    CHECK(count_of(city, "value-unknown") == 2);
    CHECK(count_of(city, "number-unreadable") == 1);
}

TEST_CASE("budget: blank money and hours are no limit, not zero") {
    const TempFolder folder;
    GatherFiles files;
    files.budget =
        folder.write("budget.csv",
                     "year,money,fund,line_h\n2027,\"1,600,000\",street,900\n2028,,,\n2029,0,,0\nsoon,1,,\n");
    const Gathered city = must_read(files);
    REQUIRE(city.city.budget.size() == 3);
    CHECK(city.city.budget[0].money == 1600000);
    CHECK_FALSE(city.city.budget[1].money);
    CHECK_FALSE(city.city.budget[1].line_h);
    CHECK(city.city.budget[2].money == 0);
    CHECK(city.rows.at("budget").set_aside == 1);
    CHECK(count_of(city, "number-unreadable") == 1);
}

TEST_CASE("as-built: what differs from the records is said, and the records stay as they are") {
    const TempFolder folder;
    GatherFiles files = poles_and_circuits(folder);
    files.poles = folder.write("poles.csv", "pole_id,string_id,order,easting,northing,duct\nP1,C-12,1,400000,"
                                            "3760000,assumed\nP2,C-12,2,400030,3760000,\n");
    files.asbuilt = folder.write("asbuilt.csv", "pole_id,done,date,order,amps,volts,duct_found\nP1,yes,2027-"
                                                "03-01,4,6.55,,bad\nP2,no,,2,5.1,,\nP9,yes,,,,,\n");
    const Gathered city = must_read(files);
    CHECK(count_of(city, "reading-differs") == 3); // order and duct of P1, amperes of P2
    CHECK(count_of(city, "pole-unknown") == 1);
    CHECK(city.city.poles[0].order == 1);
    CHECK(city.rows.at("asbuilt").read == 3);
    CHECK(city.rows.at("asbuilt").kept == 2);
}

TEST_CASE("a second call replaces its own tables and settles references over the whole") {
    const TempFolder folder;
    const Gathered first = must_read(poles_and_circuits(folder));
    GatherFiles files;
    files.circuits = folder.write("circuits2.csv", "string_id,station_e,station_n\nC-99,400000,3760000\n");
    const Gathered second = must_read(files, &first);
    CHECK(second.city.crs == "EPSG:32609");
    CHECK(second.crs_from == "user");
    CHECK(second.city.strings[0].station == MapPoint{400000, 3760000});
    CHECK_FALSE(second.city.poles[0].string.is_valid());
    CHECK(second.city.poles[3].string == StringIx(0));
    CHECK(count_of(second, "string-name-variant") == 0);
    CHECK(second.rows.at("poles").read == 4);
}

TEST_CASE("catalogue: the carried one is whole, and every price item that it names is in the list") {
    const Catalog catalog = default_catalog();
    REQUIRE(catalog.heads.size() == 4);
    CHECK(catalog.cables.size() > 10);
    CHECK(find_lamp(catalog, "150W S")->system_w == 188);
    CHECK(find_lamp(catalog, "HPS250")->system_w == 295);
    for (std::size_t i = 1; i < 4; ++i) {
        CHECK(catalog.heads[i].panel_wp > catalog.heads[i - 1].panel_wp);
        CHECK(catalog.heads[i].battery_wh > catalog.heads[i - 1].battery_wh);
        CHECK(catalog.heads[i].lumens > catalog.heads[i - 1].lumens);
        CHECK(catalog.heads[i].epa_m2 > catalog.heads[i - 1].epa_m2);
    }
}

TEST_CASE("catalogue: a list in the file replaces the default one, a wrong field is named by its path") {
    const Catalog defaults = default_catalog();
    const auto lamps = parse_catalogue(R"({"lamps": [{"fixture": "X1", "system_w": 55, "kind": "led"}]})",
                                       "c.json", defaults);
    REQUIRE(lamps);
    CHECK(lamps->lamps.size() == 1);
    CHECK(lamps->heads.size() == defaults.heads.size());
    const auto field_of = [&](const char* json) {
        return parse_catalogue(json, "c.json", defaults).error().field;
    };
    CHECK(field_of(R"({"lamps": [{"fixture": "X1", "kind": "led"}]})") == "lamps[0].system_w");
    CHECK(field_of(R"({"lamps": [{"fixture": "X1", "system_w": "55", "kind": "led"}]})") ==
          "lamps[0].system_w");
    CHECK(field_of(R"({"lamps": [{"fixture": "X1", "system_w": -1, "kind": "led"}]})") ==
          "lamps[0].system_w");
    CHECK(field_of(R"({"lamps": [{"fixture": "X1", "system_w": 5, "kind": "neon"}]})") == "lamps[0].kind");
    CHECK(
        field_of(
            R"({"heads": [{"head": "H", "panel_wp": 90, "battery_wh": 600, "led_w": 20, "lumens": 3000, "epa_m2": 0.4, "price_item": "gold"}]})") ==
        "heads[0].price_item");
    CHECK(field_of(R"({"heads": {}})") == "heads");
    CHECK(parse_catalogue("[]", "c.json", defaults).error().code == FaultCode::value_unreadable);
    CHECK(parse_catalogue("{", "c.json", defaults).error().code == FaultCode::file_broken);
}
