#include <algorithm>
#include <atomic>

#include <catch2/catch.hpp>

#include "model/phase/phase_desk.h"
#include "model/phase/phase_plan.h"
#include "tests/model/phase/small_city.h"

using namespace unstring;

namespace {

int count_of(const PhaseResult& result, const std::string& code) {
    return static_cast<int>(std::count_if(result.failures.begin(), result.failures.end(),
                                          [&](const Finding& each) { return each.code == code; }));
}

PhaseOutcome solved(const SmallCity& city, PhaseChoices choices = {}) {
    auto outcome = phase_plan(city.input(), city.decide, choices, {});
    REQUIRE(outcome.has_value());
    return std::move(*outcome);
}

/// Sections leave from the far end inward: where a section has a year, those further out have an earlier one
/// or the same.
void check_nested(const PhaseResult& result) {
    for (const Section& section : result.sections)
        for (const Section& inner : result.sections) {
            if (inner.string != section.string || inner.ring <= section.ring) continue;
            int last = 0, first = 1 << 30;
            for (const PoleIx pole : section.poles)
                last = std::max(last, result.pole_year[pole.place()] == 0 ? 1 << 30
                                                                          : result.pole_year[pole.place()]);
            for (const PoleIx pole : inner.poles)
                first = std::min(first, result.pole_year[pole.place()] == 0 ? 1 << 30
                                                                            : result.pole_year[pole.place()]);
            CHECK(last <= first);
        }
}

} // namespace

TEST_CASE("phase: for random cities the plan costs no less than its bound, is nested, and names what it "
          "over-runs") {
    int feasible = 0;
    double widest = 0;
    for (unsigned seed = 1; seed <= 25; ++seed) {
        const SmallCity city = random_city(seed);
        INFO("seed " << seed);
        const PhaseOutcome outcome = solved(city);
        const PhaseResult& result = outcome.result;
        CHECK(result.cost >= result.bound);
        CHECK(result.bound > 0);
        CHECK(count_of(result, "unit-twice") == 0);
        CHECK(count_of(result, "duct-live") == 0);
        CHECK(count_of(result, "control-lost") == 0);
        check_nested(result);
        int dated = 0;
        for (std::size_t i = 0; i < city.lamps(); ++i) {
            CHECK(outcome.plan.poles[i].choice == city.plan.poles[i].choice);
            if (outcome.plan.poles[i].year != 0) ++dated;
        }
        CHECK(dated + result.not_reached == static_cast<int>(city.lamps()));
        for (const PhaseYear& year : result.years)
            if (year.money_limit && to_dollars(year.money) > *year.money_limit + 0.005)
                CHECK(count_of(result, "money-short") > 0);
        if (result.feasible && result.not_reached == 0) {
            ++feasible;
            widest = std::max(widest, (result.cost - result.bound) / result.cost);
        }
    }
    WARN(feasible << " of 25 feasible and whole, widest gap " << widest);
    CHECK(feasible > 5);
}

TEST_CASE("phase: the same input gives the same plan") {
    const SmallCity city = random_city(3);
    const PhaseOutcome first = solved(city);
    const PhaseOutcome second = solved(city);
    CHECK(first.plan.poles == second.plan.poles);
    CHECK(first.plan.units == second.plan.units);
    CHECK(first.result.cost == second.result.cost);
    CHECK(first.result.bound == second.result.bound);
}

TEST_CASE("phase: hand years stay unless they are freed, locked years stay always") {
    SmallCity city = random_city(5);
    const int last = city.plan.last_year();
    city.plan.poles[0].year = last;
    city.plan.poles[0].year_by = YearBy::hand;
    city.plan.poles[1].year = 2027;
    city.plan.poles[1].year_by = YearBy::hand;
    city.plan.poles[1].year_locked = true;
    const PhaseOutcome kept = solved(city);
    CHECK(kept.plan.poles[0].year == last);
    CHECK(kept.plan.poles[0].year_by == YearBy::hand);
    CHECK(kept.plan.poles[1].year == 2027);
    CHECK(kept.result.cost >= kept.result.bound);
    const PhaseOutcome freed = solved(city, {true, false});
    CHECK(freed.plan.poles[1].year == 2027);
    CHECK(freed.plan.poles[0].year_by != YearBy::hand);
}

TEST_CASE("phase: with too little money the rest has no year, and what it lacks is said") {
    SmallCity city = random_city(2);
    for (YearBudget& row : city.city.budget) row.money = 30000;
    const PhaseOutcome outcome = solved(city);
    CHECK(outcome.result.not_reached > 0);
    CHECK(count_of(outcome.result, "pole-unreached") > 0);
    CHECK(count_of(outcome.result, "money-short") > 0);
    CHECK(outcome.result.feasible); // no year's limit is broken
    CHECK(outcome.result.cost >= outcome.result.bound);
    for (const PhaseYear& year : outcome.result.years) CHECK(to_dollars(year.money) <= 30000.005);
}

TEST_CASE("phase: a kept lamp keeps its string alive to the horizon") {
    SmallCity city = random_city(4);
    city.plan.poles[0].choice = Choice::keep;
    const PhaseOutcome outcome = solved(city);
    CHECK(outcome.plan.poles[0].year == 0);
    for (const StringYear& row : outcome.result.string_years)
        if (row.string == StringIx(0)) CHECK(row.lamps > 0);
    CHECK(outcome.result.cost >= outcome.result.bound);
}

TEST_CASE("phase: a cancelled run answers a fault") {
    const SmallCity city = random_city(1);
    std::atomic<bool> cancel{true};
    Progress progress;
    progress.cancel = &cancel;
    const auto outcome = phase_plan(city.input(), city.decide, {}, progress);
    REQUIRE_FALSE(outcome.has_value());
    CHECK(outcome.error().code == FaultCode::cancelled);
}

TEST_CASE("phase: a city of 1 400 lamps is planned within seconds") {
    SmallCity city;
    city.plan.settings.years = 8;
    for (int s = 0; s < 14; ++s) city.add_string(50, s % 3 != 0);
    for (int s = 0; s < 14; ++s)
        city.add_unit("T-" + std::to_string(s + 1), 25, {StringIx(static_cast<std::size_t>(s))});
    for (int k = 0; k < 4; ++k) city.add_unit("R-" + std::to_string(k + 1), 15, {});
    city.add_budget(1500000, 20000);
    city.add_catalog();
    city.choose([](std::size_t i) { return i % 3 == 0; }, SpanKind::trench_verge);
    const PhaseOutcome outcome = solved(city);
    for (const Finding& each : outcome.result.failures)
        WARN(each.code << " " << each.record << ": " << each.found);
    for (const PhaseYear& each : outcome.result.years)
        WARN(each.year << " " << to_dollars(each.money) << " of " << each.money_limit.value_or(0)
                       << ", civil " << each.hours.civil << ", left " << each.series_lamps_left);
    WARN("seconds " << outcome.result.seconds << ", cost " << outcome.result.cost << ", bound "
                    << outcome.result.bound << ", not reached " << outcome.result.not_reached << ", failures "
                    << outcome.result.failures.size());
    CHECK(outcome.result.cost >= outcome.result.bound);
    CHECK(outcome.result.seconds < 60);
}
