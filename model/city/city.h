#pragma once
// The records of the city as its files give them: poles, strings, transformers, cut-backs, services, streets.
// Comes in: what geo/imports read. Goes out: plain values addressed by typed index. A blank field is an empty
// optional or the `unknown` of its list, never a zero.

#include <optional>
#include <span>
#include <string>
#include <unordered_map>
#include <vector>

#include "model/quantities.h"

namespace unstring {

/// Where a record came from: printed in findings.
struct RowRef {
    std::string file;
    long row = 0; ///< line in the file, 1 = its first line; 0 = not from a line
};

enum class PoleStatus { standing, down, proposed, not_ours };
enum class Feed { unknown, underground, overhead };
enum class Duct { unknown, proven, inspected, assumed, bad, direct_buried };
enum class Owner { city, utility, other };
enum class Surface { verge, paved };

struct Pole {
    std::string id;
    std::string string_given;       ///< as in the file
    StringIx string;                ///< not valid: unknown string, or none given
    std::optional<int> order;       ///< wiring order as given, 1..n
    bool order_is_inferred = false; ///< order was written by vet, the file gave none
    MapPoint place;
    bool has_place = false;
    PoleStatus status = PoleStatus::standing;
    std::string fixture;          ///< as given, "HPS150"
    std::optional<double> lamp_w; ///< system watts: lamp, ballast and lamp transformer
    std::optional<double> lamp_pf;
    std::optional<double> mount_m, arm_m, arm_deg;
    std::string pole_kind;              ///< "steel", "wood", "concrete", "aluminium"; free text
    std::optional<double> epa_allow_m2; ///< allowed effective projected area, drag included
    std::string condition;
    std::string attachments;
    std::string road_class; ///< "local", "collector", "arterial"; free text
    std::optional<double> need_lm;
    bool critical = false;
    std::string street, side, ward;
    Feed feed = Feed::unknown;
    Duct duct = Duct::unknown; ///< of the span that leads to this pole from the one before it in wiring order
    std::optional<bool> spare_duct, secondary_here;
    Owner owner = Owner::city;
    std::optional<bool> consent;
    std::optional<int> earliest_year;
    std::optional<bool> solar_ok;
    std::string note;
    bool set_aside = false;
    RowRef from;
};

enum class CircuitKind { series, parallel };
enum class Control { photocell, relay, clock };

struct SeriesString { ///< one row of circuits.csv; kind says whether it is a string or a parallel circuit
    std::string id;
    CircuitKind kind = CircuitKind::series;
    std::optional<double> current_a;
    std::optional<MapPoint> station;
    std::optional<int> cable_awg;
    std::optional<double> cable_kv;
    std::optional<double> length_m; ///< conductor metres of the whole loop, return included
    bool pulsing = false;
    Control control = Control::photocell;
    std::string control_from; ///< the string, or the pole, that switches this one; empty = its own
    std::string primary_feeder;
    std::optional<double> faults_year;
    std::optional<double> asfound_a, asfound_v, insulation_mohm;
    std::string asfound_date;
    double order_confidence_frac = 1; ///< of a wiring order that vet inferred
    bool set_aside = false;
    RowRef from;
};

enum class Build { moving_coil, static_unit };
enum class Mount { pole, pad, vault };
enum class Oil { unknown, none, mineral, pcb };
enum class UnitState { in_service, spare, scrapped };

struct Transformer { ///< a regulated-output (constant-current) transformer
    std::string id;
    double rated_kw = 0;
    std::optional<double> output_a;
    std::optional<double> min_frac;
    std::vector<double> taps; ///< fractions of the rating, with 1; never empty after reading
    Build build = Build::moving_coil;
    std::optional<double> open_v; ///< nameplate open-circuit volts
    std::optional<double> primary_v;
    std::optional<Mount> mount;
    std::string made, tested; ///< dates as given, ISO where they could be read
    Oil oil = Oil::unknown;
    UnitState state = UnitState::spare;
    std::vector<StringIx> strings; ///< fed by it: none, one, or two (a two-loop unit)
    std::vector<std::string> strings_given;
    bool set_aside = false;
    RowRef from;
};

enum class CutBackKind { pullbox, trench, crossing };

struct CutBack {
    StringIx string;
    std::string string_given, pole_a, pole_b; ///< pole ids, or "out" / "return" for the station's terminals
    CutBackKind kind = CutBackKind::pullbox;
    bool confirmed = false;
    std::optional<double> new_cable_m;
    bool set_aside = false;
    RowRef from;
};

enum class ServiceKind { service, circuit_end, candidate };

struct ServicePoint {
    std::string id;
    ServiceKind kind = ServiceKind::service;
    MapPoint place;
    bool has_place = false;
    std::string pole_given; ///< at this pole, when no coordinates are given
    double volts = 240;     ///< leg to leg for three wires
    std::optional<double> free_kva;
    std::optional<double> lead_weeks;
    bool set_aside = false;
    RowRef from;
};

struct Street {
    std::string name, road_class;
    Surface surface = Surface::verge;
    std::optional<double> width_m;
    std::optional<int> repave_year;
    std::vector<MapPoint> line;
    RowRef from;
};

enum class Leaf { deciduous, evergreen };

struct CanopyArea { ///< one crown or group of crowns
    std::vector<MapPoint> ring;
    double height_m = 0;
    Leaf leaf = Leaf::deciduous;
    bool is_protected = false;
};

struct Obstacle {
    std::vector<MapPoint> ring;
    double height_m = 0;
};

struct YearBudget {
    int year = 0;
    std::optional<double> money; ///< dollars of capital; none = no limit
    std::string fund, wards, kinds, spend_by;
    std::optional<double> match_frac;
    std::optional<double> line_h, civil_h, lighting_h, electric_h; ///< crew-hours; none = no limit
    RowRef from;
};

struct City {
    std::vector<Pole> poles;
    std::vector<SeriesString> strings;
    std::vector<Transformer> transformers;
    std::vector<CutBack> cutbacks;
    std::vector<ServicePoint> services;
    std::vector<Street> streets;
    std::vector<CanopyArea> canopy;
    std::vector<Obstacle> obstacles;
    std::vector<YearBudget> budget;
    std::string crs; ///< "EPSG:n" of MapPoint
    LonLat centre;   ///< of the poles; the sun is computed here
    double convergence_deg =
        0; ///< grid north minus true north at the centre: true bearing = grid bearing + this
};

/// On a series string, in place, not set aside, standing: a lamp to decide on.
/// Poles that are down, proposed or not ours stay in the records and are shown and counted.
[[nodiscard]] bool is_candidate(const City& city, const Pole& pole);
/// On a circuit of kind parallel.
[[nodiscard]] bool is_parallel(const City& city, const Pole& pole);

[[nodiscard]] PoleIx find_pole(const City& city, std::string_view id);
[[nodiscard]] StringIx find_string(const City& city, std::string_view id);

/// The lamps of each string in wiring order as given (poles without an order last, by id), candidates and
/// poles that are down alike. One list per string.
[[nodiscard]] std::vector<std::vector<PoleIx>> lamps_by_string(const City& city);

/// One word per list value, as in the files ("not-ours"), and back; nothing for a word that is not in the
/// list.
[[nodiscard]] const char* text_of(PoleStatus value);
[[nodiscard]] const char* text_of(Feed value);
[[nodiscard]] const char* text_of(Duct value);
[[nodiscard]] const char* text_of(Owner value);
[[nodiscard]] const char* text_of(Surface value);
[[nodiscard]] const char* text_of(CircuitKind value);
[[nodiscard]] const char* text_of(Control value);
[[nodiscard]] const char* text_of(Build value);
[[nodiscard]] const char* text_of(Mount value);
[[nodiscard]] const char* text_of(Oil value);
[[nodiscard]] const char* text_of(UnitState value);
[[nodiscard]] const char* text_of(CutBackKind value);
[[nodiscard]] const char* text_of(ServiceKind value);
[[nodiscard]] const char* text_of(Leaf value);
template <class Value>
[[nodiscard]] std::optional<Value> read_word(std::string_view text);

} // namespace unstring
