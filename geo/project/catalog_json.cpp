#include "geo/project/catalog_json.h"

#include <nlohmann/json.hpp>

namespace unstring {

NLOHMANN_JSON_SERIALIZE_ENUM(LampKind, {{LampKind::hps, "hps"},
                                        {LampKind::filament, "filament"},
                                        {LampKind::lps, "lps"},
                                        {LampKind::mv, "mv"},
                                        {LampKind::led, "led"}})
NLOHMANN_JSON_SERIALIZE_ENUM(Metal, {{Metal::copper, "cu"}, {Metal::aluminium, "al"}})
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(Lamp, fixture, aliases, system_w, pf, kind)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(DimStep, from_h, to_h, frac)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(Head, head, panel_wp, tilt_deg, turn_deg, battery_wh, led_w, lumens,
                                   dimming, epa_m2, mass_kg, price_item, battery_item, life_yr, warranty_yr,
                                   cct_k, domestic, ies)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(Luminaire, luminaire, led_w, pf, lumens, price_item, ies)
NLOHMANN_DEFINE_TYPE_NON_INTRUSIVE(Cable, awg, metal, ohm_per_km, x_ohm_per_km, area_mm2, ampacity_a)

namespace {

template <class Row>
void write_kind(Statement& insert, const char* kind, const std::vector<Row>& rows) {
    for (std::size_t i = 0; i < rows.size(); ++i)
        insert.bind(1, std::string_view(kind))
            .bind(2, static_cast<std::int64_t>(i))
            .bind(3, std::string_view(nlohmann::json(rows[i]).dump()))
            .run();
}

template <class Row>
std::vector<Row> read_kind(Database& database, const char* kind) {
    Statement select = database.prepare("SELECT json FROM catalogue WHERE kind=?1 ORDER BY place");
    select.bind(1, std::string_view(kind));
    std::vector<Row> rows;
    while (select.step()) {
        const auto json = nlohmann::json::parse(select.text(0), nullptr, false);
        try {
            rows.push_back(json.get<Row>());
        } catch (const nlohmann::json::exception& error) {
            database.fail({FaultCode::file_broken, "", 0, kind, error.what(), "a catalogue row",
                           "Gather the catalogue again"});
        }
    }
    return rows;
}

} // namespace

void write_catalog(Database& database, const Catalog& catalog) {
    database.run("DELETE FROM catalogue");
    Statement insert = database.prepare("INSERT INTO catalogue VALUES (?1,?2,?3)");
    write_kind(insert, "lamps", catalog.lamps);
    write_kind(insert, "heads", catalog.heads);
    write_kind(insert, "luminaires", catalog.luminaires);
    write_kind(insert, "cables", catalog.cables);
}

Catalog read_catalog(Database& database) {
    return {read_kind<Lamp>(database, "lamps"), read_kind<Head>(database, "heads"),
            read_kind<Luminaire>(database, "luminaires"), read_kind<Cable>(database, "cables")};
}

std::string catalog_text(const Catalog& catalog) {
    return nlohmann::json{{"lamps", catalog.lamps},
                          {"heads", catalog.heads},
                          {"luminaires", catalog.luminaires},
                          {"cables", catalog.cables}}
        .dump();
}

} // namespace unstring
