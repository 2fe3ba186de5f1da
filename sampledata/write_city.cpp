#include "sampledata/write_city.h"

#include <array>
#include <filesystem>

#include <fmt/format.h>

#include "sampledata/csv_file.h"
#include "sampledata/layers.h"
#include "sampledata/tile.h"
#include "sampledata/year_tables.h"

namespace unstring::sample {
namespace {

struct Files {
    explicit Files(const std::string& folder)
        : poles(folder + "/poles.csv", "pole_id,string_id,order,easting,northing,status,fixture,lamp_w,lamp_"
                                       "pf,mount_m,arm_m,arm_deg,pole_kind,"
                                       "epa_allow_m2,condition,attachments,road_class,need_lm,critical,"
                                       "street,side,ward,feed,duct,spare_duct,"
                                       "secondary_here,owner,consent,earliest_year,solar_ok,note"),
          circuits(folder + "/circuits.csv",
                   "string_id,kind,current_a,station_e,station_n,cable_awg,cable_kv,length_m,pulsing,control,"
                   "control_from,"
                   "primary_feeder,faults_year,asfound_a,asfound_v,insulation_mohm,asfound_date"),
          units(folder + "/transformers.csv", "transformer_id,rated_kw,output_a,min_frac,taps,build,open_v,"
                                              "primary_v,mount,made,tested,oil,state,string_id"),
          cutbacks(folder + "/cutbacks.csv", "string_id,pole_a,pole_b,kind,confirmed,new_cable_m"),
          services(folder + "/services.csv",
                   "service_id,kind,easting,northing,pole_id,volts,free_kva,lead_weeks") {}

    Expected<void> close() {
        for (CsvFile* file : {&poles, &circuits, &units, &cutbacks, &services})
            if (auto closed = file->close(); !closed) return closed;
        return {};
    }

    CsvFile poles, circuits, units, cutbacks, services;
};

std::string year_cell(int year) { return year == 0 ? "" : std::to_string(year); }

void write_pole(const PoleRow& pole, CsvFile& file) {
    file.row({pole.id,
              pole.circuit,
              year_cell(pole.order),
              cell(pole.place.x_m, 2),
              cell(pole.place.y_m, 2),
              pole.status,
              pole.fixture,
              cell(pole.lamp_w, 0),
              cell(pole.lamp_pf, 2),
              cell(pole.mount_m, 1),
              cell(pole.arm_m, 1),
              cell(pole.arm_deg, 0),
              pole.kind,
              cell(pole.epa_allow_m2, 2),
              pole.condition,
              pole.attachments,
              pole.road_class,
              std::to_string(pole.need_lm),
              yes_no(pole.is_critical),
              pole.street,
              pole.side,
              std::to_string(pole.ward),
              pole.is_overhead ? "overhead" : "underground",
              pole.duct,
              pole.spare_duct,
              pole.secondary_here,
              pole.owner,
              pole.consent,
              year_cell(pole.earliest_year),
              pole.solar_ok,
              pole.note});
}

void write_circuit(const CircuitRow& row, CsvFile& file) {
    file.row({row.id, row.is_series ? "series" : "parallel", row.is_series ? "6.6" : "",
              cell(row.station.x_m, 2), cell(row.station.y_m, 2),
              row.is_series ? std::to_string(row.cable_awg) : "", row.is_series ? "5" : "",
              cell(row.length_m, 0), row.is_series ? yes_no(row.is_pulsing) : "", row.control,
              row.control_from, row.feeder, cell(row.faults_year, 1), cell(row.asfound_a, 2),
              cell(row.asfound_v, 0), cell(row.insulation_mohm, 1), row.asfound_date});
}

void write_unit(const UnitRow& row, CsvFile& file) {
    file.row({row.id, fmt::format("{}", row.rated_kw), "6.6", cell(row.min_frac, 2), row.taps, "moving-coil",
              cell(row.open_v, 0), cell(row.primary_v, 0), row.mount, row.made, row.tested, row.oil,
              row.state, row.circuit});
}

void write_service(const ServiceRow& row, CsvFile& file) {
    const bool at_pole = !row.pole_id.empty();
    file.row({row.id, row.kind, at_pole ? "" : cell(row.place.x_m, 2), at_pole ? "" : cell(row.place.y_m, 2),
              row.pole_id, std::to_string(row.volts), cell(row.free_kva, 1),
              row.lead_weeks < 0 ? "" : std::to_string(row.lead_weeks)});
}

void write_tables(const Tables& tables, Files& files, CityCount& count) {
    for (const PoleRow& pole : tables.poles) {
        write_pole(pole, files.poles);
        count.series_poles += pole.order != 0;
    }
    for (const CircuitRow& row : tables.circuits) {
        write_circuit(row, files.circuits);
        count.strings += row.is_series;
    }
    for (const UnitRow& row : tables.units) write_unit(row, files.units);
    for (const CutBackRow& row : tables.cutbacks)
        files.cutbacks.row(
            {row.circuit, row.a, row.b, row.kind, yes_no(row.is_confirmed), cell(row.new_cable_m, 0)});
    for (const ServiceRow& row : tables.services) write_service(row, files.services);
    count.poles += static_cast<long>(tables.poles.size());
    count.units += static_cast<long>(tables.units.size());
}

} // namespace

Expected<CityCount> write_city(const CityOrder& order) {
    if (order.poles < 1 || order.poles > 20'000'000)
        return tl::unexpected(Fault{FaultCode::bad_usage, "", 0, "--size", std::to_string(order.poles),
                                    "1 to 20000000 poles", "give another size"});
    std::error_code failed;
    std::filesystem::create_directories(order.folder, failed);
    const Town town = town_for(order.poles, order.seed);
    Files files(order.folder);
    CityCount count;
    std::vector<PoleRow> first_poles;
    for (int tile_y = 0; tile_y < town.tiles_y; ++tile_y)
        for (int tile_x = 0; tile_x < town.tiles_x && count.poles < order.poles; ++tile_x) {
            const Tables tables = tile_of(town, tile_x, tile_y, order.poles - count.poles);
            if (count.poles == 0) first_poles = tables.poles;
            write_tables(tables, files, count);
        }
    if (auto closed = files.close(); !closed) return tl::unexpected(closed.error());
    if (auto written = write_year_tables(order.folder, count.poles, first_poles); !written)
        return tl::unexpected(written.error());
    if (order.with_layers)
        if (auto written = write_layers(order.folder, town); !written) return tl::unexpected(written.error());
    return count;
}

} // namespace unstring::sample
