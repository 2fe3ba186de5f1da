#pragma once
// The default price book as tests of the model read it, straight from resources/prices.csv.

#include <fstream>
#include <sstream>
#include <stdexcept>
#include <string>
#include <vector>

#include "model/catalog/prices.h"

namespace unstring {

inline std::vector<std::string> csv_cells(const std::string& line) {
    std::vector<std::string> cells(1);
    bool quoted = false;
    for (const char c : line) {
        if (c == '"')
            quoted = !quoted;
        else if (c == ',' && !quoted)
            cells.emplace_back();
        else
            cells.back() += c;
    }
    return cells;
}

inline std::vector<PriceRow> default_price_rows() {
    std::ifstream stream(UNSTRING_SOURCE "/resources/prices.csv");
    std::string line;
    if (!std::getline(stream, line)) throw std::runtime_error("resources/prices.csv cannot be read");
    std::vector<PriceRow> rows;
    for (long number = 2; std::getline(stream, line); ++number) {
        const std::vector<std::string> cells = csv_cells(line);
        PriceRow row;
        row.item = cells.at(0);
        row.unit = cells.at(1);
        row.low = std::stod(cells.at(2));
        row.base = std::stod(cells.at(3));
        row.high = std::stod(cells.at(4));
        row.note = cells.at(5);
        row.date = cells.at(6);
        row.row = number;
        rows.push_back(row);
    }
    return rows;
}

inline PriceBook default_prices() { return PriceBook(default_price_rows()); }

} // namespace unstring
