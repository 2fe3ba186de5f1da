#include "model/series/sections.h"

#include <algorithm>
#include <random>
#include <set>

#include <catch2/catch.hpp>

#include "tests/model/series/city_for_tests.h"

namespace unstring {
namespace {

StringLoop loop_of(int lamps, std::vector<LoopCutBack> cutbacks) {
    StringLoop loop;
    loop.string = StringIx(0);
    for (int p = 1; p <= lamps; ++p) loop.lamps.emplace_back(static_cast<std::size_t>(p - 1));
    loop.lamp_w.assign(loop.lamps.size(), 188);
    loop.lamp_pf.assign(loop.lamps.size(), 0.8);
    loop.burns.assign(loop.lamps.size(), 1);
    loop.legs_m.assign(loop.lamps.size() + 1, 30);
    loop.cutbacks = std::move(cutbacks);
    loop.far_position = (lamps + 1) / 2;
    return loop;
}

LoopCutBack cutback(int a, int b, double new_cable_m, bool confirmed = true) {
    return {a, b, new_cable_m, confirmed ? 0 : -1, confirmed, CutBackKind::pullbox};
}

std::vector<std::size_t> positions_of(const Section& section) {
    std::vector<std::size_t> positions;
    for (const PoleIx pole : section.poles) positions.push_back(pole.place() + 1);
    return positions;
}

/// Every lamp in one section; rings count from 0; after each ring the lamps off are one run that holds the
/// far end.
void check_nested(const StringLoop& loop, const std::vector<Section>& sections) {
    std::set<std::size_t> off;
    int ring = 0;
    for (const Section& section : sections) {
        REQUIRE(section.ring == ring++);
        REQUIRE_FALSE(section.poles.empty());
        REQUIRE(std::is_sorted(section.poles.begin(), section.poles.end()));
        for (const std::size_t p : positions_of(section)) REQUIRE(off.insert(p).second);
        REQUIRE(*off.rbegin() - *off.begin() + 1 == off.size());
        REQUIRE(off.contains(static_cast<std::size_t>(loop.far_position)));
        if (section.cutback >= 0) {
            const LoopCutBack& closing = loop.cutbacks[static_cast<std::size_t>(section.cutback)];
            REQUIRE(static_cast<int>(*off.begin()) == closing.a + 1);
            REQUIRE(static_cast<int>(*off.rbegin()) == closing.b - 1);
        }
    }
    REQUIRE(off.size() == loop.lamps.size());
}

} // namespace

TEST_CASE("sections: without cut-backs a string leaves in contiguous blocks of 6 to 10 lamps from the far "
          "end inward") {
    for (int lamps = 6; lamps <= 140; ++lamps) {
        const StringLoop loop = loop_of(lamps, {});
        const std::vector<Section> sections = sections_of({loop});
        CAPTURE(lamps);
        check_nested(loop, sections);
        for (const Section& section : sections) {
            REQUIRE(section.poles.size() >= 6);
            REQUIRE(section.poles.size() <= (lamps == 11 ? 11 : 10));
            REQUIRE(section.poles.back().place() - section.poles.front().place() + 1 == section.poles.size());
            REQUIRE(section.cutback == -1);
        }
    }
}

TEST_CASE("sections: a string of one lamp is one section") {
    const StringLoop loop = loop_of(1, {});
    check_nested(loop, sections_of({loop}));
}

TEST_CASE("sections: with cut-backs the lamps between one and the next leave together, on both legs") {
    const StringLoop loop = loop_of(32, {cutback(12, 21, 5), cutback(8, 25, 5), cutback(4, 29, 5)});
    const std::vector<Section> sections = sections_of({loop});
    check_nested(loop, sections);
    REQUIRE(sections.size() == 4);
    CHECK(positions_of(sections[0]) == std::vector<std::size_t>{13, 14, 15, 16, 17, 18, 19, 20});
    CHECK(sections[0].cutback == 0);
    CHECK(positions_of(sections[1]) == std::vector<std::size_t>{9, 10, 11, 12, 21, 22, 23, 24});
    CHECK(sections[2].cutback == 2);
    CHECK(sections[3].cutback == -1);
}

TEST_CASE("sections: a wide ring is cut in pieces, jumpered until the last of them closes the loop") {
    const StringLoop loop = loop_of(48, {cutback(20, 29, 5)});
    const std::vector<Section> sections = sections_of({loop});
    check_nested(loop, sections);
    CHECK(sections[0].cutback == 0);
    CHECK(sections.size() == 6);
    for (const Section& section : sections) CHECK(section.poles.size() == 8);
}

TEST_CASE("sections: a cut-back that saves no cable is not used, a confirmed one goes before a candidate") {
    const StringLoop useless = loop_of(24, {cutback(7, 17, 300)});
    for (const Section& section : sections_of({useless})) CHECK(section.cutback == -1);
    const StringLoop either = loop_of(24, {cutback(8, 17, 20, false), cutback(8, 17, 20, true)});
    CHECK(sections_of({either})[0].cutback == 1);
}

TEST_CASE(
    "sections: stay nested and whole on 300 random loops with cut-backs, ids count on over the strings") {
    const unsigned seed = 4711;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    const auto whole = [&](int low, int high) {
        return std::uniform_int_distribution<int>(low, high)(random);
    };
    for (int round = 0; round < 300; ++round) {
        const int n = whole(1, 90);
        std::vector<LoopCutBack> cutbacks;
        for (int k = whole(0, 60); k > 0; --k) {
            const int a = whole(0, n - 1);
            const int b = whole(a + 1, n + 1);
            if (a > 0 || b <= n) cutbacks.push_back(cutback(a, b, whole(0, 200), whole(0, 1) == 1));
        }
        StringLoop loop = loop_of(n, cutbacks);
        loop.far_position = whole(1, n);
        CAPTURE(round, n);
        check_nested(loop, sections_of({loop}));
    }
    const std::vector<Section> two = sections_of({loop_of(20, {}), loop_of(20, {})});
    for (std::size_t i = 0; i < two.size(); ++i) CHECK(two[i].id == static_cast<int>(i));
}

} // namespace unstring
