#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

struct CircuitFields {
    explicit CircuitFields(TableReader& in)
        : id(in, "string_id"), control_from(in, "control_from"), feeder(in, "primary_feeder"),
          date(in, "asfound_date"), awg(in, "cable_awg"), current_a(in, "current_a", 0, 100),
          cable_kv(in, "cable_kv", 0, 50), length_m(in, "length_m", 0, 1e6),
          faults_year(in, "faults_year", 0, 1000), asfound_a(in, "asfound_a", 0, 1000),
          asfound_v(in, "asfound_v", 0, 1e5), insulation(in, "insulation_mohm", 0, 1e7),
          kind(in, "kind", "series or parallel", "multiple=parallel"),
          control(in, "control", "photocell, relay or clock",
                  "photo-cell=photocell pec=photocell timer=clock timeclock=clock time-clock=clock "
                  "cascade=relay"),
          pulsing(in, "pulsing") {}

    TextField id, control_from, feeder, date, awg;
    NumberField current_a, cable_kv, length_m, faults_year, asfound_a, asfound_v, insulation;
    WordField<CircuitKind> kind;
    WordField<Control> control;
    YesNoField pulsing;
};

std::optional<int> awg_of(TableReader& in, const std::string& cell) {
    if (is_blank_cell(cell)) return std::nullopt;
    auto awg = read_awg(cell);
    if (!awg)
        in.add_finding("number-unreadable", in.shown("cable_awg") + " \"" + cell.substr(0, 40) + "\"",
                       "a wire size such as 8 or 1/0", "mend the cell; the field is left empty until then");
    return awg;
}

SeriesString read_circuit(TableReader& in, const CircuitFields& fields, const PlaceReader& place_of) {
    SeriesString string;
    string.id = fields.id();
    string.kind = fields.kind().value_or(CircuitKind::series);
    string.current_a = fields.current_a();
    string.station = place_of();
    string.cable_awg = awg_of(in, fields.awg());
    string.cable_kv = fields.cable_kv();
    string.length_m = fields.length_m();
    string.pulsing = fields.pulsing().value_or(false);
    string.control = fields.control().value_or(Control::photocell);
    string.control_from = fields.control_from.unless_blank();
    string.primary_feeder = fields.feeder.unless_blank();
    string.faults_year = fields.faults_year();
    string.asfound_a = fields.asfound_a();
    string.asfound_v = fields.asfound_v();
    string.insulation_mohm = fields.insulation();
    string.asfound_date = read_date(fields.date());
    string.from = in.from();
    return string;
}

} // namespace

Expected<void> read_circuits(const ReadyTable& from, Gathered& out) {
    if (auto has_id = need_column(from, "string_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const auto place_of = PlaceReader::make(in, from.placed, out.city.crs);
    if (!place_of) return tl::unexpected(place_of.error());
    const CircuitFields fields(in);
    out.city.strings.clear();
    read_rows(in, "string_id", out, [&] {
        out.city.strings.push_back(read_circuit(in, fields, *place_of));
        return true;
    });
    return {};
}

} // namespace unstring
