#include <catch2/catch.hpp>

#include "model/vet/vet_result.h"
#include "tests/model/series/city_for_tests.h"
#include "tests/model/vet/findings_for_tests.h"

namespace unstring {
namespace {

using namespace for_tests;

VetResult vet(const City& city) { return vet_city(city, catalog()); }

/// A city in which vet has nothing to say.
City clean_city() {
    City city = out_and_back(30, 10);
    city.strings[0].length_m = 2300;
    return city;
}

StringIx add_string(City& city, const std::string& id) {
    city.strings.push_back(string_row(id, {0, 10}));
    city.strings.back().from.row = static_cast<long>(city.strings.size()) + 1;
    city.strings.back().length_m = 100;
    return StringIx(city.strings.size() - 1);
}

} // namespace

TEST_CASE("vet: a sound city gives no finding, and its string as it stands today") {
    const VetResult result = vet(clean_city());
    INFO(codes_in(result.findings));
    CHECK(result.findings.empty());
    REQUIRE(result.strings.size() == 1);
    const VetString& string = result.strings[0];
    CHECK(string.lamps == 30);
    CHECK(string.order == OrderFrom::given);
    CHECK(string.wiring.size() == 30);
    CHECK(string.volts == Approx(1096).margin(0.6));
    CHECK(string.load_kva == Approx(7.23).margin(0.006));
    CHECK(string.cable_m == Approx(2300));
    CHECK(string.transformer == TransformerIx(0));
    CHECK(string.loading_frac == Approx(0.723).margin(0.001));
    CHECK(string.verdict == Verdict::good);
}

TEST_CASE("vet: the second row of one id is named by its row, and only that row is set aside") {
    City city = clean_city();
    city.poles.push_back(city.poles[3]);
    city.poles.back().from.row = 77;
    const VetResult result = vet(city);
    const Finding finding = finding_of(result.findings, "pole-id-twice", "P-4");
    CHECK(finding.severity == Severity::error);
    CHECK(finding.row == 77);
    CHECK(finding.file == "poles.csv");
    CHECK(count_of(result.findings, "order-twice") == 0);
    const City mended = set_aside_errors(city, result.findings);
    CHECK_FALSE(mended.poles[3].set_aside);
    CHECK(mended.poles.back().set_aside);
}

TEST_CASE(
    "vet: ids that differ in case, signs or leading zeros alone, and poles in one place, are near twins") {
    City city = clean_city();
    city.poles[5].id = "p 004";
    city.poles[8].place = {city.poles[7].place.x_m + 0.4, city.poles[7].place.y_m};
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "pole-near-twin", "p 004").found == "reads like P-4 in row 5");
    CHECK(finding_of(result.findings, "pole-near-twin", "P-9").found == "0.4 m from P-8 in row 9");
    CHECK(count_of(result.findings, "pole-near-twin") == 2);
}

TEST_CASE("vet: a place that is missing, exchanged or far away") {
    City city = clean_city();
    for (Pole& pole : city.poles) pole.place = {500000 + pole.place.x_m, 3760000 + pole.place.y_m};
    city.strings[0].station = MapPoint{500000, 3760010};
    city.poles[0].has_place = false;
    std::swap(city.poles[1].place.x_m, city.poles[1].place.y_m);
    city.poles[2].place = {0, 0};
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "place-missing", "P-1").severity == Severity::error);
    CHECK(finding_of(result.findings, "place-swapped", "P-2").severity == Severity::error);
    CHECK(finding_of(result.findings, "place-far", "P-3").severity == Severity::warning);
    CHECK(count_of(result.findings, "load-over") == 0); // no cable is laid to the far place
    CHECK(count_of(result.findings, "span-long") == 0);
}

TEST_CASE("vet: a service point needs coordinates or a pole") {
    City city = clean_city();
    ServicePoint service;
    service.id = "SV-1";
    city.services = {service};
    service.id = "SV-2";
    service.pole_given = "P-3";
    city.services.push_back(service);
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "place-missing", "SV-1").table == "services");
    CHECK(count_of(result.findings, "place-missing") == 1);
    CHECK(set_aside_errors(city, result.findings).services[0].set_aside);
}

TEST_CASE("vet: poles, units and cut-backs of a string that is not there") {
    City city = clean_city();
    city.poles[0].string = {};
    city.poles[0].string_given = "S-99";
    city.poles[1].string = {};
    city.poles[1].string_given.clear();
    city.poles[2].string = {};
    city.poles[2].string_given.clear();
    city.poles[2].status = PoleStatus::proposed;
    city.transformers.push_back(unit_row("T-2", 10, {}, ""));
    city.transformers.back().strings_given = {"S-98"};
    CutBack cutback;
    cutback.string_given = "S-97";
    city.cutbacks = {cutback};
    cutback.string = StringIx(0);
    cutback.string_given = "S-1";
    cutback.pole_a = "P-5";
    cutback.pole_b = "P-1"; // in the city, but on no string
    city.cutbacks.push_back(cutback);
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "string-unknown", "P-1").found == "S-99");
    CHECK(finding_of(result.findings, "string-unknown", "P-2").found == "nothing");
    CHECK(finding_of(result.findings, "string-unknown", "T-2").found == "S-98");
    CHECK(count_of(result.findings, "string-unknown") == 4);
    CHECK(finding_of(result.findings, "pole-unknown", "S-1").found == "P-1, which is not on that string");
    CHECK(count_of(result.findings, "cutback-unconfirmed") == 1);
}

TEST_CASE("vet: currents, units and strings that do not go together") {
    City city = clean_city();
    city.transformers[0].output_a = 20;
    city.transformers.push_back(unit_row("T-2", 15, StringIx(0), "S-1"));
    city.transformers.back().from.row = 3;
    city.transformers.push_back(unit_row("T-3", 15, StringIx(0), "S-1"));
    city.transformers.back().strings = {StringIx(0), StringIx(0)};
    city.transformers.back().from.row = 4;
    city.transformers.push_back(unit_row("T-4", 15, {}, ""));
    city.transformers.back().tested.clear();
    city.transformers.push_back(unit_row("T-4", 25, {}, ""));
    city.transformers.back().from.row = 6;
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "current-mixed", "S-1").found == "6.6 A, unit T-1 20 A");
    CHECK(finding_of(result.findings, "transformer-twice", "T-2").row == 3);
    CHECK(finding_of(result.findings, "transformer-twice", "T-3").found == "two rows with one string");
    CHECK(finding_of(result.findings, "transformer-twice", "T-4").row == 6);
    CHECK(finding_of(result.findings, "untested-spare", "T-4").severity == Severity::notice);
}

TEST_CASE("vet: a two-loop unit feeds two strings, each within half its rating") {
    City city = clean_city();
    city.strings.push_back(string_row("S-2", {0, 10}));
    city.transformers[0].strings.push_back(StringIx(1));
    city.transformers[0].strings_given.push_back("S-2");
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "load-over", "S-1").severity == Severity::error);
    city.transformers[0].rated_kw = 20;
    CHECK(count_of(vet(city).findings, "load-over") == 0);
    CHECK(vet(city).strings[0].loading_frac == Approx(0.723).margin(0.001));
    CHECK(count_of(vet(city).findings, "transformer-twice") == 0);
}

TEST_CASE("vet: wiring numbers that are missing, doubled or leave gaps") {
    City city = clean_city();
    city.poles[9].order.reset();
    city.poles[4].order = 4;
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "order-missing", "P-10").table == "poles");
    CHECK(finding_of(result.findings, "order-twice", "P-5").found == "order 4, as P-4 in row 5");
    CHECK(finding_of(result.findings, "order-gap", "P-6").found == "5 missing before 6 in string S-1");
    CHECK(finding_of(result.findings, "order-gap", "P-11").row == 12);
    CHECK(result.strings[0].order == OrderFrom::partial);
    for (Pole& pole : city.poles) pole.order.reset();
    const VetResult none = vet(city);
    CHECK(finding_of(none.findings, "order-missing", "P-1").found ==
          "none of the 30 lamps of string S-1 has an order");
    CHECK(count_of(none.findings, "order-missing") == 1);
    CHECK(finding_of(none.findings, "order-inferred", "S-1").severity == Severity::notice);
    CHECK(none.strings[0].order == OrderFrom::inferred);
}

TEST_CASE("vet: numbers in tens are one finding, not one for each lamp") {
    City city = clean_city();
    for (Pole& pole : city.poles) pole.order = *pole.order * 10;
    const VetResult result = vet(city);
    CHECK(count_of(result.findings, "order-gap") == 1);
    CHECK(finding_of(result.findings, "order-gap", "P-1").found ==
          "1 to 9 missing before 10 in string S-1, and so on: 30 gaps in 30 numbers");
    CHECK(result.strings[0].order == OrderFrom::given);
}

TEST_CASE("vet: spans over 120 m are named at their second pole") {
    City city = clean_city();
    for (std::size_t i = 15; i < 30; ++i) city.poles[i].place.y_m = 125;
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "span-long", "P-16").found == "125 m from P-15");
    CHECK(count_of(result.findings, "span-long") == 1);
}

TEST_CASE("vet: load over the rating is an error of the string, load under the unit's range a warning") {
    City city = clean_city();
    city.transformers[0].rated_kw = 7;
    CHECK(finding_of(vet(city).findings, "load-over", "S-1").found == "7.23 kVA on T-1 of 7 kW: 103 %");
    CHECK(vet(city).strings[0].verdict == Verdict::over);
    city.transformers[0].rated_kw = 30;
    CHECK(finding_of(vet(city).findings, "load-low", "S-1").severity == Severity::warning);
    city.transformers[0].taps = {1, 0.75, 0.5};
    CHECK(vet(city).strings[0].tap == 0.5);
    CHECK(vet(city).strings[0].loading_frac == Approx(7.23 / 15).margin(0.001));
    CHECK(count_of(vet(city).findings, "load-low") == 0);
    city.transformers[0].taps = {1};
    city.transformers[0].min_frac = 0.2;
    CHECK(count_of(vet(city).findings, "load-low") == 0);
    city.strings[0].pulsing = true;
    CHECK(count_of(vet(city).findings, "pulsing-light") == 1);
}

TEST_CASE("vet: running volts and nameplate open-circuit volts over the cable's class are errors, an "
          "estimate a warning") {
    City city = clean_city();
    city.strings[0].cable_kv = 1;
    CHECK(finding_of(vet(city).findings, "volts-over", "S-1").found == "1096 V running");
    city.strings[0].cable_kv = 2;
    CHECK(count_of(vet(city).findings, "volts-over") == 0);
    CHECK(finding_of(vet(city).findings, "volts-open", "S-1").found == "2121 V open-circuit (estimate)");
    city.transformers[0].open_v = 1950;
    CHECK(count_of(vet(city).findings, "volts-open") == 0);
    city.transformers[0].open_v = 2050;
    CHECK(finding_of(vet(city).findings, "volts-over", "S-1").found == "2050 V open-circuit (nameplate)");
}

TEST_CASE("vet: a string without a unit is open") {
    City city = clean_city();
    city.transformers[0].state = UnitState::spare;
    const VetResult result = vet(city);
    CHECK(finding_of(result.findings, "transformer-missing", "S-1").severity == Severity::warning);
    CHECK(finding_of(result.findings, "unit-state", "T-1").found == "spare with string S-1");
    CHECK(result.strings[0].verdict == Verdict::open);
}

TEST_CASE("vet: lamps that are not known, and LED on a series string") {
    City city = clean_city();
    city.poles[0].fixture = "mystery";
    city.poles[1].fixture = "LED60";
    city.poles[2].fixture = "led cobra 40";
    city.poles[3].fixture = "PALED";
    city.poles[3].lamp_w = 100;
    city.poles[4].fixture = "150w s";
    const VetResult result = vet(city);
    CHECK(count_of(result.findings, "lamp-unknown") == 2);
    CHECK(finding_of(result.findings, "lamp-unknown", "P-1").found == "mystery");
    CHECK(count_of(result.findings, "led-on-string") == 2);
}

TEST_CASE("vet: consent, attachments, critical poles that are down") {
    City city = clean_city();
    city.poles[0].owner = Owner::utility;
    city.poles[1].owner = Owner::utility;
    city.poles[1].consent = true;
    city.poles[2].attachments = "banner";
    city.poles[3].critical = true;
    city.poles[3].status = PoleStatus::down;
    const VetResult result = vet(city);
    CHECK(count_of(result.findings, "owner-consent") == 1);
    CHECK(finding_of(result.findings, "attachments", "P-3").found == "banner");
    CHECK(count_of(result.findings, "critical-down") == 1);
}

TEST_CASE("vet: dates that cannot be, judged by the first year of the budget") {
    City city = clean_city();
    city.budget.push_back({});
    city.budget[0].year = 2027;
    city.transformers[0].made = "1958-13";
    city.transformers[0].tested = "2031-01-01";
    city.strings[0].asfound_date = "2026-02-30";
    CHECK(count_of(vet(city).findings, "date-odd") == 3);
    city.transformers[0].made = "1999";
    city.transformers[0].tested = "1958";
    city.strings[0].asfound_date = "2026-02-28";
    CHECK(finding_of(vet(city).findings, "date-odd", "T-1").found == "tested 1958, made 1999");
    CHECK(count_of(vet(city).findings, "date-odd") == 1);
}

TEST_CASE("vet: readings that differ from the computed string by more than 10 %") {
    City city = clean_city();
    city.strings[0].asfound_v = 1000;
    city.strings[0].asfound_a = 6.5;
    CHECK(count_of(vet(city).findings, "reading-differs") == 0);
    city.strings[0].asfound_v = 900;
    city.strings[0].asfound_a = 5.5;
    CHECK(count_of(vet(city).findings, "reading-differs") == 2);
}

TEST_CASE("vet: a length in feet taken for metres, or none, is said") {
    City city = clean_city();
    city.strings[0].length_m = 2300 / 0.3048;
    CHECK(count_of(vet(city).findings, "length-odd") == 1);
    city.strings[0].length_m = 1000;
    CHECK(count_of(vet(city).findings, "length-odd") == 1);
    city.strings[0].length_m.reset();
    CHECK(finding_of(vet(city).findings, "length-missing", "S-1").severity == Severity::notice);
}

TEST_CASE("vet: a control that names nothing, or the string itself") {
    City city = clean_city();
    city.strings[0].control_from = "S-7";
    CHECK(count_of(vet(city).findings, "control-unknown") == 1);
    city.strings[0].control_from = "S-1";
    CHECK(count_of(vet(city).findings, "control-unknown") == 1);
    city.strings[0].control_from = "P-3";
    CHECK(count_of(vet(city).findings, "control-unknown") == 0);
}

TEST_CASE("vet: parallel circuits are no strings, and their poles are not asked for lamps or order") {
    City city = clean_city();
    const StringIx parallel = add_string(city, "L-1");
    city.strings.back().kind = CircuitKind::parallel;
    Pole pole = pole_row("Q-1", parallel, "L-1", 40, {300, 60});
    pole.order.reset();
    pole.fixture = "LED60";
    city.poles.push_back(pole);
    const VetResult result = vet(city);
    INFO(codes_in(result.findings));
    CHECK(result.findings.empty());
    CHECK(result.strings.size() == 1);
}

} // namespace unstring
