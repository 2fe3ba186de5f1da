#include <algorithm>

#include <fmt/format.h>
#include <fmt/ranges.h>

#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

constexpr int kRowsBetweenLooks = 4096;

/// Every field of a pole, bound to its column.
struct PoleFields {
    explicit PoleFields(TableReader& in)
        : id(in, "pole_id"), string(in, "string_id"), fixture(in, "fixture"), kind(in, "pole_kind"),
          condition(in, "condition"), attachments(in, "attachments"), road_class(in, "road_class"),
          street(in, "street"), side(in, "side"), ward(in, "ward"), note(in, "note"),
          order(in, "order", 1, 1e6), lamp_w(in, "lamp_w", 0, 5000), lamp_pf(in, "lamp_pf", 0.05, 1),
          mount_m(in, "mount_m", 0, 200), arm_m(in, "arm_m", 0, 60), arm_deg(in, "arm_deg", -360, 360),
          epa_m2(in, "epa_allow_m2", 0, 100), need_lm(in, "need_lm", 0, 1e6),
          earliest_year(in, "earliest_year", 1900, 2200),
          status(in, "status", "standing, down, proposed or not-ours",
                 "active=standing existing=standing in-service=standing up=standing removed=down "
                 "knocked-down=down missing=down "
                 "planned=proposed future=proposed private=not-ours"),
          feed(in, "feed", "underground or overhead",
               "ug=underground buried=underground oh=overhead aerial=overhead"),
          duct(in, "duct", "proven, inspected, assumed, unknown, bad or direct-buried",
               "db=direct-buried directburied=direct-buried collapsed=bad ok=inspected good=inspected"),
          owner(in, "owner", "city, utility or other",
                "municipal=city ours=city joint-use=utility private=other"),
          critical(in, "critical"), spare_duct(in, "spare_duct"), secondary(in, "secondary_here"),
          consent(in, "consent"), solar_ok(in, "solar_ok") {}

    TextField id, string, fixture, kind, condition, attachments, road_class, street, side, ward, note;
    NumberField order, lamp_w, lamp_pf, mount_m, arm_m, arm_deg, epa_m2, need_lm, earliest_year;
    WordField<PoleStatus> status;
    WordField<Feed> feed;
    WordField<Duct> duct;
    WordField<Owner> owner;
    YesNoField critical, spare_duct, secondary, consent, solar_ok;
};

Pole read_pole(const PoleFields& fields, const PlaceReader& place_of) {
    Pole pole;
    pole.id = fields.id();
    pole.string_given = fields.string.unless_blank();
    pole.order = fields.order.whole();
    if (const auto place = place_of()) {
        pole.place = *place;
        pole.has_place = true;
    }
    pole.status = fields.status().value_or(PoleStatus::standing);
    pole.fixture = fields.fixture.unless_blank();
    pole.lamp_w = fields.lamp_w();
    pole.lamp_pf = fields.lamp_pf();
    pole.mount_m = fields.mount_m();
    pole.arm_m = fields.arm_m();
    pole.arm_deg = fields.arm_deg();
    if (pole.arm_deg && *pole.arm_deg < 0) *pole.arm_deg += 360;
    pole.pole_kind = fields.kind.unless_blank();
    pole.epa_allow_m2 = fields.epa_m2();
    pole.condition = fields.condition.unless_blank();
    pole.attachments = fields.attachments.unless_blank();
    pole.road_class = fields.road_class.unless_blank();
    pole.need_lm = fields.need_lm();
    pole.critical = fields.critical().value_or(false);
    pole.street = fields.street.unless_blank();
    pole.side = fields.side.unless_blank();
    pole.ward = fields.ward.unless_blank();
    pole.feed = fields.feed().value_or(Feed::unknown);
    pole.duct = fields.duct().value_or(Duct::unknown);
    pole.spare_duct = fields.spare_duct();
    pole.secondary_here = fields.secondary();
    pole.owner = fields.owner().value_or(Owner::city);
    pole.consent = fields.consent();
    pole.earliest_year = fields.earliest_year.whole();
    pole.solar_ok = fields.solar_ok();
    pole.note = fields.note();
    return pole;
}

/// A field whose unit nothing tells, and the median over which it cannot be SI: "Mount Ht" 25, 30, 35;
/// "EPA" 12.
struct UnitByNumbers {
    const char* field;
    std::optional<double> Pole::*value;
    double highest_usual; ///< SI; no usual street light stands, and no usual pole carries, more
    double to_si;
    const char* wanted;
};

constexpr UnitByNumbers kMount = {"mount_m", &Pole::mount_m, 16, kMetresPerFoot, "metres"};
constexpr UnitByNumbers kEpa = {"epa_allow_m2", &Pole::epa_allow_m2, 4, kMetresPerFoot* kMetresPerFoot,
                                "square metres"};

std::optional<double> median_of(const std::vector<Pole>& poles, std::optional<double> Pole::*field) {
    std::vector<double> values;
    for (const Pole& pole : poles)
        if (pole.*field) values.push_back(*(pole.*field));
    if (values.empty()) return std::nullopt;
    const auto half = values.begin() + static_cast<long>(values.size() / 2);
    std::nth_element(values.begin(), half, values.end());
    return *half;
}

/// Converts a column that can only be in feet, and says so. @return whether it was
bool settle_unit(const UnitByNumbers& unit, TableReader& in, const ReadyTable& from, Gathered& out) {
    const FieldColumn& column = from.columns.at(unit.field);
    const auto median = median_of(out.city.poles, unit.value);
    if (column.is_told || !median || *median <= unit.highest_usual) return false;
    for (Pole& pole : out.city.poles)
        if (auto& value = pole.*unit.value) *value *= unit.to_si;
    out.findings.push_back(
        make_finding("unit-guessed", from.table.file, 1, unit.field,
                     fmt::format("{}: median {:g}", in.shown(unit.field), *median), unit.wanted,
                     "read as feet by its numbers; put the unit into the column's name", "poles"));
    return true;
}

void settle_units(TableReader& in, const ReadyTable& from, Gathered& out) {
    settle_unit(kEpa, in, from, out);
    if (!settle_unit(kMount, in, from, out) || from.columns.at("arm_m").is_told || !from.columns.has("arm_m"))
        return;
    for (Pole& pole : out.city.poles)
        if (pole.arm_m) *pole.arm_m *= kMetresPerFoot;
    in.note(fmt::format("poles: {} read as feet, as the mounting height is", in.shown("arm_m")));
}

void say_place_missing(const ReadyTable& from, Gathered& out) {
    out.findings.push_back(make_finding("column-missing", from.table.file, 1, {},
                                        fmt::format("columns {}", fmt::join(from.table.columns, ", ")),
                                        "easting and northing, or lon and lat", "name them with --columns",
                                        "poles"));
}

} // namespace

Expected<void> need_column(const ReadyTable& from, std::string_view field) {
    if (from.columns.has(field)) return {};
    return tl::unexpected(Fault{
        FaultCode::column_missing, from.table.file, 1, std::string(field),
        fmt::format("columns {}", fmt::join(from.table.columns, ", ")), fmt::format("a column {}", field),
        fmt::format("name it with --columns, {{\"{}\": {{\"{}\": \"...\"}}}}", from.table.name, field)});
}

Expected<void> read_poles(const ReadyTable& from, const Progress& progress, Gathered& out) {
    if (auto has_id = need_column(from, "pole_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const auto place_of = PlaceReader::make(in, from.placed, out.city.crs);
    if (!place_of) return tl::unexpected(place_of.error());
    if (from.placed.kind == Placed::Kind::none) say_place_missing(from, out);
    const PoleFields fields(in);
    out.city.poles.clear();
    out.city.poles.reserve(from.table.rows());
    bool is_cancelled = false;
    read_rows(in, "pole_id", out, [&] {
        if (in.row() % kRowsBetweenLooks == 0) {
            is_cancelled = is_cancelled || progress.is_cancelled();
            progress.at(static_cast<double>(in.row()) / static_cast<double>(from.table.rows()));
        }
        if (is_cancelled) return false;
        Pole pole = read_pole(fields, *place_of);
        pole.from = in.from();
        out.city.poles.push_back(std::move(pole));
        return true;
    });
    if (is_cancelled)
        return tl::unexpected(
            Fault{FaultCode::cancelled, from.table.file, 0, {}, "a stop by the user", {}, {}});
    settle_units(in, from, out);
    return {};
}

} // namespace unstring
