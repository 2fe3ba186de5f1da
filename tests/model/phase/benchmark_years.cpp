#include <fstream>

#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>

#include "model/phase/years_form.h"

using namespace unstring;

namespace {

YearsForm read_benchmark(const std::string& name) {
    std::ifstream stream(std::string(UNSTRING_BENCHMARKS) + "/phasing/" + name);
    const auto json = nlohmann::json::parse(stream);
    YearsForm form;
    form.years = json.at("T");
    form.discount = json.at("discount");
    form.keep_growth = json.at("keepGrowth");
    form.min_frac = json.at("minfrac");
    form.mobilisation_cost = json.at("mobilisationCost");
    form.mobilisation_hours = json.at("mobilisationHours");
    form.swap_cost = json.at("swapCost");
    form.swap_hours = json.at("swapHours");
    form.buy_cost = json.at("buyCost");
    form.spare_fraction = json.at("spareFraction");
    form.ratings = json.at("ratings").get<std::vector<double>>();
    form.budget = json.at("budget").get<std::vector<double>>();
    form.hours = json.at("hours").get<std::vector<double>>();
    form.units_owned = json.at("unitsOwned").get<std::vector<std::vector<double>>>();
    for (const auto& row : json.at("strings"))
        form.strings.push_back(
            {row.at("ratingIndex"), row.at("fixedKeep"), row.at("load").get<std::vector<double>>(),
             row.at("capital").get<std::vector<double>>(), row.at("hours").get<std::vector<double>>(),
             row.at("keep").get<std::vector<double>>()});
    return form;
}

} // namespace

// shared/benchmarks/README.md: both values proved there by two mixed-integer models.
TEST_CASE("years: the 4 x 4 x 4 benchmark is solved to its proved optimum of 2 101 471.72") {
    const YearsForm form = read_benchmark("ph_4x4x4_s1.json");
    const PackageAnswer answer = solve_packages(packages_of(form), 4000, 5000, {});
    CHECK(answer.is_feasible);
    const YearsFormCheck check = check_years(form, answer.plan.strings);
    CHECK(check.broken.empty());
    CHECK(check.over.empty());
    CHECK(check.cost == Approx(2101471.72).margin(0.005).epsilon(0));
    CHECK(answer.bound == Approx(2101471.72).margin(0.01).epsilon(0));
    CHECK(answer.bound <= check.cost + 0.005);
    WARN("branches " << answer.branches);
}

TEST_CASE("years: the 5 x 5 x 5 benchmark is proved infeasible, and the plan says what is short") {
    const YearsForm form = read_benchmark("ph_5x5x5_s4.json");
    const PackageAnswer answer = solve_packages(packages_of(form), 4000, 5000, {});
    CHECK_FALSE(answer.is_feasible);
    CHECK(answer.is_proved_infeasible);
    const YearsFormCheck check = check_years(form, answer.plan.strings);
    CHECK(check.broken.empty());
    REQUIRE_FALSE(check.over.empty());
    for (const auto& each : check.over) {
        WARN("year " << each.year << " " << each.limit << " short by " << each.by);
        CHECK(each.by > 0);
    }
    WARN("branches " << answer.branches << " cost " << check.cost);
}
