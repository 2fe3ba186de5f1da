#pragma once
// A small city with a value in every kind of column.

#include "geo/project/city_tables.h"
#include "tests/support/temp_folder.h"

namespace unstring::tests {

inline CityTables sample_tables() {
    CityTables tables;
    City& city = tables.city;
    city.crs = "EPSG:32609";
    city.centre = {-130.001, 34.002};
    city.convergence_deg = -0.559;
    SeriesString string;
    string.id = "S-01";
    string.current_a = 6.6;
    string.station = MapPoint{400000.25, 3762000.5};
    string.cable_awg = 8;
    string.control_from = "S-02";
    city.strings = {string};
    city.strings.push_back({});
    city.strings.back().id = "P-01";
    city.strings.back().kind = CircuitKind::parallel;
    for (int i = 0; i < 5; ++i) {
        Pole pole;
        pole.id = "01-00" + std::to_string(i);
        pole.string_given = "S-01";
        pole.string = StringIx(0);
        pole.order = i + 1;
        pole.place = {400000.0 + 30 * i, 3762000.0 + i};
        pole.has_place = i != 3;
        pole.note = "O'Leary, \"corner\" \xc3\xa9";
        pole.from = {"poles.csv", i + 2};
        city.poles.push_back(pole);
    }
    city.poles[1].duct = Duct::direct_buried;
    city.poles[1].spare_duct = false;
    city.poles[2].need_lm = 4000;
    city.poles[2].consent = true;
    city.poles[2].status = PoleStatus::not_ours;
    Transformer unit;
    unit.id = "RO-01";
    unit.rated_kw = 20;
    unit.taps = {1, .9};
    unit.mount = Mount::vault;
    unit.oil = Oil::pcb;
    unit.state = UnitState::in_service;
    unit.strings = {StringIx(0)};
    unit.strings_given = {"S-01"};
    city.transformers = {unit};
    city.cutbacks = {{StringIx(0),
                      "S-01",
                      "01-001",
                      "return",
                      CutBackKind::crossing,
                      true,
                      22.5,
                      false,
                      {"cutbacks.csv", 2}}};
    ServicePoint service;
    service.id = "SV-1";
    service.kind = ServiceKind::circuit_end;
    service.place = {400050, 3762010};
    service.has_place = true;
    service.free_kva = 3;
    city.services = {service};
    city.streets = {{"Heron Street",
                     "local",
                     Surface::paved,
                     9.0,
                     2030,
                     {{400000, 3762000}, {400100, 3762000}},
                     {"streets.gpkg", 1}}};
    city.canopy = {{{{400000, 3762000}, {400010, 3762000}, {400010, 3762010}}, 12.0, Leaf::evergreen, true}};
    city.obstacles = {{{{400020, 3762000}, {400030, 3762000}, {400030, 3762010}, {400020, 3762000}}, 9.5}};
    YearBudget year;
    year.year = 2027;
    year.money = 1000000;
    year.line_h = 800;
    city.budget = {year};
    PriceRow price;
    price.item = "trench_soft";
    price.unit = "ft";
    price.low = 25;
    price.base = 45;
    price.high = 80;
    price.from_year = 2027;
    price.change_frac_year = 0.01;
    tables.prices = PriceBook({price});
    tables.catalog.lamps = {{"HPS150", {"150W S"}, 188, .9, LampKind::hps}};
    Head head;
    head.head = "Quill 60";
    head.panel_wp = 90;
    head.dimming = {{0, 4, 1}, {4, 12, .5}};
    tables.catalog.heads = {head};
    Climate climate;
    climate.ghi_kwh_m2_day.fill(4.1);
    climate.temp_c.fill(15);
    climate.albedo.fill(.2);
    tables.climate = climate;
    tables.canopy_raster = "/data/canopy.tif";
    tables.canopy_fingerprint = "f00d";
    tables.crs_from = "user";
    tables.counts = {{"poles", 6, 5, 1}};
    return tables;
}

} // namespace unstring::tests
