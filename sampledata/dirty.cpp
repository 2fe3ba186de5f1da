#include "sampledata/dirty.h"

#include <algorithm>
#include <filesystem>
#include <fstream>

#include <fmt/format.h>

#include "sampledata/csv_file.h"
#include "sampledata/dirty_poles.h"
#include "sampledata/tile.h"
#include "sampledata/write_city.h"

namespace unstring::sample {
namespace {

constexpr const char* kMap = R"({
  "poles": {"pole_id": "PoleNum", "string_id": "Circuit", "order": "Seq", "easting": "X_ft", "northing": "Y_ft",
            "status": "Status", "fixture": "Lamp", "lamp_w": "Watts", "mount_m": "MountHt_ft", "arm_m": "Arm_ft",
            "arm_deg": "ArmDir", "pole_kind": "PoleType", "epa_allow_m2": "EPA_sqft", "attachments": "Attach",
            "road_class": "Class", "need_lm": "Lumens", "critical": "Critical", "street": "Street", "ward": "Ward",
            "feed": "Feed", "duct": "Conduit", "owner": "Owner", "consent": "Consent", "note": "Remarks"}
}
)";

// The letters of Latin-1 are the first 256 of Unicode: two UTF-8 bytes become one.
std::string latin1(const std::string& utf8) {
    std::string text;
    for (std::size_t i = 0; i < utf8.size(); ++i) {
        const auto byte = static_cast<unsigned char>(utf8[i]);
        if (byte < 0x80)
            text += utf8[i];
        else
            text += static_cast<char>(((byte & 0x1f) << 6) | (static_cast<unsigned char>(utf8[++i]) & 0x3f));
    }
    return text;
}

Expected<void> write_text(const std::string& path, const std::string& text) {
    std::ofstream file(path, std::ios::binary);
    file << text;
    file.close();
    if (file) return {};
    return tl::unexpected(Fault{FaultCode::write_failed, path, 0, "", "the file could not be written",
                                "room and permission to write", "choose another folder"});
}

std::string text_of_poles(const DirtyPoles& poles) {
    std::string text = poles.header + "\r\n";
    for (const auto& row : poles.rows) text += fmt::format("{}\r\n", fmt::join(row, ";"));
    return latin1(text);
}

// One csv of short rows, and the line of each trouble.
class Sheet {
public:
    Sheet(std::string file, std::string header, std::vector<Trouble>& troubles)
        : file_(std::move(file)), text_(std::move(header) + "\n"), troubles_(troubles) {}

    void row(const std::string& line) { text_ += line + "\n", ++line_; }
    void row(const std::string& line, const std::string& code, const std::string& record,
             const std::string& why) {
        row(line);
        also(code, record, why);
    }
    void also(const std::string& code, const std::string& record, const std::string& why) {
        troubles_.push_back({code, file_, line_, record, why});
    }
    Expected<void> write(const std::string& folder) const { return write_text(folder + "/" + file_, text_); }

private:
    std::string file_, text_;
    std::vector<Trouble>& troubles_;
    long line_ = 1;
};

MapPoint station_of(const Tables& clean, const DirtyString& string) {
    for (const CircuitRow& row : clean.circuits)
        if (row.id == string.from) return row.station;
    return {};
}

Sheet circuits(const Tables& clean, std::vector<Trouble>& troubles) {
    Sheet sheet("circuits.csv",
                "string_id,kind,current_a,station_e,station_n,cable_awg,cable_kv,length_m,control,asfound_a,"
                "asfound_v,asfound_date",
                troubles);
    for (const DirtyString& string : dirty_strings()) {
        const MapPoint station = station_of(clean, string);
        const std::string id = string.id;
        const bool is_low_class = id == "C-13", is_20_a = id == "C-18", is_read = id == "C-11",
                   is_odd = id == "C-12";
        sheet.row(fmt::format("{},series,{},{:.2f},{:.2f},8,{},,photocell,{},{},{}", id,
                              is_20_a ? "20" : "6.6", station.x_m, station.y_m, is_low_class ? "1" : "5",
                              is_read ? "6.6" : "", is_read ? "1900" : "",
                              is_odd    ? "2025-02-31"
                              : is_read ? "2025-06-02"
                                        : ""));
        if (is_low_class) sheet.also("volts-over", id, "about 1.3 kV running on cable of the 1 kV class");
        if (is_20_a) sheet.also("current-mixed", id, "a 20 A string on a unit that gives 6.6 A");
        if (is_read) sheet.also("reading-differs", id, "1 900 V were read, the lamps want about half of it");
        if (is_odd) sheet.also("date-odd", id, "31 February");
        if (id == "C-14") sheet.also("order-inferred", id, "no wiring order is given: one is worked out");
        if (id == "C-17") sheet.also("transformer-missing", id, "no transformer names it");
    }
    return sheet;
}

Sheet transformers(std::vector<Trouble>& troubles) {
    Sheet sheet("transformers.csv",
                "transformer_id,rated_kw,output_a,taps,primary_v,mount,made,tested,oil,state,string_id",
                troubles);
    sheet.row("RO-81,7.5,6.6,1;.9;.75;.5,2400,pad,1961,2024-05-06,mineral,in-service,C-11");
    sheet.row("RO-82,5,6.6,1,2400,pad,1959,2024-05-06,mineral,in-service,C-12");
    troubles.push_back(
        {"load-over", "circuits.csv", 3, "C-12", "its lamps want more than the 5 kW of RO-82"});
    sheet.row("RO-83,10,6.6,1;.75;.5,2400,pad,1964,2024-05-06,mineral,in-service,C-13");
    sheet.row("RO-84,5,6.6,1;.75;.5,2400,pad,1964,2024-05-06,mineral,in-service,C-14");
    sheet.row("RO-85,5,6.6,1;.75;.5,2400,pad,1964,2024-05-06,mineral,in-service,C-15");
    sheet.row("RO-86,25,6.6,1,2400,pad,1970,2024-05-06,mineral,in-service,C-16");
    troubles.push_back({"load-low", "circuits.csv", 7, "C-16", "a dozen lamps on the 25 kW of RO-86"});
    sheet.row("RO-88,5,6.6,1;.75;.5,2400,pad,1966,2024-05-06,mineral,in-service,C-18");
    sheet.row("RO-90,10,6.6,1,2400,pad,2087-01-01,2024-05-06,none,spare,", "date-odd", "RO-90",
              "made in 2087");
    sheet.row("RO-91,7.5,6.6,1,2400,pad,1968,,unknown,spare,", "untested-spare", "RO-91",
              "a spare that nobody has tested");
    sheet.row("RO-92,15,6.6,1,2400,pad,1963,2024-05-06,mineral,spare,");
    sheet.row("RO-92,20,6.6,1,2400,pad,1963,2024-05-06,mineral,spare,", "transformer-twice", "RO-92",
              "the same id with another rating");
    return sheet;
}

Sheet cutbacks(std::vector<Trouble>& troubles) {
    Sheet sheet("cutbacks.csv", "string_id,pole_a,pole_b,kind,confirmed,new_cable_m", troubles);
    sheet.row("C-11,1110,1124,crossing,yes,22");
    sheet.row("C-12,1203,1215,pullbox,no,20", "cutback-unconfirmed", "C-12",
              "nobody has looked into the box");
    sheet.row("C-13,1302,1399,crossing,yes,20", "pole-unknown", "C-13", "there is no pole 1399");
    return sheet;
}

Sheet services(std::vector<Trouble>& troubles) {
    Sheet sheet("services.csv", "service_id,kind,easting,northing,pole_id,volts,free_kva,lead_weeks",
                troubles);
    sheet.row("SV-81,service,408000.00,3763150.00,,240,15,6");
    sheet.row("SV-82,circuit-end,,,9999,240,2,2", "pole-unknown", "SV-82", "there is no pole 9999");
    sheet.row("SV-83,service,408100.00,3763150.00,,240,fifteen,6", "number-unreadable", "SV-83",
              "kVA in words");
    return sheet;
}

Sheet marks(std::vector<Trouble>& troubles) {
    Sheet sheet("marks.csv", "pole_id,mark,lock,year,who,note", troubles);
    sheet.row("1108,solar,0,,east ward,");
    sheet.row("1888,rewire,0,,east ward,", "pole-unknown", "1888", "there is no pole 1888");
    return sheet;
}

std::string readme(const std::vector<Trouble>& troubles) {
    std::string text = R"(# The dirty set

A part of Quillhaven as nobody wants to get it: the pole file is Latin-1 with CRLF, semicolons, decimal commas, feet and
other column names (`map.json` says which is which). It is made by `quillhaven_maker --dirty --to sampledata/dirty`.

    unstring gather dirty.gpkg --crs EPSG:32609 --columns map.json --poles poles.csv --circuits circuits.csv \
        --transformers transformers.csv --cutbacks cutbacks.csv --services services.csv --marks marks.csv
    unstring vet dirty.gpkg

Lines count from 1, the header. The same table for a program: `expected.csv`. `no-place.csv` is gathered by itself, as
`--poles no-place.csv --crs EPSG:32609`, without the map.

| code | file | line | record | what is wrong |
|---|---|---|---|---|
)";
    for (const Trouble& trouble : troubles)
        text += fmt::format("| `{}` | {} | {} | {} | {} |\n", trouble.code, trouble.file, trouble.line,
                            trouble.record, trouble.why);
    text += R"(
"100W S" and "HPS 100 w" (poles 1114, 1115) are fixtures in free text: they are read, and give no
finding. Later steps have findings of their own (`no-way`, `duct-live`, `money-short` ..): those need a plan, not a file.
)";
    return text;
}

std::string expected(const std::vector<Trouble>& troubles) {
    std::string text = "code,file,line,record\n";
    for (const Trouble& trouble : troubles)
        text += fmt::format("{},{},{},{}\n", trouble.code, trouble.file, trouble.line, trouble.record);
    return text;
}

} // namespace

Expected<void> write_dirty(const std::string& folder) {
    std::error_code failed;
    std::filesystem::create_directories(folder, failed);
    const Tables clean = tile_of(town_for(1400, CityOrder{}.seed), 0, 0, 1400);
    DirtyPoles poles = dirty_poles(clean);
    std::vector<Trouble>& troubles = poles.troubles;
    if (auto written = write_text(folder + "/poles.csv", text_of_poles(poles)); !written) return written;
    for (const Sheet& sheet : {circuits(clean, troubles), transformers(troubles), cutbacks(troubles),
                               services(troubles), marks(troubles)})
        if (auto written = sheet.write(folder); !written) return written;
    troubles.push_back(
        {"column-missing", "no-place.csv", 1, "", "neither easting and northing nor lon and lat"});
    if (auto written =
            write_text(folder + "/no-place.csv", "pole_id,string_id,order,fixture\n1101,C-11,1,HPS100\n");
        !written)
        return written;
    std::sort(troubles.begin(), troubles.end(), [](const Trouble& a, const Trouble& b) {
        return std::tie(a.code, a.file, a.line) < std::tie(b.code, b.file, b.line);
    });
    if (auto written = write_text(folder + "/map.json", kMap); !written) return written;
    if (auto written = write_text(folder + "/expected.csv", expected(troubles)); !written) return written;
    return write_text(folder + "/README.md", readme(troubles));
}

} // namespace unstring::sample
