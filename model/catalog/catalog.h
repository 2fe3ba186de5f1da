#pragma once
// What can be bought or stands in the street: lamps, solar heads, luminaires, cables. Filled by geo/imports
// from catalogue.json (the default one is resources/catalogue.json); every figure of the default is invented
// or cited there.

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace unstring {

enum class LampKind { hps, filament, lps, mv, led };

struct Lamp {
    std::string fixture; ///< "HPS150"
    std::vector<std::string> aliases;
    double system_w = 0;
    double pf = 0.9;
    LampKind kind = LampKind::hps;
};

struct DimStep {
    double from_h = 0, to_h = 0; ///< hours after switch-on, from <= t < to
    double frac = 1;
};

struct Head { ///< a solar head: panel, battery, LED in one housing
    std::string head;
    double panel_wp = 0, tilt_deg = 0, turn_deg = 0, battery_wh = 0, led_w = 0, lumens = 0;
    std::vector<DimStep> dimming;
    double epa_m2 = 0; ///< drag included
    double mass_kg = 0;
    std::string price_item, battery_item;
    double life_yr = 15, warranty_yr = 0, cct_k = 0;
    bool domestic = false;
    std::string ies;
};

struct Luminaire {
    std::string luminaire;
    double led_w = 0, pf = 0.95, lumens = 0;
    std::string price_item, ies;
};

enum class Metal { copper, aluminium };

struct Cable {
    int awg = 8; ///< 0 = 1/0, -1 = 2/0, -2 = 3/0, -3 = 4/0
    Metal metal = Metal::copper;
    double ohm_per_km = 0;   ///< DC, 75 C, stranded: NEC ch. 9 table 8
    double x_ohm_per_km = 0; ///< PVC or aluminium conduit: NEC ch. 9 table 9
    double area_mm2 = 0;     ///< over the insulation, for conduit fill
    double ampacity_a = 0;   ///< 75 C
};

struct Catalog {
    std::vector<Lamp> lamps;
    std::vector<Head> heads;
    std::vector<Luminaire> luminaires;
    std::vector<Cable> cables;
};

/// The lamp that a free-text fixture means ("HPS150", "150W S", "hps 150 w"); null when it cannot be told.
/// Compared without case, blanks and punctuation, against names and aliases, then as letters + watts in any
/// order.
[[nodiscard]] const Lamp* find_lamp(const Catalog& catalog, std::string_view fixture);
[[nodiscard]] const Head* find_head(const Catalog& catalog, std::string_view head);
[[nodiscard]] const Cable* find_cable(const Catalog& catalog, int awg, Metal metal);

} // namespace unstring
