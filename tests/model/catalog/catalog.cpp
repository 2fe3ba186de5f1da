#include "model/catalog/catalog.h"

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

Catalog small_catalog() {
    Catalog catalog;
    catalog.lamps = {{"HPS100", {"S100"}, 130, 0.9, LampKind::hps},
                     {"HPS150", {"150 watt sodium"}, 188, 0.9, LampKind::hps},
                     {"FIL6000", {"6000 lm"}, 310, 1.0, LampKind::filament},
                     {"MV175", {}, 205, 0.9, LampKind::mv}};
    return catalog;
}

const char* found(const Catalog& catalog, const char* text) {
    const Lamp* lamp = find_lamp(catalog, text);
    return lamp == nullptr ? "" : lamp->fixture.c_str();
}

} // namespace

TEST_CASE("catalog: a fixture is told from free text, letters and watts in any order") {
    const Catalog catalog = small_catalog();
    for (const char* text :
         {"HPS150", "hps 150 w", "150W S", "150WS", "150-HPS", "HPS-150W", "150 Watt Sodium", "sodium 150"}) {
        INFO(text);
        CHECK(std::string(found(catalog, text)) == "HPS150");
    }
    CHECK(std::string(found(catalog, "175W MV")) == "MV175");
    CHECK(std::string(found(catalog, "s-100")) == "HPS100");
    CHECK(std::string(found(catalog, "6000LM")) == "FIL6000");
}

TEST_CASE("catalog: a fixture that cannot be told is not guessed") {
    const Catalog catalog = small_catalog();
    for (const char* text :
         {"", "  ", "150", "HPS", "HPS151", "LED150", "150W X", "HPS 100/150", "1500 HPS"}) {
        INFO(text);
        CHECK(find_lamp(catalog, text) == nullptr);
    }
}

TEST_CASE("catalog: heads and cables are found by name and by size and metal") {
    Catalog catalog;
    Head head;
    head.head = "M60";
    catalog.heads.push_back(head);
    catalog.cables = {{8, Metal::copper, 2.5, .17, 23, 50}, {8, Metal::aluminium, 4.2, .17, 23, 40}};
    CHECK(find_head(catalog, "M60") == &catalog.heads[0]);
    CHECK(find_head(catalog, "L90") == nullptr);
    CHECK(find_cable(catalog, 8, Metal::aluminium) == &catalog.cables[1]);
    CHECK(find_cable(catalog, 6, Metal::copper) == nullptr);
}
