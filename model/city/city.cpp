#include "model/city/city.h"

#include <algorithm>
#include <array>
#include <utility>

namespace unstring {
namespace {

template <class Value, std::size_t n>
using Words = std::array<std::pair<Value, const char*>, n>;

constexpr Words<PoleStatus, 4> kStatus = {{{PoleStatus::standing, "standing"},
                                           {PoleStatus::down, "down"},
                                           {PoleStatus::proposed, "proposed"},
                                           {PoleStatus::not_ours, "not-ours"}}};
constexpr Words<Feed, 3> kFeed = {
    {{Feed::unknown, ""}, {Feed::underground, "underground"}, {Feed::overhead, "overhead"}}};
constexpr Words<Duct, 6> kDuct = {{{Duct::unknown, "unknown"},
                                   {Duct::proven, "proven"},
                                   {Duct::inspected, "inspected"},
                                   {Duct::assumed, "assumed"},
                                   {Duct::bad, "bad"},
                                   {Duct::direct_buried, "direct-buried"}}};
constexpr Words<Owner, 3> kOwner = {
    {{Owner::city, "city"}, {Owner::utility, "utility"}, {Owner::other, "other"}}};
constexpr Words<Surface, 2> kSurface = {{{Surface::verge, "verge"}, {Surface::paved, "paved"}}};
constexpr Words<CircuitKind, 2> kCircuit = {
    {{CircuitKind::series, "series"}, {CircuitKind::parallel, "parallel"}}};
constexpr Words<Control, 3> kControl = {
    {{Control::photocell, "photocell"}, {Control::relay, "relay"}, {Control::clock, "clock"}}};
constexpr Words<Build, 2> kBuild = {{{Build::moving_coil, "moving-coil"}, {Build::static_unit, "static"}}};
constexpr Words<Mount, 3> kMount = {{{Mount::pole, "pole"}, {Mount::pad, "pad"}, {Mount::vault, "vault"}}};
constexpr Words<Oil, 4> kOil = {
    {{Oil::unknown, "unknown"}, {Oil::none, "none"}, {Oil::mineral, "mineral"}, {Oil::pcb, "pcb"}}};
constexpr Words<UnitState, 3> kUnit = {
    {{UnitState::in_service, "in-service"}, {UnitState::spare, "spare"}, {UnitState::scrapped, "scrapped"}}};
constexpr Words<CutBackKind, 3> kCutBack = {{{CutBackKind::pullbox, "pullbox"},
                                             {CutBackKind::trench, "trench"},
                                             {CutBackKind::crossing, "crossing"}}};
constexpr Words<ServiceKind, 3> kService = {{{ServiceKind::service, "service"},
                                             {ServiceKind::circuit_end, "circuit-end"},
                                             {ServiceKind::candidate, "candidate"}}};
constexpr Words<Leaf, 2> kLeaf = {{{Leaf::deciduous, "deciduous"}, {Leaf::evergreen, "evergreen"}}};

template <class Value, std::size_t n>
const char* word_of(const Words<Value, n>& words, Value value) {
    for (const auto& [each, word] : words)
        if (each == value) return word;
    return "";
}

template <class Value, std::size_t n>
std::optional<Value> value_of(const Words<Value, n>& words, std::string_view text) {
    for (const auto& [each, word] : words)
        if (text == word) return each;
    return std::nullopt;
}

template <class Table>
auto find_id(const Table& table, std::string_view id) {
    return static_cast<std::size_t>(
        std::find_if(table.begin(), table.end(), [&](const auto& row) { return row.id == id; }) -
        table.begin());
}

} // namespace

bool is_parallel(const City& city, const Pole& pole) {
    return pole.string.is_valid() && city.strings[pole.string.place()].kind == CircuitKind::parallel;
}

bool is_candidate(const City& city, const Pole& pole) {
    return pole.string.is_valid() && !is_parallel(city, pole) && !pole.set_aside && pole.has_place &&
           !city.strings[pole.string.place()].set_aside && pole.status == PoleStatus::standing;
}

PoleIx find_pole(const City& city, std::string_view id) {
    const std::size_t place = find_id(city.poles, id);
    return place < city.poles.size() ? PoleIx(place) : PoleIx();
}

StringIx find_string(const City& city, std::string_view id) {
    const std::size_t place = find_id(city.strings, id);
    return place < city.strings.size() ? StringIx(place) : StringIx();
}

std::vector<std::vector<PoleIx>> lamps_by_string(const City& city) {
    std::vector<std::vector<PoleIx>> lamps(city.strings.size());
    for (std::size_t i = 0; i < city.poles.size(); ++i) {
        const Pole& pole = city.poles[i];
        if (!pole.string.is_valid() || pole.set_aside || pole.status == PoleStatus::proposed) continue;
        lamps[pole.string.place()].push_back(PoleIx(i));
    }
    for (auto& on_string : lamps)
        std::sort(on_string.begin(), on_string.end(), [&](PoleIx a, PoleIx b) {
            const Pole& left = city.poles[a.place()];
            const Pole& right = city.poles[b.place()];
            const int left_order = left.order.value_or(1 << 30);
            const int right_order = right.order.value_or(1 << 30);
            if (left_order != right_order) return left_order < right_order;
            return left.id < right.id;
        });
    return lamps;
}

const char* text_of(PoleStatus value) { return word_of(kStatus, value); }
const char* text_of(Feed value) { return word_of(kFeed, value); }
const char* text_of(Duct value) { return word_of(kDuct, value); }
const char* text_of(Owner value) { return word_of(kOwner, value); }
const char* text_of(Surface value) { return word_of(kSurface, value); }
const char* text_of(CircuitKind value) { return word_of(kCircuit, value); }
const char* text_of(Control value) { return word_of(kControl, value); }
const char* text_of(Build value) { return word_of(kBuild, value); }
const char* text_of(Mount value) { return word_of(kMount, value); }
const char* text_of(Oil value) { return word_of(kOil, value); }
const char* text_of(UnitState value) { return word_of(kUnit, value); }
const char* text_of(CutBackKind value) { return word_of(kCutBack, value); }
const char* text_of(ServiceKind value) { return word_of(kService, value); }
const char* text_of(Leaf value) { return word_of(kLeaf, value); }

template <>
std::optional<PoleStatus> read_word(std::string_view text) {
    return value_of(kStatus, text);
}
template <>
std::optional<Feed> read_word(std::string_view text) {
    return value_of(kFeed, text);
}
template <>
std::optional<Duct> read_word(std::string_view text) {
    return value_of(kDuct, text);
}
template <>
std::optional<Owner> read_word(std::string_view text) {
    return value_of(kOwner, text);
}
template <>
std::optional<Surface> read_word(std::string_view text) {
    return value_of(kSurface, text);
}
template <>
std::optional<CircuitKind> read_word(std::string_view text) {
    return value_of(kCircuit, text);
}
template <>
std::optional<Control> read_word(std::string_view text) {
    return value_of(kControl, text);
}
template <>
std::optional<Build> read_word(std::string_view text) {
    return value_of(kBuild, text);
}
template <>
std::optional<Mount> read_word(std::string_view text) {
    return value_of(kMount, text);
}
template <>
std::optional<Oil> read_word(std::string_view text) {
    return value_of(kOil, text);
}
template <>
std::optional<UnitState> read_word(std::string_view text) {
    return value_of(kUnit, text);
}
template <>
std::optional<CutBackKind> read_word(std::string_view text) {
    return value_of(kCutBack, text);
}
template <>
std::optional<ServiceKind> read_word(std::string_view text) {
    return value_of(kService, text);
}
template <>
std::optional<Leaf> read_word(std::string_view text) {
    return value_of(kLeaf, text);
}

} // namespace unstring
