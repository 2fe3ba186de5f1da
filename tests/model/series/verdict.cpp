#include "model/series/verdict.h"

#include <string>

#include <catch2/catch.hpp>

namespace unstring {

TEST_CASE("verdict: each word begins where the contract says") {
    const auto word = [](double loading) {
        return std::string(text_of(verdict_of(true, 10, loading, 0.25)));
    };
    CHECK(word(1.0001) == "over");
    CHECK(word(1) == "tight");
    CHECK(word(0.9001) == "tight");
    CHECK(word(0.9) == "good");
    CHECK(word(0.5) == "good");
    CHECK(word(0.4999) == "light");
    CHECK(word(0.25) == "light");
    CHECK(word(0.2499) == "low");
}

TEST_CASE("verdict: a string without lamps is none, one without a transformer open") {
    CHECK(verdict_of(true, 0, 0.7, 0.25) == Verdict::none);
    CHECK(verdict_of(false, 0, 0, 0.25) == Verdict::none);
    CHECK(verdict_of(false, 3, 0, 0.25) == Verdict::open);
}

TEST_CASE("verdict: a unit that needs more than half its rating is low before it is good") {
    CHECK(verdict_of(true, 10, 0.55, 0.6) == Verdict::low);
}

} // namespace unstring
