#include "geo/imports/numbers.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <cstddef>
#include <system_error>

namespace unstring {
namespace {

constexpr std::size_t kLongestNumber = 64;

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::size_t count_of(std::string_view text, char c) {
    return static_cast<std::size_t>(std::count(text.begin(), text.end(), c));
}

std::string_view without_sign(std::string_view text) {
    if (!text.empty() && (text.front() == '-' || text.front() == '+')) text.remove_prefix(1);
    return text;
}

/// Whether one mark in a cell could set off thousands: 1-3 digits that are not a lone zero, then groups of
/// three.
bool could_be_thousands(std::string_view cell, char mark) {
    cell = without_sign(cell);
    const auto first = cell.find(mark);
    if (first == 0 || first > 3 || cell.front() == '0') return false;
    for (std::size_t i = 0; i < cell.size(); ++i) {
        const bool is_mark_here = i >= first && (i - first) % 4 == 0;
        if (is_mark_here ? cell[i] != mark : !is_digit(cell[i])) return false;
    }
    return (cell.size() - first) % 4 == 0;
}

/// Length of a grouping sign at `at`: blank, apostrophe, no-break blank (U+00A0), narrow no-break blank
/// (U+202F).
std::size_t group_sign(std::string_view text, std::size_t at) {
    if (text[at] == ' ' || text[at] == '\'') return 1;
    if (text.substr(at).starts_with("\xC2\xA0")) return 2;
    if (text.substr(at).starts_with("\xE2\x80\xAF")) return 3;
    return 0;
}

/// The cell with a point as its mark and without grouping; nothing where the groups are not of three digits.
std::optional<std::size_t> plain_form(std::string_view cell, DecimalMark mark,
                                      std::array<char, kLongestNumber>& out) {
    const char decimal = mark == DecimalMark::point ? '.' : ',';
    const char grouping = mark == DecimalMark::point ? ',' : '.';
    std::size_t size = 0, since_group = 0, digits = 0;
    bool has_groups = false, is_past_mark = false;
    const auto group_ends_well = [&] { return !has_groups || since_group == 3; };
    for (std::size_t at = 0; at < cell.size();) {
        const std::size_t sign = cell[at] == grouping ? 1 : group_sign(cell, at);
        if (sign > 0) {
            if (is_past_mark || digits == 0 || !(has_groups ? since_group == 3 : digits <= 3))
                return std::nullopt;
            has_groups = true;
            since_group = 0;
            at += sign;
            continue;
        }
        const char c = cell[at++];
        if (size + 1 >= out.size()) return std::nullopt;
        if (c == decimal || c == 'e' || c == 'E') {
            if (!is_past_mark && !group_ends_well()) return std::nullopt;
            is_past_mark = true;
        }
        if (is_digit(c)) {
            ++digits;
            ++since_group;
        }
        out[size++] = c == decimal ? '.' : c;
    }
    if (!is_past_mark && !group_ends_well()) return std::nullopt;
    return size;
}

} // namespace

void DecimalEvidence::add(std::string_view cell) {
    const std::size_t points = count_of(cell, '.');
    const std::size_t commas = count_of(cell, ',');
    if (points + commas == 0) return;
    if (!std::all_of(cell.begin(), cell.end(),
                     [](char c) { return is_digit(c) || c == '.' || c == ',' || c == '-' || c == '+'; }))
        return;
    if (points > 0 && commas > 0) {
        ++(cell.rfind('.') > cell.rfind(',') ? point : comma);
        return;
    }
    const char mark = points > 0 ? '.' : ',';
    const bool is_grouped = could_be_thousands(cell, mark);
    if (points + commas > 1) {
        if (is_grouped) ++(mark == ',' ? point : comma);
        return;
    }
    if (is_grouped)
        ++either;
    else
        ++(mark == '.' ? point : comma);
}

void DecimalEvidence::add(const DecimalEvidence& other) {
    point += other.point;
    comma += other.comma;
    either += other.either;
}

DecimalMark judge_mark(const DecimalEvidence& column, const DecimalEvidence& file, char delimiter) {
    for (const DecimalEvidence& evidence : {column, file})
        if (evidence.point != evidence.comma)
            return evidence.comma > evidence.point ? DecimalMark::comma : DecimalMark::point;
    return delimiter == ';' ? DecimalMark::comma : DecimalMark::point;
}

std::optional<double> read_number(std::string_view cell, DecimalMark mark) {
    std::array<char, kLongestNumber> buffer{};
    const auto size = plain_form(cell, mark, buffer);
    if (!size || *size == 0) return std::nullopt;
    const char* begin = buffer.data();
    const char* end = begin + *size;
    if (*begin == '+') ++begin;
    double value = 0;
    const auto [stop, error] = std::from_chars(begin, end, value);
    if (error != std::errc() || stop != end || !std::isfinite(value)) return std::nullopt;
    return value;
}

bool is_blank_cell(std::string_view cell) {
    constexpr std::array<std::string_view, 6> kBlank = {"", "-", "n/a", "na", "null", "<null>"};
    if (cell.size() > 6) return false;
    std::array<char, 6> lower{};
    std::transform(cell.begin(), cell.end(), lower.begin(),
                   [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c + 32) : c; });
    return std::find(kBlank.begin(), kBlank.end(), std::string_view(lower.data(), cell.size())) !=
           kBlank.end();
}

} // namespace unstring
