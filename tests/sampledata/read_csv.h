#pragma once
// A plain csv reader of the tests' own, so that the generator's output is not read by the code that it is
// made for.

#include <fstream>
#include <map>
#include <sstream>
#include <string>
#include <vector>

namespace sampledata_test {

using Row = std::map<std::string, std::string>;

inline std::vector<std::string> cells_of(const std::string& line, char separator) {
    std::vector<std::string> cells(1);
    bool is_quoted = false;
    for (const char letter : line) {
        if (letter == '"')
            is_quoted = !is_quoted;
        else if (letter == separator && !is_quoted)
            cells.emplace_back();
        else if (letter != '\r')
            cells.back() += letter;
    }
    return cells;
}

inline std::vector<Row> read_csv(const std::string& path, char separator = ',') {
    std::ifstream file(path);
    std::vector<Row> rows;
    std::string line;
    std::vector<std::string> header;
    while (std::getline(file, line)) {
        const std::vector<std::string> cells = cells_of(line, separator);
        if (header.empty()) {
            header = cells;
            continue;
        }
        Row row;
        for (std::size_t i = 0; i < header.size() && i < cells.size(); ++i) row[header[i]] = cells[i];
        rows.push_back(row);
    }
    return rows;
}

inline std::string text_of_file(const std::string& path) {
    std::ifstream file(path, std::ios::binary);
    std::ostringstream text;
    text << file.rdbuf();
    return text.str();
}

inline double number(const Row& row, const std::string& column) { return std::stod(row.at(column)); }

inline std::string committed(const std::string& file) {
    return std::string(UNSTRING_SOURCE) + "/sampledata/quillhaven/" + file;
}

} // namespace sampledata_test
