#include <fmt/format.h>

#include "sampledata/dice.h"
#include "sampledata/tile.h"

namespace unstring::sample {
namespace {

constexpr int kOverheadDistrict = 12, kOldQuarter = 5, kBrightDistrict = 1;

struct Fitting { // watts and power factor as in the default catalogue
    const char* fixture;
    double burns_w, burns_pf;
};
constexpr Fitting kHps70{"HPS70", 93, 0.9}, kHps100{"HPS100", 130, 0.9}, kHps150{"HPS150", 188, 0.9},
    kHps250{"HPS250", 295, 0.9}, kFilament{"FIL4000", 248, 0.97};

Fitting fitting_of(const Town& town, const Block& block, RoadClass road_class, int district) {
    if (road_class == RoadClass::arterial) return kHps250;
    if (road_class == RoadClass::collector) return kHps150;
    if (district == kBrightDistrict) return kHps150;
    // A local street has one kind from end to end.
    const bool east = block.from.row == block.to.row;
    Dice dice(town.seed,
              {4, east ? 1U : 0U, static_cast<std::uint64_t>(east ? block.from.row : block.from.column)});
    if (district == kOldQuarter && dice.chance(0.7)) return kFilament;
    return dice.chance(0.4) ? kHps70 : kHps100;
}

void set_fitting(const Fitting& fitting, PoleRow& pole) {
    pole.fixture = fitting.fixture;
    pole.burns_w = fitting.burns_w, pole.burns_pf = fitting.burns_pf;
}

void set_structure(RoadClass road_class, Dice& dice, PoleRow& pole) {
    pole.mount_m = road_class == RoadClass::arterial ? 10.5 : road_class == RoadClass::collector ? 8.5 : 7.5;
    pole.arm_m = road_class == RoadClass::arterial ? 3.0 : road_class == RoadClass::collector ? 2.4 : 1.8;
    const double roll = dice.unit();
    pole.kind = pole.is_overhead ? "wood" : roll < 0.62 ? "steel" : roll < 0.82 ? "concrete" : "aluminium";
    const double allowed = pole.kind == "wood"       ? 1.7
                           : pole.kind == "steel"    ? 1.15
                           : pole.kind == "concrete" ? 1.4
                                                     : 0.5;
    const double spread = dice.between(0.85, 1.2);
    if (dice.chance(0.62)) pole.epa_allow_m2 = allowed * spread;
    const double wear = dice.unit();
    pole.condition = wear < 0.12 ? "poor" : wear < 0.5 ? "fair" : "good";
    if (pole.condition == "poor" && pole.epa_allow_m2 > 0) pole.epa_allow_m2 *= 0.7;
}

// Ducts are known block by block, not pole by pole.
void set_duct(const Town& town, const Block& block, PoleRow& pole) {
    if (pole.is_overhead) return;
    Dice dice(town.seed,
              {5, static_cast<std::uint64_t>(block.from.column), static_cast<std::uint64_t>(block.from.row),
               block.from.row == block.to.row ? 1U : 0U});
    const double roll = dice.unit();
    pole.duct = roll < 0.05   ? "proven"
                : roll < 0.15 ? "inspected"
                : roll < 0.37 ? "assumed"
                : roll < 0.67 ? "unknown"
                : roll < 0.80 ? "bad"
                              : "direct-buried";
    const bool can_have_spare = pole.duct == "proven" || pole.duct == "inspected" || pole.duct == "assumed";
    const double spare = dice.unit();
    pole.spare_duct = can_have_spare && spare < 0.12 ? "yes" : spare < 0.7 ? "no" : "";
}

void set_owner(Dice& dice, PoleRow& pole) {
    if (!pole.is_overhead) return;
    pole.secondary_here = dice.chance(0.55) ? "yes" : "no";
    if (!dice.chance(0.4)) return;
    pole.owner = "utility";
    const double roll = dice.unit();
    pole.consent = roll < 0.6 ? "yes" : roll < 0.75 ? "no" : "";
    if (pole.consent != "yes") pole.earliest_year = 2028 + dice.below(2);
}

} // namespace

std::vector<PoleRow> poles_along(const Town& town, const Route& route, const std::vector<Lamp>& lamps,
                                 int district) {
    std::vector<PoleRow> poles;
    poles.reserve(lamps.size());
    for (std::size_t i = 0; i < lamps.size(); ++i) {
        const Lamp& lamp = lamps[i];
        const Road road = road_of(town, lamp.block);
        Dice dice(town.seed,
                  {6, static_cast<std::uint64_t>(lamp.block.from.column),
                   static_cast<std::uint64_t>(lamp.block.from.row), static_cast<std::uint64_t>(i)});
        PoleRow pole;
        pole.place = lamp.place;
        pole.arm_deg = lamp.arm_deg;
        pole.side = lamp.side;
        pole.street = road.name;
        pole.road_class = text_of(road.road_class);
        pole.need_lm = road.road_class == RoadClass::arterial    ? 11000
                       : road.road_class == RoadClass::collector ? 7000
                                                                 : 4000;
        pole.ward = ward_of(route.passes[static_cast<std::size_t>(lamp.pass)].block.from);
        pole.is_overhead = district == kOverheadDistrict;
        pole.is_critical = lamp.is_at_corner && dice.chance(0.6);
        set_fitting(fitting_of(town, lamp.block, road.road_class, district), pole);
        set_structure(road.road_class, dice, pole);
        set_duct(town, lamp.block, pole);
        set_owner(dice, pole);
        poles.push_back(pole);
    }
    return poles;
}

void apply_oddities(const Town& town, int district_number, bool is_series, std::vector<PoleRow>& poles) {
    constexpr const char* kAttached[] = {"camera", "banner arm", "small cell", "flower basket"};
    for (std::size_t i = 0; i < poles.size(); ++i) {
        PoleRow& pole = poles[i];
        Dice dice(town.seed, {7, static_cast<std::uint64_t>(district_number), i});
        if (dice.chance(0.012)) pole.attachments = kAttached[dice.below(4)];
        if (dice.chance(0.008)) pole.solar_ok = "no", pole.note = "heritage front, no panel in sight";
        const double roll = dice.unit();
        if (is_series && roll < 0.009)
            pole.status = "down", pole.note = "knocked down, jumpered at the base", pole.is_critical = false;
        if (!is_series && roll < 0.01)
            pole.status = "not-ours", pole.owner = "other", pole.note = "port authority's pole";
        if (!is_series && roll > 0.99) pole.status = "proposed", pole.note = "asked for by residents";
    }
}

} // namespace unstring::sample
