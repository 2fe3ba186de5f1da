#include "geo/project/city_columns.h"

#include <nlohmann/json.hpp>

namespace unstring {
namespace {

// Lists inside one cell are JSON arrays: ids may hold any character.
template <class Value>
std::vector<Value> list_in(const CellValue& cell) {
    const auto json = nlohmann::json::parse(text_in(cell), nullptr, false);
    std::vector<Value> values;
    if (!json.is_array()) return values;
    for (const auto& each : json)
        if (each.is_number() == std::is_arithmetic_v<Value>) values.push_back(each.get<Value>());
    return values;
}

Column<Transformer> taps_column() {
    return {"taps", "TEXT",
            [](const City&, const Transformer& t) { return CellValue(nlohmann::json(t.taps).dump()); },
            [](const City&, Transformer& t, const CellValue& cell) {
                t.taps = list_in<double>(cell);
                if (t.taps.empty()) t.taps = {1.0};
            }};
}

Column<Transformer> fed_column() {
    return {"strings", "TEXT",
            [](const City& city, const Transformer& t) {
                nlohmann::json ids = nlohmann::json::array();
                for (StringIx string : t.strings) ids.push_back(city.strings[string.place()].id);
                return CellValue(ids.dump());
            },
            [](const City& city, Transformer& t, const CellValue& cell) {
                for (const auto& id : list_in<std::string>(cell))
                    if (const StringIx string = find_string(city, id); string.is_valid())
                        t.strings.push_back(string);
            }};
}

Column<Transformer> fed_as_given_column() {
    return {
        "strings_given", "TEXT",
        [](const City&, const Transformer& t) { return CellValue(nlohmann::json(t.strings_given).dump()); },
        [](const City&, Transformer& t, const CellValue& cell) {
            t.strings_given = list_in<std::string>(cell);
        }};
}

} // namespace

const std::vector<Column<Pole>>& pole_columns() {
    using R = Pole;
    static const auto columns = with_origin<R>({text_column("pole_id", &R::id),
                                                text_column("string_given", &R::string_given),
                                                string_column("string_id", &R::string),
                                                integer_column("wiring_order", &R::order),
                                                word_column("status", &R::status),
                                                text_column("fixture", &R::fixture),
                                                real_column("lamp_w", &R::lamp_w),
                                                real_column("lamp_pf", &R::lamp_pf),
                                                real_column("mount_m", &R::mount_m),
                                                real_column("arm_m", &R::arm_m),
                                                real_column("arm_deg", &R::arm_deg),
                                                text_column("pole_kind", &R::pole_kind),
                                                real_column("epa_allow_m2", &R::epa_allow_m2),
                                                text_column("condition", &R::condition),
                                                text_column("attachments", &R::attachments),
                                                text_column("road_class", &R::road_class),
                                                real_column("need_lm", &R::need_lm),
                                                flag_column("critical", &R::critical),
                                                text_column("street", &R::street),
                                                text_column("side", &R::side),
                                                text_column("ward", &R::ward),
                                                word_column("feed", &R::feed),
                                                word_column("duct", &R::duct),
                                                flag_column("spare_duct", &R::spare_duct),
                                                flag_column("secondary_here", &R::secondary_here),
                                                word_column("owner", &R::owner),
                                                flag_column("consent", &R::consent),
                                                integer_column("earliest_year", &R::earliest_year),
                                                flag_column("solar_ok", &R::solar_ok),
                                                text_column("note", &R::note, false),
                                                flag_column("set_aside", &R::set_aside)});
    return columns;
}

const std::vector<Column<SeriesString>>& string_columns() {
    using R = SeriesString;
    static const auto columns = with_origin<R>(
        {text_column("string_id", &R::id), word_column("kind", &R::kind),
         real_column("current_a", &R::current_a), integer_column("cable_awg", &R::cable_awg),
         real_column("cable_kv", &R::cable_kv), real_column("length_m", &R::length_m),
         flag_column("pulsing", &R::pulsing), word_column("control", &R::control),
         text_column("control_from", &R::control_from), text_column("primary_feeder", &R::primary_feeder),
         real_column("faults_year", &R::faults_year), real_column("asfound_a", &R::asfound_a),
         real_column("asfound_v", &R::asfound_v), real_column("insulation_mohm", &R::insulation_mohm),
         text_column("asfound_date", &R::asfound_date), flag_column("set_aside", &R::set_aside)});
    return columns;
}

const std::vector<Column<Transformer>>& transformer_columns() {
    using R = Transformer;
    static const auto columns =
        with_origin<R>({text_column("transformer_id", &R::id), real_column("rated_kw", &R::rated_kw),
                        real_column("output_a", &R::output_a), real_column("min_frac", &R::min_frac),
                        taps_column(), word_column("build", &R::build), real_column("open_v", &R::open_v),
                        real_column("primary_v", &R::primary_v), word_column("mount", &R::mount),
                        text_column("made", &R::made), text_column("tested", &R::tested),
                        word_column("oil", &R::oil), word_column("state", &R::state), fed_column(),
                        fed_as_given_column(), flag_column("set_aside", &R::set_aside)});
    return columns;
}

const std::vector<Column<CutBack>>& cutback_columns() {
    using R = CutBack;
    static const auto columns = with_origin<R>(
        {string_column("string_id", &R::string), text_column("string_given", &R::string_given),
         text_column("pole_a", &R::pole_a), text_column("pole_b", &R::pole_b), word_column("kind", &R::kind),
         flag_column("confirmed", &R::confirmed), real_column("new_cable_m", &R::new_cable_m),
         flag_column("set_aside", &R::set_aside)});
    return columns;
}

const std::vector<Column<ServicePoint>>& service_columns() {
    using R = ServicePoint;
    static const auto columns =
        with_origin<R>({text_column("service_id", &R::id), word_column("kind", &R::kind),
                        text_column("pole_id", &R::pole_given), real_column("volts", &R::volts),
                        real_column("free_kva", &R::free_kva), real_column("lead_weeks", &R::lead_weeks),
                        flag_column("set_aside", &R::set_aside)});
    return columns;
}

const std::vector<Column<Street>>& street_columns() {
    using R = Street;
    static const auto columns =
        with_origin<R>({text_column("street", &R::name), text_column("road_class", &R::road_class),
                        word_column("surface", &R::surface), real_column("width_m", &R::width_m),
                        integer_column("repave_year", &R::repave_year)});
    return columns;
}

const std::vector<Column<CanopyArea>>& canopy_columns() {
    using R = CanopyArea;
    static const std::vector<Column<R>> columns = {real_column("height_m", &R::height_m),
                                                   word_column("leaf", &R::leaf),
                                                   flag_column("protected", &R::is_protected)};
    return columns;
}

const std::vector<Column<Obstacle>>& obstacle_columns() {
    static const std::vector<Column<Obstacle>> columns = {real_column("height_m", &Obstacle::height_m)};
    return columns;
}

const std::vector<Column<YearBudget>>& budget_columns() {
    using R = YearBudget;
    static const auto columns = with_origin<R>(
        {integer_column("year", &R::year), real_column("money", &R::money), text_column("fund", &R::fund),
         text_column("wards", &R::wards), text_column("kinds", &R::kinds),
         text_column("spend_by", &R::spend_by), real_column("match_frac", &R::match_frac),
         real_column("line_h", &R::line_h), real_column("civil_h", &R::civil_h),
         real_column("lighting_h", &R::lighting_h), real_column("electric_h", &R::electric_h)});
    return columns;
}

const std::vector<Column<PriceRow>>& price_columns() {
    using R = PriceRow;
    static const std::vector<Column<R>> columns = {
        text_column("item", &R::item),
        text_column("unit", &R::unit),
        real_column("low", &R::low),
        real_column("base", &R::base),
        real_column("high", &R::high),
        text_column("note", &R::note, false),
        text_column("date", &R::date, false),
        integer_column("from_year", &R::from_year),
        integer_column("to_year", &R::to_year),
        real_column("change_frac_year", &R::change_frac_year),
        {"from_row", "INTEGER", [](const City&, const R& r) { return CellValue(std::int64_t{r.row}); },
         [](const City&, R& r, const CellValue& cell) { r.row = integer_in(cell).value_or(0); }, false}};
    return columns;
}

} // namespace unstring
