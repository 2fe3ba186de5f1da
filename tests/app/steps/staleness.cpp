// What makes a step stale, and what does not.

#include <algorithm>

#include "tests/app/steps/planned_city.h"

using namespace unstring;
using namespace unstring::tests;

namespace {

void check_all_good(const OpenProject& project) {
    for (Step step : {Step::vet, Step::shade, Step::decide, Step::phase}) {
        INFO(text_of(step));
        const StepStanding now = standing(project, step);
        CHECK((now == StepStanding::up_to_date || now == StepStanding::stopped));
    }
}

// The first item of a price file, dearer.
void write_dearer(const std::string& prices, const std::string& target) {
    std::ifstream in(prices);
    std::string header, row;
    std::getline(in, header);
    std::getline(in, row);
    const std::size_t comma = row.find(','), next = row.find(',', comma + 1);
    std::ofstream(target) << header << "\n" << row.substr(0, next) << ",1,777,999,,,,,\n";
}

} // namespace

TEST_CASE("staleness: a price changed makes decide and phase stale, changed back nothing is") {
    const PlannedCity city;
    city.planned().reset();
    GatherFiles only_prices;
    only_prices.prices = city.folder.file("dear.csv");
    write_dearer(city.city + "/prices.csv", only_prices.prices);
    check_all_good(*city.open());
    city.gather(only_prices);
    {
        const auto project = city.open();
        CHECK(standing(*project, Step::vet) == StepStanding::up_to_date);
        CHECK(standing(*project, Step::shade) == StepStanding::up_to_date);
        CHECK(standing(*project, Step::decide) == StepStanding::stale);
        CHECK(standing(*project, Step::phase) == StepStanding::stale);
        const auto refused = project->run_phase({}, {});
        REQUIRE_FALSE(refused);
        CHECK(refused.error().code == FaultCode::not_ready);
    }
    only_prices.prices = city.city + "/prices.csv";
    city.gather(only_prices);
    check_all_good(*city.open());
}

TEST_CASE("staleness: a mark makes decide stale and its undo does not leave it so; a year by hand makes "
          "phase edited by hand") {
    const PlannedCity city;
    const auto project = city.planned();
    check_all_good(*project);
    const auto view = project->view();
    const PoleIx pole = view->decide->poles.front().pole;
    Plan next = view->plan;
    next.poles[pole.place()].mark =
        next.poles[pole.place()].choice == Choice::solar ? Choice::rewire : Choice::solar;
    REQUIRE(project->edit(next, "mark"));
    CHECK(standing(*project, Step::decide) == StepStanding::stale);
    CHECK(standing(*project, Step::shade) == StepStanding::up_to_date);
    REQUIRE(project->undo());
    check_all_good(*project);

    next = project->view()->plan;
    const auto planned =
        std::find_if(next.poles.begin(), next.poles.end(), [](const PolePlan& row) { return row.year != 0; });
    REQUIRE(planned != next.poles.end());
    planned->year = planned->year == next.last_year() ? next.settings.first_year : planned->year + 1;
    planned->year_by = YearBy::hand;
    REQUIRE(project->edit(next, "year by hand"));
    const StepStanding by_hand = standing(*project, Step::phase);
    CHECK((by_hand == StepStanding::by_hand || by_hand == StepStanding::stopped));
    CHECK(standing(*project, Step::decide) != StepStanding::stale);
    REQUIRE(project->undo());
    check_all_good(*project);
}

TEST_CASE("staleness: a year that came locked with the marks is no edit by hand") {
    const PlannedCity city;
    GatherFiles files = city.files();
    files.marks = city.folder.file("marks.csv");
    {
        std::ifstream poles(city.files().poles);
        std::string line;
        std::getline(poles, line);
        std::getline(poles, line);
        std::ofstream(files.marks) << "pole_id,mark,lock,year,who,note\n"
                                   << line.substr(0, line.find(',')) << ",,1,2028,planner,\n";
    }
    city.gather(files);
    const auto project = city.open();
    REQUIRE(project->run_vet(true, {}));
    REQUIRE(project->run_shade({}, {}));
    REQUIRE(project->run_decide({}, {}));
    REQUIRE(project->run_phase({}, {}));
    CHECK(project->view()->plan.poles[0].year == 2028);
    CHECK(project->view()->plan.poles[0].year_locked);
    check_all_good(*project);
}

TEST_CASE(
    "staleness: new records make every step after gather stale, and results of the old ones are not shown") {
    const PlannedCity city;
    city.planned().reset();
    GatherFiles only_poles;
    only_poles.poles = city.folder.file("fewer.csv");
    {
        std::ifstream in(city.city + "/poles.csv");
        std::ofstream out(only_poles.poles);
        std::string line;
        for (int i = 0; std::getline(in, line); ++i)
            if (i != 5) out << line << "\n";
    }
    city.gather(only_poles);
    const auto project = city.open();
    CHECK(standing(*project, Step::vet) == StepStanding::stale);
    CHECK(standing(*project, Step::decide) == StepStanding::stale);
    CHECK_FALSE(project->view()->decide);
    CHECK_FALSE(project->view()->phase);
    CHECK(project->view()->plan.poles.size() == project->view()->city.poles.size());
    const auto refused = project->run_shade({}, {});
    REQUIRE_FALSE(refused);
    CHECK(refused.error().code == FaultCode::not_ready);
}
