#include "geo/imports/table_reader.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <utility>

#include <fmt/format.h>
#include <fmt/ranges.h>

namespace unstring {
namespace {

DecimalEvidence evidence_of(const Table& table, std::size_t column) {
    DecimalEvidence evidence;
    for (std::size_t row = 0; row < table.rows(); ++row) evidence.add(table.cell(row, column));
    return evidence;
}

bool is_number_kind(FieldKind kind) { return kind != FieldKind::text; }

} // namespace

TableReader::TableReader(const Table& table, const Columns& columns, std::vector<Finding>& findings,
                         std::vector<std::string>& notes)
    : table_(table), columns_(columns), findings_(findings), notes_(notes) {
    if (!columns.guessed.empty())
        notes_.push_back(
            fmt::format("{}: columns matched by guess: {}", table.name, fmt::join(columns.guessed, ", ")));
    if (!columns.unused.empty())
        notes_.push_back(
            fmt::format("{}: columns not used: {}", table.name, fmt::join(columns.unused, ", ")));
    for (const Field& field : fields_of(table.name)) {
        const FieldColumn& found = columns.at(field.name);
        if (!found.column || !is_number_kind(field.kind)) continue;
        evidence_.add(evidence_of(table, *found.column));
        if (found.says_unit && found.to_si != 1)
            findings_.push_back(make_finding(
                "unit-guessed", table.file, 1, std::string(field.name),
                fmt::format("column \"{}\"", table.columns[*found.column]), "SI units",
                fmt::format("read as feet by its name, x {:.7g}; if it is not, rename the column",
                            found.to_si),
                table.name));
    }
}

std::string_view TableReader::cell(std::string_view field) const { return cell(columns_.at(field)); }

void TableReader::add_finding(std::string code, std::string found, std::string wanted, std::string remedy) {
    findings_.push_back(make_finding(std::move(code), table_.file, table_.lines[row_], record_,
                                     std::move(found), std::move(wanted), std::move(remedy), table_.name));
}

DecimalMark TableReader::mark_of(const FieldColumn& column) const {
    const DecimalEvidence own = column.column ? evidence_of(table_, *column.column) : DecimalEvidence();
    return judge_mark(own, evidence_, table_.delimiter);
}

std::string TableReader::shown(std::string_view field) const {
    const FieldColumn& column = columns_.at(field);
    const std::string& name = column.column ? table_.columns[*column.column] : std::string();
    return name.empty() || name == field ? std::string(field) : fmt::format("{} ({})", name, field);
}

NumberField::NumberField(TableReader& in, std::string_view field, double low, double high)
    : in_(in), field_(field), column_(in.columns().at(field)), mark_(in.mark_of(column_)), low_(low),
      high_(high) {}

std::optional<double> NumberField::read(double factor) const {
    const std::string_view cell = in_.cell(column_);
    if (is_blank_cell(cell)) return std::nullopt;
    const auto value = read_number(cell, mark_);
    if (value && *value * factor >= low_ && *value * factor <= high_) return *value * factor;
    const std::string wanted =
        value ? fmt::format("a number from {:g} to {:g}", low_ / factor, high_ / factor)
        : mark_ == DecimalMark::comma ? "a number with decimal comma, as the column has"
                                      : "a number";
    in_.add_finding("number-unreadable", fmt::format("{} \"{}\"", in_.shown(field_), cell.substr(0, 40)),
                    wanted, "mend the cell; the field is left empty until then");
    return std::nullopt;
}

std::optional<double> NumberField::operator()() const { return read(column_.to_si); }

std::optional<double> NumberField::as_given() const { return read(1); }

std::optional<int> NumberField::whole() const {
    const auto value = read(1);
    if (!value) return std::nullopt;
    if (*value == std::floor(*value)) return static_cast<int>(*value);
    in_.add_finding("number-unreadable", fmt::format("{} \"{}\"", in_.shown(field_), in_.cell(column_)),
                    "a whole number", "mend the cell; the field is left empty until then");
    return std::nullopt;
}

std::optional<bool> YesNoField::operator()() const {
    const std::string_view cell = in_.cell(column_);
    if (is_blank_cell(cell)) return std::nullopt;
    const std::string word = list_word(cell);
    for (const char* yes : {"yes", "y", "true", "t", "1", "x"})
        if (word == yes) return true;
    for (const char* no : {"no", "n", "false", "f", "0"})
        if (word == no) return false;
    in_.add_finding("value-unknown", fmt::format("{} \"{}\"", in_.shown(field_), cell.substr(0, 40)),
                    "yes, no or blank", "mend the cell; the field is taken as unknown until then");
    return std::nullopt;
}

std::string list_word(std::string_view cell) {
    std::string word(cell);
    for (char& c : word) {
        if (c >= 'A' && c <= 'Z') c = static_cast<char>(c + 32);
        if (c == ' ' || c == '_') c = '-';
    }
    return word;
}

std::string meant_word(std::string word, std::string_view also) {
    while (!also.empty()) {
        const auto end = std::min(also.find(' '), also.size());
        const std::string_view pair = also.substr(0, end);
        const auto equals = pair.find('=');
        if (pair.substr(0, equals) == word) return std::string(pair.substr(equals + 1));
        also.remove_prefix(std::min(end + 1, also.size()));
    }
    return word;
}

std::string read_date(std::string_view cell) {
    if (is_blank_cell(cell)) return {};
    const std::string text(cell.substr(0, 64));
    int a = 0, b = 0, c = 0;
    char end = 0;
    // Year first in any spelling; day and month after are told apart only where one of them is over 12.
    if (std::sscanf(text.c_str(), "%4d%*1[-/.]%2d%*1[-/.]%2d%c", &a, &b, &c, &end) == 3 && a >= 1000)
        return fmt::format("{:04}-{:02}-{:02}", a, b, c);
    if (std::sscanf(text.c_str(), "%2d.%2d.%4d%c", &a, &b, &c, &end) == 3 && c >= 1000)
        return fmt::format("{:04}-{:02}-{:02}", c, b, a);
    if (std::sscanf(text.c_str(), "%2d/%2d/%4d%c", &a, &b, &c, &end) == 3 && c >= 1000 &&
        (a > 12) != (b > 12))
        return a > 12 ? fmt::format("{:04}-{:02}-{:02}", c, b, a) : fmt::format("{:04}-{:02}-{:02}", c, a, b);
    return std::string(cell);
}

std::optional<int> read_awg(std::string_view cell) {
    std::string text;
    for (const char c : cell) {
        if ((c >= '0' && c <= '9') || c == '/' || c == '-')
            text += c;
        else if (c != ' ' && c != '#' && c != '.' &&
                 std::string_view("awgAWGno").find(c) == std::string_view::npos)
            return std::nullopt;
    }
    if (text.size() == 3 && text.substr(1) == "/0" && text[0] >= '1' && text[0] <= '4')
        return 1 - (text[0] - '0');
    int awg = 0;
    char end = 0;
    if (std::sscanf(text.c_str(), "%3d%c", &awg, &end) != 1 || awg < -3 || awg > 40) return std::nullopt;
    return awg;
}

} // namespace unstring
