#pragma once
// One list of columns a table: it makes the table, writes and reads its rows, and says what the input hash
// sees.

#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "model/city/city.h"
#include "model/plan/change.h"

namespace unstring {

template <class Record>
struct Column {
    std::string name;
    std::string type; ///< of GeoPackage: TEXT, INTEGER, REAL, BOOLEAN
    std::function<CellValue(const City&, const Record&)> get;
    std::function<void(const City&, Record&, const CellValue&)> set;
    bool is_hashed = true; ///< notes and origins are no input of any step
};

[[nodiscard]] inline std::string text_in(const CellValue& cell) {
    const auto* text = std::get_if<std::string>(&cell);
    return text != nullptr ? *text : std::string();
}
[[nodiscard]] inline std::optional<double> real_in(const CellValue& cell) {
    if (const auto* real = std::get_if<double>(&cell)) return *real;
    if (const auto* integer = std::get_if<std::int64_t>(&cell)) return static_cast<double>(*integer);
    return std::nullopt;
}
[[nodiscard]] inline std::optional<std::int64_t> integer_in(const CellValue& cell) {
    if (const auto* integer = std::get_if<std::int64_t>(&cell)) return *integer;
    if (const auto* real = std::get_if<double>(&cell)) return static_cast<std::int64_t>(*real);
    return std::nullopt;
}

template <class R>
Column<R> text_column(std::string name, std::string R::*member, bool is_hashed = true) {
    return {std::move(name), "TEXT", [member](const City&, const R& r) -> CellValue { return r.*member; },
            [member](const City&, R& r, const CellValue& cell) { r.*member = text_in(cell); }, is_hashed};
}

template <class R>
Column<R> real_column(std::string name, std::optional<double> R::*member) {
    return {std::move(name), "REAL",
            [member](const City&, const R& r) { return r.*member ? CellValue(*(r.*member)) : CellValue(); },
            [member](const City&, R& r, const CellValue& cell) { r.*member = real_in(cell); }};
}

template <class R>
Column<R> real_column(std::string name, double R::*member) {
    return {std::move(name), "REAL", [member](const City&, const R& r) { return CellValue(r.*member); },
            [member](const City&, R& r, const CellValue& cell) {
                r.*member = real_in(cell).value_or(R{}.*member);
            }};
}

template <class R>
Column<R> integer_column(std::string name, std::optional<int> R::*member) {
    return {std::move(name), "INTEGER",
            [member](const City&, const R& r) {
                return r.*member ? CellValue(std::int64_t{*(r.*member)}) : CellValue();
            },
            [member](const City&, R& r, const CellValue& cell) {
                const auto value = integer_in(cell);
                r.*member = value ? std::optional<int>(static_cast<int>(*value)) : std::nullopt;
            }};
}

template <class R>
Column<R> integer_column(std::string name, int R::*member) {
    return {std::move(name), "INTEGER",
            [member](const City&, const R& r) { return CellValue(std::int64_t{r.*member}); },
            [member](const City&, R& r, const CellValue& cell) {
                r.*member = static_cast<int>(integer_in(cell).value_or(0));
            }};
}

template <class R>
Column<R> flag_column(std::string name, bool R::*member) {
    return {std::move(name), "BOOLEAN",
            [member](const City&, const R& r) { return CellValue(std::int64_t{r.*member ? 1 : 0}); },
            [member](const City&, R& r, const CellValue& cell) {
                r.*member = integer_in(cell).value_or(0) != 0;
            }};
}

template <class R>
Column<R> flag_column(std::string name, std::optional<bool> R::*member) {
    return {std::move(name), "BOOLEAN",
            [member](const City&, const R& r) {
                return r.*member ? CellValue(std::int64_t{*(r.*member) ? 1 : 0}) : CellValue();
            },
            [member](const City&, R& r, const CellValue& cell) {
                const auto value = integer_in(cell);
                r.*member = value ? std::optional<bool>(*value != 0) : std::nullopt;
            }};
}

template <class R, class Word>
Column<R> word_column(std::string name, Word R::*member) {
    return {std::move(name), "TEXT",
            [member](const City&, const R& r) { return CellValue(std::string(text_of(r.*member))); },
            [member](const City&, R& r, const CellValue& cell) {
                r.*member = read_word<Word>(text_in(cell)).value_or(R{}.*member);
            }};
}

template <class R, class Word>
Column<R> word_column(std::string name, std::optional<Word> R::*member) {
    return {
        std::move(name), "TEXT",
        [member](const City&, const R& r) {
            return r.*member ? CellValue(std::string(text_of(*(r.*member)))) : CellValue();
        },
        [member](const City&, R& r, const CellValue& cell) { r.*member = read_word<Word>(text_in(cell)); }};
}

/// The string that a record names, by id; the columns of strings themselves are read first.
template <class R>
Column<R> string_column(std::string name, StringIx R::*member) {
    return {std::move(name), "TEXT",
            [member](const City& city, const R& r) {
                return (r.*member).is_valid() ? CellValue(city.strings[(r.*member).place()].id) : CellValue();
            },
            [member](const City& city, R& r, const CellValue& cell) {
                r.*member = find_string(city, text_in(cell));
            }};
}

template <class R>
std::vector<Column<R>> with_origin(std::vector<Column<R>> columns) {
    columns.push_back({"from_file", "TEXT", [](const City&, const R& r) { return CellValue(r.from.file); },
                       [](const City&, R& r, const CellValue& cell) { r.from.file = text_in(cell); }, false});
    columns.push_back(
        {"from_row", "INTEGER", [](const City&, const R& r) { return CellValue(std::int64_t{r.from.row}); },
         [](const City&, R& r, const CellValue& cell) { r.from.row = integer_in(cell).value_or(0); }, false});
    return columns;
}

} // namespace unstring
