#pragma once
// The rows of the sample city's files, before they are written. A blank cell is an empty text or a negative
// number.

#include <string>
#include <vector>

#include "model/quantities.h"

namespace unstring::sample {

struct PoleRow {
    std::string id, circuit;
    int order = 0; ///< 0 = blank
    MapPoint place;
    std::string status = "standing", fixture;
    double lamp_w = -1, lamp_pf = -1;   ///< as in the file: mostly blank, the catalogue knows
    double burns_w = 0, burns_pf = 0.9; ///< what really burns, for the loads; not in the file
    double mount_m = 8.5, arm_m = 2.4, arm_deg = 0;
    std::string kind;
    double epa_allow_m2 = -1;
    std::string condition, attachments, road_class;
    int need_lm = 0;
    bool is_critical = false;
    std::string street, side;
    int ward = 1;
    bool is_overhead = false;
    std::string duct, spare_duct, secondary_here, owner = "city", consent;
    int earliest_year = 0;
    std::string solar_ok, note;
};

struct CircuitRow {
    std::string id;
    bool is_series = true;
    MapPoint station;
    int cable_awg = 8;
    double length_m = -1;
    bool is_pulsing = false;
    std::string control = "photocell", control_from, feeder;
    double faults_year = -1, asfound_a = -1, asfound_v = -1, insulation_mohm = -1;
    std::string asfound_date;
    double load_kva = 0; ///< today; not in the file
};

struct UnitRow {
    std::string id;
    double rated_kw = 0, min_frac = -1;
    std::string taps;
    double open_v = -1, primary_v = 2400;
    std::string mount, made, tested, oil, state, circuit;
};

struct CutBackRow {
    std::string circuit, a, b, kind;
    bool is_confirmed = true;
    double new_cable_m = 0;
};

struct ServiceRow {
    std::string id, kind, pole_id;
    MapPoint place;
    int volts = 240;
    double free_kva = -1;
    int lead_weeks = -1;
};

struct Tables {
    std::vector<PoleRow> poles;
    std::vector<CircuitRow> circuits;
    std::vector<UnitRow> units;
    std::vector<CutBackRow> cutbacks;
    std::vector<ServiceRow> services;
};

} // namespace unstring::sample
