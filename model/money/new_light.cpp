#include "model/money/new_light.h"

#include <algorithm>
#include <cctype>

#include "model/catalog/prices.h"

namespace unstring {
namespace {

constexpr double kUnknownLampW = 188;
constexpr double kLedShareFrac = 60.0 / 188.0;

std::string lower(std::string_view text) {
    std::string out(text);
    std::transform(out.begin(), out.end(), out.begin(),
                   [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
    return out;
}

} // namespace

double lamp_watts(const Catalog& catalog, const Pole& pole) {
    if (pole.lamp_w) return *pole.lamp_w;
    const Lamp* lamp = find_lamp(catalog, pole.fixture);
    return lamp != nullptr ? lamp->system_w : kUnknownLampW;
}

NewLight new_light(const Catalog& catalog, const Pole& pole) {
    const double wanted_w = kLedShareFrac * lamp_watts(catalog, pole);
    const auto is_enough = [&](const Luminaire& each) {
        return pole.need_lm ? each.lumens >= *pole.need_lm : each.led_w >= 0.95 * wanted_w;
    };
    const Luminaire* chosen = nullptr;
    const Luminaire* largest = nullptr;
    for (const Luminaire& each : catalog.luminaires) {
        if (is_enough(each) && (chosen == nullptr || each.led_w < chosen->led_w)) chosen = &each;
        if (largest == nullptr || each.lumens > largest->lumens) largest = &each;
    }
    if (chosen == nullptr) chosen = largest;
    if (chosen == nullptr) return {"LED luminaire", wanted_w, "led_head"};
    const bool is_priced = find_price_item(chosen->price_item) != nullptr;
    return {chosen->luminaire, chosen->led_w, is_priced ? std::string_view(chosen->price_item) : "led_head"};
}

RoadClass road_class_of(const Pole& pole) {
    const std::string words = lower(pole.road_class);
    if (words.find("arterial") != std::string::npos) return RoadClass::arterial;
    if (words.find("collector") != std::string::npos) return RoadClass::collector;
    return RoadClass::local;
}

Surface surface_at(const City& city, const Pole& pole) {
    for (const Street& street : city.streets)
        if (!pole.street.empty() && street.name == pole.street) return street.surface;
    return Surface::verge;
}

} // namespace unstring
