#pragma once
// Plans and the history of their edits. Every change of a plan is one transaction: the rows, and a line in
// `edits`.

#include <optional>
#include <string>
#include <vector>

#include "geo/project/database.h"
#include "model/plan/plan.h"

namespace unstring {

struct EditRecord {
    std::int64_t id = 0;
    std::string at, who, plan, label;
    std::int64_t undoes =
        0; ///< id of the edit that this line takes back or, for a redo, brings back by taking back an undo
};

[[nodiscard]] std::vector<std::string> plan_names(Database& database);
/// The plan of that name over this city, or a new one (which is not yet written).
[[nodiscard]] Plan read_plan(Database& database, const City& city, const std::string& name);

/// Inside the caller's transaction: the rows' `after` side, and one line in edits.
void write_change(Database& database, const Change& change, std::int64_t undoes = 0);

struct UndoLine {
    std::int64_t id = 0;
    Change change; ///< as it was made
};
/// The edit that undo takes back next; nothing when there is none.
[[nodiscard]] std::optional<UndoLine> next_undo(Database& database, const std::string& plan);
/// The undo that redo takes back next; a new edit empties redo.
[[nodiscard]] std::optional<UndoLine> next_redo(Database& database, const std::string& plan);

struct UndoLabels {
    std::string undo, redo; ///< empty: nothing to undo, to redo
};
[[nodiscard]] UndoLabels undo_labels(Database& database, const std::string& plan);

/// Newest first; empty pole_id = every edit.
[[nodiscard]] std::vector<EditRecord> edits_of(Database& database, const std::string& plan,
                                               const std::string& pole_id, int at_most);

} // namespace unstring
