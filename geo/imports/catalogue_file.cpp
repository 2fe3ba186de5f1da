#include "geo/imports/catalogue_file.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <optional>
#include <stdexcept>
#include <utility>

#include <fmt/format.h>
#include <nlohmann/json.hpp>

#include "geo/imports/local_file.h"
#include "geo/imports/table_reader.h"
#include "model/catalog/cables.h"
#include "model/catalog/prices.h"
#include "resources/resources.h"

namespace unstring {
namespace {

using Json = nlohmann::json;
constexpr std::uintmax_t kMaxCatalogue = 64U << 20U;

/// Thrown inside this file only, caught where the file is read: a field that cannot be taken.
struct BadField {
    Fault fault;
};

std::string shown(const Json& value) {
    return value.is_structured() ? std::string(value.is_array() ? "a list" : "an object")
                                 : value.dump().substr(0, 60);
}

/// The fields of one object; every fault names its path, "heads[2].panel_wp".
class Fields {
public:
    Fields(const Json& object, std::string path, const std::string& file)
        : object_(object), path_(std::move(path)), file_(file) {
        if (!object_.is_object()) refuse({}, shown(object_), "an object");
    }

    [[nodiscard]] std::string text(const char* key, bool is_needed) const {
        const Json* value = find(key);
        if (value == nullptr && is_needed) refuse(key, "nothing", "a text");
        if (value == nullptr) return {};
        if (!value->is_string() || value->get_ref<const std::string&>().size() > 1000)
            refuse(key, shown(*value), "a text");
        return value->get<std::string>();
    }

    [[nodiscard]] double number(const char* key, double low, double high,
                                std::optional<double> otherwise = {}) const {
        const Json* value = find(key);
        if (value == nullptr && otherwise) return *otherwise;
        const std::string wanted = fmt::format("a number from {:g} to {:g}", low, high);
        if (value == nullptr) refuse(key, "nothing", wanted);
        const double read = value->is_number() ? value->get<double>() : std::nan("");
        if (!(read >= low && read <= high)) refuse(key, shown(*value), wanted);
        return read;
    }

    [[nodiscard]] bool flag(const char* key) const {
        const Json* value = find(key);
        if (value == nullptr) return false;
        if (!value->is_boolean()) refuse(key, shown(*value), "true or false");
        return value->get<bool>();
    }

    [[nodiscard]] std::vector<Fields> list(const char* key) const {
        const Json* value = find(key);
        if (value == nullptr) return {};
        if (!value->is_array() || value->size() > 100'000) refuse(key, shown(*value), "a list");
        std::vector<Fields> items;
        for (std::size_t i = 0; i < value->size(); ++i)
            items.emplace_back((*value)[i], fmt::format("{}[{}]", path_of(key), i), file_);
        return items;
    }

    [[nodiscard]] std::vector<std::string> texts(const char* key) const {
        const Json* value = find(key);
        if (value == nullptr) return {};
        if (!value->is_array()) refuse(key, shown(*value), "a list of texts");
        std::vector<std::string> all;
        for (const Json& item : *value) {
            if (!item.is_string()) refuse(key, shown(item), "a text");
            all.push_back(item.get<std::string>());
        }
        return all;
    }

    [[nodiscard]] const Json* find(const char* key) const {
        const auto at = object_.find(key);
        return at == object_.end() || at->is_null() ? nullptr : &*at;
    }

    [[noreturn]] void refuse(const char* key, std::string found, std::string wanted,
                             FaultCode code = FaultCode::value_unreadable) const {
        throw BadField{{code, file_, 0, key != nullptr ? path_of(key) : path_, std::move(found),
                        std::move(wanted), "mend the catalogue"}};
    }

private:
    [[nodiscard]] std::string path_of(const char* key) const {
        return path_.empty() ? key : fmt::format("{}.{}", path_, key);
    }

    const Json& object_;
    std::string path_;
    const std::string& file_;
};

LampKind lamp_kind(const Fields& in) {
    constexpr std::array<std::pair<const char*, LampKind>, 5> kKinds = {{{"hps", LampKind::hps},
                                                                         {"filament", LampKind::filament},
                                                                         {"lps", LampKind::lps},
                                                                         {"mv", LampKind::mv},
                                                                         {"led", LampKind::led}}};
    const std::string word = in.text("kind", true);
    for (const auto& [text, kind] : kKinds)
        if (word == text) return kind;
    in.refuse("kind", word, "hps, filament, lps, mv or led", FaultCode::value_unknown);
}

Lamp lamp(const Fields& in) {
    return {in.text("fixture", true), in.texts("aliases"), in.number("system_w", 0.1, 5000),
            in.number("pf", 0.05, 1, 0.9), lamp_kind(in)};
}

Head head(const Fields& in) {
    Head head;
    head.head = in.text("head", true);
    head.panel_wp = in.number("panel_wp", 1, 5000);
    head.tilt_deg = in.number("tilt_deg", 0, 90, 0);
    head.turn_deg = in.number("turn_deg", -360, 360, 0);
    head.battery_wh = in.number("battery_wh", 1, 1e5);
    head.led_w = in.number("led_w", 0.1, 1000);
    head.lumens = in.number("lumens", 1, 2e5);
    for (const Fields& step : in.list("dimming"))
        head.dimming.push_back(
            {step.number("from_h", 0, 24), step.number("to_h", 0, 24), step.number("frac", 0, 1)});
    head.epa_m2 = in.number("epa_m2", 0, 50);
    head.mass_kg = in.number("mass_kg", 0, 1000, 0);
    head.price_item = in.text("price_item", true);
    head.battery_item = in.text("battery_item", false);
    head.life_yr = in.number("life_yr", 1, 100, 15);
    head.warranty_yr = in.number("warranty_yr", 0, 100, 0);
    head.cct_k = in.number("cct_k", 0, 20000, 0);
    head.domestic = in.flag("domestic");
    head.ies = in.text("ies", false);
    for (const auto& [key, item] :
         {std::pair{"price_item", &head.price_item}, std::pair{"battery_item", &head.battery_item}}) {
        const auto items = price_items();
        const bool is_known = item->empty() || std::any_of(items.begin(), items.end(),
                                                           [&wanted = *item](const PriceItem& each) {
                                                               return each.item == wanted;
                                                           });
        if (!is_known) in.refuse(key, *item, "an item of the price list", FaultCode::value_unknown);
    }
    return head;
}

Luminaire luminaire(const Fields& in) {
    return {in.text("luminaire", true),  in.number("led_w", 0.1, 2000), in.number("pf", 0.05, 1, 0.95),
            in.number("lumens", 1, 5e5), in.text("price_item", true),   in.text("ies", false)};
}

Cable cable(const Fields& in) {
    const Json* size = in.find("awg");
    const auto awg = size == nullptr ? std::nullopt
                                     : read_awg(size->is_string() ? size->get<std::string>() : size->dump());
    if (!awg)
        in.refuse("awg", size == nullptr ? "nothing" : shown(*size), "a wire size such as 8 or \"1/0\"");
    const std::string metal = in.text("metal", true);
    if (metal != "cu" && metal != "al") in.refuse("metal", metal, "cu or al", FaultCode::value_unknown);
    return {*awg,
            metal == "cu" ? Metal::copper : Metal::aluminium,
            in.number("ohm_per_km", 1e-6, 1000),
            in.number("x_ohm_per_km", 0, 10, 0),
            in.number("area_mm2", 0, 1e5, 0),
            in.number("ampacity_a", 0, 1e5, 0)};
}

template <class Record, class Read>
void take_list(const Fields& in, const char* key, std::vector<Record>& into, const Read& read) {
    if (in.find(key) == nullptr) return;
    into.clear();
    for (const Fields& item : in.list(key)) into.push_back(read(item));
}

} // namespace

Expected<Catalog> parse_catalogue(std::string_view text, const std::string& file, const Catalog& defaults) {
    if (text.starts_with("\xEF\xBB\xBF")) text.remove_prefix(3);
    const Json json = Json::parse(text, nullptr, false);
    if (json.is_discarded())
        return tl::unexpected(Fault{
            FaultCode::file_broken, file, 0, {}, "no JSON", "a catalogue in JSON", "mend the catalogue"});
    try {
        const Fields in(json, {}, file);
        Catalog catalog = defaults;
        take_list(in, "lamps", catalog.lamps, lamp);
        take_list(in, "heads", catalog.heads, head);
        take_list(in, "luminaires", catalog.luminaires, luminaire);
        take_list(in, "cables", catalog.cables, cable);
        return catalog;
    } catch (const BadField& bad) {
        return tl::unexpected(bad.fault);
    }
}

Expected<Catalog> read_catalogue(const std::string& path, const Catalog& defaults) {
    const auto text = read_local_file(path, kMaxCatalogue);
    if (!text) return tl::unexpected(text.error());
    return parse_catalogue(*text, path, defaults);
}

Catalog default_catalog() {
    Catalog with_cables;
    with_cables.cables = default_cables();
    auto catalog = parse_catalogue(resource("catalogue.json"), "catalogue.json", with_cables);
    if (!catalog) throw std::logic_error("the carried catalogue: " + fault_text(catalog.error()));
    return *catalog;
}

} // namespace unstring
