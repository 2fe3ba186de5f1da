#include "model/vet/natural_id.h"

#include <algorithm>
#include <cctype>

namespace unstring {
namespace {

enum class Sign { digit, letter, other };

Sign sign_of(char c) {
    const auto byte = static_cast<unsigned char>(c);
    if (std::isdigit(byte) != 0) return Sign::digit;
    return std::isalpha(byte) != 0 || byte >= 0x80 ? Sign::letter : Sign::other;
}

bool is_number(const std::string& part) { return !part.empty() && sign_of(part.front()) == Sign::digit; }

} // namespace

std::vector<std::string> id_parts(std::string_view id) {
    std::vector<std::string> parts;
    Sign before = Sign::other;
    for (const char c : id) {
        const Sign sign = sign_of(c);
        if (sign != Sign::other) {
            if (sign != before) parts.emplace_back();
            if (parts.back() == "0" && sign == Sign::digit) parts.back().clear();
            parts.back() += static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
        }
        before = sign;
    }
    return parts;
}

std::string squeezed_id(std::string_view id) {
    std::string text;
    for (const std::string& part : id_parts(id)) text += (text.empty() ? "" : ".") + part;
    return text;
}

bool is_before_by_number(std::string_view a, std::string_view b) {
    const std::vector<std::string> left = id_parts(a), right = id_parts(b);
    for (std::size_t i = 0; i < std::min(left.size(), right.size()); ++i) {
        if (left[i] == right[i]) continue;
        if (is_number(left[i]) && is_number(right[i]) && left[i].size() != right[i].size())
            return left[i].size() < right[i].size();
        return left[i] < right[i];
    }
    return left.size() != right.size() ? left.size() < right.size() : a < b;
}

} // namespace unstring
