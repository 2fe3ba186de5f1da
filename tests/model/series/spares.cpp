#include "model/series/spares.h"

#include <cmath>
#include <stdexcept>

#include <catch2/catch.hpp>

namespace unstring {

TEST_CASE("spares: the stock is the smallest whose cover reaches the target") {
    for (const double mean : {0.05, 0.5, 3.0, 17.0, 140.0})
        for (const double target : {0.5, 0.9, 0.95, 0.999}) {
            const SpareStock answer = poisson_stock(mean, target);
            CAPTURE(mean, target, answer.stock);
            CHECK(answer.cover_frac >= target);
            CHECK(poisson_cover(mean, answer.stock) == Approx(answer.cover_frac).epsilon(1e-12));
            if (answer.stock > 0) CHECK(poisson_cover(mean, answer.stock - 1) < target);
        }
}

TEST_CASE("spares: nothing fails, nothing is needed; a large mean does not underflow") {
    CHECK(poisson_stock(0, 0.95).stock == 0);
    CHECK(poisson_cover(0, 0) == 1);
    CHECK(poisson_cover(1, -1) == 0);
    // normal approximation m + 1.645 sqrt(m), good to a unit or two at this size
    CHECK(std::abs(poisson_stock(10000, 0.95).stock - (10000 + 1.645 * 100)) < 3);
}

TEST_CASE("spares: a mean that is no number, or a target of certainty, is a bug") {
    CHECK_THROWS_AS(poisson_cover(std::nan(""), 1), std::logic_error);
    CHECK_THROWS_AS(poisson_stock(1, 1), std::logic_error);
}

} // namespace unstring
