#pragma once
// Everything that a project file holds, as text, without times and durations: two files of equal content are
// the same project.

#include <regex>
#include <string>

#include "geo/project/database.h"

namespace unstring::tests {

inline std::string project_content(const std::string& path) {
    auto opened = Database::open(path, Database::Access::write);
    if (!opened) return "cannot be opened: " + opened.error().found;
    Database& database = **opened;
    static const std::regex seconds("\"seconds\":[-+.0-9e]+");
    std::string content = database.text("PRAGMA integrity_check").value_or("no answer") + "\n";
    std::vector<std::string> tables;
    {
        auto names = database.prepare(
            "SELECT name FROM sqlite_master WHERE type='table' AND name NOT LIKE 'sqlite_%' ORDER BY name");
        while (names.step()) tables.push_back(names.text(0));
    }
    for (const std::string& table : tables) {
        auto rows = database.prepare("SELECT * FROM \"" + table + "\"");
        while (rows.step()) {
            content += table;
            for (int column = 0; column < rows.columns(); ++column) {
                const std::string name = rows.column_name(column);
                if (name == "at" || name == "last_change") continue;
                const Bytes bytes = rows.bytes(column);
                content += "|" + std::regex_replace(std::string(bytes.begin(), bytes.end()), seconds, "");
            }
            content += "\n";
        }
    }
    if (database.failure()) content += "failed: " + database.failure()->found;
    return content;
}

} // namespace unstring::tests
