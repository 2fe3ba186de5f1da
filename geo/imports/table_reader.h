#pragma once
// Fields of a record out of the cells of a row. What cannot be read is a finding with row and column, and the
// field is left empty. One reader serves one table; a field is bound to its column once, then asked row by
// row.

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "geo/imports/columns.h"
#include "geo/imports/numbers.h"
#include "geo/imports/table.h"
#include "model/city/city.h"
#include "model/finding.h"

namespace unstring {

class TableReader {
public:
    /// Says in `notes` which columns were matched by guess and which are not used, and gives a `unit-guessed`
    /// notice for each column whose unit was told by its name alone. All four must outlive the reader.
    TableReader(const Table& table, const Columns& columns, std::vector<Finding>& findings,
                std::vector<std::string>& notes);

    void go_to(std::size_t row) { row_ = row; }
    [[nodiscard]] std::size_t row() const { return row_; }
    /// The id of the record in this row, for its findings.
    void set_record(std::string_view id) { record_ = id; }

    [[nodiscard]] std::string_view cell(std::string_view field) const;
    [[nodiscard]] std::string_view cell(const FieldColumn& column) const {
        return column.column ? table_.cell(row_, *column.column) : std::string_view();
    }
    [[nodiscard]] RowRef from() const { return {table_.file, table_.lines[row_]}; }
    void add_finding(std::string code, std::string found, std::string wanted, std::string remedy);
    void note(std::string text) { notes_.push_back(std::move(text)); }

    [[nodiscard]] const Table& table() const { return table_; }
    [[nodiscard]] const Columns& columns() const { return columns_; }
    [[nodiscard]] DecimalMark mark_of(const FieldColumn& column) const;
    /// The column's own name, for findings.
    [[nodiscard]] std::string shown(std::string_view field) const;

private:
    const Table& table_;
    const Columns& columns_;
    std::vector<Finding>& findings_;
    std::vector<std::string>& notes_;
    std::size_t row_ = 0;
    std::string record_;
    DecimalEvidence evidence_; ///< of all columns of numbers
};

class TextField {
public:
    TextField(const TableReader& in, std::string_view field) : in_(in), column_(in.columns().at(field)) {}
    [[nodiscard]] std::string operator()() const { return std::string(in_.cell(column_)); }
    /// The same with "n/a", "null" and their like as nothing.
    [[nodiscard]] std::string unless_blank() const {
        return is_blank_cell(in_.cell(column_)) ? std::string() : (*this)();
    }

private:
    const TableReader& in_;
    const FieldColumn& column_;
};

class NumberField {
public:
    /// Numbers outside low..high are not taken: a finding, like letters. Bounds are in SI, after the unit.
    NumberField(TableReader& in, std::string_view field, double low, double high);
    [[nodiscard]] std::optional<double> operator()() const;
    /// As given in the file, times nothing: for coordinates, whose unit is settled elsewhere.
    [[nodiscard]] std::optional<double> as_given() const;
    [[nodiscard]] std::optional<int> whole() const;
    [[nodiscard]] bool is_there() const { return column_.column.has_value(); }
    [[nodiscard]] const FieldColumn& column() const { return column_; }

private:
    [[nodiscard]] std::optional<double> read(double factor) const;
    TableReader& in_;
    std::string field_;
    const FieldColumn& column_;
    DecimalMark mark_;
    double low_, high_;
};

/// A word of a closed list, without regard to case, blanks and underscores; other words are `value-unknown`
/// findings.
template <class Value>
class WordField {
public:
    WordField(TableReader& in, std::string_view field, std::string_view wanted, std::string_view also = {})
        : in_(in), field_(field), column_(in.columns().at(field)), wanted_(wanted), also_(also) {}
    [[nodiscard]] std::optional<Value> operator()() const;

private:
    TableReader& in_;
    std::string field_;
    const FieldColumn& column_;
    std::string_view wanted_, also_;
};

class YesNoField {
public:
    YesNoField(TableReader& in, std::string_view field)
        : in_(in), field_(field), column_(in.columns().at(field)) {}
    [[nodiscard]] std::optional<bool> operator()() const;

private:
    TableReader& in_;
    std::string field_;
    const FieldColumn& column_;
};

/// Lower case, blanks and underscores as hyphens: "Direct Buried" is "direct-buried".
[[nodiscard]] std::string list_word(std::string_view cell);
/// The list word that another word stands for, by "word=listed word=listed"; the word itself where there is
/// none.
[[nodiscard]] std::string meant_word(std::string word, std::string_view also);

template <class Value>
std::optional<Value> WordField<Value>::operator()() const {
    const std::string_view cell = in_.cell(column_);
    if (is_blank_cell(cell)) return std::nullopt;
    auto value = read_word<Value>(meant_word(list_word(cell), also_));
    if (!value)
        in_.add_finding("value-unknown", in_.shown(field_) + " \"" + std::string(cell.substr(0, 40)) + "\"",
                        std::string(wanted_), "mend the cell; the field is taken as unknown until then");
    return value;
}

/// A date as ISO (2024-05-31, 2024-05, 2024) where it can be told without doubt, else as it was given.
[[nodiscard]] std::string read_date(std::string_view cell);

/// "8", "#8", "AWG 8" are 8; "1/0" is 0, "2/0" -1, "4/0" -3. Nothing for anything else.
[[nodiscard]] std::optional<int> read_awg(std::string_view cell);

} // namespace unstring
