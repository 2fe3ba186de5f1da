#pragma once
// What one pole's lamp takes on its string, as far as its record and the catalogue tell.

#include <optional>
#include <string>
#include <unordered_map>

#include "model/catalog/catalog.h"
#include "model/city/city.h"

namespace unstring {

inline constexpr double kUsualLampPf = 0.9;
/// System watts of a 150 W sodium lamp: stands in where a whole string has no lamp of known watts.
inline constexpr double kUsualLampW = 188;

struct LampLoad {
    std::optional<double> w; ///< none: neither watts given nor a fixture that is known
    double pf = kUsualLampPf;
    const Lamp* lamp = nullptr; ///< of the catalogue; null = not known there
};

/// Looks lamps up by the fixture's text, each text once.
class LampBook {
public:
    explicit LampBook(const Catalog& catalog) : catalog_(catalog) {}
    /// The record's own watts and power factor go before the catalogue's.
    [[nodiscard]] LampLoad load_of(const Pole& pole);

private:
    const Catalog& catalog_;
    std::unordered_map<std::string, const Lamp*> by_fixture_;
};

} // namespace unstring
