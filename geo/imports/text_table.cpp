#include "geo/imports/text_table.h"

#include <algorithm>
#include <array>
#include <string_view>
#include <utility>

#include <fmt/format.h>

#include "geo/imports/local_file.h"
#include "geo/imports/text_encoding.h"

namespace unstring {
namespace {

constexpr std::size_t kMaxCell = 64 * 1024;
constexpr std::size_t kMaxRows = 5'000'000;
constexpr std::size_t kMaxColumns = 2'000;
constexpr std::uintmax_t kMaxFile = 2ULL << 30U;
constexpr std::size_t kRowsToJudge = 500; ///< records that the delimiter is judged by

struct Record {
    std::vector<std::string_view> cells;
    std::size_t next = 0; ///< where the next record begins
    long lines = 1;       ///< physical lines that this one takes
    const char* broken = nullptr;
};

std::string_view trimmed(std::string_view text) {
    const auto first = text.find_first_not_of(" \t");
    if (first == std::string_view::npos) return {};
    return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

/// Steps over one line end (LF, CRLF or a lone CR).
std::size_t after_line_end(std::string_view text, std::size_t at) {
    if (at < text.size() && text[at] == '\r')
        ++at;
    else if (at < text.size() && text[at] == '\n')
        return at + 1;
    if (at > 0 && at < text.size() && text[at - 1] == '\r' && text[at] == '\n') ++at;
    return at;
}

std::size_t line_end(std::string_view text, std::size_t at) {
    const auto end = text.find_first_of("\r\n", at);
    return end == std::string_view::npos ? text.size() : end;
}

/// Reads records out of one buffer; doubled quotes are folded in place, so that every cell is a view into it.
class RecordReader {
public:
    RecordReader(char* text, std::size_t size, char delimiter)
        : text_(text), view_(text, size), delimiter_(delimiter) {}

    void read(std::size_t at, Record& record) {
        record.cells.clear();
        record.lines = 1;
        record.broken = nullptr;
        const std::size_t begin = at;
        while (true) {
            at = is_quote_at(at) ? quoted_cell(at, record) : plain_cell(at, record);
            if (record.broken != nullptr || record.cells.size() > kMaxColumns) break;
            if (at < view_.size() && view_[at] == delimiter_) {
                ++at;
                continue;
            }
            break;
        }
        if (record.broken != nullptr) {
            // Only this line is given up: what follows is read on its own.
            record.lines = 1;
            at = line_end(view_, begin);
        } else {
            at = line_end(view_, at);
        }
        record.next = after_line_end(view_, at);
    }

private:
    [[nodiscard]] bool is_quote_at(std::size_t at) const {
        while (at < view_.size() && view_[at] == ' ') ++at;
        return at < view_.size() && view_[at] == '"';
    }

    std::size_t plain_cell(std::size_t at, Record& record) const {
        std::size_t end = at;
        while (end < view_.size() && view_[end] != delimiter_ && view_[end] != '\n' && view_[end] != '\r')
            ++end;
        if (end - at > kMaxCell) record.broken = "a cell of more than 64 KiB";
        record.cells.push_back(trimmed(view_.substr(at, end - at)));
        return end;
    }

    std::size_t quoted_cell(std::size_t at, Record& record) {
        while (view_[at] == ' ') ++at;
        const std::size_t begin = ++at;
        long lines = 0;
        // First to the closing quote without writing: a row that is given up must stay as it was.
        std::size_t close = at;
        while (true) {
            if (close >= view_.size() || close - begin > kMaxCell) {
                record.broken =
                    close >= view_.size() ? "a quote that is not closed" : "a cell of more than 64 KiB";
                return close;
            }
            if (view_[close] == '"') {
                if (close + 1 >= view_.size() || view_[close + 1] != '"') break;
                ++close;
            } else if (view_[close] == '\n' ||
                       (view_[close] == '\r' && (close + 1 >= view_.size() || view_[close + 1] != '\n'))) {
                ++lines;
            }
            ++close;
        }
        std::size_t after = close + 1;
        while (after < view_.size() && view_[after] == ' ') ++after;
        if (after < view_.size() && view_[after] != delimiter_ && view_[after] != '\n' &&
            view_[after] != '\r') {
            record.broken = "text after a closing quote";
            return after;
        }
        record.lines += lines;
        record.cells.push_back(folded(begin, close));
        return after;
    }

    std::string_view folded(std::size_t begin, std::size_t end) {
        std::size_t to = begin;
        for (std::size_t from = begin; from < end; ++from) {
            text_[to++] = text_[from];
            if (text_[from] == '"') ++from; // the second of a doubled quote
        }
        // What is left over becomes blanks inside the quotes and is never looked at again.
        return trimmed({text_ + begin, to - begin});
    }

    char* text_;
    std::string_view view_;
    char delimiter_;
};

bool is_blank(const Record& record) {
    return record.broken == nullptr && std::all_of(record.cells.begin(), record.cells.end(),
                                                   [](std::string_view cell) { return cell.empty(); });
}

struct Score {
    std::size_t alike = 0;   ///< records with as many cells as the first
    std::size_t columns = 1; ///< of the first
};

Score score_of(std::string sample, char delimiter) {
    RecordReader reader(sample.data(), sample.size(), delimiter);
    Record record;
    Score score;
    std::size_t records = 0;
    for (std::size_t at = 0; at < sample.size() && records < kRowsToJudge; at = record.next) {
        reader.read(at, record);
        if (is_blank(record)) continue;
        if (records++ == 0) score.columns = record.cells.size();
        if (record.cells.size() == score.columns) ++score.alike;
    }
    if (score.columns < 2) score.alike = 0;
    return score;
}

/// The delimiter by which most rows have the header's number of cells; among equals the one that makes more
/// columns.
char find_delimiter(std::string_view text) {
    std::string sample(text.substr(0, 1U << 20U));
    char best = ',';
    Score best_score;
    for (const char delimiter : {',', ';', '\t', '|'}) {
        const Score score = score_of(sample, delimiter);
        if (std::pair(score.alike, score.columns) > std::pair(best_score.alike, best_score.columns)) {
            best = delimiter;
            best_score = score;
        }
    }
    return best;
}

Fault broken(const std::string& file, std::string found, std::string wanted, std::string remedy) {
    return {FaultCode::file_broken, file, 0, {}, std::move(found), std::move(wanted), std::move(remedy)};
}

void set_columns(Table& table, Record& header, std::vector<Finding>& findings, long line) {
    while (header.cells.size() > 1 && header.cells.back().empty())
        header.cells.pop_back(); // a delimiter at the line's end
    for (const std::string_view cell : header.cells) {
        std::string name(cell);
        const bool is_twice = !name.empty() && std::find(table.columns.begin(), table.columns.end(), name) !=
                                                   table.columns.end();
        if (is_twice)
            findings.push_back(make_finding("column-twice", table.file, line, name,
                                            fmt::format("column \"{}\" twice", name), "each column once",
                                            "the first one is read; rename the other", table.name));
        table.columns.push_back(is_twice ? std::string() : std::move(name));
    }
}

/// Extra cells are forgiven where they are empty (a delimiter at the line's end).
bool fits(Record& record, std::size_t columns) {
    while (record.cells.size() > columns && record.cells.back().empty()) record.cells.pop_back();
    return record.cells.size() == columns;
}

void add_broken(Table& table, const Record& record, long line, std::vector<Finding>& findings) {
    const std::string found =
        record.broken != nullptr ? record.broken : fmt::format("{} cells", record.cells.size());
    findings.push_back(make_finding("row-broken", table.file, line, {}, found,
                                    fmt::format("{} cells", table.columns.size()),
                                    "mend the row; it is left out until then", table.name));
}

} // namespace

Expected<Table> parse_text_table(std::string utf8, const std::string& file, const std::string& name,
                                 std::vector<Finding>& findings) {
    Table table;
    table.name = name;
    table.file = file;
    table.delimiter = find_delimiter(utf8);
    std::string& text = table.pool.emplace_back(std::move(utf8));
    RecordReader reader(text.data(), text.size(), table.delimiter);
    Record record;
    long line = 1;
    for (std::size_t at = 0; at < text.size(); at = record.next, line += record.lines) {
        reader.read(at, record);
        if (is_blank(record)) continue;
        if (record.cells.size() > kMaxColumns)
            return tl::unexpected(
                broken(file, fmt::format("more than {} columns in line {}", kMaxColumns, line),
                       "a table of poles, circuits or prices", "check the file and its delimiter"));
        if (table.columns.empty()) {
            if (record.broken != nullptr)
                return tl::unexpected(
                    broken(file, record.broken, "column names in the first row", "mend the first row"));
            set_columns(table, record, findings, line);
            continue;
        }
        if (static_cast<std::size_t>(++table.read) > kMaxRows)
            return tl::unexpected(
                broken(file, fmt::format("more than {} rows", kMaxRows), "fewer rows", "split the file"));
        if (record.broken != nullptr || !fits(record, table.columns.size())) {
            add_broken(table, record, line, findings);
            continue;
        }
        table.cells.insert(table.cells.end(), record.cells.begin(), record.cells.end());
        table.lines.push_back(line);
    }
    if (table.columns.empty())
        return tl::unexpected(
            broken(file, "an empty file", "column names in the first row", "export the table again"));
    return table;
}

Expected<Table> read_text_table(const std::string& path, const std::string& name, const std::string& encoding,
                                std::vector<Finding>& findings) {
    auto bytes = read_local_file(path, kMaxFile);
    if (!bytes) return tl::unexpected(bytes.error());
    auto text = decode_text(std::move(*bytes), encoding, path);
    if (!text) return tl::unexpected(text.error());
    if (text->is_guessed)
        findings.push_back(make_finding("encoding-guessed", path, text->sample_line, {},
                                        fmt::format("read as {}: \"{}\"", text->encoding, text->sample),
                                        "UTF-8", "look at the sample; give --encoding if it is wrong", name));
    return parse_text_table(std::move(text->utf8), path, name, findings);
}

} // namespace unstring
