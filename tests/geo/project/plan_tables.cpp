#include "geo/project/plan_tables.h"

#include <random>

#include <catch2/catch.hpp>

#include "tests/geo/project/project_case.h"

using namespace unstring;
using namespace unstring::tests;

namespace {

struct Editor { ///< edits, undoes and redoes the way the steps do
    Database& database;
    City city;

    [[nodiscard]] Plan plan() const { return read_plan(database, city, "first"); }
    void edit(const Plan& next, const std::string& label) {
        const Change change = plan_difference(city, plan(), next, label);
        REQUIRE(database.transaction([&] { write_change(database, change); }));
    }
    bool take_back(const std::optional<UndoLine>& line) {
        if (!line) return false;
        REQUIRE(database.transaction([&] { write_change(database, inverse(line->change), line->id); }));
        return true;
    }
    bool undo() { return take_back(next_undo(database, "first")); }
    bool redo() { return take_back(next_redo(database, "first")); }
};

bool same(const Plan& a, const Plan& b) {
    return a.settings == b.settings && a.poles == b.poles && a.units == b.units;
}

} // namespace

TEST_CASE("plan tables: do, undo, redo over random edits comes back to the same plan each time") {
    const TempFolder folder;
    const auto database = make_project(folder.file("p.gpkg"));
    Editor editor{*database, sample_tables().city};
    const unsigned seed = 20261201;
    INFO("seed " << seed);
    std::mt19937 random(seed);
    std::vector<Plan> past = {editor.plan()};
    for (int i = 0; i < 25; ++i) {
        Plan next = editor.plan();
        PolePlan& pole = next.poles[random() % next.poles.size()];
        pole.choice = static_cast<Choice>(random() % 4);
        pole.year = 2027 + static_cast<int>(random() % 8);
        pole.year_by = YearBy::hand;
        pole.note = "note " + std::to_string(random() % 100) + " \"é'";
        if (random() % 3 == 0) next.units.push_back({StringIx(0), 2100 + i, TransformerIx(0), .9});
        editor.edit(next, "edit " + std::to_string(i));
        past.push_back(editor.plan());
        CHECK(same(past.back(), next));
    }
    for (std::size_t i = past.size() - 1; i-- > 0;) {
        REQUIRE(editor.undo());
        CHECK(same(editor.plan(), past[i]));
    }
    CHECK_FALSE(editor.undo());
    for (std::size_t i = 1; i < past.size(); ++i) {
        REQUIRE(editor.redo());
        CHECK(same(editor.plan(), past[i]));
    }
    CHECK_FALSE(editor.redo());
    CHECK(database->integer("SELECT count(*) FROM edits") == 75); // nothing is ever taken out of the history
}

TEST_CASE("plan tables: a new edit empties redo, and undo survives closing the file") {
    const TempFolder folder;
    const std::string path = folder.file("p.gpkg");
    const City city = sample_tables().city;
    {
        const auto database = make_project(path);
        Editor editor{*database, city};
        for (int year : {2028, 2029}) {
            Plan next = editor.plan();
            next.poles[0].year = year;
            editor.edit(next, "year " + std::to_string(year));
        }
        editor.undo();
        CHECK(undo_labels(*database, "first").redo == "year 2029");
        database->close_to_one_file();
    }
    const auto database = Database::open(path, Database::Access::write);
    REQUIRE(database);
    Editor editor{**database, city};
    CHECK(editor.plan().poles[0].year == 2028);
    CHECK(undo_labels(**database, "first").undo == "year 2028");
    Plan next = editor.plan();
    next.poles[1].mark = Choice::solar;
    editor.edit(next, "mark");
    CHECK_FALSE(editor.redo());
    REQUIRE(editor.undo());
    REQUIRE(editor.undo());
    CHECK(editor.plan().poles[0].year == 0);
    CHECK_FALSE(editor.undo());
}

TEST_CASE(
    "plan tables: the history of a pole lists the edits that touched it, newest first, with who made them") {
    const TempFolder folder;
    const auto database = make_project(folder.file("p.gpkg"));
    Editor editor{*database, sample_tables().city};
    for (int i = 0; i < 3; ++i) {
        Plan next = editor.plan();
        next.poles[static_cast<std::size_t>(i % 2)].year = 2027 + i;
        editor.edit(next, "edit " + std::to_string(i));
    }
    const auto lines = edits_of(*database, "first", "01-000", 10);
    REQUIRE(lines.size() == 2);
    CHECK(lines[0].label == "edit 2");
    CHECK(lines[1].label == "edit 0");
    CHECK_FALSE(lines[0].who.empty());
    CHECK(edits_of(*database, "first", "", 10).size() == 3);
}
