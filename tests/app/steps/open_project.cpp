#include "app/steps/open_project.h"

#include <atomic>

#include "tests/app/steps/planned_city.h"

using namespace unstring;
using namespace unstring::tests;

TEST_CASE("open project: a second opener gets it read-only, with who writes it, and its edits are refused") {
    const PlannedCity city(60);
    city.gather(city.files());
    const auto first = city.open();
    CHECK_FALSE(first->view()->is_read_only);
    const auto second = city.open();
    CHECK(second->view()->is_read_only);
    CHECK(second->view()->read_only_reason.find("written by ") == 0);
    Plan next = second->view()->plan;
    next.poles[0].mark = Choice::solar;
    const auto refused = second->edit(next, "mark");
    REQUIRE_FALSE(refused);
    CHECK(refused.error().code == FaultCode::file_busy);
    CHECK_FALSE(second->run_vet(false, {}));
}

TEST_CASE("open project: each edit is on disk at once, and undo and redo survive a restart") {
    const PlannedCity city(60);
    city.gather(city.files());
    {
        const auto project = city.open();
        Plan next = project->view()->plan;
        next.poles[0].mark = Choice::solar;
        REQUIRE(project->edit(next, "mark solar"));
        next.poles[1].lock = Choice::rewire;
        REQUIRE(project->edit(next, "lock rewire"));
        CHECK(project->view()->undo_label == "lock rewire");
    }
    {
        const auto project = city.open();
        CHECK(project->view()->plan.poles[0].mark == Choice::solar);
        CHECK(project->view()->undo_label == "lock rewire");
        REQUIRE(project->undo());
        CHECK(project->view()->plan.poles[1].lock == Choice::undecided);
        CHECK(project->view()->redo_label == "lock rewire");
    }
    const auto project = city.open();
    REQUIRE(project->redo());
    CHECK(project->view()->plan.poles[1].lock == Choice::rewire);
    const auto lines = project->history(project->view()->city.poles[1].id, 10);
    REQUIRE(lines);
    CHECK(lines->size() == 3);
}

TEST_CASE("open project: a closed project is one file") {
    const PlannedCity city(60);
    city.gather(city.files());
    {
        const auto project = city.open();
        REQUIRE(project->run_vet(true, {}));
    }
    for (const char* suffix : {"-wal", "-shm", "-journal", ".lock", ".new"})
        CHECK_FALSE(std::filesystem::exists(city.project + suffix));
}

TEST_CASE("open project: a step that is cancelled leaves the project as it was") {
    const PlannedCity city;
    const auto project = city.planned();
    const auto before = project->view();
    std::atomic<bool> stop{true};
    Progress progress;
    progress.cancel = &stop;
    for (int step = 0; step < 2; ++step) {
        const auto ran = step == 0 ? project->run_decide({}, progress) : project->run_phase({}, progress);
        REQUIRE_FALSE(ran);
        CHECK(ran.error().code == FaultCode::cancelled);
        CHECK(project->view()->plan.poles == before->plan.poles);
        CHECK(project->view()->undo_label == before->undo_label);
    }
}

TEST_CASE("open project: a run of decide or phase undoes like any other edit, and running it again brings "
          "the same plan") {
    const PlannedCity city;
    const auto project = city.planned();
    const Plan planned = project->view()->plan;
    REQUIRE(project->undo());
    for (const PolePlan& pole : project->view()->plan.poles) CHECK(pole.year == 0);
    REQUIRE(project->undo());
    for (const PolePlan& pole : project->view()->plan.poles) CHECK(pole.choice == Choice::undecided);
    REQUIRE(project->run_decide({}, {}));
    REQUIRE(project->run_phase({}, {}));
    CHECK(project->view()->plan.poles == planned.poles);
    CHECK(project->view()->plan.units == planned.units);
}

TEST_CASE("open project: rows read are planned, parallel or set aside, and vet finds no error once they are "
          "set aside") {
    const PlannedCity city;
    city.gather(city.files());
    GatherFiles dirty;
    dirty.poles = city.folder.file("dirty.csv");
    {
        std::ifstream in(city.city + "/poles.csv");
        std::ofstream out(dirty.poles);
        std::string line;
        for (int i = 0; std::getline(in, line); ++i) {
            if (i == 7) out << line << "\n"; // one id twice
            out << line << "\n";
        }
    }
    city.gather(dirty);
    const auto project = city.open();
    REQUIRE(project->run_vet(false, {}));
    CHECK(standing(*project, Step::vet) == StepStanding::stopped);
    REQUIRE_FALSE(project->run_shade({}, {}));
    REQUIRE(project->run_vet(true, {}));
    CHECK(standing(*project, Step::vet) == StepStanding::up_to_date);
    const auto view = project->view();
    long planned = 0, parallel = 0, aside = 0;
    for (const Pole& pole : view->city.poles) {
        const bool is_aside =
            pole.set_aside || (pole.string.is_valid() && view->city.strings[pole.string.place()].set_aside);
        (is_aside ? aside : is_parallel(view->city, pole) ? parallel : planned) += 1;
    }
    CHECK(aside >= 1);
    CHECK(planned + parallel + aside == static_cast<long>(view->city.poles.size()));
}
