#include "geo/project/plan_tables.h"

#include <algorithm>
#include <unordered_map>

#include <fmt/format.h>
#include <nlohmann/json.hpp>

#include "geo/project/lock.h"
#include "model/plan/plan_rows.h"

namespace unstring {
namespace {

nlohmann::json cells_json(const Cells& cells) {
    nlohmann::json json = nlohmann::json::object();
    for (const auto& [name, value] : cells) {
        nlohmann::json& cell = json[name];
        const auto put = [&cell](const auto& each) {
            if constexpr (std::is_same_v<std::decay_t<decltype(each)>, std::monostate>)
                cell = nullptr;
            else
                cell = each;
        };
        std::visit(put, value);
    }
    return json;
}

Cells cells_of(const nlohmann::json& json) {
    Cells cells;
    for (const auto& [name, value] : json.items()) {
        if (value.is_string())
            cells[name] = value.get<std::string>();
        else if (value.is_number_integer())
            cells[name] = value.get<std::int64_t>();
        else if (value.is_number())
            cells[name] = value.get<double>();
        else
            cells[name] = CellValue();
    }
    return cells;
}

std::string rows_json(const Change& change) {
    nlohmann::json rows = nlohmann::json::array();
    for (const RowChange& row : change.rows)
        rows.push_back({{"table", row.table},
                        {"id", row.id},
                        {"before", cells_json(row.before)},
                        {"after", cells_json(row.after)}});
    return rows.dump(-1, ' ', false, nlohmann::json::error_handler_t::replace);
}

std::vector<RowChange> rows_of(const std::string& text) {
    std::vector<RowChange> rows;
    const auto json = nlohmann::json::parse(text, nullptr, false);
    if (!json.is_array()) return rows;
    for (const auto& row : json)
        rows.push_back({row.value("table", ""), row.value("id", ""),
                        cells_of(row.value("before", nlohmann::json::object())),
                        cells_of(row.value("after", nlohmann::json::object()))});
    return rows;
}

bool is_plan_table(const std::string& table) {
    return table == kPlansTable || table == kPlanPolesTable || table == kPlanUnitsTable;
}

void write_row(Database& database, const std::string& plan, const RowChange& row) {
    const bool has_plan_column = row.table != kPlansTable;
    Statement remove = database.prepare(
        fmt::format("DELETE FROM {} WHERE id=?1{}", row.table, has_plan_column ? " AND plan=?2" : ""));
    remove.bind(1, std::string_view(row.id));
    if (has_plan_column) remove.bind(2, std::string_view(plan));
    remove.run();
    if (row.after.empty()) return;
    std::string names = has_plan_column ? "id, plan" : "id", marks = has_plan_column ? "?1, ?2" : "?1";
    int place = has_plan_column ? 2 : 1;
    for (const auto& [name, value] : row.after) {
        names += fmt::format(", \"{}\"", name);
        marks += fmt::format(", ?{}", ++place);
    }
    Statement insert =
        database.prepare(fmt::format("INSERT INTO {} ({}) VALUES ({})", row.table, names, marks));
    insert.bind(1, std::string_view(row.id));
    if (has_plan_column) insert.bind(2, std::string_view(plan));
    place = has_plan_column ? 2 : 1;
    for (const auto& [name, value] : row.after) insert.bind(++place, value);
    insert.run();
}

Cells row_cells(const Statement& row, int from) {
    Cells cells;
    for (int column = from; column < row.columns(); ++column)
        cells[row.column_name(column)] = row.cell(column);
    return cells;
}

// An edit and the lines that undo and redo it form a chain: each `undoes` the line before. What counts now is
// whether the chain's last line stands for the edit done (even length) or taken back.
struct Chains {
    std::vector<std::int64_t> done,
        undone; ///< edits that can be undone; undo lines that can be redone, in order
};

Chains chains_of(Database& database, const std::string& plan) {
    Statement select = database.prepare("SELECT id, undoes FROM edits WHERE plan=?1 ORDER BY id");
    select.bind(1, std::string_view(plan));
    Chains chains;
    while (select.step()) {
        const std::int64_t id = select.integer(0);
        if (select.is_null(1)) { // a new edit empties redo
            chains.done.push_back(id);
            chains.undone.clear();
        } else if (!chains.done.empty() && chains.done.back() == select.integer(1)) {
            chains.done.pop_back();
            chains.undone.push_back(id);
        } else if (!chains.undone.empty() && chains.undone.back() == select.integer(1)) {
            chains.undone.pop_back();
            chains.done.push_back(id);
        }
    }
    return chains;
}

std::optional<UndoLine> line_of(Database& database, const std::string& plan,
                                const std::vector<std::int64_t>& ids) {
    if (ids.empty()) return std::nullopt;
    Statement select = database.prepare("SELECT label, rows_json, who FROM edits WHERE id=?1");
    select.bind(1, ids.back());
    if (!select.step()) return std::nullopt;
    return UndoLine{ids.back(), {plan, select.text(0), select.text(2), rows_of(select.text(1))}};
}

} // namespace

std::vector<std::string> plan_names(Database& database) {
    Statement select = database.prepare("SELECT id FROM plans ORDER BY rowid");
    std::vector<std::string> names;
    while (select.step()) names.push_back(select.text(0));
    return names;
}

Plan read_plan(Database& database, const City& city, const std::string& name) {
    Plan plan = new_plan(city, name);
    Statement settings = database.prepare("SELECT id, * FROM plans WHERE id=?1");
    settings.bind(1, std::string_view(name));
    if (settings.step()) {
        plan.settings = settings_from(row_cells(settings, 2));
        plan.settings.name = name;
    }
    std::unordered_map<std::string, std::size_t> places;
    for (std::size_t i = city.poles.size(); i-- > 0;) places[city.poles[i].id] = i;
    Statement poles = database.prepare("SELECT id, * FROM plan_poles WHERE plan=?1");
    poles.bind(1, std::string_view(name));
    while (poles.step())
        if (const auto at = places.find(poles.text(0)); at != places.end())
            plan.poles[at->second] = pole_from(row_cells(poles, 3));
    Statement units = database.prepare("SELECT id, * FROM plan_units WHERE plan=?1");
    units.bind(1, std::string_view(name));
    while (units.step()) {
        const StringUnit unit = unit_from(city, units.text(0), row_cells(units, 3));
        if (unit.string.is_valid()) plan.units.push_back(unit);
    }
    std::sort(plan.units.begin(), plan.units.end(), [](const StringUnit& a, const StringUnit& b) {
        return std::pair(a.string, a.year) < std::pair(b.string, b.year);
    });
    return plan;
}

void write_change(Database& database, const Change& change, std::int64_t undoes) {
    for (const RowChange& row : change.rows) {
        if (!is_plan_table(row.table)) continue;
        write_row(database, change.plan, row);
        if (database.is_failed()) return;
    }
    Statement insert = database.prepare(
        "INSERT INTO edits(at, who, plan, label, rows_json, undoes) VALUES (?1,?2,?3,?4,?5,?6)");
    insert.bind(1, std::string_view(now_text()))
        .bind(2, std::string_view(change.who.empty() ? user_name() : change.who));
    insert.bind(3, std::string_view(change.plan))
        .bind(4, std::string_view(change.label))
        .bind(5, std::string_view(rows_json(change)));
    if (undoes != 0) insert.bind(6, undoes);
    insert.run();
}

std::optional<UndoLine> next_undo(Database& database, const std::string& plan) {
    return line_of(database, plan, chains_of(database, plan).done);
}
std::optional<UndoLine> next_redo(Database& database, const std::string& plan) {
    return line_of(database, plan, chains_of(database, plan).undone);
}

UndoLabels undo_labels(Database& database, const std::string& plan) {
    const Chains chains = chains_of(database, plan);
    const auto label = [&](const std::vector<std::int64_t>& ids) {
        return ids.empty() ? std::string()
                           : database.text(fmt::format("SELECT label FROM edits WHERE id={}", ids.back()))
                                 .value_or("");
    };
    return {label(chains.done), label(chains.undone)};
}

std::vector<EditRecord> edits_of(Database& database, const std::string& plan, const std::string& pole_id,
                                 int at_most) {
    Statement select = database.prepare("SELECT id, at, who, label, undoes FROM edits WHERE plan=?1 AND "
                                        "(?2='' OR EXISTS (SELECT 1 FROM json_each(rows_json) AS r"
                                        " WHERE json_extract(r.value,'$.table')='plan_poles' AND "
                                        "json_extract(r.value,'$.id')=?2)) ORDER BY id DESC LIMIT ?3");
    select.bind(1, std::string_view(plan)).bind(2, std::string_view(pole_id)).bind(3, std::int64_t{at_most});
    std::vector<EditRecord> records;
    while (select.step())
        records.push_back(
            {select.integer(0), select.text(1), select.text(2), plan, select.text(3), select.integer(4)});
    return records;
}

} // namespace unstring
