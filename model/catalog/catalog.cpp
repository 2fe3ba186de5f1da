#include "model/catalog/catalog.h"

#include <algorithm>
#include <array>
#include <cctype>

namespace unstring {
namespace {

bool is_letter(char c) { return std::isalpha(static_cast<unsigned char>(c)) != 0; }
bool is_digit(char c) { return std::isdigit(static_cast<unsigned char>(c)) != 0; }

/// Upper case, letters and digits only.
std::string squeezed(std::string_view text) {
    std::string out;
    for (const char c : text)
        if (is_letter(c) || is_digit(c))
            out += static_cast<char>(std::toupper(static_cast<unsigned char>(c)));
    return out;
}

struct LettersAndWatts {
    std::string letters; ///< without the W that only says watts
    std::string watts;
    bool is_plain = false; ///< one run of letters and one number
};

/// "150W S" -> S, 150.   "hps 150 w" -> HPS, 150.
LettersAndWatts letters_and_watts(std::string_view text) {
    LettersAndWatts out;
    int numbers = 0;
    bool in_number = false;
    for (std::size_t i = 0; i < text.size(); ++i) {
        if (is_digit(text[i])) {
            if (!in_number) ++numbers;
            in_number = true;
            out.watts += text[i];
        } else {
            const bool says_watts = in_number && std::toupper(static_cast<unsigned char>(text[i])) == 'W';
            in_number = false;
            if (is_letter(text[i]) && !says_watts) out.letters += squeezed(text.substr(i, 1));
        }
    }
    if (out.letters.size() > 1 && out.letters.ends_with("W") && text.find_last_of("wW") + 1 == text.size())
        out.letters.pop_back(); // "150 HPS W", "HPS 150 W"
    const std::size_t first = out.watts.find_first_not_of('0');
    out.watts = first == std::string::npos ? std::string() : out.watts.substr(first);
    out.is_plain = numbers == 1 && !out.letters.empty() && !out.watts.empty();
    return out;
}

std::optional<LampKind> kind_of(std::string_view letters) {
    constexpr std::array<std::pair<std::string_view, LampKind>, 16> kWords = {{
        {"HPS", LampKind::hps},
        {"S", LampKind::hps},
        {"HPSV", LampKind::hps},
        {"SODIUM", LampKind::hps},
        {"HIGHPRESSURESODIUM", LampKind::hps},
        {"FIL", LampKind::filament},
        {"FILAMENT", LampKind::filament},
        {"INC", LampKind::filament},
        {"INCANDESCENT", LampKind::filament},
        {"LPS", LampKind::lps},
        {"LOWPRESSURESODIUM", LampKind::lps},
        {"MV", LampKind::mv},
        {"MERCURY", LampKind::mv},
        {"MERC", LampKind::mv},
        {"MERCURYVAPOR", LampKind::mv},
        {"LED", LampKind::led},
    }};
    for (const auto& [word, kind] : kWords)
        if (word == letters) return kind;
    return std::nullopt;
}

bool bears_name(const Lamp& lamp, const std::string& name) {
    return squeezed(lamp.fixture) == name ||
           std::any_of(lamp.aliases.begin(), lamp.aliases.end(),
                       [&](const std::string& alias) { return squeezed(alias) == name; });
}

} // namespace

const Lamp* find_lamp(const Catalog& catalog, std::string_view fixture) {
    const std::string name = squeezed(fixture);
    if (name.empty()) return nullptr;
    for (const Lamp& lamp : catalog.lamps)
        if (bears_name(lamp, name)) return &lamp;
    const LettersAndWatts asked = letters_and_watts(fixture);
    if (!asked.is_plain) return nullptr;
    const std::optional<LampKind> kind = kind_of(asked.letters);
    for (const Lamp& lamp : catalog.lamps) {
        const LettersAndWatts has = letters_and_watts(lamp.fixture);
        if (has.watts != asked.watts) continue;
        if (has.letters == asked.letters || (kind && *kind == lamp.kind)) return &lamp;
    }
    return nullptr;
}

const Head* find_head(const Catalog& catalog, std::string_view head) {
    const auto at = std::find_if(catalog.heads.begin(), catalog.heads.end(),
                                 [&](const Head& each) { return each.head == head; });
    return at == catalog.heads.end() ? nullptr : &*at;
}

const Cable* find_cable(const Catalog& catalog, int awg, Metal metal) {
    const auto at = std::find_if(catalog.cables.begin(), catalog.cables.end(),
                                 [&](const Cable& each) { return each.awg == awg && each.metal == metal; });
    return at == catalog.cables.end() ? nullptr : &*at;
}

} // namespace unstring
