#include "sampledata/dirty_poles.h"

#include <algorithm>
#include <stdexcept>

#include <fmt/format.h>

namespace unstring::sample {
namespace {

constexpr double kFoot_m = 0.3048;
constexpr const char* kFile = "poles.csv";

enum Column : std::size_t {
    kPole,
    kCircuit,
    kSeq,
    kX,
    kY,
    kStatus,
    kLamp,
    kWatts,
    kMount,
    kArm,
    kArmDir,
    kType,
    kEpa,
    kAttach,
    kClass,
    kLumens,
    kCritical,
    kStreet,
    kWard,
    kFeed,
    kConduit,
    kOwner,
    kConsent,
    kRemarks,
    kColumns
};
constexpr const char* kHeader = "PoleNum;Circuit;Seq;X_ft;Y_ft;Status;Lamp;Watts;MountHt_ft;Arm_ft;ArmDir;"
                                "PoleType;EPA_sqft;Attach;Class;Lumens;"
                                "Critical;Street;Ward;Feed;Conduit;Owner;Consent;Remarks";

std::string comma(double value, int decimals) {
    std::string text = fmt::format("{:.{}f}", value, decimals);
    std::replace(text.begin(), text.end(), '.', ',');
    return text;
}

std::vector<std::string> cells_of(const PoleRow& pole, const std::string& id, const std::string& circuit,
                                  int order) {
    std::vector<std::string> cells(kColumns);
    cells[kPole] = id, cells[kCircuit] = circuit, cells[kSeq] = std::to_string(order);
    cells[kX] = comma(pole.place.x_m / kFoot_m, 2), cells[kY] = comma(pole.place.y_m / kFoot_m, 2);
    cells[kStatus] = "standing", cells[kLamp] = pole.fixture;
    cells[kWatts] = pole.lamp_w < 0 ? "" : comma(pole.lamp_w, 1);
    cells[kMount] = comma(pole.mount_m / kFoot_m, 1), cells[kArm] = comma(pole.arm_m / kFoot_m, 1);
    cells[kArmDir] = comma(pole.arm_deg, 0), cells[kType] = pole.kind;
    cells[kEpa] = pole.epa_allow_m2 < 0 ? "" : comma(pole.epa_allow_m2 / (kFoot_m * kFoot_m), 1);
    cells[kClass] = pole.road_class, cells[kLumens] = std::to_string(pole.need_lm);
    cells[kCritical] = "no", cells[kStreet] = pole.street, cells[kWard] = std::to_string(pole.ward);
    cells[kFeed] = "underground", cells[kConduit] = pole.duct, cells[kOwner] = "city";
    return cells;
}

// Edits the rows and keeps the list of troubles beside them.
class Spoiler {
public:
    explicit Spoiler(DirtyPoles& poles) : poles_(poles) {}

    std::vector<std::string>& row(const std::string& id) { return poles_.rows[place(id)]; }
    const std::string& cell(const std::string& id, Column column) { return row(id)[column]; }

    void set(const std::string& code, const std::string& id, Column column, std::string value,
             std::string why) {
        row(id)[column] = std::move(value);
        say(code, id, std::move(why));
    }
    void say(const std::string& code, const std::string& id, std::string why) {
        poles_.troubles.push_back({code, kFile, static_cast<long>(place(id)) + 2, id, std::move(why)});
    }
    void append(const std::string& code, std::vector<std::string> cells, const std::string& record,
                std::string why) {
        poles_.rows.push_back(std::move(cells));
        poles_.troubles.push_back(
            {code, kFile, static_cast<long>(poles_.rows.size()) + 1, record, std::move(why)});
    }

private:
    std::size_t place(const std::string& id) const {
        for (std::size_t i = 0; i < poles_.rows.size(); ++i)
            if (poles_.rows[i][kPole] == id) return i;
        throw std::logic_error("dirty set: no pole " + id);
    }
    DirtyPoles& poles_;
};

void spoil_cells(Spoiler& spoil) {
    spoil.set("number-unreadable", "1103", kWatts, "about 90", "watts in words");
    spoil.set("number-unreadable", "1104", kMount, "24ft6", "height as text");
    spoil.set("lamp-unknown", "1106", kLamp, "globe, old", "a fixture that no catalogue has, and no watts");
    spoil.set("led-on-string", "1107", kLamp, "LED60", "an LED on a series string");
    spoil.set("attachments", "1109", kAttach, "camera", "something else on the pole");
    spoil.set("owner-consent", "1110", kOwner, "utility", "another owner, consent blank");
    spoil.set("string-name-variant", "1112", kCircuit, "c11", "C-11 in small letters, without the stroke");
    spoil.set("string-name-variant", "1113", kCircuit, "11", "C-11 by its number alone");
    spoil.set("string-unknown", "1230", kCircuit, "Z-99", "no such string");
    spoil.row("1114")[kLamp] = "100W S"; // free text that can still be read
    spoil.row("1115")[kLamp] = "HPS 100 w";
}

void spoil_places(Spoiler& spoil) {
    spoil.set("place-missing", "1205", kX, "", "no easting");
    std::swap(spoil.row("1208")[kX], spoil.row("1208")[kY]);
    spoil.say("place-swapped", "1208", "easting and northing changed over");
    spoil.set("place-far", "1211", kX, comma(520000 / kFoot_m, 2), "some 110 km east of the others");
    spoil.set("span-long", "1320", kY, comma(3763700 / kFoot_m, 2),
              "hundreds of metres from both neighbours");
}

void spoil_orders(Spoiler& spoil, const std::vector<DirtyString>& strings) {
    for (const DirtyString& string : strings)
        if (std::string(string.id) == "C-14")
            for (std::size_t i = 1; i <= string.count; ++i)
                spoil.row(fmt::format("14{:02}", i))[kSeq].clear();
    spoil.say("order-missing", "1401", "no lamp of C-14 has a wiring order");
    spoil.set("order-missing", "1503", kSeq, "", "one blank among orders that are given");
    spoil.set("order-twice", "1508", kSeq, "7", "7 again");
    spoil.set("order-gap", "1512", kSeq, "15", "12, 13 and 14 are missing");
}

void append_rows(Spoiler& spoil) {
    auto twin = spoil.row("1116");
    spoil.append("pole-id-twice", twin, "1116", "1116 once more");
    twin = spoil.row("1117");
    twin[kPole] = "1117A", twin[kCircuit] = "", twin[kSeq] = "";
    twin[kX] = twin[kX].substr(0, twin[kX].size() - 2) + "90";
    spoil.append("pole-near-twin", twin, "1117A", "on the same spot as 1117, under another id");
    spoil.append("row-broken", {"1199", "C-11", "40"}, "", "the line ends after three cells");
}

} // namespace

const std::vector<DirtyString>& dirty_strings() {
    static const std::vector<DirtyString> kStringsOfIt = {{"C-11", "S-03", 0, 33},  {"C-12", "S-01", 0, 33},
                                                          {"C-13", "S-02", 0, 46},  {"C-14", "S-04", 0, 12},
                                                          {"C-15", "S-04", 12, 12}, {"C-16", "S-04", 24, 12},
                                                          {"C-17", "S-04", 36, 10}, {"C-18", "S-04", 46, 10}};
    return kStringsOfIt;
}

DirtyPoles dirty_poles(const Tables& clean) {
    DirtyPoles dirty;
    dirty.header = kHeader;
    for (const DirtyString& string : dirty_strings()) {
        std::size_t place = 0;
        for (const PoleRow& pole : clean.poles) {
            if (pole.circuit != string.from) continue;
            if (place >= string.first && place < string.first + string.count) {
                const auto order = static_cast<int>(place - string.first) + 1;
                dirty.rows.push_back(
                    cells_of(pole, fmt::format("{}{:02}", string.id + 2, order), string.id, order));
            }
            ++place;
        }
    }
    dirty.rows.front()[kRemarks] = "près du quai, façade à repeindre";
    dirty.troubles.push_back(
        {"encoding-guessed", kFile, 2, "", "no byte-order mark, and not UTF-8: the remark of 1101"});
    dirty.troubles.push_back({"unit-guessed", kFile, 1, "", "feet by the columns' names alone"});
    Spoiler spoil(dirty);
    spoil_cells(spoil);
    spoil_places(spoil);
    spoil_orders(spoil, dirty_strings());
    append_rows(spoil);
    return dirty;
}

} // namespace unstring::sample
