#pragma once
// Work orders: one per crew, string and year. Comes in: the phased plan. Goes out: plain values that paper
// and tables print.

#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"
#include "model/phase/phase_result.h"
#include "model/plan/plan.h"

namespace unstring {

enum class Crew { line, civil, lighting, electric };
[[nodiscard]] const char* text_of(Crew crew);

struct OrderStep {
    std::string text;
    bool hold_point = false; ///< signed before the next
    bool caution = false;
};

struct OrderPole {
    PoleIx pole;
    std::string id, street, task, head, warning; ///< warning: "live series cable in base: line crew opens"
    double volts = 0;                            ///< planned, lighting circuit only
    MapPoint place;
};

struct LoopBead { ///< one lamp of the string's loop, in wiring order: what the sketch draws
    PoleIx pole;
    std::string id;
    MapPoint place;
    bool leaves_now = false, burns_after = false;
    bool cable_live_after = false; ///< series cable in its base stays live
};

struct Material {
    std::string what, unit;
    double quantity = 0;
};

struct WorkOrder {
    std::string id; ///< "2029-S-04-line"
    int year = 0;
    Crew crew = Crew::line;
    StringIx string;
    std::string title;
    std::string string_id, unit_id; ///< unit in service while the work is done, empty = none
    std::vector<OrderPole> poles;   ///< in working order, far end first
    std::vector<LoopBead> loop;
    std::vector<std::string> cautions;
    std::vector<OrderStep> steps;
    std::vector<Material> materials;
    std::vector<std::pair<std::string, std::string>>
        facts; ///< what the crew should know: "open-circuit kV", "6.3 (estimate)"
    std::vector<std::pair<std::string, std::string>> as_found; ///< boxes to fill in: label, unit
    double planned_volts_before = 0, planned_volts_after = 0;
    double lamp_volts = 0; ///< of one lamp that leaves, the mean
    double open_circuit_v = 0;
    bool open_circuit_is_estimate = true;
    std::string
        switch_on_time; ///< earliest of the year, local solar time, HH:MM; the twelve months stand in `facts`
    std::vector<std::string> after;    ///< ids of orders that must be signed off before this one
    std::vector<std::string> findings; ///< in words: open findings at its poles and string
    double hours = 0;
    int issue = 1; ///< printed on every page
};

/// Every order of the plan, or of one year (0 = all) and one crew (nullptr = all), by year, crew, string.
/// @param phase  evaluated for input.plan
[[nodiscard]] std::vector<WorkOrder> work_orders(const MoneyInput& input, const DecideResult& decide,
                                                 const PhaseResult& phase, int year, const Crew* crew);

} // namespace unstring
