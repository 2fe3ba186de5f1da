#include "geo/exports/csv_cell.h"

#include <charconv>
#include <system_error>

namespace unstring {
namespace {

bool is_number(std::string_view text) {
    double value = 0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    return error == std::errc() && end == text.data() + text.size();
}

bool is_dropped(char c) {
    const auto code = static_cast<unsigned char>(c);
    return (code < 0x20 && c != '\t' && c != '\n') || code == 0x7f;
}

} // namespace

std::string safe_text(std::string_view text) {
    std::string out;
    for (const char c : text)
        if (!is_dropped(c)) out += c;
    const std::size_t first = out.find_first_not_of(' ');
    if (first == std::string::npos) return out;
    const bool may_be_formula = std::string_view("=+-@\t\n").find(out[first]) != std::string_view::npos;
    if (may_be_formula && !is_number(out)) out.insert(out.begin(), '\'');
    return out;
}

std::string csv_row(std::initializer_list<std::string_view> cells) {
    std::string row;
    bool is_first = true;
    for (const std::string_view cell : cells) {
        if (!is_first) row += ',';
        is_first = false;
        const std::string text = safe_text(cell);
        if (text.find_first_of(",\"\n") == std::string::npos) {
            row += text;
            continue;
        }
        row += '"';
        for (const char c : text) {
            if (c == '"') row += '"';
            row += c;
        }
        row += '"';
    }
    return row + "\r\n";
}

} // namespace unstring
