#include "model/orders/step_texts.h"

#include <cmath>

#include <fmt/format.h>

namespace unstring {
namespace {

OrderStep step(std::string text) { return {std::move(text), false, false}; }
OrderStep hold(std::string text) { return {std::move(text), true, false}; }

std::string or_blank(const std::string& text) { return text.empty() ? "________" : text; }

void add_isolation(const SeriesWords& words, std::vector<OrderStep>& steps) {
    steps.push_back(step(fmt::format(
        "Identify string {}, its RO transformer {}, the cut-backs ({}), both neighbours of each pole, and "
        "every other circuit in each pull box",
        words.string_id, or_blank(words.unit_id), words.cutbacks)));
    steps.push_back(step(fmt::format("Job briefing: open circuit {} kV, approach distance {}", words.open_kv,
                                     words.approach)));
    steps.push_back(step("Traffic control set; locates valid on the day"));
    steps.push_back(step("Write down amperes and volts as found, before the work"));
    steps.push_back(hold("Switching clearance received from the person in charge"));
    steps.push_back(hold(
        fmt::format("Control off; primary open, locked, tagged; photocell and cascade relays disabled{}",
                    words.is_two_loop ? "; two-loop unit: both strings dark, both on the clearance" : "")));
    steps.push_back(hold("Test dead at the transformer and at the pole"));
    steps.push_back(hold("Ground both conductors at the work place"));
    steps.push_back(
        hold("Identify the cable electrically, by tone; spike it or cut it remotely for the first cut"));
}

void add_work(const SeriesWords& words, std::vector<OrderStep>& steps) {
    steps.push_back(
        {fmt::format("Jumper before cutting, never the reverse: {}", words.cutbacks), false, true});
    steps.push_back(step(fmt::format("Cut, cap and tag both ends with {}", words.string_id)));
    steps.push_back(step("Take off the jumpers that are not part of the new loop"));
    if (!words.swap.empty()) {
        if (words.is_oil_suspect)
            steps.push_back(hold("Oil of the transformer sampled and the result known before it is moved"));
        steps.push_back(step(words.swap));
    }
    steps.push_back(step("All clear of the cable"));
    steps.push_back(hold("Transformer leads off the loop, grounds off under the test rules; continuity and "
                         "insulation (1-2.5 kV on old "
                         "cable) read and written down; discharged; grounded again or released"));
}

void add_return(const SeriesWords& words, std::vector<OrderStep>& steps) {
    if (words.retires) {
        steps.push_back(hold(fmt::format(
            "No lamp is left on {}: loop terminals shorted, grounded and tagged, never left open; {}",
            words.string_id,
            words.is_two_loop ? "the other loop of the unit is released and re-energised by its own clearance"
                              : "the primary stays open, locked and tagged")));
    } else {
        steps.push_back(step("Release the clearance, re-energise"));
        steps.push_back(hold(fmt::format("Amperes within {} or stop; volts changed by {:+.0f} V against the "
                                         "reading as found: off by more than "
                                         "{:.0f} V (one lamp), find it before leaving",
                                         words.band, words.change_v, words.lamp_v)));
    }
    if (!words.controls.empty())
        steps.push_back(hold(fmt::format("Prove the control of {}", words.controls)));
    steps.push_back(step("Contact voltage on metal poles read before and after"));
    steps.push_back(step("Write down the wiring order as built"));
}

} // namespace

std::vector<OrderStep> series_steps(const SeriesWords& words) {
    std::vector<OrderStep> steps;
    add_isolation(words, steps);
    add_work(words, steps);
    add_return(words, steps);
    return steps;
}

std::vector<OrderStep> civil_steps(bool reuses_duct, bool sets_poles) {
    std::vector<OrderStep> steps = {
        step("Find every pole of this order by its tag; any that differs is written below"),
        hold("Locates marked and valid on the day; permit at hand"), step("Traffic control set")};
    if (reuses_duct) {
        steps.push_back(
            hold("Line crew's signature: the series cable in each old duct is dead, cut and pulled"));
        steps.push_back(step("Prove each old duct with a mandrel; what is found is written down; a bad one: "
                             "stop there, call the planner"));
    }
    steps.push_back({"Dig by hand within reach of any marked or unmarked cable; series cable may lie shallow "
                     "and without tape",
                     false, true});
    steps.push_back(
        step("Trench, bore and pull boxes as listed; depth, bedding and warning tape by local code"));
    if (sets_poles)
        steps.push_back(step("New footing where the inspection failed the pole; cure before any load"));
    steps.push_back(step("Ends of conduit sealed, pull string in, place and depth written down"));
    steps.push_back(step("Surface restored, traffic control off"));
    return steps;
}

std::vector<OrderStep> electric_steps(const std::string& last_pole, double planned_v) {
    return {step("Identify the circuit, its source and every other circuit in each pole base and pull box"),
            hold("Line crew's signature for each pole of this order; where live series cable stays in a "
                 "base, the line crew opens it"),
            hold("Source open, locked, tagged; tested dead"),
            step("Pull wire as listed; no series cable in the same duct or box"),
            step("Bond each metal pole to the equipment grounding wire; a ground rod alone is no fault path"),
            step("Fuse and holder in each base; polarity at each luminaire"),
            step("Insulation of the new wire read and written down"),
            hold("Continuity of the grounding path to the source read and written down"),
            step("Energise"),
            hold(fmt::format(
                "Volts at the last pole ({}): {:.1f} V planned; off by more than 2 V: find it before leaving",
                or_blank(last_pole), planned_v)),
            step("Contact voltage on metal poles read; as-built written down")};
}

std::vector<OrderStep> lighting_steps(bool hangs_solar, bool hangs_led) {
    std::vector<OrderStep> steps = {
        hold("Line crew's signature for each pole of this order; a base with live series cable is opened by "
             "the line crew only"),
        step("Traffic control set; overhead lines and their approach distance checked before the lift goes "
             "up"),
        step(
            "Pole looked at from base to top; a pole to be checked: inspected before anything is hung on it"),
        step("Old luminaire off; leads capped")};
    if (hangs_solar) {
        steps.push_back(
            {"Battery: no short circuit, no damaged pack on a vehicle; panel leads are live in daylight",
             false, true});
        steps.push_back(step("Solar head hung: bearing and tilt as listed, bolts to torque, serial and "
                             "battery date written down"));
        steps.push_back(step("Sky as planned: anything new above the pole's panel is written down"));
        steps.push_back(step("Covered sensor: the light comes on; dimming steps set as listed"));
    }
    if (hangs_led)
        steps.push_back(step("LED luminaire hung and levelled; electricians connect and prove it"));
    steps.push_back(step("Serials written down"));
    return steps;
}

std::vector<std::string> cautions_for(Crew crew, bool is_two_loop, bool has_live_base) {
    std::vector<std::string> cautions = {
        "Series strings can carry thousands of volts. An opened string can rise to the transformer's full "
        "open-circuit voltage: never open a live string.",
        "A dark lamp is not a dead pole; dead by day is not isolated; in a two-loop unit the other loop may "
        "be live.",
        "Isolate, lock, tag, prove dead, ground before touching.",
        "Local codes, the owner's switching procedure and licensed practice govern. This plan is an aid to a "
        "qualified person; it is no permit and no switching order.",
        "A wind-load or light-level result is a screening, to be confirmed by a licensed engineer."};
    if (is_two_loop) cautions.push_back("This transformer feeds two strings: its clearance darkens both.");
    if (has_live_base)
        cautions.push_back("Poles marked \"" + std::string(kLiveBase) +
                           "\" hold live series cable although their lamp is off it.");
    if (crew == Crew::line) {
        cautions.push_back("Vaults and other enclosed spaces: test the air, ventilate, attendant outside.");
        cautions.push_back("Backfeed: a lamp transformer or a second circuit can make a dead string live; "
                           "test at the place of work.");
    }
    cautions.push_back(
        "What you find differs from this sheet: stop, make safe, call the planner before going on.");
    return cautions;
}

} // namespace unstring
