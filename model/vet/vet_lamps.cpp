// Lamps that the catalogue does not know, and lamps that do not belong on a series string; poles with other
// people's say.

#include <algorithm>
#include <cctype>

#include <fmt/format.h>

#include "model/series/lamp_load.h"
#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

bool is_on_series(const City& city, const Pole& pole) {
    return !pole.set_aside && pole.string.is_valid() && !is_parallel(city, pole) &&
           !city.strings[pole.string.place()].set_aside &&
           (pole.status == PoleStatus::standing || pole.status == PoleStatus::not_ours);
}

bool says_led(const std::string& fixture) {
    std::string letters;
    for (const char c : fixture) letters += static_cast<char>(std::toupper(static_cast<unsigned char>(c)));
    const std::size_t at = letters.find("LED");
    const auto is_letter = [&](std::size_t i) {
        return i < letters.size() && std::isalpha(static_cast<unsigned char>(letters[i])) != 0;
    };
    return at != std::string::npos && !(at > 0 && is_letter(at - 1)) && !is_letter(at + 3);
}

} // namespace

void vet_lamps(const VetInput& vet) {
    LampBook book(vet.catalog);
    for (const Pole& pole : vet.city.poles) {
        if (!is_on_series(vet.city, pole)) continue;
        const LampLoad load = book.load_of(pole);
        if ((load.lamp != nullptr && load.lamp->kind == LampKind::led) || says_led(pole.fixture))
            vet.add("led-on-string", kPolesTable, pole.from, pole.id, pole.fixture,
                    "a lamp made for a series circuit",
                    "check the pole: is it on a parallel circuit already, or was the lamp misread");
        if (!load.w)
            vet.add("lamp-unknown", kPolesTable, pole.from, pole.id,
                    pole.fixture.empty() ? "nothing" : pole.fixture, "a fixture of the catalogue, or lamp_w",
                    "give lamp_w or an alias; until then it counts as the middle one of its string's lamps");
    }
}

void vet_people(const VetInput& vet) {
    for (const Pole& pole : vet.city.poles) {
        if (pole.set_aside || !pole.string.is_valid() || is_parallel(vet.city, pole)) continue;
        if (pole.critical && pole.status == PoleStatus::down)
            vet.add("critical-down", kPolesTable, pole.from, pole.id, "critical and down",
                    "light at a critical place",
                    "set temporary light: no year of the plan may leave it dark");
        if (!is_on_series(vet.city, pole)) continue;
        if (pole.owner != Owner::city && pole.consent != true)
            vet.add(
                "owner-consent", kPolesTable, pole.from, pole.id,
                fmt::format("owner {}, consent {}", text_of(pole.owner), pole.consent ? "no" : "not given"),
                "consent of the owner", "ask the owner: work on it is not handed out before");
        if (!pole.attachments.empty())
            vet.add("attachments", kPolesTable, pole.from, pole.id, pole.attachments,
                    "a pole without attachments",
                    "count their wind area before a solar head goes up, and tell their owner");
    }
}

} // namespace unstring
